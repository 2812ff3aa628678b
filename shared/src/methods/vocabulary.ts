/** Concept classes by which the method picker groups the library. */
export const CHEMICAL = 'chemical';
export const NUCLEAR_THERMAL = 'nuclear-thermal';
export const NUCLEAR_ELECTRIC = 'nuclear-electric';
export const SOLAR_ELECTRIC = 'solar-electric';
export const FUSION = 'fusion';
export const ANNIHILATION = 'annihilation';
export const BEAMED = 'beamed';
export const SOLAR_SAIL = 'solar-sail';

export const ROCKETS = [CHEMICAL, NUCLEAR_THERMAL, NUCLEAR_ELECTRIC, SOLAR_ELECTRIC, FUSION, ANNIHILATION];
export const ELECTRIC = [NUCLEAR_ELECTRIC, SOLAR_ELECTRIC];
export const FAST = [FUSION, ANNIHILATION, BEAMED];
export const EVERY = [...ROCKETS, BEAMED, SOLAR_SAIL];

/** Cautions printed on method cards, exports and sign-off pages. */
export const SHIELDING_CAUTION =
  'Supports a concept decision only. Radiation shielding and dose are subject to local codes and to licensed radiation protection practice.';
export const REACTOR_CAUTION =
  'Supports a concept decision only. Nuclear power and propulsion are subject to local codes and to licensed nuclear engineering practice.';
export const PRESSURE_CAUTION =
  'Supports a concept decision only. Pressure vessels are subject to local codes and to licensed engineering practice.';
export const CRYOGEN_CAUTION =
  'Supports a concept decision only. Cryogenic storage is subject to local codes and to licensed engineering practice.';
