// What a fed patch does, with its interval, held against the brief.

import type { Brief } from '../brief/brief.ts';
import type { Notice } from '../errors.ts';
import { complex, magnitude } from '../numeric/complex.ts';
import { bareResonance, type PatchOnSlab } from './bare-resonance.ts';
import type { BoardSize, Feed, Prediction, RectangularRadiator, Requirement } from './design.ts';
import { modelFeed } from './feed-model.ts';
import { bandCentreHz, patchOn } from './frame.ts';
import type { InsetCrossSection } from './inset-network.ts';
import { feedNotices } from './inset-range.ts';
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

export interface FedPrediction {
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

/** Predicts a fed patch on its board.
 *  resonance: least reflection in the brief's reference at the connector; bandwidth around it; input resistance: the
 *  greatest that the feed sees (see FeedModel); qualities unloaded, of the bare patch; loaded quality of the pole with
 *  feed and generator.
 *  Valid: inset-range.ts says where each feed's law was verified. */
export function predictFed(
  brief: Brief,
  radiator: RectangularRadiator,
  feed: Feed,
  board: BoardSize,
  section: InsetCrossSection | null,
): FedPrediction {
  const { laminate, band, match: wish } = brief;
  const centreHz = bandCentreHz(brief);
  const patch = patchOn(brief, radiator.lengthM, radiator.widthM);
  const bare = bareResonance(patch);
  const split = qualitySplit(patch, laminate.lossTangent, laminate, bare.resonanceHz);
  const model = modelFeed(brief, radiator, feed, section);
  const reference = wish.referenceOhm;
  const match = bestMatch(model.connector, reference, bare.resonanceHz);
  const peak = peakResistance(model.seen, bare.resonanceHz);
  const pole = loadedPole(model.atPatch, reference, match.bestMatchHz, split.total / 2);
  const bandwidthHz = matchedBandwidthHz(model.connector, reference, match, BANDWIDTH_VSWR);
  const centreReflection = magnitude(reflection(model.connector(complex(centreHz)), reference));
  const worst = worstInBand(model.connector, reference, band.lowHz, band.highHz);
  const modelError = Math.hypot(bare.modelError, model.modelError);
  const interval = resonanceInterval(
    match.bestMatchHz,
    spreadsOf(brief, patch, bare.resonanceHz, match.bestMatchHz),
    modelError,
  );
  const mode = modePrediction(split, bare.resonanceHz);
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
    gainRealizedDbi: mode.gainDbi + 10 * Math.log10(1 - centreReflection ** 2) - model.lossDb,
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
      ...model.notices,
      ...modeNotices(patch, match.bestMatchHz, split),
      ...feedNotices({ brief, patch, feed, board, line: model.line, split, bandwidthHz, centreHz }),
    ],
  };
}
