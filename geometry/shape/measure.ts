// Area, extent, inside and distance of contours and shapes.

import { arcSweepRad } from './flatten.ts';
import { onSegment, turn } from './predicates.ts';
import { cornersOf } from './primitives.ts';
import { type Contour, type Edge, type PointNm, point, type Ring, type Shape } from './shape.ts';

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

/** Where an arc reaches farthest to the right, up, left and down, its ends apart; rounded to whole nanometres. */
function arcExtremes(from: PointNm, edge: Extract<Edge, { kind: 'arc' }>): PointNm[] {
  const { centre } = edge;
  const radius = Math.round(Math.hypot(from.xNm - centre.xNm, from.yNm - centre.yNm));
  const start = Math.atan2(from.yNm - centre.yNm, from.xNm - centre.xNm);
  const sweep = arcSweepRad(from, edge);
  const whole = 2 * Math.PI;
  return [
    [1, 0],
    [0, 1],
    [-1, 0],
    [0, -1],
  ].flatMap(([x, y], quarter) => {
    const turn = (quarter * Math.PI) / 2 - start;
    const along = (((sweep > 0 ? turn : -turn) % whole) + whole) % whole;
    return along < Math.abs(sweep) ? [point(centre.xNm + x! * radius, centre.yNm + y! * radius)] : [];
  });
}

/** Smallest upright box around a shape, arcs included; null for the empty shape. */
export function shapeBox(shape: Shape): BoxNm | null {
  return boxOf(
    shape.flatMap(({ outer }) => {
      const corners = cornersOf(outer);
      return outer.edges.flatMap((edge, i) =>
        edge.kind === 'line' ? [edge.to] : [edge.to, ...arcExtremes(corners[i]!, edge)],
      );
    }),
  );
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

/** A distance with the two points between which it was measured; they are not rounded. */
export interface DistanceNm {
  readonly distanceNm: number;
  readonly from: PointNm;
  readonly to: PointNm;
}

export function distanceBetween(from: PointNm, to: PointNm): DistanceNm {
  return { distanceNm: Math.hypot(from.xNm - to.xNm, from.yNm - to.yNm), from, to };
}

export function nearerOf(a: DistanceNm, b: DistanceNm): DistanceNm {
  return b.distanceNm < a.distanceNm ? b : a;
}

/** The point of the segment a–b nearest to p, not rounded; a segment of no length is its end. */
export function nearestOnSegment(p: PointNm, a: PointNm, b: PointNm): PointNm {
  const dx = b.xNm - a.xNm;
  const dy = b.yNm - a.yNm;
  const length2 = dx * dx + dy * dy;
  if (length2 === 0) return a;
  const t = Math.min(1, Math.max(0, ((p.xNm - a.xNm) * dx + (p.yNm - a.yNm) * dy) / length2));
  return point(a.xNm + t * dx, a.yNm + t * dy);
}

/** Distance of the segments a–b and c–d, from the first to the second. Exact for axis-parallel ones; 0 where they
 *  cross, with a as both points. */
export function segmentDistance(a: PointNm, b: PointNm, c: PointNm, d: PointNm): DistanceNm {
  const ends = [
    distanceBetween(a, nearestOnSegment(a, c, d)),
    distanceBetween(b, nearestOnSegment(b, c, d)),
    distanceBetween(nearestOnSegment(c, a, b), c),
    distanceBetween(nearestOnSegment(d, a, b), d),
  ].reduce(nearerOf);
  const side = (p: PointNm, q: PointNm, r: PointNm): number =>
    (q.xNm - p.xNm) * (r.yNm - p.yNm) - (q.yNm - p.yNm) * (r.xNm - p.xNm);
  const crosses = side(a, b, c) * side(a, b, d) < 0 && side(c, d, a) * side(c, d, b) < 0;
  return crosses ? { distanceNm: 0, from: a, to: a } : ends;
}
