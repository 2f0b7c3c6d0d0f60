// The one way from arcs to polygons.

import { cornersOf } from './primitives.ts';
import { type Contour, type Edge, type PointNm, point, type Ring } from './shape.ts';

/** Signed angle that an arc covers [rad]: positive counter-clockwise, never 0 (an arc that ends where it starts is a
 *  full circle). */
export function arcSweepRad(from: PointNm, edge: Extract<Edge, { kind: 'arc' }>): number {
  const start = Math.atan2(from.yNm - edge.centre.yNm, from.xNm - edge.centre.xNm);
  const end = Math.atan2(edge.to.yNm - edge.centre.yNm, edge.to.xNm - edge.centre.xNm);
  const whole = 2 * Math.PI;
  const forward = (((end - start) % whole) + whole) % whole || whole;
  return edge.clockwise ? (forward === whole ? -whole : forward - whole) : forward;
}

/** Points on an edge after its start, the end included; a straight edge is its end.
 *  @param chordErrorNm  greatest distance between arc and chord [nm], more than 0; corners are rounded to 1 nm more */
export function flattenEdge(from: PointNm, edge: Edge, chordErrorNm: number): PointNm[] {
  if (edge.kind === 'line') return [edge.to];
  const radius = Math.hypot(from.xNm - edge.centre.xNm, from.yNm - edge.centre.yNm);
  const sweep = arcSweepRad(from, edge);
  // A chord over the angle a leaves r(1 − cos(a/2)).
  const step = chordErrorNm >= radius ? Math.PI / 2 : 2 * Math.acos(1 - chordErrorNm / radius);
  const count = Math.max(1, Math.ceil(Math.abs(sweep) / step));
  const start = Math.atan2(from.yNm - edge.centre.yNm, from.xNm - edge.centre.xNm);
  const points: PointNm[] = [];
  for (let i = 1; i < count; i++) {
    const angle = start + (sweep * i) / count;
    points.push(
      point(
        Math.round(edge.centre.xNm + radius * Math.cos(angle)),
        Math.round(edge.centre.yNm + radius * Math.sin(angle)),
      ),
    );
  }
  points.push(edge.to);
  return points;
}

/** A contour as a polygon; corners of straight edges are kept as they are.
 *  @param chordErrorNm  greatest distance between the polygon and an arc [nm], more than 0 */
export function flatten(contour: Contour, chordErrorNm: number): Ring {
  const corners = cornersOf(contour);
  const ring = contour.edges.flatMap((edge, i) => flattenEdge(corners[i]!, edge, chordErrorNm));
  // The last point closes the contour: it is the start.
  return [contour.start, ...ring.slice(0, -1)];
}
