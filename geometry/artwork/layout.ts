// A design rounded to whole nanometres and laid out on its board.

import type { Brief } from '../brief/brief.ts';
import { refuse } from '../errors.ts';
import { demandRoom } from '../patch/board-room.ts';
import type { PatchDesign } from '../patch/design.ts';
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
  readonly halfLine: number;
  readonly halfInNotch: number;
  readonly gap: number;
  readonly depth: number;
  readonly pullBack: number;
  /** Half the stretch of the launch edge over which the ground reaches the board's edge. */
  readonly halfLaunch: number;
}

function half(lengthM: number): number {
  return Math.round(toNm(lengthM) / 2);
}

function millimetres(nm: number): string {
  return `${nm / 1e6} mm`;
}

/** Rounds a design to whole nanometres.
 *  Throws: EngineError "board.small", "board.cornerRadius", "board.launch", "feed.notch" for what cannot be drawn. */
export function layOut(brief: Brief, design: PatchDesign): Layout {
  const { radiator, feed, board } = design;
  demandRoom(radiator, feed, board, brief.fabricator.copperToEdgeM);
  const front = toNm(feed.lineLengthM);
  const halfPatch = half(radiator.widthM);
  const back = front + toNm(radiator.lengthM);
  const pullBack = toNm(brief.fabricator.copperToEdgeM);
  const axis = half(board.widthM);
  const boardLength = toNm(board.lengthM);
  const cornerRadius = toNm(board.cornerRadiusM);
  const halfLine = half(feed.lineWidthM);
  const corner = Math.max(pullBack, cornerRadius);
  const wanted = halfLine + Math.max(LAUNCH_OVER_HEIGHT * toNm(brief.laminate.thicknessM), LAUNCH_LEAST_NM);
  const layout: Layout = {
    boardWidth: 2 * axis,
    boardLength,
    cornerRadius,
    axis,
    halfPatch,
    front,
    back,
    halfLine,
    halfInNotch: half(feed.lineWidthInNotchM),
    gap: toNm(feed.notchGapM),
    depth: toNm(feed.insetDepthM),
    pullBack,
    halfLaunch: Math.min(wanted, axis - corner),
  };
  demand(layout);
  return layout;
}

/** A notch or a launch that cannot be drawn is refused with the field and what would do. */
function demand(l: Layout): void {
  if (l.depth > 0) {
    const outer = l.halfInNotch + l.gap;
    if (l.halfLine >= outer || l.gap <= 0) {
      refuse({
        code: 'feed.notch',
        path: 'feed.pinned.lineWidth',
        value: millimetres(2 * l.halfLine),
        problem: `a line of ${millimetres(2 * l.halfLine)} closes the notch, which is ${millimetres(2 * outer)} wide`,
        allowed: `allowed is less than ${millimetres(2 * outer)}`,
      });
    }
  }
  if (l.halfLaunch < l.halfLine) {
    refuse({
      code: 'board.launch',
      path: 'board.width',
      value: millimetres(l.boardWidth),
      problem: 'the straight part of the launch edge is narrower than the feed line',
      allowed: 'take a wider board or smaller corners',
    });
  }
}
