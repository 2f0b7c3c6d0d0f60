// From a brief to a sized inset-fed patch: the best match with this feed sits at band centre.

import type { Brief } from '../brief/brief.ts';
import { invariant, type Notice, refuse } from '../errors.ts';
import { copperRow } from '../fabricator/fabricator.ts';
import { lineWidthM } from '../line/synthesis.ts';
import { complex } from '../numeric/complex.ts';
import { findMinimum } from '../numeric/search.ts';
import { SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import { bareResonance, type PatchOnSlab } from './bare-resonance.ts';
import { demandRoom } from './board-room.ts';
import type { BoardSize, InsetFeed, PatchDesign, RectangularRadiator } from './design.ts';
import { crossSectionOf, type FedPatch, feedLine, impedanceAtConnector } from './inset-feed.ts';
import type { InsetCrossSection } from './inset-network.ts';
import { bestMatch, reflection } from './match.ts';
import { predictInset } from './predict-inset.ts';
import { qualitySplit } from './quality.ts';

/** Sized dimensions are rounded to whole micrometres, far below any fabricator's tolerance. */
const PER_METRE = 1e6;
/** Notch gaps are rounded up to this [m]: nothing electrical asks for finer ones. */
const GAP_STEP_M = 50e-6;
/** Notch gap over board height that disturbs the line little, and over the fabricator's smallest space. */
const GAP_OVER_HEIGHT = 0.65;
const GAP_OVER_SPACE = 1.3;
/** Deepest inset over the patch's length that is searched: beyond, the patch's centre has no resistance to offer. */
const DEEPEST_INSET = 0.46;
/** Laminate beyond the patch: six heights keep its fringing field on the board, and 0.06 wavelengths its ground whole. */
const MARGIN_OVER_HEIGHT = 6;
const MARGIN_OVER_WAVELENGTH = 0.06;

function rounded(lengthM: number): number {
  return Math.round(lengthM * PER_METRE) / PER_METRE;
}

/** Everything about a design that the search for length and depth leaves alone. */
interface Frame {
  readonly brief: Brief;
  readonly centreHz: number;
  readonly widthM: number;
  readonly lineWidthM: number;
  readonly lineWidthInNotchM: number;
  readonly notchGapM: number;
  readonly section: InsetCrossSection;
}

function patchOf(frame: Frame, lengthM: number): PatchOnSlab {
  const { laminate } = frame.brief;
  return {
    lengthM,
    widthM: frame.widthM,
    heightM: laminate.thicknessM,
    permittivity: laminate.permittivity,
  };
}

/** Laminate beyond the patch: as wished, or six heights and 0.06 wavelengths, rounded up to a tenth of a millimetre. */
function marginOf(brief: Brief, centreHz: number): number {
  if (brief.board.marginM !== 'auto') return brief.board.marginM;
  const wavelength = SPEED_OF_LIGHT_M_PER_S / centreHz;
  const least = Math.max(MARGIN_OVER_HEIGHT * brief.laminate.thicknessM, MARGIN_OVER_WAVELENGTH * wavelength);
  return Math.ceil(least * 1e4) / 1e4;
}

/** From the board's edge to the patch: pinned, or the margin, or what centres the patch on a board of given length. */
function lineLengthFor(brief: Brief, centreHz: number, patchLengthM: number): number {
  const { pinned } = brief.feed;
  if (pinned.lineLengthM !== undefined) return pinned.lineLengthM;
  if (brief.board.lengthM === undefined) return marginOf(brief, centreHz);
  return rounded((brief.board.lengthM - patchLengthM) / 2);
}

/** The patch with its feed, for a length and an inset depth. */
function fedPatch(frame: Frame, lengthM: number, insetDepthM: number): FedPatch {
  const { laminate } = frame.brief;
  const patch = patchOf(frame, lengthM);
  const resonanceHz = bareResonance(patch).resonanceHz;
  const split = qualitySplit(patch, laminate.lossTangent, laminate, resonanceHz);
  return {
    patch,
    mode: { resonanceHz, quality: split.total },
    feed: {
      kind: 'inset',
      lineWidthM: frame.lineWidthM,
      lineWidthInNotchM: frame.lineWidthInNotchM,
      notchGapM: frame.notchGapM,
      insetDepthM,
      lineLengthM: lineLengthFor(frame.brief, frame.centreHz, lengthM),
    },
    section: frame.section,
    line: feedLine(laminate, frame.lineWidthM, frame.centreHz),
  };
}

function bestMatchOf(frame: Frame, lengthM: number, insetDepthM: number) {
  const fed = fedPatch(frame, lengthM, insetDepthM);
  return bestMatch(impedanceAtConnector(fed), frame.brief.match.referenceOhm, fed.mode.resonanceHz);
}

/** The length whose best match, at an inset of a given share of it or of a given depth, lies at band centre. */
function lengthForBestMatch(frame: Frame, guessM: number, depthOf: (lengthM: number) => number): number {
  let length = guessM;
  for (let i = 0; i < 8; i++) {
    const { bestMatchHz } = bestMatchOf(frame, length, depthOf(length));
    const next = length * (bestMatchHz / frame.centreHz);
    const done = Math.abs(next - length) < 1e-9;
    length = next;
    if (done) break;
  }
  return length;
}

/** Length and depth together, by Newton's method on Γ(centre) = 0; null where it does not converge to a patch. */
function solveTogether(
  frame: Frame,
  guessLengthM: number,
  guessDepthM: number,
): { readonly lengthM: number; readonly depthM: number } | null {
  const reference = frame.brief.match.referenceOhm;
  const gammaAt = (lengthM: number, depthM: number) =>
    reflection(impedanceAtConnector(fedPatch(frame, lengthM, depthM))(complex(frame.centreHz)), reference);
  let length = guessLengthM;
  let depth = guessDepthM;
  for (let i = 0; i < 30; i++) {
    const here = gammaAt(length, depth);
    const step = guessLengthM * 1e-5;
    const byLength = gammaAt(length + step, depth);
    const byDepth = gammaAt(length, depth + step);
    const a = (byLength.re - here.re) / step;
    const b = (byDepth.re - here.re) / step;
    const c = (byLength.im - here.im) / step;
    const d = (byDepth.im - here.im) / step;
    const determinant = a * d - b * c;
    if (determinant === 0) return null;
    let dLength = -(d * here.re - b * here.im) / determinant;
    let dDepth = -(a * here.im - c * here.re) / determinant;
    // Steps stay within what the linear picture covers.
    const shrink = Math.min(1, (0.02 * guessLengthM) / Math.abs(dLength), (0.08 * guessLengthM) / Math.abs(dDepth));
    dLength *= shrink;
    dDepth *= shrink;
    length += dLength;
    depth += dDepth;
    if (!(depth > 0 && depth < DEEPEST_INSET * length && Math.abs(length / guessLengthM - 1) < 0.2)) return null;
    if (Math.abs(dLength) < 1e-10 && Math.abs(dDepth) < 1e-10) return { lengthM: length, depthM: depth };
  }
  return null;
}

/** The depth that gives the least reflection at its own best match, for a length that may follow the depth. */
function depthForMatch(frame: Frame, lengthAt: (share: number) => number): number {
  const reflectionAt = (share: number): number => {
    const length = lengthAt(share);
    return bestMatchOf(frame, length, share * length).bestReflection;
  };
  const steps = 12;
  let best = 0;
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i <= steps; i++) {
    const value = reflectionAt((i / steps) * DEEPEST_INSET);
    if (value < least) {
      least = value;
      best = i;
    }
  }
  const at = (i: number): number => (Math.min(steps, Math.max(0, i)) / steps) * DEEPEST_INSET;
  const share = findMinimum(reflectionAt, at(best - 1), at(best + 1), 1e-6);
  // An optimum against the lower end is a plain edge feed.
  return share < 2e-6 ? 0 : share;
}

