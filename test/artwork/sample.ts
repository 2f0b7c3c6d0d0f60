// One invented board for tests: an inset-fed patch for 2.44 GHz on glass-epoxy, and its variations.

import type { Artwork } from '../../geometry/artwork/artwork.ts';
import { composeArtwork } from '../../geometry/artwork/compose.ts';
import type { Brief } from '../../geometry/brief/brief.ts';
import type { Fabricator } from '../../geometry/fabricator/fabricator.ts';
import type { InsetFeed, PatchDesign } from '../../geometry/patch/design.ts';

export const sampleFabricator: Fabricator = {
  name: 'sample-shop',
  copperRows: [
    { baseM: 18e-6, traceM: 0.15e-3, spaceM: 0.15e-3, ringM: 0.15e-3 },
    { baseM: 35e-6, traceM: 0.2e-3, spaceM: 0.2e-3, ringM: 0.2e-3 },
  ],
  edgeToleranceM: 25e-6,
  etchCompensation: 'fabricator',
  copperToEdgeM: 0.25e-3,
  boardMaxWidthM: 0.4,
  boardMaxLengthM: 0.3,
  outlineToleranceM: 0.2e-3,
  registrationM: 0.15e-3,
  minimumInnerRadiusM: 0.5e-3,
  mask: { expansionM: 0.1e-3, webM: 0.1e-3 },
  legend: { lineM: 0.15e-3, heightM: 1e-3 },
  plated: { minimumHoleM: 0.25e-3, largestHoleM: 6.3e-3, aspectRatio: 6 },
  minimumUnplatedHoleM: 0.35e-3,
  unplatedHoleToCopperM: 0.25e-3,
  unplatedRingM: 0.3e-3,
  holeToleranceM: 0.1e-3,
  drillStepM: 0.05e-3,
  finishes: ['tin'],
};

export const sampleBrief: Brief = {
  kind: 'brief',
  title: 'Sample board, 2.44 GHz',
  band: { lowHz: 2.4e9, highHz: 2.4835e9 },
  match: { returnLossDb: 10, referenceOhm: 50 },
  polarization: 'linear',
  laminate: {
    name: 'glass-epoxy',
    permittivity: 4.3,
    permittivityTolerance: 0.2,
    lossTangent: 0.02,
    thicknessM: 1.53e-3,
    thicknessToleranceM: 0.13e-3,
    copperThicknessM: 35e-6,
    copperBaseM: 35e-6,
    conductivitySPerM: 5.8e7,
    roughnessM: 1.8e-6,
  },
  radiator: { family: 'rectangular', pinned: {} },
  feed: { kind: 'inset', pinned: {} },
  board: { marginM: 'auto', cornerRadiusM: 0 },
  fabricator: sampleFabricator,
  defaults: [],
};

export const sampleFeed: InsetFeed = {
  kind: 'inset',
  lineWidthM: 0.00298,
  lineWidthInNotchM: 0.00298,
  insetDepthM: 0.0087,
  notchGapM: 0.001,
  lineLengthM: 0.0291,
};

export const sampleDesign: PatchDesign = {
  kind: 'patch-design',
  radiator: { family: 'rectangular', lengthM: 0.029, widthM: 0.037 },
  feed: sampleFeed,
  board: { widthM: 0.0556, lengthM: 0.0674, cornerRadiusM: 0 },
  prediction: {
    method: 'closed-form',
    resonanceHz: 2.46e9,
    resonanceKind: 'bestMatch',
    resonanceLowHz: 2.403e9,
    resonanceHighHz: 2.517e9,
    contributions: [
      { cause: 'permittivity', halfWidthHz: 54.7e6 },
      { cause: 'model error', halfWidthHz: 14.4e6 },
    ],
    bareResonanceHz: 2.3956e9,
    bandwidthHz: 57.4e6,
    bandwidthVswr: 2,
    bandwidthCriticalHz: 59.2e6,
    edgeResistanceOhm: 124,
    inputResistanceOhm: 48.2,
    returnLossAtCentreDb: 15.1,
    returnLossWorstInBandDb: 4.2,
    qualityTotal: 28.6,
    qualityRadiation: 70.3,
    qualityDielectric: 50.8,
    qualityConductor: 1133,
    qualitySurfaceWave: 686,
    qualityLoaded: 15.9,
    radiationEfficiency: 0.39,
    directivityDbi: 6.45,
    gainDbi: 2.37,
    gainRealizedDbi: 2.1,
  },
  requirement: [
    {
      name: 'return loss over the band',
      wanted: 'at least 10.0 dB from 2.4000 GHz to 2.4835 GHz',
      predicted: '4.2 dB at 2.4000 GHz (nominal)',
      holds: false,
    },
  ],
  notices: [{ code: 'patch.efficiency', message: 'Only 39 % of the accepted power is radiated.' }],
};

/** The design with some of its dimensions changed. */
export function designWith(change: {
  readonly radiator?: Partial<PatchDesign['radiator']>;
  readonly feed?: Partial<InsetFeed>;
  readonly board?: Partial<PatchDesign['board']>;
}): PatchDesign {
  return {
    ...sampleDesign,
    radiator: { ...sampleDesign.radiator, ...change.radiator },
    feed: { ...sampleFeed, ...change.feed },
    board: { ...sampleDesign.board, ...change.board },
  };
}

export function sampleArtwork(design: PatchDesign = sampleDesign, brief: Brief = sampleBrief): Artwork {
  return composeArtwork({ brief, design, buildId: 'EW0123456789' });
}
