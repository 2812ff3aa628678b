import { QueryTypes } from 'sequelize';
import { ProblemError } from '../middleware/problems';
import type { Services } from '../services';

const EVERY_MS = 60_000;

interface DueDeparture {
  readonly studyId: string;
  readonly id: string;
  readonly version: number;
  readonly expires: string;
  readonly deciderId: string;
}

/**
 * Ends departures whose last day (UTC, by the database's clock) is over, once a minute, by the one path for edits. The
 * record names who granted the departure: that decision said when it ends. Several processes may do it at once; the
 * version that each saw lets only one of them through.
 */
export class ExpireDepartures {
  private timer: NodeJS.Timeout | null = null;
  private running: Promise<void> | null = null;

  constructor(private readonly services: Pick<Services, 'sequelize' | 'edits' | 'logger'>) {}

  start(): void {
    this.timer = setInterval(() => this.begin(), EVERY_MS);
    this.timer.unref();
    this.begin();
  }

  /** Starts no further round and resolves when the one under way has ended. */
  async stop(): Promise<void> {
    if (this.timer !== null) clearInterval(this.timer);
    await this.running;
  }

  /** One round; a failure is logged and tried again next time. */
  async expire(): Promise<void> {
    try {
      for (const departure of await this.due()) await this.expireOne(departure);
    } catch (err) {
      this.services.logger.warn({ err }, 'departures could not be looked through');
    }
  }

  private begin(): void {
    this.running ??= this.expire().finally(() => (this.running = null));
  }

  private due(): Promise<DueDeparture[]> {
    return this.services.sequelize.query<DueDeparture>(
      `SELECT study_id AS "studyId", id, version, expires::text AS expires, body->'decision'->>'personId' AS "deciderId"
         FROM departures
        WHERE state = 'in force' AND expires < (now() AT TIME ZONE 'UTC')::date
        ORDER BY study_id, key`,
      { type: QueryTypes.SELECT },
    );
  }

  private async expireOne({ studyId, id, version, expires, deciderId }: DueDeparture): Promise<void> {
    const { edits, logger } = this.services;
    try {
      await edits.edit(
        { studyId, personId: deciderId, roles: [] },
        { commands: [{ type: 'departure.expire', id, version }], why: `Its last day was ${expires}.` },
        { authority: 'system' },
      );
    } catch (err) {
      // Another process, or the chair, was quicker.
      if (err instanceof ProblemError && err.code === 'stale') return;
      logger.warn({ err, studyId, departure: id }, 'a departure could not be expired');
    }
  }
}
