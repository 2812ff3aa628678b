import { randomBytes } from 'node:crypto';
import * as fs from 'node:fs';
import * as path from 'node:path';
import * as z from 'zod';
import { StartRefusal } from './start-refusal';

const Secrets = z.strictObject({ cookieSigning: z.string().regex(/^[0-9a-f]{64}$/) });
export type Secrets = z.infer<typeof Secrets>;

/** Reads `secrets.json` of the data directory, or makes it (32 random bytes, readable by its owner alone) on the first start. */
export function readOrMakeSecrets(dataDirectory: string): Secrets {
  const file = path.join(dataDirectory, 'secrets.json');
  try {
    fs.mkdirSync(dataDirectory, { recursive: true });
    // Exclusive creation: of two processes that start at once, one writes and the other reads what was written.
    const fresh: Secrets = { cookieSigning: randomBytes(32).toString('hex') };
    const temporary = `${file}.${process.pid}.${randomBytes(4).toString('hex')}`;
    if (!fs.existsSync(file)) {
      fs.writeFileSync(temporary, JSON.stringify(fresh), { mode: 0o600, flag: 'wx' });
      try {
        fs.linkSync(temporary, file);
      } catch (error) {
        if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
      } finally {
        fs.unlinkSync(temporary);
      }
    }
    const open = fs.statSync(file).mode & 0o077;
    if (open !== 0) throw new Error('others than its owner can read it; run chmod 600 on it');
    return Secrets.parse(JSON.parse(fs.readFileSync(file, 'utf8')));
  } catch (error) {
    const reason = error instanceof z.ZodError ? 'it does not hold what it should' : (error as Error).message;
    throw new StartRefusal('secrets-not-readable', `The secrets file ${file} cannot be used: ${reason}.`);
  }
}
