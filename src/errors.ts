/**
 * The two ways a call can fail through its input. A fault of ours is a plain
 * `Error("bug: …")` instead, so that the two are never mistaken for each other.
 */

/** Bad input: where it is, what was found there, what would be right. */
export class InputError extends Error {
  override readonly name = 'InputError';

  constructor(
    readonly where: string,
    readonly found: string,
    readonly expected: string,
  ) {
    super(`${where}: ${found}; ${expected}.`);
  }

  /** The same complaint with the place named more exactly, e.g. the line of a list. */
  within(place: string): InputError {
    return new InputError(`${place}, ${lowerFirst(this.where)}`, this.found, this.expected);
  }
}

/** An argument holds an error cell; the call answers with that same error. */
export class CellErrorPassed extends Error {
  override readonly name = 'CellErrorPassed';

  constructor(readonly code: string) {
    super(code);
  }
}

/** A broken promise of this program itself. */
export function bug(what: string): Error {
  return new Error(`bug: ${what}`);
}

function lowerFirst(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1);
}
