import type { Limit } from '@shared/contract';
import { limitText } from './limit-text';

const base: Limit = {
  relation: 'at least',
  value: { text: '38', unit: 'km/s', si: 38_000 },
  upper: null,
  tolerance: null,
  temperature: 'absolute',
  condition: '',
};

describe('limitText', () => {
  it('writes each relation with its sign', () => {
    expect(limitText(base)).toMatch(/^≥\u00a038\s?km\/s$/);
    expect(limitText({ ...base, relation: 'at most' })).toMatch(/^≤\u00a038\s?km\/s$/);
    expect(limitText({ ...base, relation: 'between', upper: { text: '40', unit: 'km/s', si: 40_000 } })).toMatch(
      /^38\s?km\/s … 40\s?km\/s$/,
    );
    expect(limitText(null)).toBe('');
  });

  it('keeps the digits as typed in the unit in which they were typed, and only there', () => {
    const typed: Limit = { ...base, value: { text: '38.0', unit: 'km/s', si: 38_000 } };
    expect(limitText(typed)).toMatch(/^≥\u00a038\.0\s?km\/s$/);
    expect(limitText(typed, () => '38 000 m/s')).toBe('≥\u00a038 000 m/s');
  });

  it('writes the tolerance of a temperature as a difference, not as a temperature', () => {
    const limit: Limit = {
      ...base,
      relation: 'equal within',
      value: { text: '20', unit: '°C', si: 293.15 },
      tolerance: { text: '5', unit: '°C', si: 5 },
    };
    expect(limitText(limit)).toMatch(/^20\s?°C ± 5\s?°C$/);
  });
});
