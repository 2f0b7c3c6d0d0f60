// Questions about integer points, answered exactly.
//
// Products of coordinates are exact in doubles only for spans up to 94.9 mm (√2⁵³ nm); beyond, rounding could turn a
// straight line into a corner. Where a quick bound cannot decide, whole numbers of any size do.

import type { PointNm } from './shape.ts';

/** Twice the greatest relative rounding error of a difference of two products. */
const DOUBT = 4 * Number.EPSILON;

/** Sign of the turn from a over b to c: +1 left (counter-clockwise), −1 right, 0 straight on or back. Exact. */
export function turn(a: PointNm, b: PointNm, c: PointNm): -1 | 0 | 1 {
  return crossSign(b.xNm - a.xNm, b.yNm - a.yNm, c.xNm - a.xNm, c.yNm - a.yNm);
}

/** Sign of the cross product of two integer vectors. Exact. */
export function crossSign(ux: number, uy: number, vx: number, vy: number): -1 | 0 | 1 {
  const p = ux * vy;
  const q = uy * vx;
  const d = p - q;
  if (Math.abs(d) > DOUBT * (Math.abs(p) + Math.abs(q))) return d > 0 ? 1 : -1;
  const exact = BigInt(ux) * BigInt(vy) - BigInt(uy) * BigInt(vx);
  return exact > 0n ? 1 : exact < 0n ? -1 : 0;
}

/** Sign of the dot product of two integer vectors. Exact. */
export function dotSign(ux: number, uy: number, vx: number, vy: number): -1 | 0 | 1 {
  return crossSign(ux, uy, -vy, vx);
}

export function samePoint(a: PointNm, b: PointNm): boolean {
  return a.xNm === b.xNm && a.yNm === b.yNm;
}

/** Whether p lies on the segment from a to b, ends included. Exact. */
export function onSegment(p: PointNm, a: PointNm, b: PointNm): boolean {
  return (
    Math.min(a.xNm, b.xNm) <= p.xNm &&
    p.xNm <= Math.max(a.xNm, b.xNm) &&
    Math.min(a.yNm, b.yNm) <= p.yNm &&
    p.yNm <= Math.max(a.yNm, b.yNm) &&
    turn(a, b, p) === 0
  );
}

/** Whether two segments have a point in common, ends included. Exact. */
export function segmentsMeet(a: PointNm, b: PointNm, c: PointNm, d: PointNm): boolean {
  const t1 = turn(a, b, c);
  const t2 = turn(a, b, d);
  const t3 = turn(c, d, a);
  const t4 = turn(c, d, b);
  if (t1 * t2 < 0 && t3 * t4 < 0) return true;
  return onSegment(c, a, b) || onSegment(d, a, b) || onSegment(a, c, d) || onSegment(b, c, d);
}
