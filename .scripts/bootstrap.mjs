/**
 * Installs the locked packages when they are missing or differ from the lock.
 * Runs before `npm start` and `npm test`, so it may use Node's own modules only.
 */
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));

function packagesOf(lockFile) {
  return JSON.parse(readFileSync(`${root}/${lockFile}`, 'utf8')).packages;
}

function installed() {
  // npm writes this file last, so it is absent after an interrupted installation.
  if (!existsSync(`${root}/node_modules/.package-lock.json`)) return false;
  const present = packagesOf('node_modules/.package-lock.json');
  return Object.entries(packagesOf('package-lock.json')).every(
    ([path, wanted]) => path === '' || wanted.optional || present[path]?.version === wanted.version,
  );
}

const oldest = 20;
if (Number(process.versions.node.split('.')[0]) < oldest) {
  console.error(
    `Node: version ${process.versions.node} is too old; install Node ${oldest} or newer.`,
  );
  process.exit(1);
}
if (!installed()) {
  console.log('Installing the locked packages (npm ci) …');
  const npm = process.env.npm_execpath;
  const run = npm
    ? spawnSync(process.execPath, [npm, 'ci'], { cwd: root, stdio: 'inherit' })
    : spawnSync('npm ci', { cwd: root, stdio: 'inherit', shell: true });
  process.exit(run.status ?? 1);
}
