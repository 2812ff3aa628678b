import { parseUnit } from '@shared/units';
import { QUANTITY_KINDS, checkBounds, quantityKind } from '.';

const LIGHT = 299_792_458;

function refusal(kind: string, si: number): string | null {
  const found = quantityKind(kind);
  if (!found) throw new Error(`no kind ${kind}`);
  return found.bounds ? checkBounds(si, found.bounds) : null;
}

describe('quantity kinds', () => {
  it('have distinct ids and known units', () => {
    expect(new Set(QUANTITY_KINDS.map((kind) => kind.id)).size).toBe(QUANTITY_KINDS.length);
    for (const kind of QUANTITY_KINDS) expect([kind.id, parseUnit(kind.unit).ok]).toEqual([kind.id, true]);
  });

  it.each([
    ['mass', 0],
    ['temperature', 0],
    ['vehicle-speed', LIGHT],
    ['exhaust-speed', LIGHT * 1.000001],
    ['specific-impulse', 30_570_324],
    ['emissivity', 0],
    ['emissivity', 1.01],
    ['efficiency', 1.01],
    ['heat-engine-efficiency', 1],
    ['sunlight-conversion-efficiency', 0.94],
    ['burn-fraction', -0.1],
    ['fuel-specific-energy', 9e16],
    ['antimatter-specific-energy', 1.8e17],
    ['mass-ratio', 0.99],
    ['fraction-of-total', 1],
    ['margin', -1],
    ['build-up', 0.9],
    ['solar-distance', 6.9e8],
    ['liquid-hydrogen-temperature', 34],
    ['lorentz-factor', 0.5],
    ['thrust-per-jet-power', 3.3e-9],
    ['thrust-per-beam-power', 6.7e-9],
  ])('refuse %s of %d', (kind, value) => {
    expect(refusal(kind, value)).toMatch(/must be .+\(.+\)/);
  });

  it.each([
    ['payload-mass', 0],
    ['sink-temperature', 0],
    ['exhaust-speed', LIGHT],
    ['specific-impulse', 30_570_322],
    ['delta-v', 3 * LIGHT], // a sum of rapidities
    ['antimatter-specific-energy', 1.79751e17], // 2c² per mass of antimatter alone
    ['tank-to-propellant-ratio', 1.4],
    ['coefficient-of-performance', 3.5],
    ['fusion-gain', 10],
    ['emissivity', 1],
    ['vehicle-speed', 0],
    ['transmission', 1],
  ])('accept %s of %d', (kind, value) => {
    expect(refusal(kind, value)).toBeNull();
  });

  it('refuse what is not a number', () => {
    expect(refusal('mass', Number.NaN)).toMatch(/finite/);
    expect(refusal('mass', Number.POSITIVE_INFINITY)).toMatch(/finite/);
  });
});
