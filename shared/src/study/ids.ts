let newest = 0;
let sequence = 0;

/**
 * A new UUID version 7 (RFC 9562, 6.2 method 1): sorts by the time it was made, and within a millisecond by the order
 * in which this process made it.
 */
export function newId(now: number = Date.now()): string {
  if (now > newest) {
    newest = now;
    sequence = 0;
  } else if (++sequence > 0xfff) {
    newest += 1;
    sequence = 0;
  }
  const random = globalThis.crypto.getRandomValues(new Uint8Array(8));
  random[0] = ((random[0] ?? 0) & 0x3f) | 0x80;
  const tail = Array.from(random, (byte) => byte.toString(16).padStart(2, '0')).join('');
  const time = newest.toString(16).padStart(12, '0');
  const order = `7${sequence.toString(16).padStart(3, '0')}`;
  return `${time.slice(0, 8)}-${time.slice(8)}-${order}-${tail.slice(0, 4)}-${tail.slice(4)}`;
}
