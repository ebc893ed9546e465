/**
 * Prepares the grid library for our functions, once per program and before the
 * first model: the functions themselves, references to spills, and its wording.
 */
import { catalogue } from '../functions/catalogue';
import { CallLog } from './calls';
import { registerFunctions } from './register';
import { correctSpillReferences } from './spill';
import { sayInOurWords } from './wording';

/** @returns the log of all calls of our functions from now on. */
export function prepareLibrary(): CallLog {
  const log = new CallLog();
  sayInOurWords();
  correctSpillReferences();
  registerFunctions(catalogue, log.note);
  return log;
}
