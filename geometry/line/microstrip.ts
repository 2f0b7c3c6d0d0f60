// Quasi-static microstrip: impedance and effective permittivity, strip thickness included.

import { ETA0_OHM } from '../units.ts';

/** A strip over a grounded slab. */
export interface StripGeometry {
  readonly widthM: number;
  readonly heightM: number;
  readonly permittivity: number;
  /** Strip thickness [m]; 0 for a sheet. */
  readonly thicknessM: number;
}

export interface QuasiStaticLine {
  readonly impedanceOhm: number;
  readonly effectivePermittivity: number;
  /** Impedance of the same strip in air [Ω]. */
  readonly airImpedanceOhm: number;
}

/** Widths over height for which the source claims its accuracy. */
export const HAMMERSTAD_JENSEN_RANGE = { minimum: 0.01, maximum: 100 } as const;

/** Impedance of a sheet strip in air over a ground plane.
 *  Z01(u) = η0/2π · ln( F/u + √(1 + (2/u)²) ),  F = 6 + (2π − 6) exp(−(30.666/u)^0.7528)
 *  @param u  width over height
 *  @returns Z01 [Ω]
 *  Accuracy: 0.01 % for u ≤ 1, 0.03 % for u ≤ 1000 (the paper's claim).
 *  Source: E. Hammerstad, O. Jensen, Accurate models for microstrip computer-aided design, IEEE MTT-S Digest 1980, 407–409 */
export function airImpedanceOhm(u: number): number {
  const f = 6 + (2 * Math.PI - 6) * Math.exp(-((30.666 / u) ** 0.7528));
  return (ETA0_OHM / (2 * Math.PI)) * Math.log(f / u + Math.hypot(1, 2 / u));
}

/** Quasi-static effective permittivity of a sheet strip.
 *  (εr+1)/2 + (εr−1)/2 · (1 + 10/u)^(−ab)
 *  @param u  width over height, 0.01 to 100
 *  @param permittivity  εr, 1 to 128
 *  Accuracy: 0.2 % (the paper's claim).
 *  Source: Hammerstad & Jensen 1980, as above */
export function sheetEffectivePermittivity(u: number, permittivity: number): number {
  const a = 1 + Math.log((u ** 4 + (u / 52) ** 2) / (u ** 4 + 0.432)) / 49 + Math.log(1 + (u / 18.1) ** 3) / 18.7;
  const b = 0.564 * ((permittivity - 0.9) / (permittivity + 3)) ** 0.053;
  return (permittivity + 1) / 2 + ((permittivity - 1) / 2) * (1 + 10 / u) ** (-a * b);
}

/** Quasi-static microstrip with the strip's thickness, by two equivalent widths.
 *  Δu1 = (T/π) ln(1 + 4e/(T coth²√(6.517u))),  Δur = ½(1 + 1/cosh√(εr−1)) Δu1,  T = t/h, e = 2.71828…
 *  ε = εe(ur) (Z01(u1)/Z01(ur))²,  Z0 = Z01(ur)/√εe(ur)
 *  Valid: 0.01 ≤ w/h ≤ 100, strip thinner than the slab. Throws: nothing; callers check the range.
 *  Source: Hammerstad & Jensen 1980, as above */
export function quasiStaticLine(strip: StripGeometry): QuasiStaticLine {
  const u = strip.widthM / strip.heightM;
  const t = strip.thicknessM / strip.heightM;
  let widened = 0;
  if (t > 0) {
    const coth = 1 / Math.tanh(Math.sqrt(6.517 * u));
    widened = (t / Math.PI) * Math.log(1 + (4 * Math.E) / (t * coth * coth));
  }
  const u1 = u + widened;
  const ur = u + 0.5 * (1 + 1 / Math.cosh(Math.sqrt(strip.permittivity - 1))) * widened;
  const sheetPermittivity = sheetEffectivePermittivity(ur, strip.permittivity);
  const z1 = airImpedanceOhm(u1);
  const zr = airImpedanceOhm(ur);
  return {
    impedanceOhm: zr / Math.sqrt(sheetPermittivity),
    effectivePermittivity: sheetPermittivity * (z1 / zr) ** 2,
    airImpedanceOhm: z1,
  };
}
