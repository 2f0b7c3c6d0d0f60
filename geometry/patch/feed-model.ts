// Every feed as what a prediction needs of it: its impedances, its loss, its error and its remarks. One entry a feed.

import type { Brief } from '../brief/brief.ts';
import type { Notice } from '../errors.ts';
import type { PatchOnSlab } from './bare-resonance.ts';
import type { Feed, InsetFeed, ProbeFeed, QuarterWaveFeed, RectangularRadiator } from './design.ts';
import { bandCentreHz, bareModeOf, patchOn } from './frame.ts';
import {
  crossSectionOf,
  type FedPatch,
  type FeedLine,
  feedLine,
  impedanceAtConnector,
  impedanceAtFrontEdge,
  impedanceAtInsetEnd,
} from './inset-feed.ts';
import { type InsetCrossSection, insetCrossSection } from './inset-network.ts';
import { edgeRange, feedRange, probeRange } from './inset-range.ts';
import type { ImpedanceOf } from './match.ts';
import { probeImpedance } from './size-probe.ts';
import { quarterWaveImpedances } from './size-quarter-wave.ts';

export interface FeedModel {
  /** At the connector, where the match is stated. */
  readonly connector: ImpedanceOf;
  /** Behind the feed's own matching: the loaded pole is read here. */
  readonly atPatch: ImpedanceOf;
  /** Whose greatest resistance is reported as the input resistance. */
  readonly seen: ImpedanceOf;
  /** One way [dB]. */
  readonly lossDb: number;
  /** The feed law's own error at three sigma, relative. */
  readonly modelError: number;
  readonly notices: readonly Notice[];
  /** The line from the connector, where there is one. */
  readonly line: FeedLine | null;
}

const DB_PER_NP = 20 * Math.LOG10E;

function insetModel(brief: Brief, patch: PatchOnSlab, feed: InsetFeed, section: InsetCrossSection | null): FeedModel {
  const line = feedLine(brief.laminate, feed.lineWidthM, bandCentreHz(brief));
  const mode = bareModeOf(brief, patch);
  const fed: FedPatch = {
    patch,
    mode,
    feed,
    section: section ?? crossSectionOf(brief.laminate, patch.widthM, feed),
    line,
  };
  return {
    connector: impedanceAtConnector(fed),
    atPatch: impedanceAtFrontEdge(fed),
    seen: impedanceAtInsetEnd(fed),
    lossDb: DB_PER_NP * line.lossNpPerM * feed.lineLengthM,
    line,
    ...feedRange(patch, feed, mode.resonanceHz),
  };
}

function quarterWaveModel(
  brief: Brief,
  patch: PatchOnSlab,
  feed: QuarterWaveFeed,
  section: InsetCrossSection | null,
): FeedModel {
  const { edge, behind, connector, lineLossNp } = quarterWaveImpedances(
    brief,
    patch.lengthM,
    patch.widthM,
    feed,
    section ?? insetCrossSection(patch, null),
  );
  return {
    connector,
    atPatch: behind,
    seen: edge,
    lossDb: DB_PER_NP * lineLossNp,
    line: feedLine(brief.laminate, feed.lineWidthM, bandCentreHz(brief)),
    ...edgeRange(patch, feed.transformerWidthM),
  };
}

function probeModel(brief: Brief, patch: PatchOnSlab, feed: ProbeFeed): FeedModel {
  const impedance = probeImpedance(brief, patch, feed);
  return {
    connector: impedance,
    atPatch: impedance,
    seen: impedance,
    lossDb: 0,
    line: null,
    ...probeRange(patch, feed, bandCentreHz(brief)),
  };
}

/** What a feed does to a patch.
 *  @param section  its cross-section where it is at hand; it costs a millisecond or two to make */
export function modelFeed(
  brief: Brief,
  radiator: RectangularRadiator,
  feed: Feed,
  section: InsetCrossSection | null,
): FeedModel {
  const patch = patchOn(brief, radiator.lengthM, radiator.widthM);
  switch (feed.kind) {
    case 'inset':
      return insetModel(brief, patch, feed, section);
    case 'quarter-wave':
      return quarterWaveModel(brief, patch, feed, section);
    case 'probe':
      return probeModel(brief, patch, feed);
  }
}
