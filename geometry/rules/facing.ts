// The smallest distance between stretches of boundary that face each other, across clearance or across copper.
//
// Two edges face where a connecting segment p–q lies wholly in the clearance (or the copper) and meets both at 60° or
// more, so that the two sides of a corner do not count against each other.
//
//      ──────p───────  e1      Hold the direction of p–q and slide it along: its length changes evenly, so it is
//            │    ╱╲           least where the sliding ends, and that is at a corner: p or q is an end of its edge,
//            │   ╱  ╲          or p–q brushes past a corner of something that stands between. So it is enough to turn
//      ──────q───────  e2      a segment around every corner, through all directions that the corner sees.
//
// Around a corner, between two directions in which other corners lie, the same two edges are met. There the length is
// h/cos(δ), or the sum of two such terms where the segment passes the corner; h is the corner's distance from the
// edge's line and δ the lean from its normal. Both are convex in the direction, and both angles allow one interval of
// it, so each such piece has its least length by a clamp or a bisection. Nothing is sampled.

import { flattenEdge } from '../shape/flatten.ts';
import { cornersOf } from '../shape/primitives.ts';
import { type Contour, type PointNm, point, type Shape } from '../shape/shape.ts';
import { type Corner, LEAN_RAD, lookAround, type Medium, type Side, type SourceEdge, sidesOf } from './sight.ts';
import { type Candidate, onArcs, SEARCH_CHORD_NM } from './to-arcs.ts';

/** Chord error for arcs where a rule measures against a polygon [nm]. */
export const FACING_CHORD_NM = 1000;
/** Distances are compared to within this [nm]: rounding of doubles. */
export const DISTANCE_SLACK_NM = 1e-3;
/** Steps of bisection: more than a double has bits. */
const BISECTIONS = 60;

/** Where two edges come nearest while they face. */
export interface Facing {
  readonly distanceNm: number;
  readonly from: PointNm;
  readonly to: PointNm;
}

function areNeighbours(a: Side, b: Side): boolean {
  if (a.ring !== b.ring) return false;
  const apart = Math.abs(a.index - b.index);
  return apart <= 1 || apart === a.count - 1;
}

/** Difference of two directions, turned into [−π, π). */
function turnBetween(fromRad: number, toRad: number): number {
  const whole = 2 * Math.PI;
  const turn = (toRad - fromRad + Math.PI) % whole;
  return (turn < 0 ? turn + whole : turn) - Math.PI;
}

/** Distance of a corner from the line of a side. */
function height(corner: Corner, side: Side): number {
  return (side.ax - corner.x) * side.nx + (side.ay - corner.y) * side.ny;
}

/** Shortest segment from the corner, as an end of `own`, to `other` between two directions, given as leans from the
 *  other's normal. */
function fromCorner(corner: Corner, own: Side, other: Side, low: number, high: number): Candidate | null {
  // It leaves `own` within the lean of that side's normal, which points the other way.
  const square = turnBetween(other.into, own.into + Math.PI);
  const least = Math.max(low, -LEAN_RAD, square - LEAN_RAD);
  const most = Math.min(high, LEAN_RAD, square + LEAN_RAD);
  if (least > most) return null;
  const lean = Math.min(Math.max(0, least), most);
  const distance = height(corner, other) / Math.cos(lean);
  const angle = other.into + lean;
  return {
    distance,
    px: corner.x,
    py: corner.y,
    qx: corner.x + distance * Math.cos(angle),
    qy: corner.y + distance * Math.sin(angle),
  };
}

/** Shortest segment from `back` past the corner to `front`; directions as leans from the front's normal. */
function pastCorner(corner: Corner, back: Side, front: Side, low: number, high: number): Candidate | null {
  const square = turnBetween(front.into, back.into + Math.PI);
  const a = height(corner, front);
  const b = height(corner, back);
  let least = Math.max(low, -LEAN_RAD, square - LEAN_RAD);
  let most = Math.min(high, LEAN_RAD, square + LEAN_RAD);
  if (least > most) return null;
  const slope = (lean: number): number =>
    (a * Math.sin(lean)) / Math.cos(lean) ** 2 + (b * Math.sin(lean - square)) / Math.cos(lean - square) ** 2;
  let lean = 0;
  if (square === 0) lean = Math.min(Math.max(0, least), most);
  else if (slope(least) >= 0) lean = least;
  else if (slope(most) <= 0) lean = most;
  else {
    for (let i = 0; i < BISECTIONS; i++) {
      lean = (least + most) / 2;
      if (slope(lean) > 0) most = lean;
      else least = lean;
    }
  }
  const toFront = a / Math.cos(lean);
  const toBack = b / Math.cos(lean - square);
  const [cos, sin] = [Math.cos(front.into + lean), Math.sin(front.into + lean)];
  return {
    distance: toFront + toBack,
    px: corner.x - toBack * cos,
    py: corner.y - toBack * sin,
    qx: corner.x + toFront * cos,
    qy: corner.y + toFront * sin,
  };
}

