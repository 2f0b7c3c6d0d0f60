// How far the resonance may lie from its nominal value, and why: contributions at three sigma, added in squares.

import type { Contribution } from './design.ts';

/** One input with its spread. */
export interface Spread {
  readonly cause: string;
  /** Resonance with the input moved by its whole tolerance up, and down [Hz]. */
  readonly highHz: number;
  readonly lowHz: number;
}

export interface Interval {
  readonly lowHz: number;
  readonly highHz: number;
  readonly contributions: readonly Contribution[];
}

/** Root of the sum of squares of independent contributions, largest first.
 *  @param modelError  half width of the model's own error, relative
 *  The tolerances are three-sigma values, and so is the interval. */
export function resonanceInterval(nominalHz: number, spreads: readonly Spread[], modelError: number): Interval {
  const contributions = [
    ...spreads.map(({ cause, highHz, lowHz }) => ({ cause, halfWidthHz: Math.abs(highHz - lowHz) / 2 })),
    { cause: 'model error', halfWidthHz: modelError * nominalHz },
  ]
    .filter(({ halfWidthHz }) => halfWidthHz > 0)
    .sort((a, b) => b.halfWidthHz - a.halfWidthHz);
  const half = Math.hypot(...contributions.map(({ halfWidthHz }) => halfWidthHz));
  return { lowHz: nominalHz - half, highHz: nominalHz + half, contributions };
}
