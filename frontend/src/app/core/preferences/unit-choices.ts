/** Something a person may prefer a unit for. The first unit of `units` is what a new person starts with. */
export interface UnitChoice {
  readonly id: string;
  readonly label: string;
  /** A unit of the dimension meant, to recognise it by. */
  readonly unit: string;
  readonly units: readonly string[];
}

export const AS_ENTERED = 'as entered';

/** The dimensions whose usual unit differs from desk to desk; everything else is shown in the unit it was entered in. */
export const UNIT_CHOICES: readonly UnitChoice[] = [
  { id: 'speed', label: 'Speed and delta-v', unit: 'm/s', units: ['km/s', 'm/s', 'c'] },
  { id: 'mass', label: 'Mass', unit: 'kg', units: ['t', 'kg'] },
  { id: 'power', label: 'Power', unit: 'W', units: ['MW', 'kW', 'W', 'GW'] },
  { id: 'time', label: 'Time, other than specific impulse', unit: 's', units: [AS_ENTERED, 'yr', 'd', 'h'] },
  { id: 'length', label: 'Length', unit: 'm', units: [AS_ENTERED, 'm', 'km'] },
  { id: 'force', label: 'Force', unit: 'N', units: [AS_ENTERED, 'N', 'kN'] },
  { id: 'energy', label: 'Energy', unit: 'J', units: [AS_ENTERED, 'J', 'MJ', 'GJ', 'TJ'] },
];

/** The three preferences that the header shows. */
export const SUMMARY_CHOICES = ['speed', 'mass', 'power'] as const;
