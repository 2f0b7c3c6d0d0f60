// Two dimensions that bring a feed to a perfect match at band centre, and one that brings its best match there.

import type { Complex } from '../numeric/complex.ts';

export interface Pair {
  readonly first: number;
  readonly second: number;
}

/** Both dimensions by Newton's method on Γ = 0, with finite differences and bounded steps.
 *  @param gammaAt  reflection at band centre for a pair of dimensions
 *  @param step  difference for the slopes, in the dimensions' unit
 *  @param longest  greatest change of each in one step
 *  @returns null where the search leaves `allowed` or finds no end */
export function solveMatch(
  gammaAt: (first: number, second: number) => Complex,
  guess: Pair,
  step: number,
  longest: Pair,
  allowed: (pair: Pair) => boolean,
): Pair | null {
  let { first, second } = guess;
  for (let i = 0; i < 40; i++) {
    const here = gammaAt(first, second);
    const byFirst = gammaAt(first + step, second);
    const bySecond = gammaAt(first, second + step);
    const a = (byFirst.re - here.re) / step;
    const b = (bySecond.re - here.re) / step;
    const c = (byFirst.im - here.im) / step;
    const d = (bySecond.im - here.im) / step;
    const determinant = a * d - b * c;
    if (determinant === 0 || !Number.isFinite(determinant)) return null;
    let dFirst = -(d * here.re - b * here.im) / determinant;
    let dSecond = -(a * here.im - c * here.re) / determinant;
    // Steps stay within what the linear picture covers.
    const shrink = Math.min(1, longest.first / Math.abs(dFirst), longest.second / Math.abs(dSecond));
    dFirst *= shrink;
    dSecond *= shrink;
    first += dFirst;
    second += dSecond;
    if (!allowed({ first, second })) return null;
    if (Math.abs(dFirst) < 1e-10 && Math.abs(dSecond) < 1e-10) return { first, second };
  }
  return null;
}

/** The length whose best match lies at a frequency: resonances go nearly as one over the length. */
export function lengthForBestMatch(
  bestMatchHzAt: (lengthM: number) => number,
  wantedHz: number,
  guessM: number,
): number {
  let length = guessM;
  for (let i = 0; i < 8; i++) {
    const next = length * (bestMatchHzAt(length) / wantedHz);
    const done = Math.abs(next - length) < 1e-9;
    length = next;
    if (done) break;
  }
  return length;
}
