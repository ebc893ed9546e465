/**
 * The manifest as it is published: manifest/manifest.xml names the development
 * address, which is what `npm run excel` serves; here the public one replaces it.
 */
import { readFileSync } from 'node:fs';

export const DEVELOPMENT_URL = 'https://localhost:3000';

/** The manifest with every address under baseUrl; a base that Excel would refuse throws. */
export function builtManifest(baseUrl) {
  const url = URL.canParse(baseUrl) ? new URL(baseUrl) : undefined;
  if (url?.protocol !== 'https:' || url.search || url.hash) {
    throw new Error(
      `UNDERCURVE_BASE_URL: "${baseUrl}" is no address for an add-in; give one such as https://example.com/undercurve.`,
    );
  }
  const source = readFileSync(new URL('../manifest/manifest.xml', import.meta.url), 'utf8');
  return source.replaceAll(DEVELOPMENT_URL, url.href.replace(/\/$/, ''));
}
