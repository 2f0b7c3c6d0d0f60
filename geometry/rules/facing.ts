// The smallest distance between stretches of boundary that face each other, across clearance or across copper.
//
// Two edges face where a connecting segment p–q lies wholly in the clearance (or the copper) and meets both at 60° or
// more, so that the two sides of a corner do not count against each other.
//
//        ───────p────────  e1        For a given direction of p–q, sliding it along towards the point where the two
//               │                    lines meet shortens it until p or q comes to the end of its edge, or until it
//               │                    brushes past a corner of something between. So the shortest one starts at an
//        ───────q────────  e2        end of an edge, or at the foot of the perpendicular from some corner; from there
//                                    the other end is a clamp: the foot on the other edge, moved into the interval
//                                    that both angles and the edge's ends leave. Parallel edges attain it at such a
//                                    start too.

import { flatten } from '../shape/flatten.ts';
import type { PointNm, Ring, Shape } from '../shape/shape.ts';

/** Chord error for arcs [nm]: distances to arcs are too short by no more. Straight edges are exact. */
export const FACING_CHORD_NM = 1000;
/** tan 30°: how far the connecting segment may lean from an edge's normal. */
const LEAN = Math.tan(Math.PI / 6);
/** Lean that rounding may add [1]; a thousandth of a degree. */
const LEAN_SLACK = 2e-5;
/** Distances are compared to within this [nm]: rounding of feet on slanted edges. */
export const DISTANCE_SLACK_NM = 1e-3;

/** Where two edges come nearest while they face. */
export interface Facing {
  readonly distanceNm: number;
  readonly from: PointNm;
  readonly to: PointNm;
}

interface Side {
  readonly ax: number;
  readonly ay: number;
  readonly bx: number;
  readonly by: number;
  readonly length: number;
  /** Unit direction; copper lies to the left. */
  readonly ux: number;
  readonly uy: number;
  /** The ring it belongs to and its place in it, for telling neighbours. */
  readonly ring: number;
  readonly index: number;
  readonly count: number;
}

interface Candidate {
  readonly distance: number;
  readonly px: number;
  readonly py: number;
  readonly qx: number;
  readonly qy: number;
  readonly pair: number;
}

function sidesOf(rings: readonly Ring[]): Side[] {
  return rings.flatMap((points, ring) =>
    points.map((a, index) => {
      const b = points[(index + 1) % points.length]!;
      const dx = b.xNm - a.xNm;
      const dy = b.yNm - a.yNm;
      const length = Math.hypot(dx, dy);
      return {
        ax: a.xNm,
        ay: a.yNm,
        bx: b.xNm,
        by: b.yNm,
        length,
        ux: dx / length,
        uy: dy / length,
        ring,
        index,
        count: points.length,
      };
    }),
  );
}

function areNeighbours(a: Side, b: Side): boolean {
  if (a.ring !== b.ring) return false;
  const apart = Math.abs(a.index - b.index);
  return apart <= 1 || apart === a.count - 1;
}

/** The nearest allowed q on `other` from p on `own`, or null. `sign` is +1 across clearance (to the right of an edge),
 *  −1 across copper. */
function nearestFacing(
  px: number,
  py: number,
  own: Side,
  other: Side,
  sign: number,
): { qx: number; qy: number; distance: number } | null {
  // Frame of the other edge: s along it, height towards the side from which p must come.
  const rx = px - other.ax;
  const ry = py - other.ay;
  const foot = rx * other.ux + ry * other.uy;
  const height = sign * (rx * other.uy - ry * other.ux);
  if (height <= 0) return null;
  const lean = LEAN + LEAN_SLACK;
  let low = Math.max(0, foot - height * lean);
  let high = Math.min(other.length, foot + height * lean);
  // Frame of the own edge: the segment must leave within 30° of its normal n, so |d·u| ≤ lean · d·n.
  const nx = sign * own.uy;
  const ny = -sign * own.ux;
  // d(s) = a + s u − p; both bounds are linear in s: ±d·u ≤ lean d·n.
  const dux = -rx * own.ux - ry * own.uy;
  const duSlope = other.ux * own.ux + other.uy * own.uy;
  const dn = -rx * nx - ry * ny;
  const dnSlope = other.ux * nx + other.uy * ny;
  for (const side of [1, -1]) {
    // side·(dux + s duSlope) − lean (dn + s dnSlope) ≤ 0
    const constant = side * dux - lean * dn;
    const slope = side * duSlope - lean * dnSlope;
    if (Math.abs(slope) < 1e-12) {
      if (constant > DISTANCE_SLACK_NM) return null;
    } else if (slope > 0) high = Math.min(high, -constant / slope);
    else low = Math.max(low, -constant / slope);
  }
  if (low > high + DISTANCE_SLACK_NM) return null;
  const s = Math.min(Math.max(foot, low), Math.max(low, high));
  return {
    qx: other.ax + s * other.ux,
    qy: other.ay + s * other.uy,
    distance: Math.hypot(s - foot, height),
  };
}

