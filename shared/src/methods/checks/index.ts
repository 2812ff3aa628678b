import { ANNIHILATION_CHECKS } from './annihilation';
import type { Check } from './check';
import { HEAT_AND_FUSION_CHECKS } from './heat-and-fusion';
import { JET_CHECKS } from './jets';
import { MASS_CHECKS } from './masses';
import { NOZZLE_CHECKS } from './nozzles';
import { RADIATOR_CHECKS } from './radiators';
import { ROCKET_CHECKS } from './rockets';
import { SAIL_AND_TRANSFER_CHECKS } from './sails-and-transfers';
import { TANK_CHECKS } from './tanks';
import { TRIP_CHECKS } from './trips';

/** Every reference value that the tests of this build compare with the library. */
export const METHOD_CHECKS: readonly Check[] = [
  ...ROCKET_CHECKS,
  ...TRIP_CHECKS,
  ...JET_CHECKS,
  ...NOZZLE_CHECKS,
  ...RADIATOR_CHECKS,
  ...HEAT_AND_FUSION_CHECKS,
  ...ANNIHILATION_CHECKS,
  ...SAIL_AND_TRANSFER_CHECKS,
  ...TANK_CHECKS,
  ...MASS_CHECKS,
];
