/**
 * Counts the calls of our functions by the cell that makes them, so that the page
 * and the tests can show that an edit recalculates only what depends on it.
 */
import type { CallPlace, OnCall } from './register';

export class CallLog {
  private readonly counts = new Map<string, { place: CallPlace; calls: number }>();
  private recent = { calls: 0, milliseconds: 0 };

  readonly note: OnCall = (_name, place, milliseconds) => {
    this.recent.calls++;
    this.recent.milliseconds += milliseconds;
    if (place === undefined) return;
    const key = `${place.sheetId} ${place.col} ${place.row}`;
    const entry = this.counts.get(key);
    if (entry) entry.calls++;
    else this.counts.set(key, { place, calls: 1 });
  };

  /** Forgets the calls of a workbook that is no longer shown. */
  clear(): void {
    this.counts.clear();
    this.takeRecent();
  }

  /** Every cell that has made calls, with how many. */
  all(): readonly { readonly place: CallPlace; readonly calls: number }[] {
    return [...this.counts.values()];
  }

  /** Calls since the last time this was asked. */
  takeRecent(): { readonly calls: number; readonly milliseconds: number } {
    const { recent } = this;
    this.recent = { calls: 0, milliseconds: 0 };
    return recent;
  }
}
