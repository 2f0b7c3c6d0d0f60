// A resolved brief: what the user wants, in SI, with every default filled in.

import type { Fabricator } from '../fabricator/fabricator.ts';
import type { Laminate } from '../laminate/laminate.ts';

/** Dimensions that the user fixes; all others are sized around them. */
export interface PinnedRadiator {
  readonly lengthM?: number;
  readonly widthM?: number;
}

export interface PinnedInset {
  readonly insetDepthM?: number;
  readonly notchGapM?: number;
  readonly lineWidthM?: number;
  readonly lineWidthInNotchM?: number;
  readonly lineLengthM?: number;
}

export interface PinnedQuarterWave {
  readonly lineWidthM?: number;
  readonly lineLengthM?: number;
  readonly transformerWidthM?: number;
  readonly transformerLengthM?: number;
}

export interface PinnedProbe {
  readonly offsetM?: number;
  readonly pinDiameterM?: number;
  readonly holeDiameterM?: number;
  readonly padDiameterM?: number;
  readonly clearanceDiameterM?: number;
}

/** How the line meets the patch, and which of its dimensions are fixed. */
export type FeedWish =
  | { readonly kind: 'inset'; readonly pinned: PinnedInset }
  | { readonly kind: 'quarter-wave'; readonly pinned: PinnedQuarterWave }
  | { readonly kind: 'probe'; readonly pinned: PinnedProbe; readonly plated: boolean };

export interface BoardWish {
  /** Copper-free laminate around the patch, or 'auto'. */
  readonly marginM: number | 'auto';
  readonly widthM?: number;
  readonly lengthM?: number;
  /** Radius of the board's corners, 0 for square ones. */
  readonly cornerRadiusM: number;
}

export interface Brief {
  readonly kind: 'brief';
  readonly title: string;
  readonly band: { readonly lowHz: number; readonly highHz: number };
  readonly match: { readonly returnLossDb: number; readonly referenceOhm: number };
  readonly polarization: 'linear';
  readonly laminate: Laminate;
  readonly radiator: { readonly family: 'rectangular'; readonly pinned: PinnedRadiator };
  readonly feed: FeedWish;
  readonly board: BoardWish;
  readonly fabricator: Fabricator;
  /** Fields that took a default, as `path: value` in the brief's own words. */
  readonly defaults: readonly { readonly path: string; readonly value: string }[];
}