/** Every shortest segment around one corner. */
function around(corner: Corner, take: (a: Side, b: Side, candidate: Candidate | null) => void): void {
  for (const { from, to, side } of corner.views) {
    // The view's borders as leans from the side's normal; a side is seen from less than half a turn.
    const low = turnBetween(side.into, corner.start + from);
    const high = low + (to - from);
    for (const own of [corner.arriving, corner.leaving]) {
      if (!areNeighbours(own, side)) take(own, side, fromCorner(corner, own, side, low, high));
    }
    // The way on beyond the corner must be open too: half a turn on.
    for (const behind of corner.views) {
      const begin = Math.max(from, behind.from - Math.PI);
      const end = Math.min(to, behind.to - Math.PI);
      if (begin < end && behind.side !== side && !areNeighbours(behind.side, side)) {
        const past = pastCorner(corner, behind.side, side, low + (begin - from), low + (end - from));
        take(behind.side, side, past);
      }
    }
  }
}

/** A contour as a ring, and for each of its sides the edge that it belongs to. */
function ringOf(contour: Contour, firstEdge: number): { readonly ring: PointNm[]; readonly edges: SourceEdge[] } {
  const corners = cornersOf(contour);
  const ring: PointNm[] = [];
  const edges: SourceEdge[] = [];
  contour.edges.forEach((edge, i) => {
    const from = corners[i]!;
    const ends = flattenEdge(from, edge, SEARCH_CHORD_NM);
    const circle =
      edge.kind === 'line'
        ? null
        : {
            x: edge.centre.xNm,
            y: edge.centre.yNm,
            radius: Math.hypot(from.xNm - edge.centre.xNm, from.yNm - edge.centre.yNm),
          };
    ring.push(from, ...ends.slice(0, -1));
    edges.push(...ends.map(() => ({ number: firstEdge + i, circle })));
  });
  return { ring, edges };
}

/** All pairs of facing edges nearer than a distance, the nearest place of each, nearest first; and the nearest of all
 *  even when it is farther. Edges that share a corner do not face: a sharp corner is no gap.
 *  @param across  'clearance' gives gaps, 'copper' gives widths
 *  Exact for straight edges, and for arcs whose nearest place lies within them; at an arc's end within
 *  SEARCH_CHORD_NM. */
export function findFacing(
  shape: Shape,
  across: Medium,
  belowNm: number,
): { readonly nearest: Facing | null; readonly below: readonly Facing[] } {
  let edgeCount = 0;
  const outlines = shape
    .flatMap((region) => [region.outer, ...region.holes])
    .map((contour) => {
      const outline = ringOf(contour, edgeCount);
      edgeCount += contour.edges.length;
      return outline;
    });
  const sides = sidesOf(
    outlines.map(({ ring }) => ring),
    outlines.map(({ edges }) => edges),
    across,
  );
  const nearestOfPair = new Map<number, Candidate & { readonly a: Side; readonly b: Side }>();
  const take = (a: Side, b: Side, candidate: Candidate | null): void => {
    if (candidate === null || !(candidate.distance > DISTANCE_SLACK_NM)) return;
    const pair = Math.min(a.edge.number, b.edge.number) * edgeCount + Math.max(a.edge.number, b.edge.number);
    const known = nearestOfPair.get(pair);
    if (known === undefined || candidate.distance < known.distance) nearestOfPair.set(pair, { ...candidate, a, b });
  };
  let first = 0;
  for (const { ring } of outlines) {
    for (let i = 0; i < ring.length; i++) {
      const arriving = sides[first + ((i + ring.length - 1) % ring.length)]!;
      around(lookAround(arriving, sides[first + i]!, sides, across), take);
    }
    first += ring.length;
  }
  const facings = [...nearestOfPair]
    .map(([pair, found]) => ({ pair, found: onArcs(found, found.a, found.b) }))
    .sort((a, b) => a.found.distance - b.found.distance || a.pair - b.pair)
    .map(({ found }) => facingOf(found));
  return {
    nearest: facings[0] ?? null,
    below: facings.filter(({ distanceNm }) => distanceNm < belowNm - DISTANCE_SLACK_NM),
  };
}

function facingOf(c: Candidate): Facing {
  const whole = (x: number, y: number): PointNm => point(Math.round(x), Math.round(y));
  return { distanceNm: c.distance, from: whole(c.px, c.py), to: whole(c.qx, c.qy) };
}
