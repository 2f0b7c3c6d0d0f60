// Natural resonance of a bare rectangular patch: the real part of the complex pole, as a probe of no thickness would see it.
//
// Trap of convention: this is not where an inset-fed patch is best matched; that lies 1.7–3.7 % higher.

import type { Notice } from '../errors.ts';
import { openEndOverHeight } from '../line/discontinuity.ts';
import { dispersiveLine } from '../line/microstrip-dispersion.ts';
import { SPEED_OF_LIGHT_M_PER_S } from '../units.ts';

export interface PatchOnSlab {
  /** Resonant dimension [m]. */
  readonly lengthM: number;
  readonly widthM: number;
  readonly heightM: number;
  readonly permittivity: number;
}

export interface BareResonance {
  readonly resonanceHz: number;
  /** Half width of the model's own error at three sigma, relative. */
  readonly modelError: number;
  readonly notices: readonly Notice[];
}

/** The calibration's box. W/L, εr and h/λd (λd in the dielectric at the uncorrected frequency). */
export const CALIBRATION_BOX = {
  permittivity: { minimum: 1.05, maximum: 10.2 },
  aspect: { minimum: 0.6, maximum: 2.2 },
  heightOverWavelength: { minimum: 0.006, maximum: 0.1 },
} as const;

/** Residual of the calibration inside its box: 0.5 % at most in sample (0.15 % rms). */
const MODEL_ERROR_IN_BOX = 0.005;
/** How fast the model error grows outside, per unit of ln(distance from the box); no source, chosen wide. */
const MODEL_ERROR_GROWTH = 0.02;

/** The resonance of a wide microstrip half a wave long, open at both ends, before calibration.
 *  f = c / (2 (L + 2Δl) √ε(f)), a fixed point in f. */
export function openStripResonanceHz(patch: PatchOnSlab): number {
  const strip = { ...patch, thicknessM: 0 };
  const u = patch.widthM / patch.heightM;
  let f = SPEED_OF_LIGHT_M_PER_S / (2 * patch.lengthM * Math.sqrt(patch.permittivity));
  for (let i = 0; i < 100; i++) {
    const e = dispersiveLine(strip, f).effectivePermittivity;
    const extension = openEndOverHeight(u, patch.permittivity, e) * patch.heightM;
    const next = SPEED_OF_LIGHT_M_PER_S / (2 * (patch.lengthM + 2 * extension) * Math.sqrt(e));
    const done = Math.abs(next - f) <= 1e-13 * f;
    f = next;
    if (done) break;
  }
  return f;
}

/** ln of the calibrated over the uncalibrated resonance.
 *  D = 0.05158 x ln x − 13.26735 x²q + 2.07837 x²q²r + 0.06765 r x ln x + 0.94933 q x ln x + 3.41402 xq
 *      + 3.84179 x²q² + 0.30618 xqr,  x = h/λd, q = 1/εr, r = ln(W/L)
 *  Source: fitted to a spectral-domain solution of the lossless patch (fixtures/published/resonance_reference.csv);
 *  rms 0.15 %, 0.5 % at most over the box. */
function calibration(x: number, q: number, r: number): number {
  const xl = x * Math.log(x);
  const x2 = x * x;
  return (
    0.05158 * xl -
    13.26735 * x2 * q +
    2.07837 * x2 * q * q * r +
    0.06765 * r * xl +
    0.94933 * q * xl +
    3.41402 * x * q +
    3.84179 * x2 * q * q +
    0.30618 * x * q * r
  );
}

export function clampToRange(value: number, range: { readonly minimum: number; readonly maximum: number }): number {
  return Math.min(range.maximum, Math.max(range.minimum, value));
}

/** Natural resonance of a bare rectangular patch of zero-thickness copper on an infinite grounded slab.
 *  Valid: CALIBRATION_BOX; outside it the correction of the box's nearest point is used, so that results stay
 *  continuous, with Notice "resonance.range" and a growing model error.
 *  Accuracy: 0.09 % mean, 0.20 % at most on 20 points kept out of the fit. */
export function bareResonance(patch: PatchOnSlab): BareResonance {
  const uncorrectedHz = openStripResonanceHz(patch);
  const x = (patch.heightM * Math.sqrt(patch.permittivity) * uncorrectedHz) / SPEED_OF_LIGHT_M_PER_S;
  const aspect = patch.widthM / patch.lengthM;
  const box = CALIBRATION_BOX;
  const inX = clampToRange(x, box.heightOverWavelength);
  const inE = clampToRange(patch.permittivity, box.permittivity);
  const inAspect = clampToRange(aspect, box.aspect);
  const distance =
    Math.abs(Math.log(x / inX)) + Math.abs(Math.log(patch.permittivity / inE)) + Math.abs(Math.log(aspect / inAspect));
  const notices: Notice[] = [];
  if (distance > 0) {
    const said: string[] = [];
    if (inX !== x) said.push(`h/λd ${x.toFixed(4)} (0.006 to 0.1)`);
    if (inE !== patch.permittivity) said.push(`permittivity ${patch.permittivity} (1.05 to 10.2)`);
    if (inAspect !== aspect) said.push(`W/L ${aspect.toFixed(2)} (0.6 to 2.2)`);
    notices.push({
      code: 'resonance.range',
      message: `The resonance formula was calibrated on another range: ${said.join(', ')}; its error is taken as larger here and is unverified.`,
    });
  }
  return {
    resonanceHz: uncorrectedHz * Math.exp(calibration(inX, 1 / inE, Math.log(inAspect))),
    modelError: MODEL_ERROR_IN_BOX + MODEL_ERROR_GROWTH * distance,
    notices,
  };
}

/** The textbook's transmission-line resonance, for comparison only: 2.5–4.5 % above the natural resonance of
 *  ordinary boards, and near the best match of a well-placed inset feed.
 *  f = c / (2 (L + 2Δl) √ε),  ε = (εr+1)/2 + (εr−1)/2 (1 + 12 h/W)^−½
 *  Source: C. A. Balanis, Antenna Theory, 4th ed., eqs. (14-1), (14-2), (14-5) */
export function textbookResonanceHz(patch: PatchOnSlab): number {
  const { permittivity: er, heightM: h, widthM: w } = patch;
  const e = (er + 1) / 2 + (er - 1) / 2 / Math.sqrt(1 + (12 * h) / w);
  const u = w / h;
  const extension = (0.412 * (e + 0.3) * (u + 0.264) * h) / ((e - 0.258) * (u + 0.8));
  return SPEED_OF_LIGHT_M_PER_S / (2 * (patch.lengthM + 2 * extension) * Math.sqrt(e));
}
