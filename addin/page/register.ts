/**
 * The functions of the catalogue as functions of the grid: UNDERCURVE.DRAW and the rest.
 *
 * A bad input shows #VALUE! with our message; an error cell in an argument comes
 * back as itself, message and origin included. Not handled here: the arguments'
 * meaning (the functions' own), recalculation (the grid's).
 */
import { addFunction, helpers, registries } from '@odoo/o-spreadsheet';
import { CellErrorPassed, InputError } from '../../src/index';
import { type CatalogueEntry, namespace } from '../functions/catalogue';
import { takesLong } from '../functions/long';
import { type Arguments, cellsOf, type Reply } from '../functions/reply';
import { type LongCalls, WORKING } from './long';
import { findErrorCell, type GridArgument, type GridCell, toColumns, toRange } from './translate';

/** The grid declares no repeating argument after optional ones, so givens are numbered. */
const GIVENS = 8;
const VALUE_ERROR = '#VALUE!';

/** Where a call was made: the sheet's id and the cell's column and row, counted from 0. */
export interface CallPlace {
  readonly sheetId: string;
  readonly col: number;
  readonly row: number;
}
/** Is told of every call, with its time in milliseconds. */
export type OnCall = (name: string, place: CallPlace | undefined, milliseconds: number) => void;

/** The reply to a call that may take long: null while it is on its way, undefined when the call is no such call. */
type ReplyLater = (args: Arguments) => Reply | null | undefined;

/**
 * Adds every function of the catalogue to the grid library, once per program. Without
 * `long` every call is answered at once.
 */
export function registerFunctions(
  catalogue: readonly CatalogueEntry[],
  onCall: OnCall,
  long: LongCalls | null = null,
): void {
  registries.errorTypes.add(VALUE_ERROR);
  registries.errorTypes.add(WORKING);
  for (const entry of catalogue) {
    const name = `${namespace}.${entry.name}`;
    addFunction(name, {
      description: entry.description,
      category: 'Undercurve',
      args: declareArguments(entry),
      compute(...args: readonly unknown[]) {
        const started = performance.now();
        const place = this.__originCellPosition;
        const later: ReplyLater = (ranges) =>
          long && takesLong(entry.name, ranges)
            ? long.replyFor(entry.name, ranges, place)
            : undefined;
        const format = place && this.getters.getCell(place)?.format;
        const result = answer(entry, args as readonly GridArgument[], later, format);
        onCall(entry.name, place, performance.now() - started);
        return result;
      },
    });
  }
}

/**
 * What the grid shows for a call: the columns of the result, numbers in `format` where their
 * cells have none of their own, or one error cell. Never throws.
 */
export function answer(
  entry: Pick<CatalogueEntry, 'call'>,
  args: readonly GridArgument[],
  later: ReplyLater = () => undefined,
  format?: string,
): GridCell | GridCell[][] {
  try {
    const ranges = args.map((argument) => toRange(argument, helpers.isEvaluationError));
    const reply = later(ranges);
    if (reply === null) return { value: WORKING, message: 'The proof is being worked out.' };
    return toColumns(reply ? cellsOf(reply) : entry.call(ranges), format);
  } catch (problem) {
    if (problem instanceof CellErrorPassed) {
      return findErrorCell(args, problem.code) ?? { value: problem.code, message: problem.code };
    }
    if (problem instanceof InputError) return { value: VALUE_ERROR, message: problem.message };
    return {
      value: VALUE_ERROR,
      message: problem instanceof Error ? problem.message : String(problem),
    };
  }
}

function declareArguments(entry: CatalogueEntry): ReturnType<typeof helpers.arg>[] {
  return entry.parameters.flatMap(({ name, description, optional, repeating }) => {
    const names = repeating ? Array.from({ length: GIVENS }, (_, i) => `${name}${i + 1}`) : [name];
    // Both "any" and "range": a single cell or value is welcome, and a range arrives whole.
    const kind = optional || repeating ? 'any, range, optional' : 'any, range';
    return names.map((each, i) =>
      helpers.arg(`${each} (${kind})`, i === 0 ? description : `As ${names[0]}.`),
    );
  });
}
