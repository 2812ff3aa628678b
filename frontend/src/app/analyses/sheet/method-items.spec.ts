import { METHODS } from '@shared/methods';
import { filtered, givenBy, newest } from '../methods/method-filter';
import { piecesOf } from './lines-part';
import { renumbered, repeatedPorts, withoutItem } from './method-items';
import { refusalAt } from './refusals';
import { ProblemError } from '../../core/http/problem-error';

const roll = METHODS.find(({ id }) => id === 'mass-roll-up')!;
const group = roll.group!;
const from = { constant: 'c' };
const inputs = ['m_p', 'mass_1', 'growth_1', 'mass_2', 'growth_2', 'mass_3'].map((name, index) => ({
  ...{ id: index, name, from },
}));

describe('repeated items of a method', () => {
  it('are counted by the highest that is bound; an ordinary input is none', () => {
    expect(repeatedPorts(group, ['m_p', 'mass_1', 'growth_4'])).toBe(4);
    expect(repeatedPorts(group, ['m_1'])).toBe(0);
  });

  it('move up when one before them is removed', () => {
    const left = renumbered(withoutItem(inputs, group, 2), group, 2);
    expect(left.map(({ name }) => name)).toEqual(['m_p', 'mass_1', 'growth_1', 'mass_2']);
  });
});

describe('the library', () => {
  it('is found by words, concept and what a method gives', () => {
    const all = newest(METHODS);
    expect(filtered(all, { concept: '', gives: '', q: 'mass roll-up' })).toContain(roll);
    expect(filtered(all, { concept: 'no such', gives: '', q: '' })).toEqual([]);
    expect(givenBy(roll)).toContain('mass');
    expect(filtered(all, { concept: '', gives: 'time', q: '' })).not.toContain(roll);
  });

  it('offers each method once, in its newest version', () => {
    const old = { ...roll, version: '0.9.0' };
    expect(newest([old, { ...roll, version: '0.10.0' }]).map(({ version }) => version)).toEqual(['0.10.0']);
  });
});

describe('what is refused', () => {
  it('marks the range, and at least one character of it', () => {
    expect(piecesOf('a + b', { from: 4, to: 5 })).toEqual(['a + ', 'b', '']);
    expect(piecesOf('a +', { from: 3, to: 3 })).toEqual(['a ', '+', '']);
    expect(piecesOf('', { from: 0, to: 0 })).toEqual(['', '', '']);
  });

  it.each(['lines[1].expression', 'changes.lines[1].unit', 'commands.0.lines.1.name'])('is placed by %p', (field) => {
    const problem = new ProblemError(422, 'invalid', 'Refused', '', [{ field, message: 'that is no line' }]);
    expect(refusalAt(problem, 'lines[1]')).toBe('That is no line.');
    expect(refusalAt(problem, 'lines[0]')).toBe('');
  });
});
