// A design rounded to whole nanometres and laid out on its board.

import type { Brief } from '../brief/brief.ts';
import { EngineError, type Fault, invariant } from '../errors.ts';
import { demandRoom } from '../patch/board-room.ts';
import { frontEdgeM, type PatchDesign } from '../patch/design.ts';
import { SHORTEST_EDGE_NM } from '../shape/validate.ts';
import { toNm } from '../units.ts';

/** Ground kept up to the board's edge on either side of the line: five heights, and room for a connector's legs. */
const LAUNCH_OVER_HEIGHT = 5;
const LAUNCH_LEAST_NM = 6_000_000;

/** All lengths in whole nanometres; widths as halves, so that both sides of the axis are the same. */
export interface Layout {
  readonly boardWidth: number;
  readonly boardLength: number;
  readonly cornerRadius: number;
  /** Axis of the antenna. */
  readonly axis: number;
  readonly halfPatch: number;
  readonly front: number;
  readonly back: number;
  readonly pullBack: number;
  /** The line to the board's edge, and half the stretch over which the ground reaches that edge; null for a probe. */
  readonly line: { readonly half: number; readonly halfLaunch: number } | null;
  /** Null for a plain edge. */
  readonly notch: NotchLayout | null;
  /** Half its width, and where it begins on the way from the board's edge. */
  readonly transformer: { readonly half: number; readonly from: number } | null;
  readonly pin: PinLayout | null;
}

export interface NotchLayout {
  /** Half the line within the notch. */
  readonly halfLine: number;
  /** From the line's edge, at its width outside, to the flank. */
  readonly gap: number;
  /** From the axis to the flank. */
  readonly outer: number;
  readonly depth: number;
}

export interface PinLayout {
  /** Height of the pin on the axis. */
  readonly y: number;
  readonly hole: number;
  readonly pad: number;
  readonly clearance: number;
  readonly plated: boolean;
}

function half(lengthM: number): number {
  return Math.round(toNm(lengthM) / 2);
}

/** To an even number of nanometres, so that a centred circle has whole ends. */
function even(lengthM: number): number {
  return 2 * half(lengthM);
}

function millimetres(nm: number): string {
  return `${nm / 1e6} mm`;
}

/** Rounds a design to whole nanometres.
 *  Throws: EngineError "board.small", "board.cornerRadius", "board.launch", "feed.lineWidth", "feed.notch", "feed.notchGap",
 *  "feed.insetDepth", "feed.lineWidthInNotch" for what cannot be drawn. */
export function layOut(brief: Brief, design: PatchDesign): Layout {
  const { radiator, feed, board } = design;
  demandRoom(radiator, frontEdgeM(feed), board, brief.fabricator.copperToEdgeM);
  const front = toNm(frontEdgeM(feed));
  const length = toNm(radiator.lengthM);
  const pullBack = toNm(brief.fabricator.copperToEdgeM);
  const axis = half(board.widthM);
  const cornerRadius = toNm(board.cornerRadiusM);
  const lineHalf = feed.kind === 'probe' ? null : half(feed.lineWidthM);
  const wanted = (lineHalf ?? 0) + Math.max(LAUNCH_OVER_HEIGHT * toNm(brief.laminate.thicknessM), LAUNCH_LEAST_NM);
  const layout: Layout = {
    boardWidth: 2 * axis,
    boardLength: toNm(board.lengthM),
    cornerRadius,
    axis,
    halfPatch: half(radiator.widthM),
    front,
    back: front + length,
    pullBack,
    line:
      lineHalf === null
        ? null
        : { half: lineHalf, halfLaunch: Math.min(wanted, axis - Math.max(pullBack, cornerRadius)) },
    notch:
      feed.kind === 'inset' && toNm(feed.insetDepthM) > 0
        ? {
            halfLine: half(feed.lineWidthInNotchM),
            gap: toNm(feed.notchGapM),
            outer: half(feed.lineWidthM) + toNm(feed.notchGapM),
            depth: toNm(feed.insetDepthM),
          }
        : null,
    transformer:
      feed.kind === 'quarter-wave' ? { half: half(feed.transformerWidthM), from: toNm(feed.lineLengthM) } : null,
    pin:
      feed.kind === 'probe'
        ? {
            y: front + Math.round(length / 2) - toNm(feed.offsetM),
            hole: even(feed.holeDiameterM),
            pad: even(feed.padDiameterM),
            clearance: even(feed.clearanceDiameterM),
            plated: feed.plated,
          }
        : null,
  };
  invariant(
    Object.values(layout).every((value) => typeof value !== 'number' || Number.isSafeInteger(value)),
    'a design has finite dimensions',
  );
  demand(layout);
  return layout;
}

