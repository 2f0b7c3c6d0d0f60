// The angle that an arc turns through, which drawing formats want and the shapes leave implicit.

import type { Edge, PointNm } from '../shape/shape.ts';

export type ArcEdge = Extract<Edge, { readonly kind: 'arc' }>;

/** Angle from an arc's start to its end about its centre [rad]: positive counter-clockwise, negative clockwise.
 *  An arc that ends where it starts is the whole circle. In (0, 2π] or [−2π, 0). */
export function arcSweepRad(from: PointNm, arc: ArcEdge): number {
  const start = Math.atan2(from.yNm - arc.centre.yNm, from.xNm - arc.centre.xNm);
  const end = Math.atan2(arc.to.yNm - arc.centre.yNm, arc.to.xNm - arc.centre.xNm);
  const turn = 2 * Math.PI;
  const forward = arc.clockwise ? start - end : end - start;
  const positive = forward > 0 ? forward : forward + turn;
  return arc.clockwise ? -positive : positive;
}
