import { ago } from './ago';
import { sectionOf } from './sections';

describe('ago', () => {
  const now = Date.parse('2026-12-01T12:00:00Z');
  it.each([
    ['2026-12-01T11:59:49Z', '11 s ago'],
    ['2026-12-01T11:56:00Z', '4 min ago'],
    ['2026-12-01T09:00:00Z', '3 h ago'],
    ['2026-11-26T12:00:00Z', '5 d ago'],
    // The server's clock may run ahead of the browser's.
    ['2026-12-01T12:00:03Z', '0 s ago'],
    ['never', ''],
  ])('says of %s %p', (iso, words) => {
    expect(ago(iso, now)).toBe(words);
  });
});

describe('sectionOf', () => {
  it.each([
    ['/studies/PETREL/requirements/VEH-001?at=baseline:B2', 'Requirements'],
    ['/studies/PETREL/product-tree', 'Product tree'],
    ['/people', undefined],
  ])('finds the section of %s', (url, label) => {
    expect(sectionOf(url)?.label).toBe(label);
  });
});