/** Whether p–q, moved sideways by `shift`, crosses any edge between its ends. */
function crosses(c: Candidate, sides: readonly Side[], shift: number): boolean {
  const dx = c.qx - c.px;
  const dy = c.qy - c.py;
  const length = c.distance;
  const ox = c.px - (dy / length) * shift;
  const oy = c.py + (dx / length) * shift;
  // Nearer than this to either end it is the edge on which the end lies.
  const skip = Math.min(0.25, 2 / length);
  for (const side of sides) {
    const sa = dx * (side.ay - oy) - dy * (side.ax - ox);
    const sb = dx * (side.by - oy) - dy * (side.bx - ox);
    if (sa > 0 === sb > 0) continue;
    const k = sa / (sa - sb);
    const x = side.ax + k * (side.bx - side.ax) - ox;
    const y = side.ay + k * (side.by - side.ay) - oy;
    const t = (x * dx + y * dy) / (length * length);
    if (t > skip && t < 1 - skip) return true;
  }
  return false;
}

function isInCopper(x: number, y: number, sides: readonly Side[]): boolean {
  let inside = false;
  for (const { ax, ay, bx, by } of sides) {
    if (ay > y !== by > y && x < ax + ((y - ay) / (by - ay)) * (bx - ax)) inside = !inside;
  }
  return inside;
}

/** Sideways play when looking past a corner [nm]: a segment that brushes a corner is not blocked by it. */
const BRUSH_NM = 0.5;

function isOpen(c: Candidate, sides: readonly Side[], across: 'clearance' | 'copper'): boolean {
  for (const shift of [BRUSH_NM, -BRUSH_NM]) {
    if (crosses(c, sides, shift)) continue;
    const dx = c.qx - c.px;
    const dy = c.qy - c.py;
    const x = (c.px + c.qx) / 2 - (dy / c.distance) * shift;
    const y = (c.py + c.qy) / 2 + (dx / c.distance) * shift;
    if (isInCopper(x, y, sides) === (across === 'copper')) return true;
  }
  return false;
}

/** Points of an edge from which a shortest segment may start: its ends, and the feet of the corners that look at it. */
function startsOf(side: Side, sides: readonly Side[]): number[] {
  const starts = [0, side.length];
  for (const { ax, ay } of sides) {
    const foot = (ax - side.ax) * side.ux + (ay - side.ay) * side.uy;
    if (foot > 0 && foot < side.length) starts.push(foot);
  }
  return starts;
}

/** Edges at most this many are searched from feet as well as from ends; more come only from flattened arcs, whose
 *  chords are so short that their ends serve. */
const FEW_SIDES = 80;

/** All pairs of facing edges nearer than a distance, the nearest place of each, nearest first; and the nearest of all
 *  even when it is farther.
 *  @param across  'clearance' gives gaps, 'copper' gives widths
 *  Exact for straight edges, but where something stands between two edges and no corner's foot sees past it. */
export function findFacing(
  shape: Shape,
  across: 'clearance' | 'copper',
  belowNm: number,
): { readonly nearest: Facing | null; readonly below: readonly Facing[] } {
  const rings = shape.flatMap((region) => [region.outer, ...region.holes].map((c) => flatten(c, FACING_CHORD_NM)));
  const sides = sidesOf(rings);
  const sign = across === 'clearance' ? 1 : -1;
  const candidates: Candidate[] = [];
  sides.forEach((own, i) => {
    const starts = sides.length <= FEW_SIDES ? startsOf(own, sides) : [0, own.length];
    sides.forEach((other, j) => {
      if (i === j || areNeighbours(own, other)) return;
      for (const start of starts) {
        const px = own.ax + start * own.ux;
        const py = own.ay + start * own.uy;
        const found = nearestFacing(px, py, own, other, sign);
        if (found !== null && found.distance > DISTANCE_SLACK_NM) {
          const pair = Math.min(i, j) * sides.length + Math.max(i, j);
          candidates.push({ px, py, qx: found.qx, qy: found.qy, distance: found.distance, pair });
        }
      }
    });
  });
  candidates.sort((a, b) => a.distance - b.distance || a.pair - b.pair || a.px - b.px || a.py - b.py);
  let nearest: Facing | null = null;
  const below: Facing[] = [];
  const seen = new Set<number>();
  for (const candidate of candidates) {
    const isBelow = candidate.distance < belowNm - DISTANCE_SLACK_NM;
    if (nearest !== null && !isBelow) break;
    if (seen.has(candidate.pair) || !isOpen(candidate, sides, across)) continue;
    seen.add(candidate.pair);
    const facing = facingOf(candidate);
    nearest ??= facing;
    if (isBelow) below.push(facing);
  }
  return { nearest, below };
}

function facingOf(c: Candidate): Facing {
  const whole = (x: number, y: number): PointNm => ({ xNm: Math.round(x), yNm: Math.round(y) });
  return { distanceNm: c.distance, from: whole(c.px, c.py), to: whole(c.qx, c.qy) };
}
