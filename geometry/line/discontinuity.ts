// Where a strip ends: how much longer it acts than it is drawn.

/** Open-end extension over height.
 *  Δl/h = ξ1 ξ3 ξ5 / ξ4
 *  @param u  width over height, 0.01 to 100
 *  @param permittivity  εr ≤ 50
 *  @param effectivePermittivity  of the strip at the working frequency
 *  @returns Δl/h
 *  Accuracy: 2.5 % (the paper's claim, from memory). Holds neither radiation nor the coupling of a patch's two edges.
 *  Source: M. Kirschning, R. H. Jansen, N. H. L. Koster, Electronics Letters 17 (1981) 123–125 */
export function openEndOverHeight(u: number, permittivity: number, effectivePermittivity: number): number {
  const power = effectivePermittivity ** 0.81;
  const widthPower = u ** 0.8544;
  const x1 = (0.434907 * ((power + 0.26) / (power - 0.189)) * (widthPower + 0.236)) / (widthPower + 0.87);
  const x2 = 1 + u ** 0.371 / (2.358 * permittivity + 1);
  const x3 = 1 + (0.5274 * Math.atan(0.084 * u ** (1.9413 / x2))) / effectivePermittivity ** 0.9236;
  const x4 = 1 + 0.0377 * Math.atan(0.067 * u ** 1.456) * (6 - 5 * Math.exp(0.036 * (1 - permittivity)));
  const x5 = 1 - 0.218 * Math.exp(-7.5 * u);
  return (x1 * x3 * x5) / x4;
}

/** The textbook's open-end extension over height, for comparison only: too short for wide strips on low permittivity.
 *  Δl/h = 0.412 (ε+0.3)(u+0.264) / ((ε−0.258)(u+0.8))
 *  Source: E. O. Hammerstad, 1975, as printed by C. A. Balanis, Antenna Theory, 4th ed., eq. (14-2) */
export function textbookOpenEndOverHeight(u: number, effectivePermittivity: number): number {
  const e = effectivePermittivity;
  return (0.412 * (e + 0.3) * (u + 0.264)) / ((e - 0.258) * (u + 0.8));
}
