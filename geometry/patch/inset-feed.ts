// The inset feed as a one-port: patch network, feed line to the board's edge, and the range in which it was verified.

import type { Laminate } from '../laminate/laminate.ts';
import { notchCrossSection } from '../line/coupled-strips.ts';
import { conductorLossNpPerM, dielectricLossNpPerM } from '../line/loss.ts';
import { dispersiveLine } from '../line/microstrip-dispersion.ts';
import { type Complex, complex, divide, multiply, scale, subtract, timesJ } from '../numeric/complex.ts';
import { SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import type { PatchOnSlab } from './bare-resonance.ts';
import type { InsetFeed } from './design.ts';
import {
  type BareMode,
  clearanceInNotchM,
  frontEdgeImpedance,
  type InsetCrossSection,
  insetCrossSection,
} from './inset-network.ts';
import { type ImpedanceOf, throughLine } from './match.ts';

/** The feed line outside the patch, at one frequency. */
export interface FeedLine {
  readonly impedanceOhm: number;
  readonly effectivePermittivity: number;
  readonly lossNpPerM: number;
}

export function feedLine(laminate: Laminate, widthM: number, frequencyHz: number): FeedLine {
  const strip = {
    widthM,
    heightM: laminate.thicknessM,
    permittivity: laminate.permittivity,
    thicknessM: laminate.copperThicknessM,
  };
  const line = dispersiveLine(strip, frequencyHz);
  return {
    impedanceOhm: line.impedanceOhm,
    effectivePermittivity: line.effectivePermittivity,
    lossNpPerM:
      conductorLossNpPerM(strip, frequencyHz, laminate) +
      dielectricLossNpPerM(frequencyHz, laminate.permittivity, line.effectivePermittivity, laminate.lossTangent),
  };
}

/** Cross-section of the notch: costs a millisecond or two, and is the same for every length and depth. */
export function crossSectionOf(
  laminate: Laminate,
  patchWidthM: number,
  feed: { readonly lineWidthM: number; readonly lineWidthInNotchM: number; readonly notchGapM: number },
): InsetCrossSection {
  const slab = { widthM: patchWidthM, heightM: laminate.thicknessM, permittivity: laminate.permittivity };
  return insetCrossSection(
    slab,
    notchCrossSection(patchWidthM, feed.lineWidthInNotchM, clearanceInNotchM(feed), slab.heightM, slab.permittivity),
  );
}

export interface FedPatch {
  readonly patch: PatchOnSlab;
  readonly mode: BareMode;
  readonly feed: InsetFeed;
  readonly section: InsetCrossSection;
  readonly line: FeedLine;
}

/** Impedance at the patch's front edge. */
export function impedanceAtFrontEdge(fed: FedPatch): ImpedanceOf {
  return frontEdgeImpedance(fed.patch, fed.mode, fed.feed, fed.section);
}

/** Impedance at the board's edge, where the connector sits. */
export function impedanceAtConnector(fed: FedPatch): ImpedanceOf {
  const front = impedanceAtFrontEdge(fed);
  const line = {
    impedanceOhm: fed.line.impedanceOhm,
    delayS: (fed.feed.lineLengthM * Math.sqrt(fed.line.effectivePermittivity)) / SPEED_OF_LIGHT_M_PER_S,
    lossNp: fed.feed.lineLengthM * fed.line.lossNpPerM,
  };
  return (f) => throughLine(front(f), line, f);
}

/** Impedance referred to the inset's end through a plain line of the feed's own constants, which is how references
 *  state it; the line between the flanks is not plain, so this is a way of speaking, not a place on the board. */
export function impedanceAtInsetEnd(fed: FedPatch): ImpedanceOf {
  const front = impedanceAtFrontEdge(fed);
  const perHz =
    (2 * Math.PI * fed.feed.insetDepthM * Math.sqrt(fed.line.effectivePermittivity)) / SPEED_OF_LIGHT_M_PER_S;
  const z0 = complex(fed.line.impedanceOhm);
  return (f: Complex) => {
    const z = front(f);
    const t = Math.tan(perHz * f.re);
    return divide(multiply(z0, subtract(z, timesJ(scale(z0, t)))), subtract(z0, timesJ(scale(z, t))));
  };
}
