// A design as a sheet for reading in a terminal.

import {
  type Brief,
  type Feed,
  formatFrequency,
  formatLengthMm,
  type Notice,
  type PatchDesign,
  type Prediction,
  type Requirement,
  type ResonanceKind,
} from '../geometry/index.ts';
import { CAUTIONS } from './cautions.ts';

const KIND_IN_WORDS: Readonly<Record<ResonanceKind, string>> = {
  bare: 'bare: the patch without its feed',
  loadedPole: 'loaded: the pole with feed and generator',
  bestMatch: 'best match: least reflection at the feed',
};

const mm = (lengthM: number): string => formatLengthMm(lengthM, 3);
const spread = (halfWidthHz: number): string => `± ${formatFrequency(halfWidthHz, 2)}`;

function row(label: string, text: string): string {
  return `  ${label.padEnd(18)}${text}`;
}

/** A frequency with its interval and the largest cause of it; never the number alone. */
export function resonanceText(prediction: Prediction): string {
  const { resonanceHz, resonanceLowHz, resonanceHighHz, contributions, resonanceKind } = prediction;
  const half = (resonanceHighHz - resonanceLowHz) / 2;
  const cause = contributions[0] === undefined ? '' : ` (${contributions[0].cause})`;
  return `${formatFrequency(resonanceHz)} ${spread(half)}${cause}, ${KIND_IN_WORDS[resonanceKind]}`;
}

/** A return loss above this says nothing: no connector and no instrument is that good. */
const BEST_RETURN_LOSS_DB = 40;
const returnLoss = (value: number | null): string => {
  if (value === null) return 'none';
  return value > BEST_RETURN_LOSS_DB ? `over ${BEST_RETURN_LOSS_DB} dB` : `${value.toFixed(1)} dB`;
};
const quality = (value: number | null): string => (value === null ? 'none' : value.toFixed(0));

export function predictionLines(prediction: Prediction): readonly string[] {
  const p = prediction;
  const band =
    p.bandwidthHz === null
      ? p.resonanceKind === 'bare'
        ? `${formatFrequency(p.bandwidthCriticalHz, 3)} at VSWR ${p.bandwidthVswr}, if critically fed`
        : `never reaches VSWR ${p.bandwidthVswr}`
      : `${formatFrequency(p.bandwidthHz, 3)} at VSWR ${p.bandwidthVswr}`;
  const causes = p.contributions.map(({ cause, halfWidthHz }) => `${cause} ${spread(halfWidthHz)}`).join(', ');
  return [
    row('resonance', resonanceText(p)),
    row('  three sigma', causes),
    row('bandwidth', band),
    ...(p.returnLossAtCentreDb === null
      ? []
      : [
          row(
            'return loss',
            `${returnLoss(p.returnLossAtCentreDb)} at band centre, ${returnLoss(p.returnLossWorstInBandDb)} at worst`,
          ),
        ]),
    row('edge resistance', `${p.edgeResistanceOhm.toFixed(0)} ohm, loss included`),
    row(
      'quality',
      `${quality(p.qualityTotal)} unloaded (radiation ${quality(p.qualityRadiation)}, dielectric ${quality(p.qualityDielectric)}, conductor ${quality(p.qualityConductor)}, surface wave ${quality(p.qualitySurfaceWave)})`,
    ),
    row('efficiency', `${(100 * p.radiationEfficiency).toFixed(0)} %`),
    row(
      'gain',
      `${p.gainDbi.toFixed(1)} dBi (directivity ${p.directivityDbi.toFixed(1)} dBi)${p.gainRealizedDbi === null ? '' : `, ${p.gainRealizedDbi.toFixed(1)} dBi with mismatch and feed line`}`,
    ),
  ];
}

export function requirementLines(requirements: readonly Requirement[]): readonly string[] {
  return requirements.map(
    ({ name, wanted, predicted, holds }) =>
      `  ${holds ? 'holds    ' : 'NOT MET  '} ${name}: wanted ${wanted}; predicted ${predicted}`,
  );
}

export function noticeLines(notices: readonly Notice[]): readonly string[] {
  return notices.map(({ message, code }) => `  ${message} [${code}]`);
}

function section(title: string, lines: readonly string[]): readonly string[] {
  return lines.length === 0 ? [] : ['', title, ...lines];
}

/** Sections that every result ends in. */
export function closingSections(notices: readonly Notice[]): readonly string[] {
  return [
    ...section('Notices', noticeLines(notices)),
    ...section(
      'Cautions',
      CAUTIONS.map((line) => `  ${line}`),
    ),
  ];
}

/** The feed's dimensions in words. */
function feedRows(feed: Feed): readonly string[] {
  switch (feed.kind) {
    case 'inset': {
      const narrowed =
        feed.lineWidthInNotchM === feed.lineWidthM ? '' : `, ${mm(feed.lineWidthInNotchM)} wide within the notch`;
      return [
        row('inset feed', `depth ${mm(feed.insetDepthM)}, gap ${mm(feed.notchGapM)} each side`),
        row('feed line', `${mm(feed.lineWidthM)} wide${narrowed}, ${mm(feed.lineLengthM)} from the edge to the patch`),
      ];
    }
    case 'quarter-wave':
      return [
        row('transformer', `${mm(feed.transformerWidthM)} wide, ${mm(feed.transformerLengthM)} long, at the patch`),
        row('feed line', `${mm(feed.lineWidthM)} wide, ${mm(feed.lineLengthM)} from the edge to the transformer`),
      ];
    case 'probe':
      return [
        row(
          'probe',
          `${mm(feed.offsetM)} from the patch's centre towards its front edge, pin ${mm(feed.pinDiameterM)}`,
        ),
        row(
          'hole',
          `${mm(feed.holeDiameterM)}, ${feed.plated ? 'plated' : 'not plated'}, pad ${mm(feed.padDiameterM)}, opening in the ground ${mm(feed.clearanceDiameterM)}`,
        ),
      ];
  }
}

export function designSheet(brief: Brief, design: PatchDesign): string {
  const { radiator, feed, board, prediction } = design;
  return [
    brief.title,
    ...section('Dimensions', [
      row('patch', `length ${mm(radiator.lengthM)} (resonant, along y), width ${mm(radiator.widthM)}`),
      ...feedRows(feed),
      row('board', `width ${mm(board.widthM)}, length ${mm(board.lengthM)}`),
      row(
        'laminate',
        `${brief.laminate.name}, permittivity ${brief.laminate.permittivity} ± ${brief.laminate.permittivityTolerance}, ${mm(brief.laminate.thicknessM)} ± ${mm(brief.laminate.thicknessToleranceM)}`,
      ),
      row('fabricator', brief.fabricator.name),
    ]),
    ...section('Prediction', predictionLines(prediction)),
    ...section('Requirements', requirementLines(design.requirement)),
    ...section(
      'Defaults taken',
      brief.defaults.map(({ path, value }) => `  ${path}: ${value}`),
    ),
    ...closingSections(design.notices),
  ].join('\n');
}
