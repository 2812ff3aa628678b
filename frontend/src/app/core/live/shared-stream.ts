import { Observable } from 'rxjs';

/**
 * The messages of one server-sent event stream, shared by all tabs of this browser: HTTP/1.1 allows six connections
 * per origin, so the tab that holds the lock reads and tells the others. When it closes, the next one takes over.
 */
export function sharedStream(url: string): Observable<string> {
  return new Observable<string>((subscriber) => {
    const name = `deltaproof ${url}`;
    const ended = new AbortController();
    const channel = new BroadcastChannel(name);
    channel.onmessage = (message: MessageEvent<string>) => subscriber.next(message.data);

    const read = (): Promise<void> =>
      new Promise((resolve) => {
        if (ended.signal.aborted) return resolve();
        const source = new EventSource(url);
        const pass = (message: MessageEvent<string>): void => {
          subscriber.next(message.data);
          channel.postMessage(message.data);
        };
        for (const kind of ['revision', 'reset']) source.addEventListener(kind, pass);
        ended.signal.addEventListener('abort', () => {
          source.close();
          resolve();
        });
      });

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
