/** The words with which a call is refused, for tests that assert all of them. */
import { CellErrorPassed, InputError } from '../src/errors';

/** The message with which a call refuses its input; a fault of ours is thrown on. */
export function messageOf(call: () => unknown): string {
  try {
    call();
  } catch (error) {
    if (error instanceof InputError || error instanceof CellErrorPassed) return error.message;
    throw error;
  }
  return 'nothing was refused';
}
