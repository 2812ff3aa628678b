import { sharedStream } from './shared-stream';

/** Stands for the browser's EventSource: remembers what was opened, lets a test speak for the server. */
class FakeSource extends EventTarget {
  static readonly CLOSED = 2;
  static opened: FakeSource[] = [];
  readyState = 1;

  constructor(readonly url: string) {
    super();
    FakeSource.opened.push(this);
  }

  close(): void {
    this.readyState = FakeSource.CLOSED;
  }

  say(kind: string, data: string): void {
    this.dispatchEvent(new MessageEvent(kind, { data }));
  }

  refuse(): void {
    this.readyState = FakeSource.CLOSED;
    this.dispatchEvent(new Event('error'));
  }
}

/** Channels of one browser: what one posts, the others of its name hear. */
class FakeChannel {
  static all: FakeChannel[] = [];
  onmessage: ((message: { data: string }) => void) | null = null;

  constructor(readonly name: string) {
    FakeChannel.all.push(this);
  }

  postMessage(data: string): void {
    for (const other of FakeChannel.all) if (other !== this && other.name === this.name) other.onmessage?.({ data });
  }

  close(): void {
    FakeChannel.all = FakeChannel.all.filter((channel) => channel !== this);
  }
}

/** One lock per name, granted in turn. */
function fakeLocks() {
  const tails = new Map<string, Promise<unknown>>();
  return {
    request: (name: string, { signal }: { signal: AbortSignal }, work: () => Promise<void>): Promise<void> => {
      const turn = (tails.get(name) ?? Promise.resolve()).then(() => (signal.aborted ? undefined : work()));
      tails.set(name, turn);
      return turn;
    },
  };
}

describe('sharedStream', () => {
  const settle = async (): Promise<void> => {
    for (let turn = 0; turn < 10; turn += 1) await Promise.resolve();
  };

  beforeEach(() => {
    jest.useFakeTimers();
    FakeSource.opened = [];
    FakeChannel.all = [];
    Object.assign(globalThis, { EventSource: FakeSource, BroadcastChannel: FakeChannel });
    Object.defineProperty(navigator, 'locks', { value: fakeLocks(), configurable: true });
  });
  afterEach(() => jest.useRealTimers());

  function tab(heard: string[]) {
    return sharedStream('/api/studies/PETREL/events').subscribe((data) => heard.push(data));
  }

  it('opens one connection for two tabs, both of which hear everything once', async () => {
    const [first, second]: [string[], string[]] = [[], []];
    const leader = tab(first);
    const follower = tab(second);
    await settle();
    expect(FakeSource.opened).toHaveLength(1);
    FakeSource.opened[0]?.say('revision', 'r419');
    expect([first, second]).toEqual([['r419'], ['r419']]);

    // The reading tab closes: the other takes over.
    leader.unsubscribe();
    await settle();
    expect(FakeSource.opened).toHaveLength(2);
    FakeSource.opened[1]?.say('reset', 'r425');
    expect([first, second]).toEqual([['r419'], ['r419', 'r425']]);
    follower.unsubscribe();
    expect(FakeSource.opened.every((source) => source.readyState === FakeSource.CLOSED)).toBe(true);
  });

  it('opens again after a refusal, but not once nobody listens', async () => {
    const subscription = tab([]);
    await settle();
    FakeSource.opened[0]?.refuse();
    await settle();
    jest.advanceTimersByTime(5000);
    await settle();
    expect(FakeSource.opened).toHaveLength(2);
    FakeSource.opened[1]?.refuse();
    subscription.unsubscribe();
    await settle();
    jest.advanceTimersByTime(20_000);
    await settle();
    expect(FakeSource.opened).toHaveLength(2);
  });
});
