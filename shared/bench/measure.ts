/** One line of the benchmark's answer. Times in ms of processor time, memory in MB; `ratio` is peer / ours. */
export interface Line {
  readonly group: string;
  readonly name: string;
  readonly ours: number;
  readonly peer: number;
  readonly peerName: string;
  readonly ratio: number;
  /** In words; the comparison that `met` answers. */
  readonly target: string;
  readonly met: boolean;
}

/** Makes a line; `least` is what peer / ours must reach, absent for figures shown for comparison only. */
export function lineOf(
  group: string,
  name: string,
  ours: number,
  peer: number,
  peerName: string,
  least?: number,
): Line {
  const ratio = peer / ours;
  const target = least === undefined ? 'for comparison' : `ratio ≥ ${least}`;
  return { group, name, ours, peer, peerName, ratio, target, met: least === undefined || ratio >= least };
}

/** Repeated work: `i` counts calls, so that the work can alternate between two edits. */
type Work = (i: number) => void;

/** Long enough for the clock. */
const BATCH_MS = 0.5;
/** How long one work is timed before the next has its turn, and how many turns each has. */
const TURN_MS = 30;
const TURNS = 12;
/** Time and calls before timing begins, so that the JavaScript engine has compiled what it will compile. */
const WARM_UP_MS = 250;
const WARM_UP_CALLS = 20;

/**
 * Processor time of this process so far in ms, helper threads included. On a quiet machine it runs with the clock; on a
 * busy one the clock would measure the others.
 */
function processorTime(): number {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1000;
}

/** Median time of one call in ms for each of several works, which take turns. */
export function typicalTimes(works: readonly Work[]): number[] {
  const runners = works.map((work) => new Runner(work));
  for (let turn = 0; turn < TURNS; turn++) for (const runner of runners) runner.turn();
  return runners.map((runner) => median(runner.samples));
}

class Runner {
  readonly samples: number[] = [];
  private calls = 0;
  private batch = 1;

  constructor(private readonly work: Work) {
    const until = processorTime() + WARM_UP_MS;
    while (this.calls < WARM_UP_CALLS || processorTime() < until) this.work(this.calls++);
    while (this.time() < BATCH_MS && this.batch < 1e6) this.batch *= 2;
  }

  /** One call before timing brings the work's data back into the caches. */
  turn(): void {
    const until = processorTime() + TURN_MS;
    this.work(this.calls++);
    do this.samples.push(this.time() / this.batch);
    while (processorTime() < until);
  }

  private time(): number {
    const started = processorTime();
    for (let i = 0; i < this.batch; i++) this.work(this.calls++);
    return processorTime() - started;
  }
}

/** Time of one call in ms, for work that is done once. */
export function onceTime<T>(work: () => T): { ms: number; result: T } {
  collect();
  const started = processorTime();
  const result = work();
  return { ms: processorTime() - started, result };
}

/** Memory that a result keeps alive, in MB: heap and array buffers after garbage collection. */
export function keptMemory<T>(make: () => T): { mb: number; result: T } {
  collect();
  const before = used();
  const result = make();
  collect();
  return { mb: (used() - before) / 1e6, result };
}

function used(): number {
  const { heapUsed, arrayBuffers } = process.memoryUsage();
  return heapUsed + arrayBuffers;
}

function collect(): void {
  for (let i = 0; i < 3; i++) globalThis.gc?.();
}

function median(samples: readonly number[]): number {
  const sorted = [...samples].sort((a, b) => a - b);
  return sorted[sorted.length >> 1] ?? NaN;
}
