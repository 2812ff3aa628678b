import { blank, changedFields, fieldsOf, renamedIn, splitLine } from './analysis-text';
import { readMeasureText } from './measure-text';
import { freeName } from './sources';

describe('a line taken apart', () => {
  it.each([
    ['m_p = m_0 - m_f', 'm_p', 'm_0 - m_f', 6],
    ['  x=a >= b ? 1 : 2', 'x', 'a >= b ? 1 : 2', 4],
    ['a == b', '', 'a == b', 0],
    ['m_0 - m_f', '', 'm_0 - m_f', 0],
  ])('%p', (text, name, expression, at) => {
    expect(splitLine(text)).toEqual({ name, expression, at });
  });
});

describe('an analysis as typed', () => {
  const text = {
    ...blank('formula'),
    name: ' Propellant ',
    lines: [
      { id: 1, text: 'm_p = m_0 - m_f', unit: ' t ', label: '' },
      { id: 2, text: '  ', unit: '', label: '' },
    ],
  };

  it('becomes the fields of a command without its empty lines', () => {
    expect(fieldsOf(text)).toMatchObject({
      name: 'Propellant',
      lines: [{ name: 'm_p', expression: 'm_0 - m_f', unit: 't', label: '' }],
      elementId: null,
    });
  });

  it('sends only what differs', () => {
    expect(changedFields(text, { ...text, assumptions: 'no losses' })).toEqual({ assumptions: 'no losses' });
  });

  it('renames whole words only', () => {
    const [line] = renamedIn([{ id: 1, text: 'x = m * m_0 + am / m', unit: '', label: '' }], 'm', 'M');
    expect(line?.text).toBe('x = M * m_0 + am / M');
  });
});

it.each([
  ['6 700 s', '6 700', 's'],
  ['-1.5e3 kg m/s', '-1.5e3', 'kg m/s'],
  ['0.88', '0.88', ''],
  ['about 5 m', 'about 5 m', ''],
])('reads digits and unit of %p', (typed, text, unit) => {
  expect(readMeasureText(typed)).toEqual({ text, unit });
});

it('gives an input the symbol, numbered where that is taken', () => {
  expect(freeName('I_sp', new Set())).toBe('I_sp');
  expect(freeName('I_sp', new Set(['I_sp', 'I_sp_2']))).toBe('I_sp_3');
});
