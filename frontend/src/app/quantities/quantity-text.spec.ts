import type { QuantityRow } from '@shared/contract';
import { commandOf } from './quantity-edits';
import { filtered } from './quantity-filter';
import { quantityTableText } from './quantity-table-text';
import { readUncertainty, readValue, uncertaintyText, valueText } from './quantity-text';

const row: QuantityRow = {
  id: '0197d0a0-0000-7000-8000-000000000004',
  version: 3,
  key: 'Q-004',
  symbol: 'I_sp',
  tex: 'I_{sp}',
  name: 'Specific impulse',
  kind: 'specific-impulse',
  kindName: 'specific impulse',
  dimension: 'time',
  unit: 's',
  temperature: 'absolute',
  value: { text: '6700', unit: 's', si: 6700 },
  uncertainty: { distribution: 'normal', halfWidth: { text: '1', unit: 'min', si: 60 }, k: 2 },
  basis: 'estimated',
  source: 'thruster test',
  elementId: null,
  element: '',
  owner: { id: '0197d0a0-0000-7000-8000-000000000001', name: 'Mika Sato' },
  state: 'working',
  usedBy: ['AN-001'],
  bearsOn: ['VEH-001'],
  changePending: [],
};

describe('values and uncertainties as they are typed', () => {
  it.each([
    ['6 700 s', { text: '6 700', unit: 's' }],
    ['2 h', { text: '2', unit: 'h' }],
    ['', null],
  ])('reads %p', (typed, value) => {
    const read = readValue(row, typed);
    expect(read.ok).toBe(true);
    expect(read.ok && read.value && read.value.unit).toBe(value === null ? null : value.unit);
  });

  it.each(['6700', '6700 m', '6700 furlongs', 'about six'])('refuses %p with a sentence', (typed) => {
    const read = readValue(row, typed);
    expect(read.ok).toBe(false);
    expect(!read.ok && read.message.length).toBeGreaterThan(10);
  });

  it('says the unit that is missing with what was typed', () => {
    const read = readValue(row, '6 700');
    expect(!read.ok && read.message).toContain('“6 700 s”');
  });

  it.each([
    ['50 s', { distribution: 'normal', k: 2 }],
    ['± 50 s, k = 1', { distribution: 'normal', k: 1 }],
    ['50 s, rectangular', { distribution: 'rectangular', k: 2 }],
  ])('reads the uncertainty %p', (typed, expected) => {
    const read = readUncertainty('s', typed);
    expect(read.ok && read.value).toMatchObject({ ...expected, halfWidth: { text: '50', unit: 's' } });
  });

  it('refuses an uncertainty with a word it does not know, and says what would be right', () => {
    const read = readUncertainty('s', '50 s, gaussian');
    expect(!read.ok && read.message).toContain('50 s, k = 2');
  });

  it('writes what it reads', () => {
    expect(valueText(row)).toBe('6700 s');
    expect(uncertaintyText(row.uncertainty)).toBe('1 min');
    expect(uncertaintyText({ distribution: 'triangular', halfWidth: { text: '50', unit: 's', si: 50 }, k: 2 })).toBe(
      '50 s, triangular',
    );
  });
});

describe('commandOf', () => {
  it('sets the value with the version that was seen and leaves the rest alone', () => {
    const read = commandOf(row, 'value', '6500 s');
    expect(read.ok && read.command).toEqual({
      type: 'quantity.set',
      id: row.id,
      version: 3,
      value: { text: '6500', unit: 's' },
    });
  });

  it('keeps the value where the source is edited', () => {
    const read = commandOf(row, 'source', ' data sheet ');
    expect(read.ok && read.command).toMatchObject({ value: { text: '6700', unit: 's' }, source: 'data sheet' });
  });

  it('refuses a basis that is none', () => {
    expect(commandOf(row, 'basis', 'guessed').ok).toBe(false);
  });
});

describe('filters and copying', () => {
  it('narrows by state, words and what a quantity bears on', () => {
    const all = { state: '', basis: '', element: '', q: '' };
    expect(filtered([row], { ...all, q: 'impulse veh-001' })).toHaveLength(1);
    expect(filtered([row], { ...all, state: 'controlled' })).toHaveLength(0);
    expect(filtered([row], { ...all, state: 'not used' })).toHaveLength(0);
  });

  it('copies numbers bare in the unit of the quantity, and texts inert', () => {
    const [, line = ''] = quantityTableText([{ ...row, name: '=1+1' }]).split('\n');
    const cells = line.split('\t');
    expect(cells[3]).toBe('6700');
    // 1 min of half-width is 60 s.
    expect(cells[5]).toBe('60');
    expect(cells[2]).toBe("'=1+1");
  });
});
