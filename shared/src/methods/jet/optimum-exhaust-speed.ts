import { EFFICIENCY_ABOVE_ZERO, EXTENT, SPECIFIC_POWER } from '../bounds';
import { defineMethod, line, refuse, show } from '../define';
import { bisect } from '../numerics';
import type { Method } from '../types';
import { ELECTRIC } from '../vocabulary';

const VALIDITY = 'Constant power, efficiency and exhaust speed over the whole thrust time; classical.';
const REFERENCE =
  'E. Stuhlinger, Ion Propulsion for Space Flight, 1964 (from memory); P. Lozano, MIT 16.522 notes, eqs. 3-5 to 3-13 (cited by the public library proptools).';

const efficiency = { tex: '\\eta', label: 'thruster total efficiency', unit: '1', bounds: EFFICIENCY_ABOVE_ZERO };
const thrustTime = { tex: 't', label: 'thrust time', unit: 'yr', bounds: EXTENT };
const specificMass = { tex: 'a_s', label: 'specific mass of the power system', unit: 'kg/kW', bounds: SPECIFIC_POWER };
const characteristic = { tex: 'v_{ch}', label: 'characteristic speed', unit: 'km/s' };
const characteristicLine = line('v_ch', 'v_{ch}', 'sqrt(2 * eta * t / a_s)', 'm/s');

/** Mass fraction left for payload and structure at exhaust speed C, all speeds in units of the characteristic speed. */
function payloadFraction(C: number, u: number): number {
  return Math.exp(-u / C) + C ** 2 * Math.expm1(-u / C);
}

/** Characteristic speed (m/s) of a power-limited vehicle: all jet energy of the thrust time put into the power system. */
export const characteristicSpeed: Method = defineMethod({
  id: 'characteristic-speed',
  version: '1.0.0',
  family: 'M5',
  name: 'Characteristic speed of a power-limited vehicle',
  summary: 'Speed scale set by thrust time, efficiency and specific mass of the power system.',
  equation: 'v_{ch} = \\sqrt{\\frac{2\\,\\eta\\, t}{a_s}}',
  inputs: { eta: efficiency, t: thrustTime, a_s: specificMass },
  outputs: { v_ch: characteristic },
  proof: [characteristicLine],
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: ELECTRIC,
  checks: ['M5-06'],
  solve: ({ eta, t, a_s }) => ({ v_ch: Math.sqrt((2 * eta * t) / a_s) }),
});

/** Payload and structure fraction of a power-limited vehicle at a given exhaust speed (m/s). Stuhlinger 1964. */
export const powerLimitedPayload: Method = defineMethod({
  id: 'power-limited-payload',
  version: '1.0.0',
  family: 'M5',
  name: 'Payload fraction at constant power',
  summary: 'Mass fraction left for payload and structure after power system and propellant, at a chosen exhaust speed.',
  equation: '\\lambda = e^{-\\Delta v/C} - \\frac{C^2}{v_{ch}^2}\\left(1 - e^{-\\Delta v/C}\\right)',
  inputs: {
    dv: {
      tex: '\\Delta v',
      label: 'delta-v',
      unit: 'km/s',
      bounds: { ...EXTENT, reason: 'without delta-v nothing is optimised' },
    },
    C: { tex: 'C', label: 'effective exhaust speed', unit: 'km/s', bounds: EXTENT },
    eta: efficiency,
    t: thrustTime,
    a_s: specificMass,
  },
  outputs: { v_ch: characteristic, lambda: { tex: '\\lambda', label: 'payload and structure fraction', unit: '1' } },
  proof: [characteristicLine, line('lambda', '\\lambda', 'exp(-dv / C) + (C / v_ch)^2 * expm1(-dv / C)', '1')],
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: ELECTRIC,
  checks: [],
  solve({ dv, C, eta, t, a_s }, { warn }) {
    const v_ch = Math.sqrt((2 * eta * t) / a_s);
    const lambda = payloadFraction(C / v_ch, dv / v_ch);
    if (lambda <= 0) warn('Power system and propellant use up the whole vehicle: infeasible at this exhaust speed.');
    return { v_ch, lambda };
  },
});

/** Exhaust speed (m/s) of greatest payload fraction of a power-limited vehicle; refused when none stays positive. */
export const optimumExhaustSpeed: Method = defineMethod({
  id: 'optimum-exhaust-speed',
  version: '1.0.0',
  family: 'M5',
  name: 'Optimum exhaust speed at constant power',
  summary: 'Exhaust speed that leaves most mass for payload and structure at a given thrust time and specific mass.',
  equation: '\\max_C\\; e^{-\\Delta v/C} - \\frac{C^2}{v_{ch}^2}\\left(1 - e^{-\\Delta v/C}\\right)',
  inputs: {
    dv: {
      tex: '\\Delta v',
      label: 'delta-v',
      unit: 'km/s',
      bounds: { ...EXTENT, reason: 'without delta-v nothing is optimised' },
    },
    eta: efficiency,
    t: thrustTime,
    a_s: specificMass,
  },
  outputs: {
    v_ch: characteristic,
    C: { tex: 'C', label: 'optimum exhaust speed', unit: 'km/s' },
    lambda: { tex: '\\lambda', label: 'payload and structure fraction', unit: '1' },
  },
  validity: `${VALIDITY} A maximum exists while the delta-v stays below about 0.8 of the characteristic speed.`,
  reference: REFERENCE,
  cautions: [],
  concepts: ELECTRIC,
  checks: ['M5-08'],
  solve({ dv, eta, t, a_s }) {
    const v_ch = Math.sqrt((2 * eta * t) / a_s);
    const u = dv / v_ch;
    const infeasible = refuse(
      'dv',
      `The delta-v ${show(dv, 'km/s')} leaves nothing for payload at a characteristic speed of ${show(v_ch, 'km/s')}; it must stay below about 0.8 of it.`,
    );
    if (u > 1) return infeasible;
    // Stationarity, C dλ/dC: negative at very small C, positive up to the maximum, negative beyond it.
    const slope = (C: number) => (u / C + u * C) * Math.exp(-u / C) + 2 * C ** 2 * Math.expm1(-u / C);
    let low = u / 20;
    while (slope(low) <= 0 && low < 2) low *= 1.02;
    if (low >= 2) return infeasible;
    const C = bisect(slope, low, 4);
    const lambda = payloadFraction(C, u);
    return lambda > 0 ? { v_ch, C: C * v_ch, lambda } : infeasible;
  },
});