function sizeRadiator(frame: Frame): { readonly lengthM: number; readonly depthM: number } {
  const { radiator, feed } = frame.brief;
  const pinnedLength = radiator.pinned.lengthM;
  const pinnedDepth = feed.pinned.insetDepthM;
  const halfWave = (0.5 * SPEED_OF_LIGHT_M_PER_S) / (frame.centreHz * Math.sqrt(frame.brief.laminate.permittivity));
  const guess = lengthForBestMatch(frame, halfWave * 0.95, () => pinnedDepth ?? 0);
  if (pinnedLength !== undefined) {
    return {
      lengthM: pinnedLength,
      depthM: pinnedDepth ?? rounded(depthForMatch(frame, () => pinnedLength) * pinnedLength),
    };
  }
  if (pinnedDepth !== undefined) return { lengthM: rounded(guess), depthM: pinnedDepth };
  const solved = solveTogether(frame, guess, 0.3 * guess);
  if (solved !== null) return { lengthM: rounded(solved.lengthM), depthM: rounded(solved.depthM) };
  const share = depthForMatch(frame, (s) => lengthForBestMatch(frame, guess, (l) => s * l));
  const length = lengthForBestMatch(frame, guess, (l) => share * l);
  return { lengthM: rounded(length), depthM: rounded(share * length) };
}

