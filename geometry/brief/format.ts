// A resolved brief → the plain record of a brief file, complete in itself: laminate and fabricator inline.

import type { Fabricator } from '../fabricator/fabricator.ts';
import type { Laminate } from '../laminate/laminate.ts';
import { formatQuantity } from '../units.ts';
import type { Brief } from './brief.ts';
import { BRIEF_FIELDS } from './fields.ts';

const frequency = (frequencyHz: number): string => formatQuantity(frequencyHz, 'frequency');
const length = (lengthM: number): string => formatQuantity(lengthM, 'length');

/** The pinned dimensions under the keys of the file: those of the record without their unit. */
function formatPinned(pinned: object): Readonly<Record<string, string>> {
  const entries: [string, string][] = [];
  for (const [key, value] of Object.entries(pinned)) {
    if (typeof value === 'number') entries.push([key.slice(0, -1), length(value)]);
  }
  return Object.fromEntries(entries);
}

export function formatLaminate(laminate: Laminate): unknown {
  return {
    name: laminate.name,
    permittivity: laminate.permittivity,
    permittivityTolerance: laminate.permittivityTolerance,
    lossTangent: laminate.lossTangent,
    thickness: length(laminate.thicknessM),
    thicknessTolerance: length(laminate.thicknessToleranceM),
    copperThickness: length(laminate.copperThicknessM),
    copperBase: length(laminate.copperBaseM),
    conductivity: formatQuantity(laminate.conductivitySPerM, 'conductivity'),
    roughness: length(laminate.roughnessM),
  };
}

export function formatFabricator(sheet: Fabricator): unknown {
  const { mask, legend, plated } = sheet;
  return {
    name: sheet.name,
    copperRows: sheet.copperRows.map(({ baseM, traceM, spaceM, ringM }) => ({
      base: length(baseM),
      trace: length(traceM),
      space: length(spaceM),
      ring: length(ringM),
    })),
    edgeTolerance: length(sheet.edgeToleranceM),
    etchCompensation: sheet.etchCompensation,
    copperToEdge: length(sheet.copperToEdgeM),
    boardMaxWidth: length(sheet.boardMaxWidthM),
    boardMaxLength: length(sheet.boardMaxLengthM),
    outlineTolerance: length(sheet.outlineToleranceM),
    registration: length(sheet.registrationM),
    minimumInnerRadius: sheet.minimumInnerRadiusM === null ? null : length(sheet.minimumInnerRadiusM),
    mask: mask && { expansion: length(mask.expansionM), web: length(mask.webM) },
    legend: legend && { line: length(legend.lineM), height: length(legend.heightM) },
    plated: plated && {
      minimumHole: length(plated.minimumHoleM),
      largestHole: length(plated.largestHoleM),
      aspectRatio: plated.aspectRatio,
    },
    minimumUnplatedHole: length(sheet.minimumUnplatedHoleM),
    unplatedHoleToCopper: length(sheet.unplatedHoleToCopperM),
    unplatedRing: length(sheet.unplatedRingM),
    holeTolerance: length(sheet.holeToleranceM),
    drillStep: sheet.drillStepM === null ? null : length(sheet.drillStepM),
    finishes: sheet.finishes,
  };
}

function formatBoard(board: Brief['board']): unknown {
  const { marginM, widthM, lengthM, cornerRadiusM } = board;
  return {
    // Beside both width and length a margin would say it twice; "auto" is what is read back then.
    ...(widthM !== undefined && lengthM !== undefined
      ? {}
      : { margin: marginM === 'auto' ? marginM : length(marginM) }),
    ...(widthM === undefined ? {} : { width: length(widthM) }),
    ...(lengthM === undefined ? {} : { length: length(lengthM) }),
    cornerRadius: length(cornerRadiusM),
  };
}

/** The inverse of `parseBrief`: JSON of the result reads back as the same brief, to the last bit of every number, and
 *  takes no default on the way. */
export function formatBrief(brief: Brief): unknown {
  return {
    format: BRIEF_FIELDS.format.choices[0],
    title: brief.title,
    band: { low: frequency(brief.band.lowHz), high: frequency(brief.band.highHz) },
    match: {
      returnLoss: formatQuantity(brief.match.returnLossDb, 'decibel'),
      reference: formatQuantity(brief.match.referenceOhm, 'resistance'),
    },
    polarization: brief.polarization,
    laminate: formatLaminate(brief.laminate),
    radiator: { family: brief.radiator.family, pinned: formatPinned(brief.radiator.pinned) },
    feed: {
      kind: brief.feed.kind,
      ...(brief.feed.kind === 'probe' ? { plated: brief.feed.plated } : {}),
      pinned: formatPinned(brief.feed.pinned),
    },
    board: formatBoard(brief.board),
    fabricator: formatFabricator(brief.fabricator),
  };
}
