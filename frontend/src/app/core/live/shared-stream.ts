import { Observable } from 'rxjs';

/** Kinds of message that the server sends: a revision with what made it, or that too much was missed to list. */
const KINDS = ['revision', 'reset'];
const REOPEN_AFTER = 5000;

/**
 * The messages of one server-sent event stream, shared by all tabs of this browser: HTTP/1.1 allows six connections
 * per origin, so the tab that holds the lock reads and tells the others. When it closes, the next one takes over; the
 * server then opens with the revision that stands, so nothing is missed in between.
 */
export function sharedStream(url: string): Observable<string> {
  return new Observable<string>((subscriber) => {
    const name = `deltaproof ${url}`;
    const ended = new AbortController();
    const channel = new BroadcastChannel(name);
    channel.onmessage = (message: MessageEvent<string>) => subscriber.next(message.data);

    const read = async (): Promise<void> => {
      while (!ended.signal.aborted) {
        await readUntilClosed(url, ended.signal, (data) => {
          subscriber.next(data);
          channel.postMessage(data);
        });
        await pause(REOPEN_AFTER, ended.signal);
      }
    };

    // Without a secure context there are no locks; then each tab reads for itself.
    if ('locks' in navigator) {
      navigator.locks.request(name, { signal: ended.signal }, read).catch((error: unknown) => {
        if (!ended.signal.aborted) subscriber.error(error);
      });
    } else {
      void read();
    }

    return () => {
      ended.abort();
      channel.close();
    };
  });
}

/** Reads one stream until it is refused for good (the browser itself comes back after a cut) or no longer wanted. */
function readUntilClosed(url: string, signal: AbortSignal, pass: (data: string) => void): Promise<void> {
  return new Promise((resolve) => {
    const source = new EventSource(url);
    const close = (): void => {
      source.close();
      resolve();
    };
    for (const kind of KINDS) source.addEventListener(kind, (message: MessageEvent<string>) => pass(message.data));
    source.addEventListener('error', () => {
      if (source.readyState === EventSource.CLOSED) close();
    });
    signal.addEventListener('abort', close);
  });
}

function pause(milliseconds: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    if (signal.aborted) return resolve();
    const timer = setTimeout(resolve, milliseconds);
    signal.addEventListener('abort', () => {
      clearTimeout(timer);
      resolve();
    });
  });
}
