/** @jest-environment node */
import * as fs from 'node:fs';
import * as os from 'node:os';
import * as path from 'node:path';
import { readOrMakeSecrets } from './secrets';

let directory: string;
let file: string;
beforeEach(() => {
  directory = path.join(fs.mkdtempSync(path.join(os.tmpdir(), 'deltaproof-secrets-')), 'data');
  file = path.join(directory, 'secrets.json');
});
afterEach(() => fs.rmSync(path.dirname(directory), { recursive: true }));

it('makes 32 random bytes on the first start, readable by the owner alone, and keeps them', () => {
  const first = readOrMakeSecrets(directory);
  expect(first.cookieSigning).toMatch(/^[0-9a-f]{64}$/);
  expect(fs.statSync(file).mode & 0o777).toBe(0o600);
  expect(readOrMakeSecrets(directory)).toEqual(first);
  expect(fs.readdirSync(directory)).toEqual(['secrets.json']);
});

it('differs from one installation to the next', () => {
  const other = path.join(path.dirname(directory), 'other');
  expect(readOrMakeSecrets(other)).not.toEqual(readOrMakeSecrets(directory));
});

it('refuses a file that others can read, and one that is cut off, without replacing it', () => {
  readOrMakeSecrets(directory);
  fs.chmodSync(file, 0o644);
  expect(() => readOrMakeSecrets(directory)).toThrow(/chmod 600/);
  fs.chmodSync(file, 0o600);
  fs.writeFileSync(file, '{"cookieSigning":"abc"}');
  expect(() => readOrMakeSecrets(directory)).toThrow(/does not hold what it should/);
  fs.writeFileSync(file, '{"cookie');
  expect(() => readOrMakeSecrets(directory)).toThrow(/cannot be used/);
  expect(fs.readFileSync(file, 'utf8')).toBe('{"cookie');
});
