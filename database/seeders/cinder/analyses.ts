import { all, formula, method, type Phrase } from '../script';

/** Tank, masses, delta-v and engine of Cinder. */
export const analyses: Phrase = all(
  formula('tank', {
    title: 'Hydrogen tank',
    purpose: 'Load and shell mass of the spherical tank.',
    element: 'TNK',
    assumptions: 'Thin wall; fittings and supports add 35 % to the shell.',
    inputs: { V_T: 'v-t', rho_H: 'rho-h', f_u: 'f-ull', t_w: 't-w', rho_w: 'rho-w' },
    lines: [
      ['m_cap', 'rho_H * V_T * (1 - f_u)', 't', 'hydrogen that fits in'],
      ['r', 'cbrt(3 * V_T / (4 * 3.141592653589793))', 'm', 'radius'],
      ['A_T', '4 * 3.141592653589793 * r^2', 'm^2', 'surface'],
      ['m_T', '1.35 * rho_w * A_T * t_w', 't', 'shell mass with fittings'],
    ],
  }),
  formula('boil-off', {
    title: 'Hydrogen boil-off',
    purpose: 'Share of the load that boils off in a day.',
    element: 'TNK',
    inputs: { k_i: 'k-i', A_T: 'tank.A_T', T_o: 't-o', T_H: 't-h', d_i: 'd-i', h_H: 'h-h', m_p: 'm-p' },
    lines: [
      ['Q_l', 'k_i * A_T * (T_o - T_H) / d_i', 'W', 'heat leak'],
      ['b', 'Q_l / (h_H * m_p)', '%/d', 'boil-off rate'],
    ],
  }),
  method('roll-up', 'mass-roll-up', {
    title: 'Mass roll-up',
    purpose: 'Initial mass of the loaded stage with its payload.',
    element: 'STG',
    inputs: {
      m_p: 'm-p',
      m_pl: 'm-pl',
      mass_1: 'm-eng',
      growth_1: 'g-new',
      mass_2: 'm-shd',
      growth_2: 'g-new',
      mass_3: 'm-str',
      growth_3: 'g-new',
      mass_4: 'tank.m_T',
      growth_4: 'g-new',
      mass_5: 'm-ins',
      growth_5: 'g-new',
      mass_6: 'm-avi',
      growth_6: 'g-list',
      mass_7: 'm-res',
      growth_7: 'g-none',
    },
  }),
  method('delta-v', 'rocket-equation', {
    title: 'Transfer delta-v',
    purpose: 'Delta-v that the usable hydrogen gives the loaded stage.',
    element: 'STG',
    inputs: { I_sp: 'isp', m_0: 'roll-up.m', m_p: 'm-p' },
  }),
  method('thrust', 'mass-flow-thrust', {
    title: 'Thrust and burn time',
    purpose: 'Thrust at full flow and the time that spends the usable hydrogen.',
    element: 'ENG',
    inputs: { mdot: 'mdot', v_e: 'delta-v.v_e', m_p: 'm-p' },
  }),
  formula('engine', {
    title: 'Engine loads',
    purpose: 'Reactor power and thrust over weight at the start.',
    element: 'ENG',
    inputs: { P_j: 'thrust.P_j', eta_j: 'eta-th', F: 'thrust.F', m_0: 'roll-up.m', g_0: '$g_0' },
    lines: [
      ['P_r', 'P_j / eta_j', 'MW', 'reactor power'],
      ['n_0', 'F / (m_0 * g_0)', '', 'thrust over weight at the start'],
    ],
  }),
  formula('payload', {
    title: 'Payload that the stage could send',
    purpose: 'Largest payload that still gets the delta-v of the transfer.',
    element: 'STG',
    inputs: { m_p: 'm-p', dv_n: 'dv-need', v_e: 'delta-v.v_e', m_dry: 'roll-up.m_pred' },
    lines: [
      ['m_f', 'm_p / expm1(dv_n / v_e)', 't', 'final mass that fits the delta-v'],
      ['m_c', 'm_f - m_dry', 't', 'payload'],
    ],
  }),
);
/** Analyses by name, in order. */
export const ANALYSES = ['tank', 'boil-off', 'roll-up', 'delta-v', 'thrust', 'engine', 'payload'] as const;
