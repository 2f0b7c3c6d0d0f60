// Whether a board holds its antenna.

import { refuse } from '../errors.ts';
import { toNm } from '../units.ts';
import type { BoardSize, RectangularRadiator } from './design.ts';

function millimetres(nm: number): string {
  return `${nm / 1e6} mm`;
}

/** Refuses a board that does not hold patch and feed with the fabricator's distance to its edge.
 *  @param frontEdgeM  from the board's edge to the patch's front edge
 *  Compared in whole nanometres, as they are drawn.
 *  Throws: EngineError "board.small", "board.cornerRadius". */
export function demandRoom(
  radiator: RectangularRadiator,
  frontEdgeM: number,
  board: BoardSize,
  copperToEdgeM: number,
): void {
  const edge = toNm(copperToEdgeM);
  const patchWidth = toNm(radiator.widthM);
  const patchLength = toNm(radiator.lengthM);
  const width = toNm(board.widthM);
  const length = toNm(board.lengthM);
  const line = toNm(frontEdgeM);
  const needWidth = patchWidth + 2 * edge;
  if (width < needWidth) {
    refuse({
      code: 'board.small',
      path: 'board.width',
      value: millimetres(width),
      problem: `a board ${millimetres(width)} wide does not hold the patch of ${millimetres(patchWidth)}`,
      allowed: `allowed is ${millimetres(needWidth)} or more`,
    });
  }
  if (length < line + patchLength + edge || line < edge) {
    const least = Math.max(line + patchLength + edge, patchLength + 2 * edge);
    refuse({
      code: 'board.small',
      path: 'board.length',
      value: millimetres(length),
      problem: `a board ${millimetres(length)} long does not hold the patch of ${millimetres(patchLength)} and its feed line`,
      allowed: `allowed is ${millimetres(least)} or more, of which the feed line takes ${millimetres(edge)} or more`,
    });
  }
  const corner = toNm(board.cornerRadiusM);
  if (2 * corner > Math.min(width, length)) {
    refuse({
      code: 'board.cornerRadius',
      path: 'board.cornerRadius',
      value: millimetres(corner),
      problem: `corners of ${millimetres(corner)} do not fit the board`,
      allowed: `allowed is half the shorter side, ${millimetres(Math.min(width, length) / 2)}, or less`,
    });
  }
  // The patch's corners may come nearer to a rounded corner of the board than to its sides.
  const beside = (width - patchWidth) / 2;
  const behind = length - line - patchLength;
  const reach = (margin: number): number => Math.max(0, corner - margin);
  const deepest = Math.max(hypot(reach(beside), reach(behind)), hypot(reach(beside), reach(line)));
  if (deepest > 0 && deepest > corner - edge) {
    refuse({
      code: 'board.cornerRadius',
      path: 'board.cornerRadius',
      value: millimetres(corner),
      problem: `corners of ${millimetres(corner)} cut into the patch or leave it too near to the board's edge`,
      allowed: 'take smaller corners or a wider margin',
    });
  }
}

function hypot(x: number, y: number): number {
  // One side clear of the corner is clear of it altogether.
  return x === 0 || y === 0 ? 0 : Math.hypot(x, y);
}
