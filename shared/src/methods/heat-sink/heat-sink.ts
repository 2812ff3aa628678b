import { EXTENT, EXTENT_OR_NONE, MASS, TEMPERATURE } from '../bounds';
import { constantIds, sigma } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import { emissivity, sinkTemperature } from '../radiator/ports';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';

const kelvin = { unit: 'K', temperature: 'absolute' as const, bounds: TEMPERATURE };
const mass = { tex: 'm', label: 'heat-sink mass', unit: 'kg', bounds: MASS };
const heatCapacity = { tex: 'c_p', label: 'specific heat capacity', unit: 'J/(kg K)', bounds: EXTENT };
const area = { tex: 'A', label: 'emitting area', unit: 'm^2', bounds: EXTENT };
const start = { tex: 'T_1', label: 'starting temperature', ...kelvin };
const target = { tex: 'T_2', label: 'target temperature', ...kelvin };
const timeOutput = { tex: 't', label: 'time to reach the target', unit: 's' };
const scaleLine = line('k_t', 'k_t', 'm * c_p / (eps * sigma * A)', 's K^3');

const VALIDITY =
  'Uniform temperature (Biot number h L/k below 0.1 with h = 4εσT³), constant heat capacity, grey surface that sees only its sink.';
const REFERENCE =
  'F. P. Incropera and D. P. DeWitt, Fundamentals of Heat and Mass Transfer, section 5.3 (eqs. 5.18–5.19, from memory).';

/** Integral of dT/(T⁴ − T_s⁴) from T_2 up to T_1, 1/K³, by its closed form or, for a cold sink, by its series. */
function coolingIntegral(T_1: number, T_2: number, T_s: number): number {
  const [r_1, r_2] = [T_s / T_1, T_s / T_2];
  if (r_2 > 0.3) return (Math.atanh(r_2) - Math.atan(r_2) - (Math.atanh(r_1) - Math.atan(r_1))) / (2 * T_s ** 3);
  let sum = 0;
  // Terms fall by r_2⁴ < 0.01; the closed form would lose all digits as T_s goes to 0.
  for (let power = 3; power <= 43; power += 4) sum += (T_s ** (power - 3) / power) * (T_2 ** -power - T_1 ** -power);
  return sum;
}

