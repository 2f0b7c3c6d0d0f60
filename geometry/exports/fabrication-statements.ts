// What the fabricator must know, as sentences: the drawing's column of notes and FABRICATION.txt say the same words.

import type { Artwork } from '../artwork/artwork.ts';
import type { ExportInput } from './exporter.ts';
import { frequency, micrometresOf, millimetresOf, RESONANCE_IN_WORDS } from './wording.ts';

/** The standing notes, in the order of how much a breach would cost. */
export function standingNotes({ artwork, brief, design }: ExportInput): readonly string[] {
  const { fabricator } = brief;
  const { cornerRadiusM } = design.board;
  const corners = cornerRadiusM > 0 ? `corners with a radius of ${millimetresOf(cornerRadiusM)} mm` : 'square corners';
  return [
    'Material as named, no substitution: another laminate of the same class moves the resonance.',
    'Dimensions are those of the finished copper. ' +
      (fabricator.etchCompensation === 'fabricator'
        ? 'The files are not compensated for etching; the fabricator compensates, once.'
        : 'Etch the files as they are: the owner answers for etching, so do not compensate.'),
    `Boxed dimensions are critical. Each etched edge within ${micrometresOf(fabricator.edgeToleranceM)} µm of where it is drawn.`,
    ...artwork.launches.map(
      ({ name }) => `${name}: copper runs to the board's edge by intent. Do not clip it or pull it back.`,
    ),
    'The patch is an antenna, not a fault. Add no thieving, teardrop, logo, date code or other metal or print anywhere on the board; change no line width.',
    artwork.hasSolderMask
      ? 'Solder mask is open over radiator and feed by intent: mask there lowers the resonance.'
      : 'No solder mask on either side, by intent: mask files hold one opening over the whole board.',
    ...holeNotes(artwork),
    'Radiator and ground are two nets without any connection: an open between them is right.',
    'All layers are seen from the top, none is mirrored; ground is drawn positive.',
    `Routed outline within ±${millimetresOf(fabricator.outlineToleranceM)} mm, ${corners}${artwork.launches.length === 0 ? '' : '; no score line through the edge that carries the feed'}.`,
  ];
}

/** What every hole is meant to be: a shop may guess from the pads around it, and guess wrong. */
function holeNotes(artwork: Artwork): readonly string[] {
  if (artwork.holes.length === 0) return ['No holes, plated or unplated: there is no drill file, by intent.'];
  return artwork.holes.map(({ label, plated, finishedDiameterNm }) =>
    plated
      ? `Hole for the ${label}: ${finishedDiameterNm / 1e6} mm finished, plated by intent, joined to the patch alone; the ground is open around it.`
      : `Hole for the ${label}: ${finishedDiameterNm / 1e6} mm finished, not plated by intent, though copper surrounds it on one side. Do not plate it.`,
  );
}

/** The frequency promised, with its interval: never a bare number. */
export function predictionSentence({ design }: ExportInput): string {
  const { prediction } = design;
  return (
    `Predicted ${RESONANCE_IN_WORDS[prediction.resonanceKind]}: ${frequency(prediction.resonanceHz)}, ` +
    `between ${frequency(prediction.resonanceLowHz)} and ${frequency(prediction.resonanceHighHz)} ` +
    'with the tolerances stated, at three sigma.'
  );
}

/** Each requirement that the prediction does not meet, as a sentence. */
export function shortfalls({ design }: ExportInput): readonly string[] {
  return design.requirement
    .filter((requirement) => !requirement.holds)
    .map(({ name, wanted, predicted }) => `${name}: wanted ${wanted}, predicted ${predicted}.`);
}

/** Finished thickness of the bare board: dielectric and two coppers [m]. */
export function boardThicknessM({ brief }: ExportInput): number {
  return brief.laminate.thicknessM + 2 * brief.laminate.copperThicknessM;
}