/** The textbook's width, c/(2f) √(2/(εr+1)): a fair radiator that keeps the next mode away. */
function defaultWidthM(brief: Brief, centreHz: number): number {
  const er = brief.laminate.permittivity;
  return rounded((SPEED_OF_LIGHT_M_PER_S / (2 * centreHz)) * Math.sqrt(2 / (er + 1)));
}

function defaultLineWidthM(brief: Brief, centreHz: number, notices: Notice[]): number {
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

function frameOf(brief: Brief, notices: Notice[]): Frame {
  const centreHz = (brief.band.lowHz + brief.band.highHz) / 2;
  const pinned = brief.feed.pinned;
  const widthM = brief.radiator.pinned.widthM ?? defaultWidthM(brief, centreHz);
  const line = pinned.lineWidthM ?? defaultLineWidthM(brief, centreHz, notices);
  const inNotch = pinned.lineWidthInNotchM ?? line;
  const space = copperRow(brief.fabricator, brief.laminate.copperBaseM)?.spaceM ?? 0;
  const gap =
    pinned.notchGapM ??
    rounded(
      Math.ceil(Math.max(GAP_OVER_HEIGHT * brief.laminate.thicknessM, GAP_OVER_SPACE * space) / GAP_STEP_M - 1e-9) *
        GAP_STEP_M,
    );
  const needed = Math.max(line, inNotch + 2 * gap);
  if (needed >= widthM) {
    refuse({
      code: 'feed.width',
      path: pinned.lineWidthM !== undefined ? 'feed.pinned.lineWidth' : 'radiator.pinned.width',
      value: `${(needed * 1e3).toFixed(3)} mm`,
      problem: `line and notch take ${(needed * 1e3).toFixed(3)} mm, the patch is ${(widthM * 1e3).toFixed(3)} mm wide`,
      allowed: 'line width plus both gaps must be less than the patch width',
    });
  }
  const section = crossSectionOf(brief.laminate, widthM, { lineWidthInNotchM: inNotch, notchGapM: gap });
  return { brief, centreHz, widthM, lineWidthM: line, lineWidthInNotchM: inNotch, notchGapM: gap, section };
}

function sizeBoard(brief: Brief, radiator: RectangularRadiator, centreHz: number): BoardSize {
  const wish = brief.board;
  const margin = marginOf(brief, centreHz);
  const line = lineLengthFor(brief, centreHz, radiator.lengthM);
  return {
    widthM: wish.widthM ?? rounded(radiator.widthM + 2 * margin),
    lengthM: wish.lengthM ?? rounded(line + radiator.lengthM + margin),
    cornerRadiusM: wish.cornerRadiusM,
  };
}

/** Sizes the antenna around what the brief pins, and predicts what the rounded copper does.
 *  Throws: EngineError naming the field where the wishes exclude one another. */
export function sizePatch(brief: Brief): PatchDesign {
  const notices: Notice[] = [];
  const frame = frameOf(brief, notices);
  const { lengthM, depthM } = sizeRadiator(frame);
  invariant(lengthM > 0 && depthM >= 0, 'sizePatch: a length and a depth');
  if (depthM >= lengthM) {
    refuse({
      code: 'feed.insetDepth',
      path: 'feed.pinned.insetDepth',
      value: `${(depthM * 1e3).toFixed(3)} mm`,
      problem: `the inset is as deep as the patch is long (${(lengthM * 1e3).toFixed(3)} mm)`,
      allowed: 'less than half the patch length is useful',
    });
  }
  const radiator: RectangularRadiator = { family: 'rectangular', lengthM, widthM: frame.widthM };
  const board = sizeBoard(brief, radiator, frame.centreHz);
  const feed: InsetFeed = {
    kind: 'inset',
    lineWidthM: frame.lineWidthM,
    lineWidthInNotchM: frame.lineWidthInNotchM,
    insetDepthM: depthM,
    notchGapM: frame.notchGapM,
    lineLengthM: lineLengthFor(brief, frame.centreHz, lengthM),
  };
  demandRoom(radiator, feed, board, brief.fabricator.copperToEdgeM);
  const predicted = predictInset(brief, radiator, feed, board, frame.section);
  return {
    kind: 'patch-design',
    radiator,
    feed,
    board,
    prediction: predicted.prediction,
    requirement: predicted.requirement,
    notices: [...notices, ...predicted.notices],
  };
}
