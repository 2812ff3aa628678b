import type { Sequelize } from 'sequelize';
import type { Logger } from './logger';

const EVERY_MS = 3_600_000;

/** What may be forgotten, and after which time. A late repetition of a write finds its answer for a week. */
const FORGET = [
  "DELETE FROM idempotency_keys WHERE at < now() - interval '7 days'",
  "DELETE FROM tokens WHERE expires_at < now() - interval '30 days'",
  "DELETE FROM mails WHERE status <> 'queued' AND created_at < now() - interval '90 days'",
  'DELETE FROM sessions WHERE expire < now()',
] as const;

/** Removes what has outlived its use, once an hour. Several processes may do it at once. */
export class Housekeeping {
  private timer: NodeJS.Timeout | null = null;

  constructor(
    private readonly sequelize: Sequelize,
    private readonly logger: Logger,
  ) {}

  start(): void {
    this.timer = setInterval(() => void this.forget(), EVERY_MS);
    this.timer.unref();
  }

  stop(): void {
    if (this.timer !== null) clearInterval(this.timer);
  }

  /** One round; a failure is logged and tried again next time. */
  async forget(): Promise<void> {
    try {
      for (const statement of FORGET) await this.sequelize.query(statement);
    } catch (err) {
      this.logger.warn({ err }, 'housekeeping failed');
    }
  }
}
