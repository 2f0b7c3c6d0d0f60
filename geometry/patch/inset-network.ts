// What a line feed sees: the patch, its notch and the line in it as a network of coupled transmission lines.
//
//   board edge                front edge     inset end                      back edge
//       |                         |             |                              |
//       |                         |=== flanks ==|                              |
//   ====|======= feed line =======|--- line ----+==== undivided patch =========|
//       |                         |=== flanks ==|                              |
//                                 0             y                              L
//
// Over the inset the copper is two conductors, the line and both flanks together, with the 2 × 2 capacitances of
// coupled-strips.ts and a velocity for each of their two modes. At the inset's end both meet the undivided patch, and
// the current has to spread from the line, or round the notch: one inductance, which vanishes for the current
// distribution of an undivided strip. The flanks' front ends and the back edge are open ends. Phases are scaled so
// that the patch without line and notch resonates at its calibrated natural frequency, with its quality.

import { type NotchCrossSection, stripCrossSection } from '../line/coupled-strips.ts';
import { openEndOverHeight } from '../line/discontinuity.ts';
import { dispersiveLine } from '../line/microstrip-dispersion.ts';
import {
  add,
  type Complex,
  complex,
  cosine,
  divide,
  multiply,
  scale,
  sine,
  subtract,
  tangent,
  timesJ,
} from '../numeric/complex.ts';
import { MU0_H_PER_M, SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import type { PatchOnSlab } from './bare-resonance.ts';

export interface InsetGeometry {
  readonly lineWidthM: number;
  readonly lineWidthInNotchM: number;
  readonly notchGapM: number;
  readonly insetDepthM: number;
}

/** Clear space beside the line within the notch [m]. The notch is as wide as the line outside and a gap on either
 *  side: a line that is narrowed within it has more. */
export function clearanceInNotchM(feed: Omit<InsetGeometry, 'insetDepthM'>): number {
  return feed.notchGapM + (feed.lineWidthM - feed.lineWidthInNotchM) / 2;
}

/** The patch without line and notch. */
export interface BareMode {
  readonly resonanceHz: number;
  readonly quality: number;
}

/** Coefficients of the network. */
export interface InsetLaw {
  /** Spreading inductance over μ0 h/π: aspect · ln(W/w) + shape · ln(W/1.2L) + slab/εr + constant. */
  readonly spreadingAspect: number;
  readonly spreadingShape: number;
  readonly spreadingSlab: number;
  readonly spreadingConstant: number;
  /** Share of an undivided strip's current that line and notch interrupt:
   *  (line·w + gap·g + height·h)/W · (W/1.2L)^shape. */
  readonly shareLine: number;
  readonly shareGap: number;
  readonly shareHeight: number;
  readonly shareShape: number;
  /** Open-end extension, quality and admittance level over those of the bare patch, as the feed sees them. */
  readonly extension: number;
  readonly quality: number;
  readonly admittance: number;
}

/** Fitted to 213 full-wave cases on 19 boards, seven figures each. METHODS.md tells how and with which residuals;
 *  inset-range.ts holds the box. */
export const INSET_LAW: InsetLaw = {
  spreadingAspect: 0.295,
  spreadingShape: 0.57,
  spreadingSlab: 0.444,
  spreadingConstant: 0.126,
  shareLine: 0.896,
  shareGap: 2.644,
  shareHeight: -1.666,
  shareShape: -0.193,
  extension: 1.952,
  quality: 1.093,
  admittance: 0.958,
};

/** W/L about which the law's shape terms turn: that of the boards most of it was fitted to. */
const USUAL_ASPECT = 1.2;

/** Two rows of a 2 × 2 matrix: a b / c d. */
interface Matrix2<T> {
  readonly a: T;
  readonly b: T;
  readonly c: T;
  readonly d: T;
}

/** The line–flank pair's two modes. */
export interface PairModes {
  /** Square root of each mode's effective permittivity. */
  readonly index: readonly [number, number];
  /** Projector on the first mode's voltages; the second's is I less it. */
  readonly projector: Matrix2<number>;
  /** Inductance times c [Ω] and capacitance times c [S]. */
  readonly inductiveOhm: Matrix2<number>;
  readonly capacitiveS: Matrix2<number>;
}

/** What of a network depends on the cross-section alone: the same for all lengths and inset depths. */
export interface InsetCrossSection {
  readonly patchWidthM: number;
  /** Characteristic admittance [S] and index of the undivided patch. */
  readonly patchAdmittanceS: number;
  readonly patchIndex: number;
  /** Null for a plain edge feed. */
  readonly pair: PairModes | null;
}

function map(m: Matrix2<number>, factor: number): Matrix2<number> {
  return { a: m.a * factor, b: m.b * factor, c: m.c * factor, d: m.d * factor };
}

function pairModes(section: NotchCrossSection): PairModes {
  const { capacitance: c, airCapacitance: air } = section;
  const determinant = air.lineLine * air.flankFlank - air.lineFlank ** 2;
  const inverse = map({ a: air.flankFlank, b: -air.lineFlank, c: -air.lineFlank, d: air.lineLine }, 1 / determinant);
  // N = C0⁻¹ C: its eigenvalues are the modes' effective permittivities.
  const n = {
    a: inverse.a * c.lineLine + inverse.b * c.lineFlank,
    b: inverse.a * c.lineFlank + inverse.b * c.flankFlank,
    c: inverse.c * c.lineLine + inverse.d * c.lineFlank,
    d: inverse.c * c.lineFlank + inverse.d * c.flankFlank,
  };
  const half = (n.a + n.d) / 2;
  const spread = Math.sqrt(Math.max(0, ((n.a - n.d) / 2) ** 2 + n.b * n.c));
  // In a homogeneous medium both modes have one velocity, and any projector will do.
  const split = spread > 1e-9 * half;
  const projector = split
    ? map({ a: n.a - half + spread, b: n.b, c: n.c, d: n.d - half + spread }, 1 / (2 * spread))
    : { a: 1, b: 0, c: 0, d: 0 };
  const v = SPEED_OF_LIGHT_M_PER_S;
  return {
    index: [Math.sqrt(half + spread), Math.sqrt(half - spread)],
    projector,
    inductiveOhm: map(inverse, 1 / v),
    capacitiveS: map({ a: c.lineLine, b: c.lineFlank, c: c.lineFlank, d: c.flankFlank }, v),
  };
}

/** Prepares the cross-section of a patch with a notch (or, with null, without one). */
export function insetCrossSection(
  patch: { readonly widthM: number; readonly heightM: number; readonly permittivity: number },
  section: NotchCrossSection | null,
): InsetCrossSection {
  const strip = stripCrossSection(patch.widthM, patch.heightM, patch.permittivity);
  return {
    patchWidthM: patch.widthM,
    patchAdmittanceS: SPEED_OF_LIGHT_M_PER_S * Math.sqrt(strip.capacitance * strip.airCapacitance),
    patchIndex: Math.sqrt(strip.capacitance / strip.airCapacitance),
    pair: section === null ? null : pairModes(section),
  };
}

/** first·P + second·(I − P), a function of the pair's matrix by Sylvester's formula. */
function onModes(p: Matrix2<number>, first: Complex, second: Complex): Matrix2<Complex> {
  const difference = subtract(first, second);
  return {
    a: add(scale(difference, p.a), second),
    b: scale(difference, p.b),
    c: scale(difference, p.c),
    d: add(scale(difference, p.d), second),
  };
}

interface PairState {
  readonly lineV: Complex;
  readonly flankV: Complex;
  readonly lineI: Complex;
  readonly flankI: Complex;
}

/** Carries voltages and currents from the inset's end to the front edge.
 *  @param level  factor on the pair's admittances
 *  V(0) = cos V(y) + j (sin/√ε) cL I(y),  I(0) = cosᵀ I(y) + j (sin/√ε)ᵀ cC V(y), as functions of the matrix C0⁻¹C. */
function toFrontEdge(pair: PairModes, level: number, thetas: readonly [Complex, Complex], end: PairState): PairState {
  const cos = onModes(pair.projector, cosine(thetas[0]), cosine(thetas[1]));
  const sin = onModes(
    pair.projector,
    scale(sine(thetas[0]), 1 / pair.index[0]),
    scale(sine(thetas[1]), 1 / pair.index[1]),
  );
  const l = map(pair.inductiveOhm, 1 / level);
  const c = map(pair.capacitiveS, level);
  const fluxLine = add(scale(end.lineI, l.a), scale(end.flankI, l.b));
  const fluxFlank = add(scale(end.lineI, l.c), scale(end.flankI, l.d));
  const chargeLine = add(scale(end.lineV, c.a), scale(end.flankV, c.b));
  const chargeFlank = add(scale(end.lineV, c.c), scale(end.flankV, c.d));
  const dot = (p: Complex, x: Complex, q: Complex, y: Complex): Complex => add(multiply(p, x), multiply(q, y));
  return {
    lineV: add(dot(cos.a, end.lineV, cos.b, end.flankV), timesJ(dot(sin.a, fluxLine, sin.b, fluxFlank))),
    flankV: add(dot(cos.c, end.lineV, cos.d, end.flankV), timesJ(dot(sin.c, fluxLine, sin.d, fluxFlank))),
    lineI: add(dot(cos.a, end.lineI, cos.c, end.flankI), timesJ(dot(sin.a, chargeLine, sin.c, chargeFlank))),
    flankI: add(dot(cos.b, end.lineI, cos.d, end.flankI), timesJ(dot(sin.b, chargeLine, sin.d, chargeFlank))),
  };
}

/** Impedance of the patch at its front edge, as the feed line sees it.
 *  @returns a function of complex frequency [Hz] (a positive imaginary part is decay), giving Z [Ω]
 *  Valid: where the coefficients were fitted, see inset-feed.ts; analytic in the frequency.
 *  Accuracy: 0.2 % in the frequency of best match, 10 % in resistance, see test/published/fed-reference.test.ts
 *  Source: multiconductor transmission lines (C. R. Paul, Analysis of Multiconductor Transmission Lines, 1994,
 *  from memory), with a spreading inductance of our own */
export function frontEdgeImpedance(
  patch: PatchOnSlab,
  mode: BareMode,
  feed: InsetGeometry,
  section: InsetCrossSection,
  law: InsetLaw = INSET_LAW,
): (frequencyHz: Complex) => Complex {
  const { heightM: h, widthM: w } = patch;
  const strip = { widthM: w, heightM: h, permittivity: patch.permittivity, thicknessM: 0 };
  const e = dispersiveLine(strip, mode.resonanceHz).effectivePermittivity;
  const extensionM = openEndOverHeight(w / h, patch.permittivity, e) * h * law.extension;
  const depthM = feed.insetDepthM;
  const pair = depthM > 0 ? section.pair : null;
  // How much of a notch there is: a shallow one acts like a plain edge.
  const clearanceM = clearanceInNotchM(feed);
  const bare = depthM > 0 ? Math.exp(-depthM / clearanceM) : 1;
  const widthM = depthM > 0 ? feed.lineWidthInNotchM : feed.lineWidthM;
  const gapM = clearanceM * (1 - bare);
  const openShare = Math.max(0, 1 - (widthM + 2 * gapM + bare * h) / w);
  const shape = w / patch.lengthM / USUAL_ASPECT;
  const interrupted = (law.shareLine * widthM + law.shareGap * gapM + law.shareHeight * h) / w;
  const lineShare = Math.min(1, Math.max(0, interrupted * shape ** law.shareShape));
  const flankShare = 1 - lineShare;
  const spreading = Math.max(
    0,
    law.spreadingAspect * Math.log(w / widthM) +
      law.spreadingShape * Math.log(shape) +
      law.spreadingSlab / patch.permittivity +
      law.spreadingConstant,
  );
  const spreadingH = ((MU0_H_PER_M * h) / Math.PI) * spreading;
  const patchAdmittanceS = section.patchAdmittanceS * law.admittance;
  const perHz = Math.PI / (patch.lengthM + 2 * extensionM) / mode.resonanceHz;
  const lossy = complex(perHz, -perHz / (2 * mode.quality * law.quality));
  return (frequency) => {
    const wavenumber = multiply(frequency, lossy);
    const openEnd = tangent(scale(wavenumber, extensionM));
    const flankEnd = timesJ(scale(openEnd, patchAdmittanceS * openShare));
    const behind = timesJ(scale(tangent(scale(wavenumber, patch.lengthM - depthM + extensionM)), patchAdmittanceS));
    const common = divide(complex(1), behind);
    const spread = timesJ(scale(frequency, 2 * Math.PI * spreadingH));
    const mutual = add(common, scale(spread, -lineShare * flankShare));
    const forLine: PairState = {
      lineI: complex(1),
      flankI: complex(0),
      lineV: add(common, scale(spread, flankShare * flankShare)),
      flankV: mutual,
    };
    const forFlank: PairState = {
      lineI: complex(0),
      flankI: complex(1),
      lineV: mutual,
      flankV: add(common, scale(spread, lineShare * lineShare)),
    };
    let u = forLine;
    let v = forFlank;
    if (pair !== null) {
      const theta = scale(wavenumber, depthM / section.patchIndex);
      const thetas = [scale(theta, pair.index[0]), scale(theta, pair.index[1])] as const;
      u = toFrontEdge(pair, law.admittance, thetas, u);
      v = toFrontEdge(pair, law.admittance, thetas, v);
    }
    // The flanks' front ends are open: I + Y V = 0 fixes how much of the second solution is needed.
    const share = divide(
      scale(add(u.flankI, multiply(flankEnd, u.flankV)), -1),
      add(v.flankI, multiply(flankEnd, v.flankV)),
    );
    return divide(add(u.lineV, multiply(share, v.lineV)), add(u.lineI, multiply(share, v.lineI)));
  };
}