/** What cannot be drawn is refused, all of it together, with the field and what would do. */
function demand(l: Layout): void {
  const faults: Fault[] = [];
  const fault = (code: string, path: string, valueNm: number, problem: string, allowed: string): void => {
    faults.push({ code, file: '', path, value: millimetres(valueNm), problem, allowed });
  };
  const { line, notch, boardWidth, cornerRadius } = l;
  const least = millimetres(SHORTEST_EDGE_NM);
  const patchWidth = 2 * l.halfPatch;
  if (line !== null && line.half >= l.halfPatch) {
    fault(
      'feed.lineWidth',
      'feed.pinned.lineWidth',
      2 * line.half,
      `a line of ${millimetres(2 * line.half)} is as wide as the patch of ${millimetres(patchWidth)}`,
      `allowed is less than ${millimetres(patchWidth)}`,
    );
  }
  if (line !== null && notch !== null) demandNotch(l, line.half, notch, fault);
  if (l.pin !== null) demandGroundAround(l, l.pin, fault);
  if (line !== null && line.halfLaunch < line.half) {
    fault(
      'board.launch',
      'board.width',
      boardWidth,
      'the straight part of the launch edge is narrower than the feed line',
      'take a wider board or smaller corners',
    );
  }
  if (cornerRadius > 0 && cornerRadius < SHORTEST_EDGE_NM) {
    fault(
      'board.cornerRadius',
      'board.cornerRadius',
      cornerRadius,
      `corners of ${millimetres(cornerRadius)} are too small to draw`,
      `allowed is 0 for square corners, or ${least} and more`,
    );
  }
  if (faults.length > 0) throw new EngineError(faults);
}

/** The opening around a pin must leave ground on all sides, clear of rounded corners too. */
function demandGroundAround(
  l: Layout,
  pin: PinLayout,
  fault: (code: string, path: string, valueNm: number, problem: string, allowed: string) => void,
): void {
  const edge = Math.max(l.pullBack, l.cornerRadius) + SHORTEST_EDGE_NM;
  const room = Math.min(pin.y, l.boardLength - pin.y, l.axis) - edge;
  if (pin.clearance / 2 <= room) return;
  fault(
    'feed.clearance',
    'feed.pinned.clearanceDiameter',
    pin.clearance,
    `an opening of ${millimetres(pin.clearance)} around the pin cuts the ground off at the board's edge`,
    room > 0 ? `allowed is up to ${millimetres(2 * room)}, or a wider margin` : 'take a wider margin',
  );
}

function demandNotch(
  l: Layout,
  halfLine: number,
  notch: NonNullable<Layout['notch']>,
  fault: (code: string, path: string, valueNm: number, problem: string, allowed: string) => void,
): void {
  const least = millimetres(SHORTEST_EDGE_NM);
  const { outer } = notch;
  const length = l.back - l.front;
  if (outer - notch.halfLine < SHORTEST_EDGE_NM) {
    fault(
      'feed.notch',
      'feed.pinned.lineWidthInNotch',
      2 * notch.halfLine,
      `a line of ${millimetres(2 * notch.halfLine)} fills the notch, which is ${millimetres(2 * outer)} wide`,
      `allowed is less than ${millimetres(2 * outer)}`,
    );
  }
  if (notch.gap < SHORTEST_EDGE_NM) {
    fault(
      'feed.notchGap',
      'feed.pinned.notchGap',
      notch.gap,
      `a notch gap of ${millimetres(notch.gap)} cannot be drawn`,
      `allowed is ${least} or more`,
    );
  }
  if (outer > l.halfPatch - SHORTEST_EDGE_NM) {
    fault(
      'feed.notchGap',
      'feed.pinned.notchGap',
      notch.gap,
      `line and notch gaps take ${millimetres(2 * outer)}, the patch is ${millimetres(2 * l.halfPatch)} wide`,
      `allowed is a gap below ${millimetres(Math.max(0, l.halfPatch - halfLine))}`,
    );
  }
  if (notch.depth < SHORTEST_EDGE_NM || notch.depth > length - SHORTEST_EDGE_NM) {
    fault(
      'feed.insetDepth',
      'feed.pinned.insetDepth',
      notch.depth,
      `an inset ${millimetres(notch.depth)} deep cannot be drawn in a patch ${millimetres(length)} long`,
      `allowed is 0 for a plain edge, or from ${least} to less than the patch is long`,
    );
  }
  const step = Math.abs(notch.halfLine - halfLine);
  if (step > 0 && step < SHORTEST_EDGE_NM) {
    fault(
      'feed.lineWidthInNotch',
      'feed.pinned.lineWidthInNotch',
      2 * notch.halfLine,
      `the line changes its width by ${millimetres(2 * step)} at the notch, too little to draw`,
      `allowed is ${millimetres(2 * halfLine)}, or a difference of ${millimetres(2 * SHORTEST_EDGE_NM)} and more`,
    );
  }
}
