/** The command line was used wrongly, as opposed to a function given wrong input. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}
