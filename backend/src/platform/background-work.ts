import type { Logger } from './logger';

/** Work that goes on after its request was answered; shutting down waits for it. */
export class BackgroundWork {
  private readonly running = new Set<Promise<void>>();

  constructor(private readonly logger: Logger) {}

  /** Starts work whose failure is logged under the given name and otherwise has no effect. */
  start(name: string, work: () => Promise<void>): void {
    const promise = work().catch((err: unknown) => this.logger.error({ err, work: name }, 'background work failed'));
    this.running.add(promise);
    void promise.finally(() => this.running.delete(promise));
  }

  /** Resolves when everything started so far has ended. */
  async settled(): Promise<void> {
    await Promise.all(this.running);
  }
}
