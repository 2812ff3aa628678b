import type { Command } from '@shared/contract';
import { refused } from '../testing/refused';
import { reviewedStudy, seen } from '../testing/reviewed-study';
import { ANALYST, CHAIR, ID, OWNER, edit, idOf, quantity, smallStudy } from '../testing/small-study';

const set = (id: string, version: number, text: string, unit: string): Command => ({
  type: 'quantity.set',
  id,
  version,
  value: { text, unit },
});

describe('setting a quantity', () => {
  it('takes any unit of the dimension and keeps digits and unit as typed', () => {
    const study = smallStudy();
    edit(study, ANALYST, set(ID.dry, 1, '65 200', 'kg'));
    expect(study.get('quantity', ID.dry)).toMatchObject({ version: 2, unit: 't', value: { unit: 'kg', si: 65200 } });
    edit(study, ANALYST, { type: 'quantity.set', id: ID.dry, version: 2, value: null });
    expect(study.get('quantity', ID.dry)!.value).toBeNull();
  });

  it.each([
    ['an unknown unit', '65', 'tonnnes', 'value', /tonn/],
    ['a wrong dimension', '65', 's', 'value', /a time; a mass is needed/],
    ['a number without unit', '65', '', 'value', /mass/],
    ['no number', 'heavy', 't', 'value', /number/],
    ['a number beyond double precision', '1e400', 't', 'value', /./],
  ])('refuses %s, naming field, value and what would be right', (_case, text, unit, field, sentence) => {
    const refusal = refused(smallStudy(), ANALYST, set(ID.dry, 1, text, unit));
    expect(refusal.code).toBe('invalid');
    expect(refusal.details.field).toBe(field);
    expect(refusal.details.value).toContain(text);
    expect(refusal.message).toMatch(sentence);
  });

  it.each([
    ['emissivity above one', 'emissivity', '1.2', '1'],
    ['emissivity of zero', 'emissivity', '0', '1'],
    ['a vehicle faster than light', 'vehicle-speed', '1.1', 'c'],
    ['a temperature at zero', 'temperature', '0', 'K'],
    ['a negative mass', 'mass', '-3', 'kg'],
    ['more efficiency than there is', 'efficiency', '101', '%'],
  ])('refuses %s by the physical bounds of its kind', (_case, kind, text, unit) => {
    const refusal = refused(smallStudy(), ANALYST, quantity(idOf(80), 'x', text, unit, { kind }));
    expect(refusal).toMatchObject({ code: 'invalid', details: { field: 'value' } });
  });

  it('accepts the bound itself where it is included', () => {
    const study = smallStudy();
    edit(study, ANALYST, quantity(idOf(80), 'e', '1', '1', { kind: 'emissivity' }));
    expect(study.get('quantity', idOf(80))!.value!.si).toBe(1);
  });

  it('refuses an uncertainty of another dimension or of no width', () => {
    const study = smallStudy();
    const with_ = (text: string, unit: string): Command => ({
      type: 'quantity.set',
      id: ID.isp,
      version: 1,
      value: { text: '6500', unit: 's' },
      uncertainty: { distribution: 'normal', halfWidth: { text, unit }, k: 2 },
    });
    expect(refused(study, ANALYST, with_('10', 'kg')).details.field).toBe('uncertainty.halfWidth');
    expect(refused(study, ANALYST, with_('0', 's')).message).toContain('above zero');
  });

  it('reads the half-width of a temperature as a difference', () => {
    const study = smallStudy();
    edit(
      study,
      ANALYST,
      quantity(idOf(80), 'T', '20', 'degC', {
        kind: 'temperature',
        uncertainty: { distribution: 'rectangular', halfWidth: { text: '5', unit: 'degC' }, k: 2 },
      }),
    );
    const { value, uncertainty } = study.get('quantity', idOf(80))!;
    expect(value!.si).toBeCloseTo(293.15, 10);
    expect(uncertainty!.halfWidth.si).toBeCloseTo(5, 10);
  });

  it('is refused directly once it is controlled', () => {
    const study = reviewedStudy();
    const refusal = refused(study, ANALYST, set(ID.isp, seen(study, 'quantity', ID.isp).version, '6600', 's'));
    expect(refusal).toMatchObject({ code: 'controlled' });
    expect(refusal.message).toBe('Q-001 is controlled. Raise a change request to propose this edit.');
  });

  it('needs the role of analyst', () => {
    const refusal = refused(smallStudy(), OWNER, set(ID.isp, 1, '6600', 's'));
    expect(refusal.code).toBe('forbidden');
    expect(refusal.message).toContain('analyst');
    expect(refusal.message).toContain('requirements owner');
    expect(refused(smallStudy(), CHAIR, set(ID.isp, 1, '6600', 's')).code).toBe('forbidden');
  });
});

describe('revising and removing a quantity', () => {
  it('keeps the dimension of one in use', () => {
    const study = smallStudy();
    const refusal = refused(study, ANALYST, {
      type: 'quantity.revise',
      id: ID.isp,
      version: 1,
      changes: { unit: 'm/s', kind: null },
    });
    expect(refusal.details.field).toBe('changes.unit');
    expect(refusal.message).toContain('AN-002');
    edit(study, ANALYST, { type: 'quantity.revise', id: ID.isp, version: 1, changes: { unit: 'h' } });
    expect(study.get('quantity', ID.isp)).toMatchObject({ unit: 'h', value: { text: '6500', unit: 's', si: 6500 } });
  });

  it('refuses a kind of another dimension and one that is not there', () => {
    const study = smallStudy();
    const kind = (value: string): Command => ({
      type: 'quantity.revise',
      id: ID.dry,
      version: 1,
      changes: { kind: value },
    });
    expect(refused(study, ANALYST, kind('emissivity')).details.field).toBe('unit');
    expect(refused(study, ANALYST, kind('charm')).details.field).toBe('kind');
  });

  it('refuses an unknown unit of its own', () => {
    const refusal = refused(smallStudy(), ANALYST, quantity(idOf(80), 'x', null, 'parsecc'));
    expect(refusal.details).toMatchObject({ field: 'unit', value: 'parsecc' });
  });

  it('removes none that an analysis uses', () => {
    const refusal = refused(smallStudy(), ANALYST, { type: 'quantity.remove', id: ID.propellant, version: 1 });
    expect(refusal.code).toBe('in-use');
    expect(refusal.message).toContain('AN-001, AN-002');
  });
});
