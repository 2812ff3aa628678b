import { BLANK, type RequirementText, changesBetween, faultsOf, fieldsOf, textOf } from './requirement-text';
import { isTypedTemperature, understood } from './typed-limit';

const WRITTEN: RequirementText = {
  ...BLANK,
  text: 'The vehicle shall provide a total delta-v of at least 38.0 km/s.',
  title: 'Provide total delta-v',
  level: 'vehicle',
  prefix: 'VEH',
  relation: 'at least',
  value: '38.0 km/s',
};

describe('a requirement as it is typed', () => {
  it('names each field that is missing', () => {
    expect(Object.keys(faultsOf(BLANK, true)).sort()).toEqual(['level', 'prefix', 'text', 'title']);
    expect(faultsOf(WRITTEN, true)).toEqual({});
    expect(faultsOf({ ...WRITTEN, prefix: '' }, false)).toEqual({});
    expect(faultsOf({ ...WRITTEN, prefix: 'veh' }, true).prefix).toContain('“veh”');
  });

  it('says what is wrong with a limit: unknown unit, another dimension at the upper end, order', () => {
    expect(faultsOf({ ...WRITTEN, value: '38 kmps' }, true).value).toContain('kmps');
    expect(faultsOf({ ...WRITTEN, relation: 'between', upper: '40 t' }, true).upper).toContain('speed');
    expect(faultsOf({ ...WRITTEN, relation: 'between', upper: '30 km/s' }, true).upper).toContain('larger');
    expect(faultsOf({ ...WRITTEN, relation: '' }, true).relation).toBeDefined();
    expect(faultsOf({ ...WRITTEN, relation: 'equal within', tolerance: '' }, true).tolerance).toBeDefined();
  });

  it('asks for the fields of what is to be resolved only when there is something', () => {
    expect(Object.keys(faultsOf({ ...WRITTEN, openKind: 'TBR' }, true)).sort()).toEqual([
      'action',
      'due',
      'openPersonId',
    ]);
  });

  it('becomes the fields of a command with digits and unit as typed', () => {
    const fields = fieldsOf({ ...WRITTEN, relation: 'between', upper: '1.2e1 km/s', value: '1e1 km/s' });
    expect(fields.limit).toEqual({
      relation: 'between',
      value: { text: '1e1', unit: 'km/s' },
      upper: { text: '1.2e1', unit: 'km/s' },
      temperature: 'absolute',
      condition: '',
    });
    expect([fields.elementId, fields.parameter, fields.openItem]).toEqual([null, null, null]);
  });

  it('revises only what differs, and reads back what stands', () => {
    const limit = {
      relation: 'at least' as const,
      value: { text: '38.0', unit: 'km/s', si: 38_000 },
      upper: null,
      tolerance: null,
      temperature: 'absolute' as const,
      condition: '',
    };
    const before = textOf({ ...fieldsOf(WRITTEN), limit, openItem: null });
    expect(before.value).toBe('38.0 km/s');
    expect(changesBetween(before, { ...before })).toEqual({});
    expect(Object.keys(changesBetween(before, { ...before, value: '39 km/s', title: 'More' })).sort()).toEqual([
      'limit',
      'title',
    ]);
  });

  it('says how a number was understood', () => {
    expect(understood('38 km/s')).toBe('Read as a speed.');
    expect(understood('0.95')).toContain('plain number');
    expect(understood('38 kmps')).toBe('');
    expect([isTypedTemperature('900 K'), isTypedTemperature('5 km')]).toEqual([true, false]);
  });
});
