/** `npm run bench [-- NAME …]`: runs the programs of test/bench, one after the other. */
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { build } from './build.mjs';

await build(['bench']);
const wanted = process.argv.slice(2);
const programs = readdirSync('.build/bench')
  .filter((file) => file.endsWith('.cjs'))
  .map((file) => file.replace('.cjs', ''))
  .filter((name) => wanted.length === 0 || wanted.includes(name));
if (programs.length === 0) {
  console.error(`Bench: no program ${wanted.join(', ')}; see test/bench.`);
  process.exitCode = 1;
}
for (const name of programs) {
  console.log(`\n${name}`);
  const run = spawnSync(process.execPath, ['--enable-source-maps', `.build/bench/${name}.cjs`], {
    stdio: 'inherit',
  });
  if (run.status !== 0) process.exitCode = 1;
}
