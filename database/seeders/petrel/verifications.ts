import { all, record, verify, type Phrase } from '../script';

const REVIEW = { method: 'review of design', stage: 'concept' } as const;

/** What shows that the mission and the vehicle comply. */
export const missionVerifications: Phrase = all(
  verify('MIS-001', 'cargo.m_c', { criterion: 'Cargo mass left over is at least the limit.' }),
  verify('MIS-002', 'thrusting.t', { criterion: 'Time that spends the propellant load at full power.' }),
  verify('MIS-003', 'duration.t_tot'),
  verify('MIS-004', 'outbound.h_0'),
  verify('MIS-005', 'reliability.R'),
  verify('MIS-006', null, {
    ...REVIEW,
    criterion: 'Disposal orbits in the mission definition stay clear of both moons.',
  }),
  verify('VEH-001', 'delta-v.dv', { criterion: 'Rocket equation with the mass of the roll-up.' }),
  verify('VEH-002', 'roll-up.m', { criterion: 'Total of the mass roll-up with growth allowances.' }),
  verify('VEH-003', 'specific-power.alpha'),
  verify('VEH-004', 'acceleration.a'),
  verify('VEH-005', 'pointing.th'),
  verify('VEH-006', 'dose.D'),
);

/** What shows that systems and units comply. */
export const systemVerifications: Phrase = all(
  verify('PRP-001', 'outbound.dv_out'),
  verify('PRP-002', 'capture.dv_cap'),
  verify('PRP-003', null, { criterion: 'Delta-v of the disposal orbit, once it is chosen.' }),
  verify('PRP-004', 'thrusting.F', { gate: 'preliminary design review' }),
  verify('PRP-005', 'need.m_need'),
  verify('PWR-001', 'end-of-life.P_eol'),
  verify('PWR-002', 'unit-masses.m_P'),
  verify('PWR-003', 'end-of-life.V_bus'),
  verify('STR-001', 'boom.f_1'),
  verify('STR-002', 'pointing.th_2'),
  verify('AVI-001', 'pointing.th_1'),
  verify('AVI-002', null, {
    ...REVIEW,
    criterion: 'The autonomy concept brings the vehicle to its safe state within the time.',
  }),
  verify('PAY-001', 'cargo-temperature.T_c'),
  verify('RCT-001', 'conversion.P_th'),
  verify('RCT-002', 'unit-masses.m_R'),
  verify('RCT-003', 'reliability.R_r'),
  verify('RCT-004', 'burn-up.b'),
  verify('CNV-001', 'conversion.eta_c'),
  verify('CNV-002', 'unit-masses.m_C'),
  verify('CNV-003', 'reliability.R_c'),
  verify('RAD-001', 'peak.T_pk'),
  verify('RAD-002', 'rejection.Q', { criterion: 'Heat rejected with its uncertainty stays above the limit.' }),
  verify('RAD-003', 'coolant.s'),
  verify('RAD-004', 'panels.m_rad'),
  verify('THR-001', 'thruster-load.F_1', { gate: 'preliminary design review' }),
  verify('THR-002', 'thruster-load.t_1'),
  verify('THR-003', 'pointing.th_3'),
  verify('THR-004', 'reliability.R_t'),
  verify('PPU-001', 'thruster-load.Q_u'),
  verify('TNK-001', 'tank.m_cap'),
  verify('TNK-002', 'tank.m_tank'),
  verify('TNK-003', 'tank.n_b'),
  verify('TNK-004', 'boil-off.b'),
);

/** Findings of people where a design is reviewed. */
export const findings: Phrase = all(
  record('MIS-006', true, 'PTL-MD-001', '2', 'Section 6 keeps both moons out of the disposal orbits.'),
  record('AVI-002', true, 'PTL-TN-009', '1', 'The sequence ends within 9 h in the slowest case.'),
);
