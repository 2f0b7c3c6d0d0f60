// Microstrip over frequency: effective permittivity and impedance rise with it.
//
// Trap of convention: the normalised frequency is in GHz·mm here. Reprints in GHz·cm carry other constants; mixing
// the two is the commonest misprint.

import { quasiStaticLine, type StripGeometry } from './microstrip.ts';

export interface DispersiveLine {
  readonly impedanceOhm: number;
  readonly effectivePermittivity: number;
  readonly staticImpedanceOhm: number;
  readonly staticEffectivePermittivity: number;
}

/** Range of the source: εr ≤ 20, 0.1 ≤ w/h ≤ 100, h/λ0 ≤ 0.13. */
export const KIRSCHNING_JANSEN_RANGE = {
  permittivityMaximum: 20,
  widthMinimum: 0.1,
  widthMaximum: 100,
  heightOverWavelengthMaximum: 0.13,
} as const;

function normalisedFrequencyGhzMm(frequencyHz: number, heightM: number): number {
  return frequencyHz * 1e-9 * (heightM * 1e3);
}

/** Effective permittivity at a frequency.
 *  ε(f) = εr − (εr − ε(0)) / (1 + P(f))
 *  @param u  width over height
 *  @param staticPermittivity  ε(0)
 *  @param normalised  frequency × height [GHz·mm]
 *  Accuracy: 0.6 % (the paper's claim) within KIRSCHNING_JANSEN_RANGE.
 *  Source: M. Kirschning, R. H. Jansen, Electronics Letters 18 (1982) 272–273 */
export function dispersedPermittivity(
  u: number,
  permittivity: number,
  staticPermittivity: number,
  normalised: number,
): number {
  const p1 = 0.27488 + u * (0.6315 + 0.525 / (1 + 0.0157 * normalised) ** 20) - 0.065683 * Math.exp(-8.7513 * u);
  const p2 = 0.33622 * (1 - Math.exp(-0.03442 * permittivity));
  const p3 = 0.0363 * Math.exp(-4.6 * u) * (1 - Math.exp(-((normalised / 38.7) ** 4.97)));
  const p4 = 1 + 2.751 * (1 - Math.exp(-((permittivity / 15.916) ** 8)));
  const p = p1 * p2 * ((0.1844 + p3 * p4) * normalised) ** 1.5763;
  return permittivity - (permittivity - staticPermittivity) / (1 + p);
}

/** Impedance at a frequency over its quasi-static value, Z(f)/Z(0) (definition by power and current).
 *  Range as dispersedPermittivity. Claimed accuracy: none recovered; unverified beyond its limit f → 0 and
 *  the general rise with frequency.
 *  Source: R. H. Jansen, M. Kirschning, Archiv für Elektronik und Übertragungstechnik 37 (1983) 108–112 */
function impedanceRatio(
  u: number,
  permittivity: number,
  staticPermittivity: number,
  permittivityAtF: number,
  normalised: number,
): number {
  const er = permittivity;
  const fn = normalised;
  const r1 = Math.min(0.03891 * er ** 1.4, 20);
  const r2 = Math.min(0.267 * u ** 7, 20);
  const r3 = 4.766 * Math.exp(-3.228 * u ** 0.641);
  const r4 = 0.016 + (0.0514 * er) ** 4.524;
  const r5 = (fn / 28.843) ** 12;
  const r6 = Math.min(22.2 * u ** 1.92, 20);
  const r7 = 1.206 - 0.3144 * Math.exp(-r1) * (1 - Math.exp(-r2));
  const r8 = 1 + 1.275 * (1 - Math.exp(-0.004625 * r3 * er ** 1.674 * (fn / 18.365) ** 2.745));
  const e6 = (er - 1) ** 6;
  const r9 = ((5.086 * r4 * r5) / (0.3838 + 0.386 * r4)) * (Math.exp(-r6) / (1 + 1.2992 * r5)) * (e6 / (1 + 10 * e6));
  const r10 = 0.00044 * er ** 2.136 + 0.0184;
  const f6 = (fn / 19.47) ** 6;
  const r11 = f6 / (1 + 0.0962 * f6);
  const r12 = 1 / (1 + 0.00245 * u * u);
  const r13 = 0.9408 * permittivityAtF ** r8 - 0.9603;
  const r14 = (0.9408 - r9) * staticPermittivity ** r8 - 0.9603;
  const r15 = 0.707 * r10 * (fn / 12.3) ** 1.097;
  const r16 = 1 + 0.0503 * er * er * r11 * (1 - Math.exp(-((u / 15) ** 6)));
  const r17 = r7 * (1 - 1.1241 * (r12 / r16) * Math.exp(-0.026 * fn ** 1.15656 - r15));
  // At er = 1 both terms are small and of either sign: the line is then free of dispersion.
  if (r13 <= 0 || r14 <= 0) return 1;
  return (r13 / r14) ** r17;
}

/** Microstrip at a frequency: Hammerstad–Jensen with strip thickness, then Kirschning–Jansen dispersion.
 *  @param frequencyHz  0 gives the quasi-static line */
export function dispersiveLine(strip: StripGeometry, frequencyHz: number): DispersiveLine {
  const line = quasiStaticLine(strip);
  const u = strip.widthM / strip.heightM;
  const fn = normalisedFrequencyGhzMm(frequencyHz, strip.heightM);
  const e = dispersedPermittivity(u, strip.permittivity, line.effectivePermittivity, fn);
  const ratio = impedanceRatio(u, strip.permittivity, line.effectivePermittivity, e, fn);
  return {
    impedanceOhm: line.impedanceOhm * ratio,
    effectivePermittivity: e,
    staticImpedanceOhm: line.impedanceOhm,
    staticEffectivePermittivity: line.effectivePermittivity,
  };
}
