// The width of a line from its impedance.

import { findRoot } from '../numeric/search.ts';
import { dispersiveLine } from './microstrip-dispersion.ts';

/** Widths over height that are searched: the range of the analysis formulas. */
const NARROWEST_U = 0.01;
const WIDEST_U = 100;

/** Width of the microstrip with a wanted impedance at a frequency, by inverting the analysis; a wider strip has a
 *  lower impedance, so the answer is unique.
 *  @returns width [m], or null where no width between 0.01 h and 100 h gives it */
export function lineWidthM(
  wantedOhm: number,
  slab: { readonly heightM: number; readonly permittivity: number; readonly thicknessM: number },
  frequencyHz: number,
): number | null {
  const excess = (logU: number): number =>
    dispersiveLine({ widthM: Math.exp(logU) * slab.heightM, ...slab }, frequencyHz).impedanceOhm - wantedOhm;
  const low = Math.log(NARROWEST_U);
  const high = Math.log(WIDEST_U);
  if (excess(low) < 0 || excess(high) > 0) return null;
  return Math.exp(findRoot(excess, low, high, 1e-12)) * slab.heightM;
}
