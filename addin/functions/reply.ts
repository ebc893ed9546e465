/**
 * A function's answer as plain data that can pass between threads: its cells, or which
 * of the three kinds of failure it was.
 */
import { CellErrorPassed, InputError } from '../../src/index';
import type { Range } from '../../src/index';
import { catalogue } from './catalogue';

export type Arguments = readonly (Range | null)[];

export type Reply =
  | { readonly cells: Range }
  | {
      readonly wrong: { readonly where: string; readonly found: string; readonly expected: string };
    }
  | { readonly passed: string }
  | { readonly fault: string };

/** Calls a function of the catalogue; never throws. */
export function replyOf(name: string, args: Arguments): Reply {
  try {
    const entry = catalogue.find((candidate) => candidate.name === name);
    if (entry === undefined) throw new Error(`bug: ${name} is not in the catalogue`);
    return { cells: entry.call(args) };
  } catch (failure) {
    if (failure instanceof InputError) {
      const { where, found, expected } = failure;
      return { wrong: { where, found, expected } };
    }
    if (failure instanceof CellErrorPassed) return { passed: failure.code };
    return { fault: failure instanceof Error ? failure.message : String(failure) };
  }
}

/** The cells of a reply. @throws what the call threw. */
export function cellsOf(reply: Reply): Range {
  if ('cells' in reply) return reply.cells;
  if ('wrong' in reply) {
    const { where, found, expected } = reply.wrong;
    throw new InputError(where, found, expected);
  }
  if ('passed' in reply) throw new CellErrorPassed(reply.passed);
  throw new Error(reply.fault);
}
