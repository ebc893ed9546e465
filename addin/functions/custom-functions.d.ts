/** The part of the host's custom-functions runtime that this add-in uses. */
declare namespace CustomFunctions {
  /** A cell error; the message shows for #VALUE! and #N/A only. */
  class Error {
    constructor(code: string, message?: string);
    readonly code: string;
    readonly message: string;
  }
  /** Passed after the arguments of a cancelable function. */
  interface CancelableInvocation {
    onCanceled: () => void;
  }
  function associate(id: string, run: (...args: never[]) => unknown): void;
}
