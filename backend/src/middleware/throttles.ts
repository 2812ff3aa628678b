import { createHash } from 'node:crypto';
import type { Pool } from 'pg';
import {
  type RateLimiterAbstract,
  RateLimiterMemory,
  RateLimiterPostgres,
  RateLimiterRes,
} from 'rate-limiter-flexible';
import type { SignInLimits } from '../platform/config';
import { TooMany } from './problems';

const MAILS = 3;
const MAIL_REQUESTS_PER_ADDRESS = 10;
const MAIL_WINDOW_SECONDS = 5 * 60;

/**
 * Limits on attempts. Those on signing in and on mails are kept in PostgreSQL, so that several server processes share
 * them; an account is only ever slowed per client address, so that nobody can lock somebody else out.
 */
export class Throttles {
  private readonly accountAttempts: RateLimiterAbstract;
  private readonly addressAttempts: RateLimiterAbstract;
  private readonly mails: RateLimiterAbstract;
  private readonly mailRequests: RateLimiterAbstract;
  private readonly requests: RateLimiterAbstract;

  constructor(pool: Pool, signIn: SignInLimits, requestsPerMinute: number) {
    const shared = (keyPrefix: string, points: number, duration: number): RateLimiterAbstract =>
      new RateLimiterPostgres({
        storeClient: pool,
        tableName: 'throttles',
        tableCreated: true,
        keyPrefix,
        points,
        duration,
      });
    this.accountAttempts = shared('sign-in-account', signIn.failuresPerAccountAndAddress, signIn.windowSeconds);
    this.addressAttempts = shared('sign-in-address', signIn.failuresPerAddress, signIn.windowSeconds);
    this.mails = shared('mail-account', MAILS, MAIL_WINDOW_SECONDS);
    this.mailRequests = shared('mail-address', MAIL_REQUESTS_PER_ADDRESS, MAIL_WINDOW_SECONDS);
    this.requests = new RateLimiterMemory({ points: requestsPerMinute, duration: 60 });
  }

  /**
   * Counts an attempt to sign in before its password is looked at, so that a burst in parallel gains nothing.
   * Throws TooMany with the remaining time.
   */
  async countSignIn(email: string, address: string): Promise<void> {
    const detail = 'Too many failed attempts to sign in from here. Wait, or reset the password.';
    await take(this.addressAttempts, address, detail);
    await take(this.accountAttempts, accountKey(email, address), detail);
  }

  /** Takes back what a successful attempt had counted. */
  async forgiveSignIn(email: string, address: string): Promise<void> {
    await this.accountAttempts.delete(accountKey(email, address));
    await this.addressAttempts.reward(address);
  }

  /** Whether a mail to this account may be sent now; silent, because the answer must not tell whether the account exists. */
  async allowsMail(email: string): Promise<boolean> {
    try {
      await this.mails.consume(digest(email.toLowerCase()));
      return true;
    } catch (refusal) {
      if (refusal instanceof RateLimiterRes) return false;
      throw refusal;
    }
  }

  /** Counts a request that may cause a mail; throws TooMany. */
  async countMailRequest(address: string): Promise<void> {
    await take(this.mailRequests, address, 'Too many requests for mails from here. Wait a few minutes.');
  }

  /** Counts any request of a person; throws TooMany. */
  async countRequest(personId: string): Promise<void> {
    await take(this.requests, personId, 'More requests per minute than one person can make.');
  }
}

async function take(limiter: RateLimiterAbstract, key: string, detail: string): Promise<void> {
  try {
    await limiter.consume(key);
  } catch (refusal) {
    if (refusal instanceof RateLimiterRes) throw new TooMany(refusal.msBeforeNext / 1000, detail);
    throw refusal;
  }
}

function accountKey(email: string, address: string): string {
  return digest(`${email.toLowerCase()}|${address}`);
}

/** Keys in the throttle table name nobody. */
function digest(text: string): string {
  return createHash('sha256').update(text).digest('hex');
}
