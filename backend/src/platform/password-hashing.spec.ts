/** @jest-environment node */
import { HashingBusy, PasswordHasher } from './password-hashing';

const light = { memoryKiB: 1024, passes: 1 };

it('makes argon2id hashes of the given strength and knows the right password', async () => {
  const hasher = new PasswordHasher({ memoryKiB: 19456, passes: 2 });
  const hash = await hasher.hash('four-quiet-pumps-hum');
  expect(hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  expect(await hasher.verify('four-quiet-pumps-hum', hash)).toBe(true);
  expect(await hasher.verify('four-quiet-pumps-huM', hash)).toBe(false);
  expect(await hasher.hash('four-quiet-pumps-hum')).not.toBe(hash);
});

it('answers no where there is no hash', async () => {
  const hasher = new PasswordHasher(light);
  expect(await hasher.verify('anything', null)).toBe(false);
});

it('calls weaker and foreign hashes weak', async () => {
  const hash = await new PasswordHasher(light).hash('x');
  expect(new PasswordHasher(light).isWeak(hash)).toBe(false);
  expect(new PasswordHasher({ ...light, passes: 2 }).isWeak(hash)).toBe(true);
  expect(new PasswordHasher({ ...light, memoryKiB: 2048 }).isWeak(hash)).toBe(true);
  expect(new PasswordHasher(light).isWeak('$2b$10$abcdefghijklmnopqrstuv')).toBe(true);
});

it('serves two at once and 32 in turn, and turns the rest away', async () => {
  const hasher = new PasswordHasher({ memoryKiB: 8192, passes: 1 });
  // Let the dummy hash of the start finish first, so that exactly 2 + 32 places are free.
  await hasher.verify('x', null);
  const results = await Promise.allSettled(Array.from({ length: 40 }, () => hasher.hash('x')));
  const refused = results.filter((result) => result.status === 'rejected');
  expect(refused).toHaveLength(40 - 34);
  expect(refused.every((result) => result.reason instanceof HashingBusy)).toBe(true);
  // All places are free again.
  await expect(hasher.hash('x')).resolves.toContain('argon2id');
});
