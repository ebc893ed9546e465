/**
 * Between the workbook host and the catalogue: what the host passes for a cell
 * becomes a cell of ours, the answer's cells become what the host can show, and
 * every failure becomes a cell error with the message in it.
 *
 * Calls that may take long are answered by a Worker where there is one, and dropped when
 * the host says that they are no longer needed. Not handled: streaming.
 */
import { CellErrorPassed, InputError } from '../../src/index';
import type { Cell, Range } from '../../src/index';
import { Background } from './background';
import { takesLong } from './long';
import { cellsOf, replyOf } from './reply';
import type { Reply } from './reply';

/** On the web a request or response holds 5 MB, about this many cells of random numbers. */
const MOST_CELLS_ON_WEB = 200_000;

/** Ranges as the host passes them; an omitted argument is null or undefined. */
type HostRange = readonly (readonly unknown[])[] | null | undefined;

/** How the host tells that an answer is no longer needed. */
type Invocation = Pick<CustomFunctions.CancelableInvocation, 'onCanceled'> | null | undefined;

/** Holds no results: only the Worker and the calls that wait for it. */
const background =
  typeof Worker === 'undefined' ? null : new Background(() => new Worker('worker.js'));

/** The named function's answer in the host's terms, or the host's error for what went wrong. */
export function answer(
  name: string,
  fixed: readonly HostRange[],
  repeated: readonly HostRange[] | null | undefined,
): unknown[][] {
  return toHost(replyOf(name, [...fixed, ...(repeated ?? [])].map(rangeFromHost)));
}

/** As `answer`, for functions whose calls may take long. */
export async function answerLater(
  name: string,
  fixed: readonly HostRange[],
  repeated: readonly HostRange[] | null | undefined,
  invocation: Invocation,
): Promise<unknown[][]> {
  const args = [...fixed, ...(repeated ?? [])].map(rangeFromHost);
  if (background === null || !takesLong(name, args)) return toHost(replyOf(name, args));
  const call = background.call(name, args);
  if (invocation) invocation.onCanceled = () => call.cancel();
  return toHost(await call.reply);
}

function toHost(reply: Reply): unknown[][] {
  try {
    const result = cellsOf(reply);
    refuseTooManyCells(result);
    return result.map((row) => row.map(cellToHost));
  } catch (failure) {
    // eslint-disable-next-line @typescript-eslint/only-throw-error -- the host's own kind of error
    throw errorToHost(failure);
  }
}

function rangeFromHost(range: HostRange): Range | null {
  // A range holds at least one row: hosts may pass an empty array for what was omitted.
  if (range === null || range === undefined || range.length === 0) return null;
  return range.map((row) => row.map(cellFromHost));
}

function cellFromHost(value: unknown): Cell {
  switch (typeof value) {
    case 'number':
    case 'boolean':
      return value;
    case 'string':
      return value === '' ? null : value;
    case 'object':
      return value === null ? null : cellFromObject(value);
    default:
      return null;
  }
}

/** Errors come as objects with a code; formatted values carry the plain one as basicValue. */
function cellFromObject(value: object): Cell {
  if ('code' in value && typeof value.code === 'string') return { error: value.code };
  if ('type' in value && value.type === 'Empty') return null;
  if (!('basicValue' in value)) return { error: '#VALUE!' };
  if ('type' in value && value.type === 'Error') return { error: String(value.basicValue) };
  return cellFromHost(value.basicValue);
}

function cellToHost(cell: Cell): unknown {
  // The host shows null, NaN and infinities as 0: none of them may leave as they are.
  if (cell === null) return '';
  if (typeof cell === 'number' && !Number.isFinite(cell)) {
    return new CustomFunctions.Error('#NUM!');
  }
  if (typeof cell === 'object') return new CustomFunctions.Error(cell.error);
  return cell;
}

function refuseTooManyCells(result: Range): void {
  const nCells = result.length * (result[0]?.length ?? 0);
  if (nCells > MOST_CELLS_ON_WEB && onWeb()) {
    throw new InputError(
      'Result',
      `${nCells} cells are more than the web host takes`,
      `ask for at most ${MOST_CELLS_ON_WEB} cells (rows times columns), or use the desktop`,
    );
  }
}

function onWeb(): boolean {
  return (
    typeof Office !== 'undefined' && Office.context?.platform === Office.PlatformType.OfficeOnline
  );
}

function errorToHost(failure: unknown): CustomFunctions.Error {
  if (failure instanceof CellErrorPassed) return new CustomFunctions.Error(failure.code);
  const message = failure instanceof Error ? failure.message : String(failure);
  return new CustomFunctions.Error('#VALUE!', message);
}
