import { EMISSIVITY, SINK_TEMPERATURE, TEMPERATURE } from '../bounds';
import { refuse, show } from '../define';

export const RADIATION_VALIDITY =
  'Grey diffuse surface at uniform temperature; the sink temperature is that of the equivalent black surroundings.';
export const RADIATION_REFERENCE =
  'Stefan–Boltzmann law; F. P. Incropera and D. P. DeWitt, Fundamentals of Heat and Mass Transfer, ch. 12–13 (from memory).';

export const emissivity = { tex: '\\varepsilon', label: 'emissivity', unit: '1', bounds: EMISSIVITY };
export const radiatorTemperature = {
  tex: 'T_r',
  label: 'radiator temperature',
  unit: 'K',
  temperature: 'absolute' as const,
  bounds: TEMPERATURE,
};
export const sinkTemperature = {
  tex: 'T_s',
  label: 'sink temperature',
  unit: 'K',
  temperature: 'absolute' as const,
  bounds: SINK_TEMPERATURE,
  default: 0,
};
export const finEfficiency = {
  tex: '\\eta_f',
  label: 'fin efficiency',
  unit: '1',
  bounds: { min: 0, minExclusive: true, max: 1, reason: 'a fin is nowhere hotter than its root' },
  default: 1,
};

/** Refusal of a radiator that is not warmer than its sink. */
export function sinkTooWarm(T_r: number, T_s: number) {
  return refuse(
    'T_r',
    `The radiator temperature ${show(T_r, 'K')} is not above the sink temperature ${show(T_s, 'K')}; no net heat leaves. Give a radiator warmer than its sink.`,
  );
}
