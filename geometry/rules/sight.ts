// What a corner sees of the boundary around it, direction by direction.

import type { Ring } from '../shape/shape.ts';

/** The medium between two stretches of boundary: copper lies to the left of every side, clearance to the right. */
export type Medium = 'clearance' | 'copper';

export interface Circle {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
}

/** An edge of a contour. */
export interface SourceEdge {
  readonly number: number;
  /** The circle that an arc lies on; null for a straight edge. */
  readonly circle: Circle | null;
}

/** A straight side of a ring. */
export interface Side {
  readonly ax: number;
  readonly ay: number;
  readonly bx: number;
  readonly by: number;
  /** Unit direction. */
  readonly ux: number;
  readonly uy: number;
  /** Unit normal and its direction [rad], out of the medium into the side: how a segment meets it squarely. */
  readonly nx: number;
  readonly ny: number;
  readonly into: number;
  /** The edge of the contour that it is, or is a chord of. */
  readonly edge: SourceEdge;
  readonly ring: number;
  readonly index: number;
  /** How many sides its ring has. */
  readonly count: number;
}

/** One view: from a corner, between two directions, nothing but this side is seen. Directions are counted from the
 *  start of the corner's open sector [rad]. */
export interface View {
  readonly from: number;
  readonly to: number;
  readonly side: Side;
}

export interface Corner {
  readonly x: number;
  readonly y: number;
  /** The side that ends and the one that begins here. */
  readonly arriving: Side;
  readonly leaving: Side;
  /** Direction in which the corner's open sector begins [rad]; it turns counter-clockwise from there. */
  readonly start: number;
  readonly width: number;
  readonly views: readonly View[];
}

/** How far a connecting segment may lean from an edge's normal [rad]: 30°, and a thousandth of a degree for edges whose
 *  ends were rounded. */
export const LEAN_RAD = Math.PI / 6 + 2e-5;
const WHOLE = 2 * Math.PI;
/** Directions closer together than this are one [rad]. */
const SAME_DIRECTION_RAD = 1e-12;

/** An angle turned into [0, 2π). */
export function forward(angleRad: number): number {
  const rest = angleRad % WHOLE;
  return rest < 0 ? rest + WHOLE : rest;
}

/** The sides of rings; `edgeOf` tells which edge of a contour a side belongs to. */
export function sidesOf(rings: readonly Ring[], edges: readonly (readonly SourceEdge[])[], medium: Medium): Side[] {
  const sign = medium === 'clearance' ? 1 : -1;
  return rings.flatMap((points, ring) =>
    points.map((a, index): Side => {
      const b = points[(index + 1) % points.length]!;
      const dx = b.xNm - a.xNm;
      const dy = b.yNm - a.yNm;
      const length = Math.hypot(dx, dy);
      const [ux, uy] = [dx / length, dy / length];
      const [nx, ny] = [-sign * uy, sign * ux];
      return {
        ax: a.xNm,
        ay: a.yNm,
        bx: b.xNm,
        by: b.yNm,
        ux,
        uy,
        nx,
        ny,
        into: Math.atan2(ny, nx),
        edge: edges[ring]![index]!,
        ring,
        index,
        count: points.length,
      };
    }),
  );
}

/** A side as a corner at the origin has it. */
interface Seen {
  readonly side: Side;
  readonly ax: number;
  readonly ay: number;
  readonly bx: number;
  readonly by: number;
  readonly leastDistance: number;
}

function seenFrom(x: number, y: number, side: Side): Seen {
  const [ax, ay, bx, by] = [side.ax - x, side.ay - y, side.bx - x, side.by - y];
  const along = -(ax * side.ux + ay * side.uy);
  const length = Math.hypot(bx - ax, by - ay);
  const t = Math.min(length, Math.max(0, along));
  return { side, ax, ay, bx, by, leastDistance: Math.hypot(ax + t * side.ux, ay + t * side.uy) };
}

/** The side first met from the origin in a direction; `seen` runs from near to far. */
function firstMet(seen: readonly Seen[], dx: number, dy: number): Side | null {
  let nearest = Number.POSITIVE_INFINITY;
  let met: Side | null = null;
  for (const s of seen) {
    if (s.leastDistance > nearest) break;
    const ca = dx * s.ay - dy * s.ax;
    const cb = dx * s.by - dy * s.bx;
    if (ca > 0 === cb > 0) continue;
    const distance = (s.ax * s.by - s.ay * s.bx) / (cb - ca);
    if (distance > 0 && distance < nearest) {
      nearest = distance;
      met = s.side;
    }
  }
  return met;
}

/** Whether a segment in these directions may count: it leaves one of the corner's own sides squarely enough, or there is
 *  an opposite direction in which it may go on. */
function isWanted(from: number, to: number, width: number): boolean {
  if (width > Math.PI && (from < width - Math.PI || to > Math.PI)) return true;
  return [Math.PI / 2, width - Math.PI / 2].some((normal) => to >= normal - LEAN_RAD && from <= normal + LEAN_RAD);
}

/** What the corner at the start of `leaving` sees within its open sector, in the directions that matter. */
export function lookAround(arriving: Side, leaving: Side, sides: readonly Side[], medium: Medium): Corner {
  const { ax: x, ay: y } = leaving;
  const ahead = Math.atan2(leaving.uy, leaving.ux);
  const behind = Math.atan2(-arriving.uy, -arriving.ux);
  const [start, end] = medium === 'copper' ? [ahead, behind] : [behind, ahead];
  const width = forward(end - start);
  const seen = sides
    .filter((side) => side !== arriving && side !== leaving)
    .map((side) => seenFrom(x, y, side))
    .sort((a, b) => a.leastDistance - b.leastDistance);
  const turns = seen
    .filter(({ ax, ay }) => ax !== 0 || ay !== 0)
    .map(({ ax, ay }) => forward(Math.atan2(ay, ax) - start))
    .filter((angle) => angle < width)
    .sort((a, b) => a - b);
  const views: View[] = [];
  let from = 0;
  for (const to of [...turns, width]) {
    if (to - from < SAME_DIRECTION_RAD) continue;
    // Between two turns no corner lies: the middle speaks for all of it.
    if (isWanted(from, to, width)) {
      const middle = start + (from + to) / 2;
      const side = firstMet(seen, Math.cos(middle), Math.sin(middle));
      if (side !== null) views.push({ from, to, side });
    }
    from = to;
  }
  return { x, y, arriving, leaving, start, width, views };
}
