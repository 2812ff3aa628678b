import { BLANK, boundsInWords, changedFields, faultsOf, fieldsOf } from './quantity-form';

const thrust = { ...BLANK, symbol: 'F', name: 'Thrust', unit: 'N', value: '21.3 N', halfWidth: '600 mN' };

describe('the form of a quantity', () => {
  it('becomes the fields of a command', () => {
    expect(faultsOf(thrust)).toEqual({});
    expect(fieldsOf(thrust)).toMatchObject({
      symbol: 'F',
      kind: null,
      value: { text: '21.3', unit: 'N' },
      uncertainty: { distribution: 'normal', halfWidth: { text: '600', unit: 'mN' }, k: 2 },
      elementId: null,
    });
  });

  it.each([
    [{ symbol: '2F' }, 'symbol'],
    [{ name: ' ' }, 'name'],
    [{ unit: 'newtonn' }, 'unit'],
    [{ value: '21.3 kg' }, 'value'],
    [{ halfWidth: '0.6' }, 'halfWidth'],
    [{ k: '0' }, 'k'],
  ])('says what is wrong with %p beside %s', (change, field) => {
    expect(Object.keys(faultsOf({ ...thrust, ...change }))).toEqual([field]);
  });

  it('sends only what differs', () => {
    expect(changedFields(thrust, { ...thrust, source: 'test 12' })).toEqual({ source: 'test 12' });
    expect(changedFields(thrust, thrust)).toEqual({});
  });

  it('says the bounds of a kind with their reason', () => {
    const kind = {
      id: 'efficiency',
      name: 'energy efficiency',
      unit: '1',
      bounds: { min: 0, max: 1, minExclusive: true, reason: 'energy is conserved' },
    };
    expect(boundsInWords(kind, String)).toBe('Above 0, at most 1: energy is conserved.');
  });
});
