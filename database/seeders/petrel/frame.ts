import { all, element, policy, settings, type Phrase } from '../script';
import { ASSUMED } from './sources';

const ESA = 'Study assumption after ESA SRE-PA/2011.097, margin philosophy (contents seen)';

/** Settings, margin policy and product tree of Petrel. */
export const frame: Phrase = all(
  settings({ maturity: 'concept', quorum: 2 }),
  policy('delta-v', 5, 'margin over the limit, held at vehicle level', ESA),
  policy('mass', 20, '(limit − predicted mass) / limit', ESA),
  policy('power', 20, 'distance from the limit over the limit, at end of life', ESA),
  policy('specific power', 10, 'margin over the limit, predicted mass with growth allowance', ASSUMED),
  policy('heat rejection', 5, 'margin over the limit, at the hottest sink', ASSUMED),
  policy('thrust', 10, 'margin over the limit, at full power', ASSUMED),
  policy('duration', 5, '(limit − duration) / limit', ASSUMED),
  element('VEH', 'Vehicle', null, 'The whole tug, without cargo.'),
  element('PWR', 'Power system', 'VEH', 'Makes electric power and gets rid of the heat that comes with it.'),
  element('RCT', 'Reactor and shield', 'PWR', 'Fast-spectrum reactor with shadow shield.'),
  element('CNV', 'Power conversion', 'PWR', 'Two closed Brayton loops, each able to carry half of full power.'),
  element('RAD', 'Main radiator', 'PWR', 'Flat two-sided heat-pipe panels with a pumped coolant loop.'),
  element('PRP', 'Propulsion system', 'VEH', 'Turns electric power and propellant into thrust.'),
  element('THR', 'Thrusters', 'PRP', 'Twelve ion thrusters in four pods; eight run at a time.'),
  element('PPU', 'Power processing', 'PRP', 'Converters between the bus and the thrusters.'),
  element('TNK', 'Propellant tank', 'PRP', 'One insulated sphere for liquid argon.'),
  element('STR', 'Structure', 'VEH', 'Thrust frame and the boom that keeps the reactor away.'),
  element('AVI', 'Avionics', 'VEH', 'Attitude control, computing and communication.'),
  element('PAY', 'Cargo bay', 'VEH', 'Adapter, shade and release mechanism for the cargo.'),
);
