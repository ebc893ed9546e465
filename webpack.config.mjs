/**
 * All bundles of the project; pick one with `webpack --config-name`:
 *   addin  what Excel loads, with its manifest   -> .build/addin   (npm run build, npm run excel)
 *   page   the local workbook                    -> .build/page    (npm start)
 *   pane   the task pane beside it, offline      -> .build/pane    (npm start)
 *   cli    the command line                      -> .build/cli     (npm ci, through "prepare")
 *   bench  the timings                           -> .build/bench   (npm run bench)
 * The add-in's public address is one setting: UNDERCURVE_BASE_URL.
 */
import { chmodSync, existsSync, readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import CopyPlugin from 'copy-webpack-plugin';
import HtmlPlugin from 'html-webpack-plugin';
import webpack from 'webpack';
import { builtManifest, DEVELOPMENT_URL } from './.scripts/built-manifest.mjs';
import { checkedFunctionsJson } from './.scripts/functions-json.mjs';

const at = (path) => fileURLToPath(new URL(path, import.meta.url));
const officePackage = at('node_modules/@microsoft/office-js/dist');
/** The vendor asks that published add-ins load office.js from its own address. */
const OFFICE_ADDRESS = 'https://appsforoffice.microsoft.com';

function bundle(name, settings) {
  return {
    name,
    mode: 'production',
    // Never an eval-based source map: the pane's content security policy forbids eval.
    devtool: 'source-map',
    context: at('.'),
    output: { path: at(`.build/${name}`), clean: true },
    resolve: { extensions: ['.ts', '.js', '.json'] },
    module: { rules: [{ test: /\.ts$/, loader: 'swc-loader' }] },
    experiments: { css: true },
    performance: { hints: false },
    stats: 'errors-warnings',
    ...settings,
  };
}

const forBrowser = { target: ['web', 'es2022'] };
/** Node programs; the suffix keeps them CommonJS whatever package.json says. */
const forNode = (folder) => ({
  target: 'node20',
  output: { path: at(`.build/${folder}`), filename: '[name].cjs', clean: true },
});

/** The pane's page, with office.js from an address that its policy then allows. */
function panePage(chunks, office) {
  return new HtmlPlugin({
    template: 'addin/pane/pane.html',
    filename: 'pane.html',
    chunks,
    chunksSortMode: 'manual',
    inject: 'body',
    templateParameters: office,
  });
}

const icons = { from: 'addin/assets/icon-*.png', to: 'assets/[name][ext]' };

async function addin() {
  const functionsJson = await checkedFunctionsJson();
  const manifest = builtManifest(process.env.UNDERCURVE_BASE_URL || DEVELOPMENT_URL);
  const made = { 'functions.json': functionsJson, 'manifest.xml': manifest };
  return bundle('addin', {
    ...forBrowser,
    entry: {
      functions: './addin/functions/register.ts',
      pane: './addin/pane/pane.ts',
      worker: './addin/functions/worker.ts',
    },
    plugins: [
      panePage(['functions', 'pane'], {
        officeAddress: OFFICE_ADDRESS,
        officeScript: `${OFFICE_ADDRESS}/lib/1/hosted/office.js`,
        localWorkbook: '',
      }),
      new CopyPlugin({
        patterns: [
          icons,
          'addin/pane/support.html',
          ...Object.entries(made).map(([to, text]) => ({
            from: 'package.json',
            to,
            transform: () => text,
          })),
        ],
      }),
    ],
  });
}

function pane() {
  return bundle('pane', {
    ...forBrowser,
    entry: { pane: './addin/pane/pane.ts' },
    plugins: [
      panePage(['pane'], {
        officeAddress: '',
        officeScript: 'office/office.js',
        localWorkbook: '../',
      }),
      new CopyPlugin({
        patterns: [
          icons,
          'addin/pane/support.html',
          // Outside any host office.js loads these two and nothing else.
          ...['office.js', 'o15apptofilemappingtable.js'].map((file) => ({
            from: `${officePackage}/${file}`,
            to: `office/${file}`,
            info: { minimized: true },
          })),
        ],
      }),
    ],
  });
}

/** The LGPL-3 grid library stays a bundle of its own beside our code. */
function ownBundle(name, test) {
  return { name, test, chunks: 'all', enforce: true };
}

function page() {
  return bundle('page', {
    ...forBrowser,
    entry: { page: './addin/page/index.ts', worker: './addin/functions/worker.ts' },
    // Served from this machine: not minimizing saves half the build and keeps the library readable.
    optimization: {
      minimize: false,
      splitChunks: { cacheGroups: { grid: ownBundle('grid', /[\\/]@odoo[\\/]/) } },
    },
    resolve: {
      extensions: ['.ts', '.js', '.json'],
      mainFields: ['module', 'main'],
      // Its main file, which part of @stdlib asks for, is for Node.
      alias: { debug$: 'debug/src/browser.js' },
    },
    module: {
      rules: [
        { test: /\.ts$/, loader: 'swc-loader' },
        { test: /\.xml$/, type: 'asset/source' },
      ],
    },
    plugins: [
      new HtmlPlugin({
        template: 'addin/page/index.html',
        inject: 'body',
        minify: false,
        excludeChunks: ['worker'],
      }),
      new CopyPlugin({
        patterns: ['o-spreadsheet', 'owl'].map((name) => ({
          from: `node_modules/@odoo/${name}/LICENSE`,
          to: `licenses/${name}.txt`,
          toType: 'file',
        })),
      }),
    ],
  });
}

/** npx runs the file itself: a build must not take away what makes that possible. */
function makeExecutable(compiler) {
  compiler.hooks.afterEmit.tap('executable', () =>
    chmodSync(at('.build/cli/undercurve.cjs'), 0o755),
  );
}

function cli() {
  return bundle('cli', {
    ...forNode('cli'),
    entry: { undercurve: './addin/cli/undercurve.ts' },
    plugins: [
      new webpack.BannerPlugin({ banner: '#!/usr/bin/env node', raw: true }),
      { apply: makeExecutable },
    ],
  });
}

/** Each test/bench/NAME.bench.ts is a program of its own. */
function bench() {
  const folder = at('test/bench');
  const files = existsSync(folder) ? readdirSync(folder) : [];
  const programs = files.filter((file) => file.endsWith('.bench.ts'));
  return bundle('bench', {
    ...forNode('bench'),
    entry: Object.fromEntries(
      programs.map((file) => [file.replace('.bench.ts', ''), `./test/bench/${file}`]),
    ),
  });
}

export default async () => [await addin(), pane(), page(), cli(), bench()];
