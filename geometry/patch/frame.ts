// What sizing starts from, whatever the feed: widths, margins, rounding.

import type { Brief } from '../brief/brief.ts';
import { type Notice, refuse } from '../errors.ts';
import { copperRow } from '../fabricator/fabricator.ts';
import { lineWidthM } from '../line/synthesis.ts';
import { SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import { bareResonance, type PatchOnSlab } from './bare-resonance.ts';
import type { BareMode } from './inset-network.ts';
import { qualitySplit } from './quality.ts';

/** Sized dimensions are rounded to whole micrometres, far below any fabricator's tolerance. */
const PER_METRE = 1e6;
/** Laminate beyond the patch: six heights keep its fringing field on the board, and 0.06 wavelengths its ground whole. */
const MARGIN_OVER_HEIGHT = 6;
const MARGIN_OVER_WAVELENGTH = 0.06;

export function rounded(lengthM: number): number {
  return Math.round(lengthM * PER_METRE) / PER_METRE;
}

export function bandCentreHz(brief: Brief): number {
  return (brief.band.lowHz + brief.band.highHz) / 2;
}

export function patchOn(brief: Brief, lengthM: number, widthM: number): PatchOnSlab {
  const { laminate } = brief;
  return { lengthM, widthM, heightM: laminate.thicknessM, permittivity: laminate.permittivity };
}

/** The mode of a bare patch of a brief's laminate. */
export function bareModeOf(brief: Brief, patch: PatchOnSlab): BareMode {
  const resonanceHz = bareResonance(patch).resonanceHz;
  const split = qualitySplit(patch, brief.laminate.lossTangent, brief.laminate, resonanceHz);
  return { resonanceHz, quality: split.total };
}

/** Laminate beyond the patch: as wished, or six heights and 0.06 wavelengths, rounded up to a tenth of a millimetre. */
export function marginOf(brief: Brief, centreHz: number): number {
  if (brief.board.marginM !== 'auto') return brief.board.marginM;
  const wavelength = SPEED_OF_LIGHT_M_PER_S / centreHz;
  const least = Math.max(MARGIN_OVER_HEIGHT * brief.laminate.thicknessM, MARGIN_OVER_WAVELENGTH * wavelength);
  return Math.ceil(least * 1e4) / 1e4;
}

/** From the board's edge to the patch: pinned, or the margin, or what centres the patch on a board of given length. */
export function frontEdgeFor(brief: Brief, patchLengthM: number, pinnedM: number | undefined): number {
  if (pinnedM !== undefined) return pinnedM;
  if (brief.board.lengthM === undefined) return marginOf(brief, bandCentreHz(brief));
  return rounded((brief.board.lengthM - patchLengthM) / 2);
}

/** The textbook's width, c/(2f) √(2/(εr+1)): a fair radiator that keeps the next mode away. */
export function defaultWidthM(brief: Brief, centreHz: number): number {
  const er = brief.laminate.permittivity;
  return rounded((SPEED_OF_LIGHT_M_PER_S / (2 * centreHz)) * Math.sqrt(2 / (er + 1)));
}

/** Width of a line of the brief's reference impedance, rounded.
 *  Throws: EngineError "match.reference" where no width gives it. */
export function defaultLineWidthM(brief: Brief, centreHz: number, notices: Notice[]): number {
  const { laminate, match, fabricator } = brief;
  const width = lineWidthM(
    match.referenceOhm,
    { heightM: laminate.thicknessM, permittivity: laminate.permittivity, thicknessM: laminate.copperThicknessM },
    centreHz,
  );
  if (width === null) {
    refuse({
      code: 'match.reference',
      path: 'match.reference',
      value: `${match.referenceOhm} ohm`,
      problem: `no microstrip on this laminate has ${match.referenceOhm} ohm`,
      allowed: 'take a reference nearer to 50 ohm or another thickness',
    });
  }
  const narrowest = copperRow(fabricator, laminate.copperBaseM)?.traceM ?? 0;
  if (width < narrowest) {
    notices.push({
      code: 'line.narrow',
      message: `A ${match.referenceOhm} ohm line would be ${(width * 1e3).toFixed(3)} mm wide here; ${fabricator.name} etches no trace below ${(narrowest * 1e3).toFixed(2)} mm.`,
    });
  }
  return rounded(width);
}
