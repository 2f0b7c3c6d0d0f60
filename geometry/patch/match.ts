// What a one-port does over frequency, read off its impedance: best match, band, loaded pole.

import { add, type Complex, complex, divide, magnitude, multiply, scale, subtract } from '../numeric/complex.ts';
import { findMinimum, findRoot } from '../numeric/search.ts';

/** Impedance over complex frequency [Hz → Ω]. */
export type ImpedanceOf = (frequencyHz: Complex) => Complex;

/** Reflection of an impedance in a reference [Ω]. */
export function reflection(impedance: Complex, referenceOhm: number): Complex {
  const reference = complex(referenceOhm);
  return divide(subtract(impedance, reference), add(impedance, reference));
}

/** Reflections below this are noise of the arithmetic: return losses end at 120 dB, and stay finite. */
const LEAST_REFLECTION = 1e-6;

export function returnLossDb(reflectionMagnitude: number): number {
  return -20 * Math.log10(Math.max(LEAST_REFLECTION, reflectionMagnitude));
}

/** Reflection at the far end of a line: the load's, referred to the line, turned and weakened, referred back.
 *  @param line  impedance [Ω], delay [s] and one-way loss [Np] of the line */
export function throughLine(
  load: Complex,
  line: { readonly impedanceOhm: number; readonly delayS: number; readonly lossNp: number },
  frequencyHz: Complex,
): Complex {
  const atLoad = reflection(load, line.impedanceOhm);
  // e^(−2(α + jωτ)) with a complex frequency.
  const turn = -4 * Math.PI * line.delayS;
  const size = Math.exp(-2 * line.lossNp - turn * frequencyHz.im);
  const angle = turn * frequencyHz.re;
  const here = multiply(atLoad, complex(size * Math.cos(angle), size * Math.sin(angle)));
  return divide(scale(add(complex(1), here), line.impedanceOhm), subtract(complex(1), here));
}

/** Frequencies scanned for the best match, over the bare resonance: feeds raise it by up to 4 %. */
const SEARCH_FROM = 0.95;
const SEARCH_TO = 1.1;
const SEARCH_STEPS = 75;

/** Where a function is smallest between two frequencies: a scan, then golden section around the best point. */
function scanMinimum(f: (frequencyHz: number) => number, fromHz: number, toHz: number, steps: number): number {
  const step = (toHz - fromHz) / steps;
  let best = 0;
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i <= steps; i++) {
    const value = f(fromHz + i * step);
    if (value < least) {
      least = value;
      best = i;
    }
  }
  const centre = fromHz + best * step;
  return findMinimum(f, Math.max(fromHz, centre - step), Math.min(toHz, centre + step), centre * 1e-8);
}

export interface Match {
  readonly bestMatchHz: number;
  readonly bestReflection: number;
}

/** The frequency of least reflection near a natural resonance. */
export function bestMatch(impedance: ImpedanceOf, referenceOhm: number, bareHz: number): Match {
  const gamma = (f: number): number => magnitude(reflection(impedance(complex(f)), referenceOhm));
  const bestMatchHz = scanMinimum(gamma, bareHz * SEARCH_FROM, bareHz * SEARCH_TO, SEARCH_STEPS);
  return { bestMatchHz, bestReflection: gamma(bestMatchHz) };
}

/** The greatest resistance near a natural resonance, and where it is. */
export function peakResistance(
  impedance: ImpedanceOf,
  bareHz: number,
): { readonly frequencyHz: number; readonly resistanceOhm: number } {
  const negative = (f: number): number => -impedance(complex(f)).re;
  const frequencyHz = scanMinimum(negative, bareHz * SEARCH_FROM, bareHz * SEARCH_TO, SEARCH_STEPS);
  return { frequencyHz, resistanceOhm: -negative(frequencyHz) };
}

/** Width of the band around the best match where the standing-wave ratio stays within a limit [Hz]; null where it
 *  never does. */
export function matchedBandwidthHz(
  impedance: ImpedanceOf,
  referenceOhm: number,
  match: Match,
  vswr: number,
): number | null {
  const limit = (vswr - 1) / (vswr + 1);
  if (match.bestReflection >= limit) return null;
  const excess = (f: number): number => magnitude(reflection(impedance(complex(f)), referenceOhm)) - limit;
  const edge = (direction: number): number => {
    // Doubling steps outward until the limit is passed; within an octave it always is.
    for (let step = match.bestMatchHz * 0.002; step < match.bestMatchHz / 2; step *= 1.5) {
      const f = match.bestMatchHz + direction * step;
      if (excess(f) > 0) return findRoot(excess, match.bestMatchHz, f, match.bestMatchHz * 1e-9);
    }
    return match.bestMatchHz * (1 + direction / 2);
  };
  return edge(1) - edge(-1);
}

/** The natural frequency of patch, feed and generator together: where Z(f) + reference = 0 in the complex plane.
 *  Newton's method from the best match on (Z+R)/(Z−R), whose zero it is.
 *  @returns real part [Hz] and quality f/(2 Im f), or null where the iteration leaves the neighbourhood */
export function loadedPole(
  impedance: ImpedanceOf,
  referenceOhm: number,
  startHz: number,
  startQuality: number,
): { readonly frequencyHz: number; readonly quality: number } | null {
  let f = complex(startHz, startHz / (2 * startQuality));
  const zeroOf = (x: Complex): Complex => {
    const z = impedance(x);
    return divide(add(z, complex(referenceOhm)), subtract(z, complex(referenceOhm)));
  };
  for (let i = 0; i < 60; i++) {
    const h = startHz * 1e-7;
    const value = zeroOf(f);
    const slope = scale(subtract(zeroOf(add(f, complex(h))), value), 1 / h);
    let step = divide(value, slope);
    const greatest = startHz * 0.01;
    const size = magnitude(step);
    if (size > greatest) step = scale(step, greatest / size);
    f = subtract(f, step);
    if (size < startHz * 1e-11) break;
  }
  const quality = f.re / (2 * f.im);
  const near = Math.abs(f.re / startHz - 1) < 0.1 && quality > 0.5 && magnitude(zeroOf(f)) < 1e-3;
  return near ? { frequencyHz: f.re, quality } : null;
}