/** Time (s) in which a body (kg) radiates from T_1 down to T_2 (K) to a sink (K). */
export const heatSinkCooling: Method = defineMethod({
  id: 'heat-sink-cooling',
  version: '1.0.0',
  family: 'M8',
  name: 'Heat sink cooling by radiation',
  summary: 'Time in which a hot body cools to a target temperature by radiation alone.',
  equation: 't = \\frac{m c_p}{\\varepsilon\\sigma A}\\int_{T_2}^{T_1}\\frac{dT}{T^4 - T_s^4}',
  inputs: { m: mass, c_p: heatCapacity, A: area, eps: emissivity, T_1: start, T_2: target, T_s: sinkTemperature },
  outputs: { t: timeOutput },
  proof: [
    scaleLine,
    line('r_1', 'r_1', 'T_s / T_1', '1'),
    line('r_2', 'r_2', 'T_s / T_2', '1'),
    line(
      't',
      't',
      'r_2 > 0.01 ? k_t / (2 * T_s^3) * (atanh(r_2) - atan(r_2) - (atanh(r_1) - atan(r_1))) : k_t * ((1 / T_2^3 - 1 / T_1^3) / 3 + T_s^4 * (1 / T_2^7 - 1 / T_1^7) / 7)',
      's',
    ),
  ],
  constants: constantIds('sigma'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: EVERY,
  checks: ['M8-01', 'M8-03', 'M8-04'],
  solve({ m, c_p, A, eps, T_1, T_2, T_s }) {
    if (T_2 <= T_s) {
      return refuse(
        'T_2',
        `The target ${show(T_2, 'K')} is never reached: the body cools towards its sink at ${show(T_s, 'K')}.`,
      );
    }
    if (T_2 > T_1)
      return refuse(
        'T_2',
        `The target ${show(T_2, 'K')} is above the starting temperature ${show(T_1, 'K')}; a body that radiates cools.`,
      );
    return { t: ((m * c_p) / (eps * sigma * A)) * coolingIntegral(T_1, T_2, T_s) };
  },
});

/** Energy (J) and time (s) that a constant power (W) needs to warm a body (kg) without losses, melting included. */
export const heatSinkStorage: Method = defineMethod({
  id: 'heat-sink-storage',
  version: '1.0.0',
  family: 'M8',
  name: 'Heat sink storage',
  summary: 'Heat that a body stores between two temperatures and the time a constant power needs to fill it.',
  equation: 'E = m c_p (T_2 - T_1) + m_L L,\\quad t = E/Q',
  inputs: {
    m: mass,
    c_p: heatCapacity,
    T_1: start,
    T_2: target,
    Q: { tex: 'Q', label: 'heat flow into the body', unit: 'kW', bounds: EXTENT },
    m_L: { tex: 'm_L', label: 'mass that changes phase', unit: 'kg', bounds: EXTENT_OR_NONE, default: 0 },
    L: { tex: 'L', label: 'latent heat', unit: 'kJ/kg', bounds: EXTENT_OR_NONE, default: 0 },
  },
  outputs: { E: { tex: 'E', label: 'heat stored', unit: 'MJ' }, t: timeOutput },
  proof: [line('E', 'E', 'm * c_p * (T_2 - T_1) + m_L * L', 'J'), line('t', 't', 'E / Q', 's')],
  validity: 'Constant heat capacity, no losses.',
  reference: 'Energy balance.',
  cautions: [],
  concepts: EVERY,
  checks: ['M8-05'],
  solve({ m, c_p, T_1, T_2, Q, m_L, L }) {
    if (T_2 < T_1)
      return refuse(
        'T_2',
        `The target ${show(T_2, 'K')} is below the starting temperature ${show(T_1, 'K')}; heat warms the body.`,
      );
    if (m_L > m)
      return refuse(
        'm_L',
        `The mass that changes phase, ${show(m_L, 'kg')}, is more than the body has, ${show(m, 'kg')}.`,
      );
    const E = m * c_p * (T_2 - T_1) + m_L * L;
    return { E, t: E / Q };
  },
});

/** Time (s) in which a constant heat flow (W) warms a radiating body from T_1 to T_2 (K), and its steady temperature (K). */
export const heatSinkWarming: Method = defineMethod({
  id: 'heat-sink-warming',
  version: '1.0.0',
  family: 'M8',
  name: 'Heat sink warming while it radiates',
  summary: 'Time to a target temperature under constant heat flow while the body radiates, and where it would settle.',
  equation:
    't = \\frac{m c_p}{\\varepsilon\\sigma A}\\int_{T_1}^{T_2}\\frac{dT}{T_\\infty^4 - T^4},\\quad T_\\infty^4 = \\frac{Q}{\\varepsilon\\sigma A} + T_s^4',
  inputs: {
    m: mass,
    c_p: heatCapacity,
    A: area,
    eps: emissivity,
    Q: { tex: 'Q', label: 'heat flow into the body', unit: 'kW', bounds: EXTENT },
    T_1: start,
    T_2: target,
    T_s: sinkTemperature,
  },
  outputs: {
    T_ss: { tex: 'T_\\infty', label: 'steady temperature', unit: 'K', temperature: 'absolute' },
    t: timeOutput,
  },
  proof: [
    scaleLine,
    line('T_ss', 'T_\\infty', '(Q / (eps * sigma * A) + T_s^4)^0.25', 'K'),
    line('r_1', 'r_1', 'T_1 / T_ss', '1'),
    line('r_2', 'r_2', 'T_2 / T_ss', '1'),
    line('t', 't', 'k_t / (2 * T_ss^3) * (atanh(r_2) + atan(r_2) - (atanh(r_1) + atan(r_1)))', 's'),
  ],
  constants: constantIds('sigma'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: EVERY,
  checks: [],
  solve({ m, c_p, A, eps, Q, T_1, T_2, T_s }) {
    const T_ss = Math.sqrt(Math.sqrt(Q / (eps * sigma * A) + T_s ** 4));
    if (T_2 >= T_ss) {
      return refuse('T_2', `The target ${show(T_2, 'K')} is never reached: the body settles at ${show(T_ss, 'K')}.`);
    }
    if (T_2 < T_1)
      return refuse(
        'T_2',
        `The target ${show(T_2, 'K')} is below the starting temperature ${show(T_1, 'K')}; this heat flow warms the body.`,
      );
    const [r_1, r_2] = [T_1 / T_ss, T_2 / T_ss];
    const integral = (Math.atanh(r_2) + Math.atan(r_2) - (Math.atanh(r_1) + Math.atan(r_1))) / (2 * T_ss ** 3);
    return { T_ss, t: ((m * c_p) / (eps * sigma * A)) * integral };
  },
});
