// Length and inset depth of an inset-fed patch, together: the best match with this feed sits at band centre.

import type { Brief, PinnedInset } from '../brief/brief.ts';
import { type Notice, refuse } from '../errors.ts';
import { copperRow } from '../fabricator/fabricator.ts';
import { complex } from '../numeric/complex.ts';
import { findMinimum } from '../numeric/search.ts';
import { SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import type { InsetFeed } from './design.ts';
import { bandCentreHz, bareModeOf, defaultLineWidthM, defaultWidthM, frontEdgeFor, patchOn, rounded } from './frame.ts';
import { crossSectionOf, type FedPatch, feedLine, impedanceAtConnector } from './inset-feed.ts';
import type { InsetCrossSection } from './inset-network.ts';
import { bestMatch, reflection } from './match.ts';
import { lengthForBestMatch, solveMatch } from './solve-match.ts';

/** Notch gaps are rounded up to this [m]: nothing electrical asks for finer ones. */
const GAP_STEP_M = 50e-6;
/** Notch gap over board height that disturbs the line little, and over the fabricator's smallest space. */
const GAP_OVER_HEIGHT = 0.65;
const GAP_OVER_SPACE = 1.3;
/** Deepest inset over the patch's length that is searched: beyond, the patch's centre has no resistance to offer. */
const DEEPEST_INSET = 0.46;

/** Everything about a design that the search for length and depth leaves alone. */
interface Frame {
  readonly brief: Brief;
  readonly pinned: PinnedInset;
  readonly centreHz: number;
  readonly widthM: number;
  readonly lineWidthM: number;
  readonly lineWidthInNotchM: number;
  readonly notchGapM: number;
  readonly section: InsetCrossSection;
}

function feedOf(frame: Frame, lengthM: number, insetDepthM: number): InsetFeed {
  return {
    kind: 'inset',
    lineWidthM: frame.lineWidthM,
    lineWidthInNotchM: frame.lineWidthInNotchM,
    insetDepthM,
    notchGapM: frame.notchGapM,
    lineLengthM: frontEdgeFor(frame.brief, lengthM, frame.pinned.lineLengthM),
  };
}

/** The patch with its feed, for a length and an inset depth. */
function fedPatch(frame: Frame, lengthM: number, insetDepthM: number): FedPatch {
  const patch = patchOn(frame.brief, lengthM, frame.widthM);
  return {
    patch,
    mode: bareModeOf(frame.brief, patch),
    feed: feedOf(frame, lengthM, insetDepthM),
    section: frame.section,
    line: feedLine(frame.brief.laminate, frame.lineWidthM, frame.centreHz),
  };
}

function bestMatchOf(frame: Frame, lengthM: number, insetDepthM: number) {
  const fed = fedPatch(frame, lengthM, insetDepthM);
  return bestMatch(impedanceAtConnector(fed), frame.brief.match.referenceOhm, fed.mode.resonanceHz);
}

/** The length whose best match, at the inset depth that goes with it, lies at band centre. */
function lengthFor(frame: Frame, guessM: number, depthOf: (lengthM: number) => number): number {
  return lengthForBestMatch((l) => bestMatchOf(frame, l, depthOf(l)).bestMatchHz, frame.centreHz, guessM);
}

/** Length and depth together; null where no depth matches. */
function solveTogether(frame: Frame, guessM: number): { readonly lengthM: number; readonly depthM: number } | null {
  const reference = frame.brief.match.referenceOhm;
  const solved = solveMatch(
    (lengthM, depthM) =>
      reflection(impedanceAtConnector(fedPatch(frame, lengthM, depthM))(complex(frame.centreHz)), reference),
    { first: guessM, second: 0.3 * guessM },
    guessM * 1e-5,
    { first: 0.02 * guessM, second: 0.08 * guessM },
    ({ first, second }) => second > 0 && second < DEEPEST_INSET * first && Math.abs(first / guessM - 1) < 0.2,
  );
  return solved === null ? null : { lengthM: solved.first, depthM: solved.second };
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

function sizeLengthAndDepth(frame: Frame): { readonly lengthM: number; readonly depthM: number } {
  const pinnedLength = frame.brief.radiator.pinned.lengthM;
  const pinnedDepth = frame.pinned.insetDepthM;
  const halfWave = (0.5 * SPEED_OF_LIGHT_M_PER_S) / (frame.centreHz * Math.sqrt(frame.brief.laminate.permittivity));
  if (pinnedLength !== undefined) {
    return {
      lengthM: pinnedLength,
      depthM: pinnedDepth ?? rounded(depthForMatch(frame, () => pinnedLength) * pinnedLength),
    };
  }
  const guess = lengthFor(frame, halfWave * 0.95, () => pinnedDepth ?? 0);
  if (pinnedDepth !== undefined) return { lengthM: rounded(guess), depthM: pinnedDepth };
  const solved = solveTogether(frame, guess);
  if (solved !== null) return { lengthM: rounded(solved.lengthM), depthM: rounded(solved.depthM) };
  const share = depthForMatch(frame, (s) => lengthFor(frame, guess, (l) => s * l));
  const length = lengthFor(frame, guess, (l) => share * l);
  return { lengthM: rounded(length), depthM: rounded(share * length) };
}

function frameOf(brief: Brief, pinned: PinnedInset, notices: Notice[]): Frame {
  const centreHz = bandCentreHz(brief);
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
  const needed = Math.max(line + 2 * gap, inNotch);
  if (needed >= widthM) {
    refuse({
      code: 'feed.width',
      path: pinned.lineWidthM !== undefined ? 'feed.pinned.lineWidth' : 'radiator.pinned.width',
      value: `${(needed * 1e3).toFixed(3)} mm`,
      problem: `line and notch take ${(needed * 1e3).toFixed(3)} mm, the patch is ${(widthM * 1e3).toFixed(3)} mm wide`,
      allowed: 'line width plus both gaps must be less than the patch width',
    });
  }
  if (inNotch >= line + 2 * gap) {
    refuse({
      code: 'feed.lineWidthInNotch',
      path: 'feed.pinned.lineWidthInNotch',
      value: `${(inNotch * 1e3).toFixed(3)} mm`,
      problem: `a line of ${(inNotch * 1e3).toFixed(3)} mm fills the notch, which is ${((line + 2 * gap) * 1e3).toFixed(3)} mm wide`,
      allowed: 'allowed is less than the line width and both gaps',
    });
  }
  const section = crossSectionOf(brief.laminate, widthM, {
    lineWidthM: line,
    lineWidthInNotchM: inNotch,
    notchGapM: gap,
  });
  return { brief, pinned, centreHz, widthM, lineWidthM: line, lineWidthInNotchM: inNotch, notchGapM: gap, section };
}

/** Sizes patch length and inset depth around what is pinned.
 *  Throws: EngineError "feed.width", "feed.insetDepth", "match.reference". */
export function sizeInset(brief: Brief, pinned: PinnedInset, notices: Notice[]) {
  const frame = frameOf(brief, pinned, notices);
  const { lengthM, depthM } = sizeLengthAndDepth(frame);
  if (depthM >= lengthM) {
    refuse({
      code: 'feed.insetDepth',
      path: 'feed.pinned.insetDepth',
      value: `${(depthM * 1e3).toFixed(3)} mm`,
      problem: `the inset is as deep as the patch is long (${(lengthM * 1e3).toFixed(3)} mm)`,
      allowed: 'less than half the patch length is useful',
    });
  }
  return { lengthM, widthM: frame.widthM, feed: feedOf(frame, lengthM, depthM), section: frame.section };
}
