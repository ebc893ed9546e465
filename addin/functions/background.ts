/**
 * Calls in a Worker, one at a time and in order, so that a long proof never holds the
 * page. A call that is no longer wanted is dropped; the one under way is ended together
 * with its Worker, and the next one starts a new Worker.
 *
 * Not handled: which calls are worth it (long.ts).
 */
import type { Arguments, Reply } from './reply';
import { replyOf } from './reply';

/** What a Worker is asked. */
export interface Task {
  readonly name: string;
  readonly args: Arguments;
}

export interface BackgroundCall {
  /** Never fails; never settles once the call is cancelled. */
  readonly reply: Promise<Reply>;
  cancel(): void;
}

/** The part of a Worker that is used. */
export type Helper = Pick<Worker, 'postMessage' | 'terminate' | 'onmessage' | 'onerror'>;

interface Waiting extends Task {
  readonly settle: (reply: Reply) => void;
}

export class Background {
  private helper: Helper | null = null;
  /** The first one is under way. */
  private readonly calls: Waiting[] = [];

  constructor(private readonly start: () => Helper) {}

  call(name: string, args: Arguments): BackgroundCall {
    let settle!: (reply: Reply) => void;
    const reply = new Promise<Reply>((resolve) => (settle = resolve));
    const waiting: Waiting = { name, args, settle };
    this.calls.push(waiting);
    if (this.calls.length === 1) this.next();
    return { reply, cancel: () => this.cancel(waiting) };
  }

  private next(): void {
    const first = this.calls[0];
    if (first === undefined) return;
    this.helper ??= this.started();
    const { name, args } = first;
    this.helper.postMessage({ name, args } satisfies Task);
  }

  private started(): Helper {
    const helper = this.start();
    helper.onmessage = ({ data }: MessageEvent<Reply>) => this.finish(data);
    // A Worker that cannot be loaded or breaks: the same answer, without it.
    helper.onerror = () => {
      this.end();
      const first = this.calls[0];
      if (first) this.finish(replyOf(first.name, first.args));
    };
    return helper;
  }

  private finish(reply: Reply): void {
    this.calls.shift()?.settle(reply);
    this.next();
  }

  private cancel(waiting: Waiting): void {
    const at = this.calls.indexOf(waiting);
    if (at < 0) return;
    this.calls.splice(at, 1);
    if (at > 0) return;
    this.end();
    this.next();
  }

  private end(): void {
    this.helper?.terminate();
    this.helper = null;
  }
}
