/** Timings on a machine that others use too: many short runs in turn, and their medians. */

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const half = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[half]! : (sorted[half - 1]! + sorted[half]!) / 2;
}

/**
 * Seconds that `run` takes of one thread: the lesser of the processor's time, in which waiting for
 * others on the machine does not count but the engine's helpers do (memory is cleared by several
 * threads at once), and the clock's, in which it is the other way round.
 */
export function seconds(run: () => void): number {
  const [start, started] = [process.cpuUsage(), performance.now()];
  run();
  const clock = (performance.now() - started) / 1e3;
  const { user, system } = process.cpuUsage(start);
  return Math.min(clock, (user + system) / 1e6);
}

/** The seconds of each run in `rounds` rounds, the runs taking turns. */
export function inTurn(
  runs: readonly (() => void)[],
  rounds: number,
): readonly (readonly number[])[] {
  const times: number[][] = runs.map(() => []);
  for (let round = 0; round < rounds; round++)
    runs.forEach((run, i) => times[i]!.push(seconds(run)));
  return times;
}

/** Prints lines of cells in columns, texts to the left and numbers to the right. */
export function printTable(lines: readonly (readonly (string | number)[])[]): void {
  const texts = lines.map((line) => line.map(String));
  const widths = texts[0]!.map((_, j) => Math.max(...texts.map((line) => line[j]!.length)));
  texts.forEach((line, i) => {
    const cells = line.map((text, j) =>
      typeof lines[Math.max(1, i)]?.[j] === 'number' || (i > 0 && /^[\d.,]+( |$)/.test(text))
        ? text.padStart(widths[j]!)
        : text.padEnd(widths[j]!),
    );
    console.log(cells.join('  ').trimEnd());
  });
}
