// A design rounded to whole nanometres and laid out on its board.

import type { Brief } from '../brief/brief.ts';
import { refuse } from '../errors.ts';
import { demandRoom } from '../patch/board-room.ts';
import { frontEdgeM, type PatchDesign } from '../patch/design.ts';
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
  readonly notch: { readonly halfLine: number; readonly gap: number; readonly depth: number } | null;
  /** Half its width, and where it begins on the way from the board's edge. */
  readonly transformer: { readonly half: number; readonly from: number } | null;
  readonly pin: PinLayout | null;
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
 *  Throws: EngineError "board.small", "board.cornerRadius", "board.launch", "feed.notch" for what cannot be drawn. */
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
        ? { halfLine: half(feed.lineWidthInNotchM), gap: toNm(feed.notchGapM), depth: toNm(feed.insetDepthM) }
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
  demand(layout);
  return layout;
}

/** A notch or a launch that cannot be drawn is refused with the field and what would do. */
function demand({ line, notch, boardWidth }: Layout): void {
  if (line === null) return;
  if (notch !== null) {
    const outer = notch.halfLine + notch.gap;
    if (line.half >= outer || notch.gap <= 0) {
      refuse({
        code: 'feed.notch',
        path: 'feed.pinned.lineWidth',
        value: millimetres(2 * line.half),
        problem: `a line of ${millimetres(2 * line.half)} closes the notch, which is ${millimetres(2 * outer)} wide`,
        allowed: `allowed is less than ${millimetres(2 * outer)}`,
      });
    }
  }
  if (line.halfLaunch < line.half) {
    refuse({
      code: 'board.launch',
      path: 'board.width',
      value: millimetres(boardWidth),
      problem: 'the straight part of the launch edge is narrower than the feed line',
      allowed: 'take a wider board or smaller corners',
    });
  }
}
