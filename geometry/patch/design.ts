// A sized antenna with what is predicted of it: the record between sizing and artwork.

import type { Notice } from '../errors.ts';

/** Which of the frequencies that people call "resonance" a number is.
 *  bare: real part of the complex pole of the patch without a feed;
 *  loadedPole: the same with feed and generator; bestMatch: least reflection at the feed. */
export type ResonanceKind = 'bare' | 'loadedPole' | 'bestMatch';

export interface RectangularRadiator {
  readonly family: 'rectangular';
  /** The resonant dimension, along y [m]. */
  readonly lengthM: number;
  /** Along x [m]. */
  readonly widthM: number;
}

export interface InsetFeed {
  readonly kind: 'inset';
  readonly lineWidthM: number;
  readonly lineWidthInNotchM: number;
  /** From the patch's front edge to the end of the notch [m]; 0 is a plain edge feed. */
  readonly insetDepthM: number;
  /** From the line's edge, as wide as it is outside, to the notch's flank [m]: a line narrowed within the notch has
   *  more space beside it. */
  readonly notchGapM: number;
  /** From the board's edge to the patch's front edge [m]. */
  readonly lineLengthM: number;
}

/** A plain edge feed through a quarter-wave transformer. */
export interface QuarterWaveFeed {
  readonly kind: 'quarter-wave';
  /** The line from the board's edge. */
  readonly lineWidthM: number;
  /** From the board's edge to the transformer [m]. */
  readonly lineLengthM: number;
  /** The narrow section between line and patch. */
  readonly transformerWidthM: number;
  readonly transformerLengthM: number;
}

/** A coaxial pin from below. */
export interface ProbeFeed {
  readonly kind: 'probe';
  /** From the patch's centre towards its front edge [m]. */
  readonly offsetM: number;
  readonly pinDiameterM: number;
  /** Finished hole through patch and slab. */
  readonly holeDiameterM: number;
  /** Copper ring on the patch; the patch itself where it is larger. */
  readonly padDiameterM: number;
  /** Opening in the ground around the pin. */
  readonly clearanceDiameterM: number;
  /** Whether the hole is plated, by intent. */
  readonly plated: boolean;
  /** From the board's edge to the patch's front edge [m]. */
  readonly lineLengthM: number;
}

export type Feed = InsetFeed | QuarterWaveFeed | ProbeFeed;

/** From the board's edge to the patch's front edge [m]. */
export function frontEdgeM(feed: Feed): number {
  return feed.kind === 'quarter-wave' ? feed.lineLengthM + feed.transformerLengthM : feed.lineLengthM;
}

export interface BoardSize {
  readonly widthM: number;
  readonly lengthM: number;
  readonly cornerRadiusM: number;
}

/** One cause's part of the interval: half its width at three sigma [Hz]. */
export interface Contribution {
  readonly cause: string;
  readonly halfWidthHz: number;
}

export interface Prediction {
  readonly method: 'closed-form';
  readonly resonanceHz: number;
  readonly resonanceKind: ResonanceKind;
  readonly resonanceLowHz: number;
  readonly resonanceHighHz: number;
  /** Largest first. */
  readonly contributions: readonly Contribution[];
  /** Natural resonance of the same rectangle without feed [Hz]. */
  readonly bareResonanceHz: number;
  /** With this feed, at bandwidthVswr; null where the match never reaches it or there is no feed. */
  readonly bandwidthHz: number | null;
  readonly bandwidthVswr: number;
  /** (S−1)/(Q√S)·f: what a critically coupled feed would give [Hz]. */
  readonly bandwidthCriticalHz: number;
  /** Resistance at the radiating edge of the bare patch, loss included [Ω]. */
  readonly edgeResistanceOhm: number;
  /** Greatest resistance that the feed sees [Ω]: at the inset's end, at the patch's edge, at the pin; null without a
   *  feed. */
  readonly inputResistanceOhm: number | null;
  readonly returnLossAtCentreDb: number | null;
  readonly returnLossWorstInBandDb: number | null;
  /** Unloaded. */
  readonly qualityTotal: number;
  readonly qualityRadiation: number;
  readonly qualityDielectric: number | null;
  readonly qualityConductor: number | null;
  readonly qualitySurfaceWave: number | null;
  readonly qualityLoaded: number | null;
  readonly radiationEfficiency: number;
  readonly directivityDbi: number;
  readonly gainDbi: number;
  /** With mismatch and feed line at band centre; null without a feed. */
  readonly gainRealizedDbi: number | null;
}

/** A wish of the brief held against the prediction. */
export interface Requirement {
  readonly name: string;
  readonly wanted: string;
  readonly predicted: string;
  readonly holds: boolean;
}

export interface PatchDesign {
  readonly kind: 'patch-design';
  readonly radiator: RectangularRadiator;
  readonly feed: Feed;
  readonly board: BoardSize;
  readonly prediction: Prediction;
  readonly requirement: readonly Requirement[];
  readonly notices: readonly Notice[];
}
