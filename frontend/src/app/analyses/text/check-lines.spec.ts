import { parseUnit } from '@shared/units';
import type { TypedLine } from './analysis-text';
import { checkLines } from './check-lines';
import type { Source } from './sources';

function bound(name: string, unit: string, si: number | null, temperature: 'absolute' | 'difference' = 'absolute') {
  const parsed = parseUnit(unit);
  if (!parsed.ok) throw new Error(parsed.message);
  const source: Source = {
    ...{ from: { constant: name }, group: 'Constants', key: name, symbol: name, name, unit },
    ...{ dimension: parsed.unit.dimension, temperature, si },
  };
  return { name, source };
}
function lines(...texts: readonly string[]): readonly TypedLine[] {
  return texts.map((text, index) => ({ id: index + 1, text, unit: '', label: '' }));
}

describe('checkLines', () => {
  it('computes from line to line in SI, typeset as it is typed', () => {
    const [first, second] = checkLines(lines('A = 2 * L * w', 'm = A * rho'), [
      bound('L', 'm', 18),
      bound('w', 'm', 3.87),
      bound('rho', 'kg/m^2', 4.6),
    ]);
    // 2 · 18 m · 3.87 m = 139.32 m²; 139.32 m² · 4.6 kg/m² = 640.872 kg
    expect(first?.result?.si).toBeCloseTo(139.32, 9);
    expect(second?.result?.si).toBeCloseTo(640.872, 9);
    expect(second?.result?.unit).toBe('kg');
    expect(first?.tex).toContain('A =');
  });

  it('marks the refused range in the text as typed, and says it in a sentence', () => {
    const text = 'm = A * rho + F';
    const [line] = checkLines(lines(text), [bound('A', 'm^2', 1), bound('rho', 'kg/m^2', 1), bound('F', 'N', 1)]);
    expect(line?.problem?.message).toMatch(/^Line 1: .*force.*\.$/);
    expect(text.slice(line?.problem?.from, line?.problem?.to)).toContain('F');
    expect(line?.result).toBeNull();
  });

  it('names what is bound to nothing, and only that', () => {
    const [first, second] = checkLines(lines('q = eps * 2', 'Q = q * A'), [bound('A', 'm^2', 1)]);
    expect(first?.missing).toBe('eps');
    expect(second?.missing).toBe('');
    expect(second?.problem?.message).toBe('Line 2: q is not known until line 1 is right.');
  });

  it('refuses a line without a name, a name used twice, and a word of the language', () => {
    const checked = checkLines(lines('L * 2', 'L = 3', 'sqrt = 4'), [bound('L', 'm', 1)]);
    expect(checked.map(({ problem }) => problem !== null)).toEqual([true, true, true]);
  });

  it('says which unit would be right', () => {
    const [line] = checkLines([{ id: 1, text: 'A = L * L', unit: 'kg', label: '' }], [bound('L', 'm', 2)]);
    expect(line?.unitProblem).toContain('m');
    expect(line?.result?.si).toBe(4);
  });

  it('has no number where an input has none, and says why', () => {
    const [line] = checkLines(lines('A = L * L'), [bound('L', 'm', null)]);
    expect(line?.problem).toBeNull();
    expect(line?.result).toBeNull();
    expect(line?.failure).toContain('L');
  });

  it('keeps a temperature and a difference apart', () => {
    const inputs = [bound('T_1', 'K', 300), bound('T_2', 'K', 280)];
    const [difference, sum] = checkLines(lines('d = T_1 - T_2', 's = T_1 + T_2'), inputs);
    expect(difference?.result).toMatchObject({ si: 20, temperature: 'difference' });
    expect(sum?.problem).not.toBeNull();
  });
});
