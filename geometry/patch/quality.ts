// Unloaded quality of a bare patch, split into where the energy goes, and the resistance at its radiating edge.

import { openEndOverHeight } from '../line/discontinuity.ts';
import { roughnessFactor, skinDepthM } from '../line/loss.ts';
import { dispersiveLine } from '../line/microstrip-dispersion.ts';
import { ETA0_OHM, MU0_H_PER_M, SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import { CALIBRATION_BOX, clampToRange, type PatchOnSlab } from './bare-resonance.ts';
import { modePowers } from './radiation.ts';

export interface Conductor {
  /** [S/m]; null for a conductor without resistance. */
  readonly conductivitySPerM: number | null;
  /** Root-mean-square roughness [m]. */
  readonly roughnessM: number;
}

/** Each partial Q is null where that loss is absent; 1/total is the sum of the inverses. */
export interface QualitySplit {
  readonly total: number;
  readonly radiation: number;
  readonly surfaceWave: number | null;
  readonly dielectric: number | null;
  readonly conductor: number | null;
  /** Radiated over accepted power; the surface wave counts as loss. */
  readonly efficiency: number;
  readonly directivityDbi: number;
  /** Resistance at the radiating edge, loss included [Ω]. */
  readonly edgeResistanceOhm: number;
  /** The same with the slab and copper lossless: what a textbook computes. */
  readonly losslessEdgeResistanceOhm: number;
}

/** Length and width over which the mode's field extends: the copper and an open-end extension on every side. */
export function effectiveSize(
  patch: PatchOnSlab,
  frequencyHz: number,
): { readonly lengthM: number; readonly widthM: number } {
  const extension = (acrossM: number): number => {
    const strip = { widthM: acrossM, heightM: patch.heightM, permittivity: patch.permittivity, thicknessM: 0 };
    const e = dispersiveLine(strip, frequencyHz).effectivePermittivity;
    return openEndOverHeight(acrossM / patch.heightM, patch.permittivity, e) * patch.heightM;
  };
  return {
    lengthM: patch.lengthM + 2 * extension(patch.widthM),
    widthM: patch.widthM + 2 * extension(patch.lengthM),
  };
}

/** ln of the mode's Q over the Q of its current without edge currents.
 *  −(1.30321 x ln x q − 2.13626 xr − 1.79568 x ln x − 4.13933 x + 32.4324 x²rq + 4.33276 xq)
 *  x = h/λd, q = 1/εr, r = ln(W/L), each kept within the calibration's box.
 *  Source: fitted to the lossless Q of fixtures/published/resonance_reference.csv; rms 1.2 %, 2.9 % at most; 1.4 %
 *  rms on rows left out of the fit. */
function calibration(patch: PatchOnSlab, frequencyHz: number): number {
  const x = clampToRange(
    (patch.heightM * Math.sqrt(patch.permittivity) * frequencyHz) / SPEED_OF_LIGHT_M_PER_S,
    CALIBRATION_BOX.heightOverWavelength,
  );
  const q = 1 / clampToRange(patch.permittivity, CALIBRATION_BOX.permittivity);
  const r = Math.log(clampToRange(patch.widthM / patch.lengthM, CALIBRATION_BOX.aspect));
  const xl = x * Math.log(x);
  return -(1.30321 * xl * q - 2.13626 * x * r - 1.79568 * xl - 4.13933 * x + 32.4324 * x * x * r * q + 4.33276 * x * q);
}

/** Share of the field's energy that lies in the slab: εr (ε−1) / (ε (εr−1)). */
function slabShare(patch: PatchOnSlab, frequencyHz: number): number {
  if (patch.permittivity === 1) return 1;
  const strip = { widthM: patch.widthM, heightM: patch.heightM, permittivity: patch.permittivity, thicknessM: 0 };
  const e = dispersiveLine(strip, frequencyHz).effectivePermittivity;
  return (patch.permittivity * (e - 1)) / (e * (patch.permittivity - 1));
}

/** Quality of the first mode of a rectangular patch.
 *  Q = ω μ0 L' W' h / (4 P) for a current of 1 A/m at the centre (L', W' the extended sides), P by modePowers;
 *  Qd = 1/(s tanδ), s the slab's share of the energy; Qc = h/δ over the roughness factor;
 *  R = 2 h η0² Q / (εr ω μ0 L' W') from the mode's voltage at the edge.
 *  @param lossTangent  0 for a lossless slab
 *  Valid: CALIBRATION_BOX; beyond it the calibration of the nearest point is kept (Notice "resonance.range" of the
 *  resonance covers both).
 *  Accuracy: 3 % of the lossless Q; with loss checked against four full-wave patches.
 *  Source: transmission-line voltages of the slab, derived; Qc as D. R. Jackson, N. G. Alexopoulos, IEEE Trans. AP-39
 *  (1991) 407–410 */
export function qualitySplit(
  patch: PatchOnSlab,
  lossTangent: number,
  conductor: Conductor,
  frequencyHz: number,
): QualitySplit {
  const size = effectiveSize(patch, frequencyHz);
  const powers = modePowers({
    ...size,
    heightM: patch.heightM,
    permittivity: patch.permittivity,
    frequencyHz,
  });
  const omegaMu = 2 * Math.PI * frequencyHz * MU0_H_PER_M;
  const stored = (omegaMu * size.lengthM * size.widthM * patch.heightM * Math.exp(calibration(patch, frequencyHz))) / 4;
  const radiation = stored / powers.spaceWaveW;
  const surfaceWave = powers.surfaceWaveW > 0 ? stored / powers.surfaceWaveW : null;
  const dielectric = lossTangent > 0 ? 1 / (lossTangent * slabShare(patch, frequencyHz)) : null;
  let copper: number | null = null;
  if (conductor.conductivitySPerM !== null) {
    const skin = skinDepthM(frequencyHz, conductor.conductivitySPerM);
    copper = patch.heightM / skin / roughnessFactor(conductor.roughnessM, skin);
  }
  const inverse = (q: number | null): number => (q === null ? 0 : 1 / q);
  const lossless = 1 / (1 / radiation + inverse(surfaceWave));
  const total = 1 / (1 / lossless + inverse(dielectric) + inverse(copper));
  const perQuality = (2 * patch.heightM * ETA0_OHM ** 2) / (patch.permittivity * omegaMu * size.lengthM * size.widthM);
  return {
    total,
    radiation,
    surfaceWave,
    dielectric,
    conductor: copper,
    efficiency: total / radiation,
    directivityDbi: powers.directivityDbi,
    edgeResistanceOhm: perQuality * total,
    losslessEdgeResistanceOhm: perQuality * lossless,
  };
}
