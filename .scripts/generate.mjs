/**
 * `npm run generate`: everything that is made from functions.ts and committed:
 * functions.json and the function reference in README.md. With --check it writes
 * nothing and fails if a file is out of date.
 */
import { readFileSync, writeFileSync } from 'node:fs';
import { functionsJson, jsonFile } from './functions-json.mjs';

const readmeFile = new URL('../README.md', import.meta.url);
const START = '<!-- functions: made by npm run generate -->';
const END = '<!-- /functions -->';

function reference({ functions }) {
  return functions.map(section).join('\n');
}

function section({ name, description, parameters }) {
  const names = parameters.map(({ name, repeating }) => (repeating ? `${name}…` : name));
  const lines = parameters.map(
    ({ name, optional, description }) =>
      `- \`${name}\`${optional ? ' (optional)' : ''}: ${description}`,
  );
  return [
    `### \`UNDERCURVE.${name}(${names.join(', ')})\``,
    '',
    description,
    '',
    ...lines,
    '',
  ].join('\n');
}

function withReference(readme, text) {
  const [before, rest] = readme.split(START);
  const after = rest?.split(END)[1];
  if (after === undefined) throw new Error(`README.md: has no lines "${START}" and "${END}".`);
  return `${before}${START}\n\n${text}\n${END}${after}`;
}

const json = await functionsJson();
const made = [
  [jsonFile, json],
  [readmeFile, withReference(readFileSync(readmeFile, 'utf8'), reference(JSON.parse(json)))],
];
for (const [file, text] of made) {
  if (!process.argv.includes('--check')) writeFileSync(file, text);
  else if (readFileSync(file, 'utf8') !== text) {
    console.error(`${file}: out of date; run npm run generate.`);
    process.exitCode = 1;
  }
}
