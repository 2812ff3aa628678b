import { all, formula, method, type Phrase } from '../script';

/** From mass ratio to heat, in the order in which each rests on the one before. */
export const analyses: Phrase = all(
  method('propellant', 'relativistic-propellant', {
    title: 'Mass ratio for the cruise speed',
    purpose: 'Propellant and initial mass that bring the dry mass to cruise speed.',
    element: 'PRB',
    assumptions: 'One speed change; the probe does not brake.',
    inputs: { w: 'w', v: 'v-end', m_f: 'm-dry' },
  }),
  method('power', 'annihilation-power', {
    title: 'Energy per second at the engine',
    purpose: 'Mean power of the annihilation and the part that stays in the structure.',
    element: 'ENG',
    assumptions: 'All propellant annihilates, half of it antimatter, evenly over the time of thrust.',
    inputs: { m: 'propellant.m_p', t: 't-burn', f_g: 'f-gam', f_abs: 'f-abs' },
  }),
  method('engine-flux', 'surface-flux-ratio', {
    title: 'Heat flux on the engine',
    purpose:
      'Flux that the engine structure takes, against the surface of the Sun, and its temperature by the fourth root.',
    element: 'ENG',
    assumptions: 'The structure sheds its heat where it takes it, as a black surface.',
    inputs: { P: 'power.P_abs', A: 'a-eng' },
  }),
  method('envelope', 'cylinder-envelope-area', {
    title: 'Convex envelope of the radiators',
    purpose: 'Largest area that fins inside the cylinders can radiate from, whatever their number.',
    element: 'RAD',
    assumptions: 'Side surface only; end faces see engine and payload.',
    inputs: { N: 'n-cyl', D: 'd-cyl', L: 'l-cyl' },
  }),
  method('rejection', 'radiator-heat-rejection', {
    title: 'Heat that the radiators reject',
    purpose: 'Heat rejected from the envelope at the radiator temperature.',
    element: 'RAD',
    inputs: { A: 'envelope.A', eps: 'eps', T_r: 't-rad' },
  }),
  method('share', 'implied-efficiency', {
    title: 'Share of the absorbed heat rejected',
    purpose: 'How much of what the structure absorbs the radiators can reject.',
    element: 'RAD',
    inputs: { P: 'power.P_abs', Q: 'rejection.Q' },
  }),
  method('balance', 'steady-surface-temperature', {
    title: 'Radiator temperature in balance',
    purpose: 'Temperature at which the radiators would reject all that is absorbed.',
    element: 'RAD',
    inputs: { Q: 'power.P_abs', A: 'envelope.A', eps: 'eps' },
  }),
  method('shield', 'gamma-shield', {
    title: 'Gamma shield',
    purpose: 'Thickness and mass of the shield in front of the payload.',
    element: 'SHD',
    assumptions: 'First interactions with a build-up factor for the cascade; flat disc.',
    inputs: { mu_rho: 'mu-rho', rho: 'rho-w', K: 'k-red', A: 'a-shd', B: 'b-up' },
  }),
  method('front', 'interstellar-heating', {
    title: 'Front shield in the interstellar medium',
    purpose: 'Heat flux and temperature of the front shield at cruise speed.',
    element: 'FRO',
    inputs: { v: 'v-end', n: 'n-gas', m_a: 'm-atom', f_d: 'f-dust', eps: 'eps-f' },
  }),
  method('grain', 'dust-impact', {
    title: 'Largest grain',
    purpose: 'Energy of the largest grain expected at cruise speed.',
    element: 'FRO',
    inputs: { v: 'v-end', d: 'd-grain', rho: 'rho-grain' },
  }),
  formula('antimatter', {
    title: 'Antimatter on board',
    purpose: 'Half of the propellant is antimatter.',
    element: 'ENG',
    inputs: { m_p: 'propellant.m_p' },
    lines: [['m_a', 'm_p / 2', 't', 'antimatter']],
  }),
);
