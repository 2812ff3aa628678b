import { CONSTANTS, type Constant } from '@shared/constants';

function bySymbol(symbol: string): Constant {
  const found = CONSTANTS.find((constant) => constant.symbol === symbol);
  if (!found) throw new Error(`The table of constants has no ${symbol}.`);
  return found;
}

/** Ids of constants by the symbols that proof lines use. */
export function constantIds(...symbols: string[]): readonly string[] {
  return symbols.map((symbol) => bySymbol(symbol).id);
}

/** Speed of light in vacuum, m/s. */
export const c = bySymbol('c').value;
/** Standard acceleration of free fall, m/s². */
export const g_0 = bySymbol('g_0').value;
/** Stefan–Boltzmann constant, W/(m² K⁴). */
export const sigma = bySymbol('sigma').value;
/** Elementary charge, C. */
export const q_e = bySymbol('q_e').value;
/** Molar gas constant, J/(mol K). */
export const R_gas = bySymbol('R_gas').value;
