// What an inset-fed patch does, with its interval, held against the brief.

import type { Brief } from '../brief/brief.ts';
import type { Notice } from '../errors.ts';
import { complex, magnitude } from '../numeric/complex.ts';
import { bareResonance, type PatchOnSlab } from './bare-resonance.ts';
import type { BoardSize, InsetFeed, Prediction, RectangularRadiator, Requirement } from './design.ts';
import {
  type FedPatch,
  feedLine,
  impedanceAtConnector,
  impedanceAtFrontEdge,
  impedanceAtInsetEnd,
} from './inset-feed.ts';
import type { InsetCrossSection } from './inset-network.ts';
import { feedNotices, feedRange } from './inset-range.ts';
import { resonanceInterval, type Spread } from './interval.ts';
import {
  bestMatch,
  type ImpedanceOf,
  loadedPole,
  matchedBandwidthHz,
  peakResistance,
  reflection,
  returnLossDb,
} from './match.ts';
import { qualitySplit } from './quality.ts';
import { BANDWIDTH_VSWR, modeNotices, modePrediction } from './rectangular.ts';

/** Frequencies at which the band is searched for its worst return loss, both ends included. */
const BAND_POINTS = 41;

export interface InsetPrediction {
  readonly prediction: Prediction;
  readonly requirement: readonly Requirement[];
  readonly notices: readonly Notice[];
}

/** Resonances of the bare patch with one input at either end of its tolerance, carried to the best match in
 *  proportion: line and notch shift all of them alike to the first order. */
function spreadsOf(brief: Brief, patch: PatchOnSlab, bareHz: number, bestHz: number): readonly Spread[] {
  const { laminate, fabricator } = brief;
  const ratio = bestHz / bareHz;
  const pair = (cause: string, high: Partial<PatchOnSlab>, low: Partial<PatchOnSlab>): Spread => ({
    cause,
    highHz: ratio * bareResonance({ ...patch, ...high }).resonanceHz,
    lowHz: ratio * bareResonance({ ...patch, ...low }).resonanceHz,
  });
  const e = laminate.permittivityTolerance;
  const h = laminate.thicknessToleranceM;
  const etch = 2 * fabricator.edgeToleranceM;
  return [
    pair(
      'permittivity',
      { permittivity: patch.permittivity + e },
      { permittivity: Math.max(1, patch.permittivity - e) },
    ),
    pair('thickness', { heightM: patch.heightM + h }, { heightM: Math.max(patch.heightM / 2, patch.heightM - h) }),
    pair(
      'etch',
      { lengthM: patch.lengthM + etch, widthM: patch.widthM + etch },
      { lengthM: patch.lengthM - etch, widthM: patch.widthM - etch },
    ),
  ];
}

function worstInBand(impedance: ImpedanceOf, referenceOhm: number, lowHz: number, highHz: number) {
  let worst = { frequencyHz: lowHz, reflection: -1 };
  for (let i = 0; i < BAND_POINTS; i++) {
    const frequencyHz = lowHz + ((highHz - lowHz) * i) / (BAND_POINTS - 1);
    const size = magnitude(reflection(impedance(complex(frequencyHz)), referenceOhm));
    if (size > worst.reflection) worst = { frequencyHz, reflection: size };
  }
  return worst;
}

function ghz(frequencyHz: number): string {
  return `${(frequencyHz / 1e9).toFixed(4)} GHz`;
}

/** Predicts an inset-fed patch on its board.
 *  resonance: least reflection in the brief's reference at the connector; bandwidth around it; peak resistance at the
 *  inset's end (see impedanceAtInsetEnd); qualities unloaded, of the bare patch; loaded quality of the pole with feed
 *  and generator.
 *  Valid: inset-range.ts says where the feed's law was verified. */
export function predictInset(
  brief: Brief,
  radiator: RectangularRadiator,
  feed: InsetFeed,
  board: BoardSize,
  section: InsetCrossSection,
): InsetPrediction {
  const { laminate, band, match: wish } = brief;
  const centreHz = (band.lowHz + band.highHz) / 2;
  const patch: PatchOnSlab = {
    lengthM: radiator.lengthM,
    widthM: radiator.widthM,
    heightM: laminate.thicknessM,
    permittivity: laminate.permittivity,
  };
  const bare = bareResonance(patch);
  const split = qualitySplit(patch, laminate.lossTangent, laminate, bare.resonanceHz);
  const line = feedLine(laminate, feed.lineWidthM, centreHz);
  const fed: FedPatch = {
    patch,
    mode: { resonanceHz: bare.resonanceHz, quality: split.total },
    feed,
    section,
    line,
  };
  const front = impedanceAtFrontEdge(fed);
  const connector = impedanceAtConnector(fed);
  const reference = wish.referenceOhm;
  const match = bestMatch(connector, reference, bare.resonanceHz);
  const peak = peakResistance(impedanceAtInsetEnd(fed), bare.resonanceHz);
  const pole = loadedPole(front, reference, match.bestMatchHz, split.total / 2);
  const bandwidthHz = matchedBandwidthHz(connector, reference, match, BANDWIDTH_VSWR);
  const centreReflection = magnitude(reflection(connector(complex(centreHz)), reference));
  const worst = worstInBand(connector, reference, band.lowHz, band.highHz);
  const range = feedRange(patch, feed, bare.resonanceHz);
  const modelError = Math.hypot(bare.modelError, range.modelError);
  const interval = resonanceInterval(
    match.bestMatchHz,
    spreadsOf(brief, patch, bare.resonanceHz, match.bestMatchHz),
    modelError,
  );
  const mode = modePrediction(split, bare.resonanceHz);
  const lineLossDb = 20 * Math.LOG10E * line.lossNpPerM * feed.lineLengthM;
  const worstDb = returnLossDb(worst.reflection);
  const prediction: Prediction = {
    ...mode,
    resonanceHz: match.bestMatchHz,
    resonanceKind: 'bestMatch',
    resonanceLowHz: interval.lowHz,
    resonanceHighHz: interval.highHz,
    contributions: interval.contributions,
    bandwidthHz,
    inputResistanceOhm: peak.resistanceOhm,
    returnLossAtCentreDb: returnLossDb(centreReflection),
    returnLossWorstInBandDb: worstDb,
    qualityLoaded: pole === null ? null : pole.quality,
    gainRealizedDbi: mode.gainDbi + 10 * Math.log10(1 - centreReflection ** 2) - lineLossDb,
  };
  const requirement: Requirement[] = [
    {
      name: 'return loss over the band',
      wanted: `at least ${wish.returnLossDb.toFixed(1)} dB from ${ghz(band.lowHz)} to ${ghz(band.highHz)}`,
      predicted: `${worstDb.toFixed(1)} dB at ${ghz(worst.frequencyHz)} (nominal)`,
      holds: worstDb >= wish.returnLossDb,
    },
  ];
  return {
    prediction,
    requirement,
    notices: [
      ...bare.notices,
      ...range.notices,
      ...modeNotices(patch, match.bestMatchHz, split),
      ...feedNotices({ brief, patch, feed, board, line, split, bandwidthHz, centreHz }),
    ],
  };
}
