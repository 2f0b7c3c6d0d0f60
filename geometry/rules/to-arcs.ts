// Places found between the chords of arcs, taken over to the arcs themselves.

import { nearestOnSegment } from '../shape/measure.ts';
import { point } from '../shape/shape.ts';
import type { Circle, Side } from './sight.ts';

/** Chord error for arcs while places are looked for [nm]. */
export const SEARCH_CHORD_NM = 5000;

/** A connecting segment and its length. */
export interface Candidate {
  readonly distance: number;
  readonly px: number;
  readonly py: number;
  readonly qx: number;
  readonly qy: number;
}

type Xy = readonly [number, number];

/** The point of a circle straight towards or straight away from a target, whichever is nearer to where one was found. */
function onCircle({ x, y, radius }: Circle, [tx, ty]: Xy, [fx, fy]: Xy): Xy {
  const [dx, dy] = [tx - x, ty - y];
  const away = Math.hypot(dx, dy);
  const scale = ((dx * (fx - x) + dy * (fy - y) >= 0 ? 1 : -1) * radius) / away;
  return [x + dx * scale, y + dy * scale];
}

/** Takes a place that was found between chords over to the arcs: the nearest points of two circles lie on the line of
 *  their centres, those of a circle and a straight edge on the perpendicular through the centre. Where this leads
 *  farther than chords and arcs differ, as at an arc's end, the chords' answer stands. */
export function onArcs(c: Candidate, a: Side, b: Side): Candidate {
  const [first, second] = [a.edge.circle, b.edge.circle];
  if (first === null && second === null) return c;
  const foot = (side: Side, centre: Circle): Xy => {
    const { ax, ay, bx, by } = side;
    const { xNm, yNm } = nearestOnSegment(point(centre.x, centre.y), point(ax, ay), point(bx, by));
    return [xNm, yNm];
  };
  const from: Xy = [c.px, c.py];
  const to: Xy = [c.qx, c.qy];
  let p: Xy;
  let q: Xy;
  if (first === null) {
    p = foot(a, second!);
    q = onCircle(second!, p, to);
  } else if (second === null) {
    q = foot(b, first);
    p = onCircle(first, q, from);
  } else {
    const areConcentric = Math.hypot(first.x - second.x, first.y - second.y) < 1;
    p = onCircle(first, areConcentric ? from : [second.x, second.y], from);
    q = onCircle(second, areConcentric ? from : [first.x, first.y], to);
  }
  const [px, py] = p;
  const [qx, qy] = q;
  const distance = Math.hypot(qx - px, qy - py);
  return Math.abs(distance - c.distance) <= 2 * SEARCH_CHORD_NM + 2 ? { distance, px, py, qx, qy } : c;
}
