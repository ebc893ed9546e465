/**
 * Entry of the functions bundle: ties every name in functions.json to its function.
 * Outside a workbook host there is nothing to register with, and that is fine.
 */
import * as functions from './functions';
import { catalogue } from './catalogue';

const byName = new Map<string, (...args: never[]) => unknown>(
  Object.entries(functions).map(([name, run]) => [name.toUpperCase(), run]),
);

if (typeof CustomFunctions !== 'undefined') {
  for (const { name } of catalogue) {
    const run = byName.get(name);
    if (run === undefined) throw new Error(`bug: ${name} has no function in functions.ts`);
    CustomFunctions.associate(name, run);
  }
}
