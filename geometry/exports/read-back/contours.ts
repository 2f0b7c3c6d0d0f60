// Contours as read against contours as drawn.

import type { Contour, PointNm } from '../../shape/shape.ts';
import type { ReadPath } from './gerber-reader.ts';

/** Greatest distance between a point as drawn and as read [nm]. */
export const DEVIATION_NM = 1000;

/** A corner and the edge that leaves it: straight, or an arc round a centre. */
export interface Corner {
  readonly at: PointNm;
  readonly centre: PointNm | null;
  readonly clockwise: boolean;
}

/** Corners of a contour of the artwork, edges without length left out. */
export function cornersDrawn(contour: Contour): readonly Corner[] {
  const corners: Corner[] = [];
  let at = contour.start;
  for (const edge of contour.edges) {
    const arc = edge.kind === 'arc';
    if (arc || edge.to.xNm !== at.xNm || edge.to.yNm !== at.yNm) {
      corners.push({ at, centre: arc ? edge.centre : null, clockwise: arc && edge.clockwise });
    }
    at = edge.to;
  }
  return corners;
}

export function cornersRead(path: ReadPath): readonly Corner[] {
  let at = path.start;
  return path.edges.map(({ to, centre, clockwise }) => {
    const corner = { at, centre, clockwise };
    at = to;
    return corner;
  });
}

function near(a: PointNm, b: PointNm): boolean {
  return Math.hypot(a.xNm - b.xNm, a.yNm - b.yNm) <= DEVIATION_NM;
}

function sameCorner(a: Corner, b: Corner): boolean {
  if (!near(a.at, b.at) || (a.centre === null) !== (b.centre === null)) return false;
  return a.centre === null || b.centre === null || (near(a.centre, b.centre) && a.clockwise === b.clockwise);
}

/** Whether two closed chains are the same, wherever they start. */
export function sameContour(a: readonly Corner[], b: readonly Corner[]): boolean {
  if (a.length !== b.length) return false;
  return a.some((_, shift) => a.every((corner, i) => sameCorner(corner, b[(i + shift) % b.length]!)));
}

/** Pairs what was wanted with what was found, each used once; says how many of either are left over. */
export function unmatched<A, B>(
  wanted: readonly A[],
  found: readonly B[],
  same: (a: A, b: B) => boolean,
): { readonly missing: number; readonly extra: number } {
  const left = [...found];
  let missing = 0;
  for (const item of wanted) {
    const index = left.findIndex((candidate) => same(item, candidate));
    if (index < 0) missing += 1;
    else left.splice(index, 1);
  }
  return { missing, extra: left.length };
}
