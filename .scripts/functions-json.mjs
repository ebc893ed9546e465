/**
 * Makes addin/functions/functions.json from the comments of functions.ts.
 *
 *   node .scripts/functions-json.mjs           writes the file
 *
 * The metadata tool reports errors but succeeds all the same; here an error stops
 * the build. Its library is called, not its command, so no usage data is involved.
 */
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import metadata from 'custom-functions-metadata';

export const sourceFile = fileURLToPath(
  new URL('../addin/functions/functions.ts', import.meta.url),
);
export const jsonFile = fileURLToPath(
  new URL('../addin/functions/functions.json', import.meta.url),
);
/** The host refuses a larger file. */
const LARGEST_BYTES = 1_000_000;

/** The text of functions.json for a source file; throws on any metadata error. */
export async function functionsJson(source = sourceFile) {
  const result = await metadata.generateCustomFunctionsMetadata(source, false);
  if (result.errors.length > 0) {
    throw new Error(`Function metadata: ${result.errors.join('\n')}`);
  }
  // The tool has no tag for this: without it an error cell never reaches the function.
  const json = { allowErrorForDataTypeAny: true, ...JSON.parse(result.metadataJson) };
  for (const { name, description, parameters } of json.functions) {
    for (const item of [{ name, description }, ...parameters]) {
      if (!item.description) {
        throw new Error(
          `Function metadata: ${name} says nothing about ${item.name}; describe it in functions.ts.`,
        );
      }
    }
  }
  const text = `${JSON.stringify(json, null, 2)}\n`;
  const bytes = Buffer.byteLength(text);
  if (bytes > LARGEST_BYTES) {
    throw new Error(`Function metadata: ${bytes} bytes; the host takes at most ${LARGEST_BYTES}.`);
  }
  return text;
}

/** The committed functions.json, once it is certain that it belongs to functions.ts. */
export async function checkedFunctionsJson() {
  const text = await functionsJson();
  if (text !== readFileSync(jsonFile, 'utf8')) {
    throw new Error(
      'addin/functions/functions.json: differs from functions.ts; run npm run generate.',
    );
  }
  return text;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  writeFileSync(jsonFile, await functionsJson());
}
