import { EXTENT, SURFACE_SHARE } from '../bounds';

export const SAIL_VALIDITY = 'Flat sail, large against the wavelength; specular reflection.';
export const SAIL_REFERENCE = 'C. R. McInnes, Solar Sailing, 1999, ch. 2 (from memory).';
export const irradiance = { tex: 'S', label: 'irradiance at the sail', unit: 'W/m^2', bounds: EXTENT };
export const reflectivity = { tex: 'r', label: 'reflectivity', unit: '1', bounds: SURFACE_SHARE };
