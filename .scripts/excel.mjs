/**
 * `npm run excel`: serves the add-in for Excel at https://localhost:3000, the
 * address in manifest/manifest.xml, and rebuilds it when a file changes. Another
 * port would not match the manifest, so a taken one is an error.
 *
 * The certificate comes from the office tool's library (not its command, so no
 * usage data); the first time the system asks whether to trust it.
 */
import { once } from 'node:events';
import { createServer } from 'node:net';
import devCerts from 'office-addin-dev-certs';
import webpack from 'webpack';
import DevServer from 'webpack-dev-server';
import configurations from '../webpack.config.mjs';

const PORT = 3000;

// The development server would end with a stack of its own.
const probe = createServer().listen(PORT, 'localhost');
try {
  await once(probe, 'listening');
  probe.close();
} catch {
  console.error(
    `Port ${PORT}: is taken; end the program that uses it, the manifest names this port.`,
  );
  process.exit(1);
}

const addin = (await configurations()).find(({ name }) => name === 'addin');
const server = new DevServer(
  {
    host: 'localhost',
    port: PORT,
    server: { type: 'https', options: await devCerts.getHttpsServerOptions() },
    // The host's web views load the pane and functions.json from another origin.
    headers: { 'Access-Control-Allow-Origin': '*' },
    // Its injected styles and evaluated updates would break the pane's security policy.
    hot: false,
    client: { overlay: false },
    static: false,
  },
  webpack({ ...addin, mode: 'development' }),
);
await server.start();
console.log('Load manifest/manifest.xml in Excel; README.md tells how.');
