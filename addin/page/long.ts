/**
 * Calls that may take long, on a page whose grid waits for nothing: such a call runs in
 * a Worker while its cell shows `#WORKING!`, and the cell is calculated again once the
 * answer is there. A cell that meanwhile asks for something else drops its first call.
 * The grid also tries a formula before it is in a cell; no call begins for that.
 *
 * Not handled: which calls those are (../functions/long.ts).
 */
import { LRUCache } from 'lru-cache';
import type { Background, BackgroundCall } from '../functions/background';
import type { Arguments, Reply } from '../functions/reply';
import type { CallPlace } from './register';

/** What a cell shows while its answer is being worked out. */
export const WORKING: string = '#WORKING!';
/** Answers kept hold this many cells together, about 64 MB. */
const MOST_CELLS = 2_000_000;

interface Waiting {
  readonly call: BackgroundCall;
  readonly places: Map<string, CallPlace>;
}

const textOf = ({ sheetId, col, row }: CallPlace): string => `${sheetId} ${col} ${row}`;

export class LongCalls {
  private readonly replies = new LRUCache<string, Reply>({
    maxSize: MOST_CELLS,
    sizeCalculation: (reply) =>
      'cells' in reply ? Math.max(1, reply.cells.length * (reply.cells[0]?.length ?? 1)) : 1,
  });
  private readonly waiting = new Map<string, Waiting>();

  /** `recalculate` is told the cells whose answers have come. */
  constructor(
    private readonly background: Background,
    private readonly recalculate: (places: readonly CallPlace[]) => void,
  ) {}

  /** The answer if it is there; else null, and the cell at `place` will be calculated again. */
  replyFor(name: string, args: Arguments, place: CallPlace | undefined): Reply | null {
    const key = JSON.stringify([name, args]);
    const known = this.replies.get(key);
    if (place === undefined) return known ?? null;
    this.leaveOthers(place, key);
    if (known) return known;
    let waiting = this.waiting.get(key);
    if (waiting === undefined) {
      waiting = { call: this.background.call(name, args), places: new Map() };
      this.waiting.set(key, waiting);
      void waiting.call.reply.then((reply) => this.finish(key, reply));
    }
    waiting.places.set(textOf(place), place);
    return null;
  }

  /** Drops every call under way, for a workbook that is no longer shown. */
  clear(): void {
    for (const { call } of this.waiting.values()) call.cancel();
    this.waiting.clear();
  }

  /** A cell waits for one call at a time; a call that no cell waits for is dropped. */
  private leaveOthers(place: CallPlace, key: string): void {
    for (const [other, { call, places }] of this.waiting) {
      if (other === key || !places.delete(textOf(place)) || places.size > 0) continue;
      this.waiting.delete(other);
      call.cancel();
    }
  }

  private finish(key: string, reply: Reply): void {
    const waiting = this.waiting.get(key);
    if (waiting === undefined) return;
    this.waiting.delete(key);
    this.replies.set(key, reply);
    this.recalculate([...waiting.places.values()]);
  }
}
