/**
 * Prepares the grid library for our functions, once per program and before the
 * first model: the functions themselves, references to spills, and its wording.
 */
import { catalogue } from '../functions/catalogue';
import { CallLog } from './calls';
import type { LongCalls } from './long';
import { registerFunctions } from './register';
import { correctSpillReferences } from './spill';
import { sayInOurWords } from './wording';

/**
 * Without `long` every call is answered at once.
 * @returns the log of all calls of our functions from now on.
 */
export function prepareLibrary(long: LongCalls | null = null): CallLog {
  const log = new CallLog();
  sayInOurWords();
  correctSpillReferences();
  registerFunctions(catalogue, log.note, long);
  return log;
}
