import { type Algorithm, hash, verify } from '@node-rs/argon2';
import { randomBytes } from 'node:crypto';
import type { PasswordHashing } from './config';

const AT_ONCE = 2;
const QUEUE_LENGTH = 32;

/** Thrown when more people sign in at once than hashing can serve; the request is answered with 503. */
export class HashingBusy extends Error {}

/** argon2id with at most two computations at once, so that a wave of sign-ins cannot take all memory and threads. */
export class PasswordHasher {
  private running = 0;
  private readonly waiting: (() => void)[] = [];
  private readonly dummyHash: Promise<string>;

  constructor(private readonly parameters: PasswordHashing) {
    this.dummyHash = this.hash(randomBytes(16).toString('hex'));
  }

  /** The PHC string to store for a password. Throws HashingBusy when the queue is full. */
  hash(password: string): Promise<string> {
    const options = {
      // The package declares its algorithms as an ambient const enum; 2 is argon2id.
      algorithm: 2 as Algorithm,
      memoryCost: this.parameters.memoryKiB,
      timeCost: this.parameters.passes,
      parallelism: 1,
    };
    return this.inTurn(() => hash(password, options));
  }

  /** Whether the password belongs to the hash. Without a hash it takes as long and answers false. */
  async verify(password: string, passwordHash: string | null): Promise<boolean> {
    const against = passwordHash ?? (await this.dummyHash);
    const matches = await this.inTurn(() => verify(against, password));
    return matches && passwordHash !== null;
  }

  /** Whether a stored hash was made with weaker parameters than today's. */
  isWeak(passwordHash: string): boolean {
    const found = /^\$argon2id\$v=19\$m=(\d+),t=(\d+),p=\d+\$/.exec(passwordHash);
    return found === null || Number(found[1]) < this.parameters.memoryKiB || Number(found[2]) < this.parameters.passes;
  }

  private async inTurn<T>(work: () => Promise<T>): Promise<T> {
    if (this.running >= AT_ONCE) {
      if (this.waiting.length >= QUEUE_LENGTH) throw new HashingBusy('too many passwords are being checked');
      // The one who finishes hands over its place, so `running` stays as it is.
      await new Promise<void>((resolve) => this.waiting.push(resolve));
    } else this.running += 1;
    try {
      return await work();
    } finally {
      const next = this.waiting.shift();
      if (next === undefined) this.running -= 1;
      else next();
    }
  }
}
