// A coaxial pin from below: what it sees, and where it must stand.

import type { Brief, PinnedProbe } from '../brief/brief.ts';
import { type Notice, refuse } from '../errors.ts';
import { type Complex, complex, divide } from '../numeric/complex.ts';
import { ETA0_OHM, SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import { bareResonance, type PatchOnSlab } from './bare-resonance.ts';
import type { ProbeFeed } from './design.ts';
import { bandCentreHz, defaultWidthM, frontEdgeFor, patchOn, rounded } from './frame.ts';
import type { ImpedanceOf } from './match.ts';
import { effectiveSize, qualitySplit } from './quality.ts';

/** Trade-standard pin and flange of the usual sub-miniature connector (common practice, no source) [m]. */
const PIN_DIAMETER_M = 1.27e-3;
const CLEARANCE_DIAMETER_M = 4.1e-3;
/** Room of the hole around the pin, and copper around the hole. */
const HOLE_OVER_PIN_M = 0.18e-3;
const PAD_OVER_HOLE_M = 0.9e-3;

/** Reactance of a pin through the slab [Ω], inductive.
 *  X = (η0 k0 h/2π) [ln(4/(k d)) − 0.57722],  k = k0 √εr
 *  @param diameterM  pin diameter d
 *  Valid: h well under a wavelength in the slab, d well under h.
 *  Source: C. A. Balanis, Antenna Theory, 4th ed., eq. (14-91) */
export function pinReactanceOhm(patch: PatchOnSlab, diameterM: number, frequencyHz: number): number {
  const k0 = (2 * Math.PI * frequencyHz) / SPEED_OF_LIGHT_M_PER_S;
  const k = k0 * Math.sqrt(patch.permittivity);
  return ((ETA0_OHM * k0 * patch.heightM) / (2 * Math.PI)) * (Math.log(4 / (k * diameterM)) - 0.57722);
}

/** Resistance at resonance where the pin stands, a distance from the patch's centre [Ω].
 *  R = R_edge sin²(π x/L'),  L' the length with its open-end extensions: the usual law with L in place of L' is
 *  15–45 % high near the centre.
 *  Accuracy: 6 % for x ≤ 0.3 L, 7 % low at 0.35 L, 11 % low at the edge, against three full-wave patches
 *  (fixtures/published/input_resistance.csv, lossless). */
export function pinResistanceOhm(edgeResistanceOhm: number, offsetM: number, extendedLengthM: number): number {
  return edgeResistanceOhm * Math.sin((Math.PI * offsetM) / extendedLengthM) ** 2;
}

/** Impedance at the pin: jX f/fc + R / (1 + jQ(f/f0 − f0/f)). */
export function probeImpedance(brief: Brief, patch: PatchOnSlab, feed: ProbeFeed): ImpedanceOf {
  const { laminate } = brief;
  const centreHz = bandCentreHz(brief);
  const f0 = bareResonance(patch).resonanceHz;
  const split = qualitySplit(patch, laminate.lossTangent, laminate, f0);
  const extended = effectiveSize(patch, f0).lengthM;
  const resistance = pinResistanceOhm(split.edgeResistanceOhm, feed.offsetM, extended);
  const reactance = pinReactanceOhm(patch, feed.pinDiameterM, centreHz);
  return (f: Complex) => {
    const ratio = complex(f.re / f0, f.im / f0);
    const inverse = divide(complex(1), ratio);
    // 1 + jQ(ratio − 1/ratio)
    const detuned = complex(1 - split.total * (ratio.im - inverse.im), split.total * (ratio.re - inverse.re));
    const mode = divide(complex(resistance), detuned);
    const pin = complex((-reactance * f.im) / centreHz, (reactance * f.re) / centreHz);
    return complex(mode.re + pin.re, mode.im + pin.im);
  };
}

/** Sizes patch length and pin offset together, so that the best match sits at band centre: the mode, detuned by X/R₀
 *  over 2Q, offers the conjugate of the pin's reactance, and its resistance is R₀ (1 + (X/R₀)²).
 *  Throws: EngineError "feed.pin". */
export function sizeProbe(brief: Brief, pinned: PinnedProbe, plated: boolean, notices: Notice[]) {
  const centreHz = bandCentreHz(brief);
  const { laminate, match } = brief;
  const reference = match.referenceOhm;
  const widthM = brief.radiator.pinned.widthM ?? defaultWidthM(brief, centreHz);
  const pinDiameterM = pinned.pinDiameterM ?? PIN_DIAMETER_M;
  const holeDiameterM = pinned.holeDiameterM ?? holeFor(brief, pinDiameterM, plated);
  const padDiameterM = pinned.padDiameterM ?? rounded(holeDiameterM + PAD_OVER_HOLE_M);
  const clearanceDiameterM = pinned.clearanceDiameterM ?? Math.max(CLEARANCE_DIAMETER_M, rounded(2.5 * pinDiameterM));
  demandPin({ pinDiameterM, holeDiameterM, padDiameterM, clearanceDiameterM });
  let lengthM = brief.radiator.pinned.lengthM;
  if (lengthM === undefined) {
    lengthM = (0.47 * SPEED_OF_LIGHT_M_PER_S) / (centreHz * Math.sqrt(laminate.permittivity));
    for (let i = 0; i < 30; i++) {
      const patch = patchOn(brief, lengthM, widthM);
      const f0 = bareResonance(patch).resonanceHz;
      const { total } = qualitySplit(patch, laminate.lossTangent, laminate, f0);
      const x = pinReactanceOhm(patch, pinDiameterM, centreHz) / reference;
      const wanted = centreHz / (1 + x / (2 * total));
      const next: number = lengthM * (f0 / wanted);
      const done = Math.abs(next - lengthM) < 1e-10;
      lengthM = next;
      if (done) break;
    }
    lengthM = rounded(lengthM);
  }
  const patch = patchOn(brief, lengthM, widthM);
  const f0 = bareResonance(patch).resonanceHz;
  const split = qualitySplit(patch, laminate.lossTangent, laminate, f0);
  const x = pinReactanceOhm(patch, pinDiameterM, centreHz) / reference;
  const wanted = reference * (1 + x * x);
  let offsetM = pinned.offsetM;
  if (offsetM === undefined) {
    const extended = effectiveSize(patch, f0).lengthM;
    const share = Math.min(1, wanted / split.edgeResistanceOhm);
    const outermost = lengthM / 2 - padDiameterM / 2;
    const ideal = (extended / Math.PI) * Math.asin(Math.sqrt(share));
    offsetM = rounded(Math.min(ideal, outermost));
    if (ideal > outermost) {
      notices.push({
        code: 'feed.probeResistance',
        message: `The pin would need ${wanted.toFixed(0)} ohm, and the patch offers ${pinResistanceOhm(split.edgeResistanceOhm, outermost, extended).toFixed(0)} ohm at its edge: the match stays short. A narrower patch, a laminate of lower loss or a thicker board raises it.`,
      });
    }
  }
  const feed: ProbeFeed = {
    kind: 'probe',
    offsetM,
    pinDiameterM,
    holeDiameterM,
    padDiameterM,
    clearanceDiameterM,
    plated,
    lineLengthM: frontEdgeFor(brief, lengthM, undefined),
  };
  if (offsetM + padDiameterM / 2 > lengthM / 2) {
    refuse({
      code: 'feed.pin',
      path: 'feed.pinned.offset',
      value: `${(offsetM * 1e3).toFixed(3)} mm`,
      problem: `a pad ${(padDiameterM * 1e3).toFixed(2)} mm wide ${(offsetM * 1e3).toFixed(3)} mm from the centre leaves the patch`,
      allowed: `allowed is up to ${((lengthM - padDiameterM) * 500).toFixed(3)} mm`,
    });
  }
  return { lengthM, widthM, feed };
}

/** The pin's hole: room for the pin, rounded up to the fabricator's drill step. */
function holeFor(brief: Brief, pinDiameterM: number, plated: boolean): number {
  const { fabricator } = brief;
  const least = Math.max(
    pinDiameterM + HOLE_OVER_PIN_M,
    plated ? (fabricator.plated?.minimumHoleM ?? 0) : fabricator.minimumUnplatedHoleM,
  );
  const step = fabricator.drillStepM ?? 10e-6;
  return rounded(Math.ceil(least / step - 1e-9) * step);
}

function demandPin(d: {
  readonly pinDiameterM: number;
  readonly holeDiameterM: number;
  readonly padDiameterM: number;
  readonly clearanceDiameterM: number;
}): void {
  const order = [
    ['feed.pinned.holeDiameter', d.holeDiameterM, d.pinDiameterM, 'the pin'],
    ['feed.pinned.padDiameter', d.padDiameterM, d.holeDiameterM, 'the hole'],
    ['feed.pinned.clearanceDiameter', d.clearanceDiameterM, d.holeDiameterM, 'the hole'],
  ] as const;
  for (const [path, value, least, what] of order) {
    if (value > least) continue;
    refuse({
      code: 'feed.pin',
      path,
      value: `${(value * 1e3).toFixed(3)} mm`,
      problem: `${(value * 1e3).toFixed(3)} mm is not more than ${what} (${(least * 1e3).toFixed(3)} mm)`,
      allowed: `allowed is more than ${(least * 1e3).toFixed(3)} mm`,
    });
  }
}
