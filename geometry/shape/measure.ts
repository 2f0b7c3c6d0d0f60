// Area, extent and inside of contours and shapes.

import { arcSweepRad, flatten } from './flatten.ts';
import { onSegment, turn } from './predicates.ts';
import { cornersOf } from './primitives.ts';
import type { Contour, PointNm, Ring, Shape } from './shape.ts';

/** Signed area of a contour [nm²]: positive counter-clockwise; arcs exactly, by Green's theorem.
 *  Straight edges: exact to rounding of the last sum (the terms are taken about the start, so they stay small). */
export function contourAreaNm2(contour: Contour): number {
  const corners = cornersOf(contour);
  const { xNm: x0, yNm: y0 } = contour.start;
  let twice = 0;
  contour.edges.forEach((edge, i) => {
    const from = corners[i]!;
    twice += (from.xNm - x0) * (edge.to.yNm - y0) - (edge.to.xNm - x0) * (from.yNm - y0);
    if (edge.kind === 'arc') {
      // The segment between chord and arc: r²(θ − sin θ)/2, signed by the sense.
      const radius2 = (from.xNm - edge.centre.xNm) ** 2 + (from.yNm - edge.centre.yNm) ** 2;
      const sweep = arcSweepRad(from, edge);
      twice += radius2 * (sweep - Math.sin(sweep));
    }
  });
  return twice / 2;
}

/** Area of a shape, holes left out [nm²]. */
export function areaNm2(shape: Shape): number {
  let sum = 0;
  for (const region of shape) {
    sum += Math.abs(contourAreaNm2(region.outer));
    for (const hole of region.holes) sum -= Math.abs(contourAreaNm2(hole));
  }
  return sum;
}

export interface BoxNm {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

/** Chord error for extents and inside tests [nm]: no arc here bulges by more between its chords. */
const EXTENT_CHORD_NM = 10;

/** Smallest upright box around points; null for none. */
export function boxOf(points: readonly PointNm[]): BoxNm | null {
  if (points.length === 0) return null;
  let minX = Number.POSITIVE_INFINITY;
  let minY = Number.POSITIVE_INFINITY;
  let maxX = Number.NEGATIVE_INFINITY;
  let maxY = Number.NEGATIVE_INFINITY;
  for (const { xNm, yNm } of points) {
    minX = Math.min(minX, xNm);
    minY = Math.min(minY, yNm);
    maxX = Math.max(maxX, xNm);
    maxY = Math.max(maxY, yNm);
  }
  return { minX, minY, maxX, maxY };
}

/** Smallest upright box around a shape; null for the empty shape. Arcs to within EXTENT_CHORD_NM. */
export function shapeBox(shape: Shape): BoxNm | null {
  return boxOf(shape.flatMap((region) => flatten(region.outer, EXTENT_CHORD_NM)));
}

/** Where a point lies against a ring of straight edges. Exact, for either orientation. */
export function locate(p: PointNm, ring: Ring): 'inside' | 'outside' | 'on' {
  let inside = false;
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i]!;
    const b = ring[(i + 1) % ring.length]!;
    if (onSegment(p, a, b)) return 'on';
    if (a.yNm > p.yNm !== b.yNm > p.yNm) {
      const side = b.yNm > a.yNm ? turn(a, b, p) : turn(b, a, p);
      if (side > 0) inside = !inside;
    }
  }
  return inside ? 'inside' : 'outside';
}
