// The one validator of geometric truths, for every shape that is ever built.

import { arcSweepRad, flatten } from './flatten.ts';
import { contourAreaNm2, distanceBetween, locate, nearestOnSegment } from './measure.ts';
import { dotSign, samePoint, segmentsMeet, turn } from './predicates.ts';
import { cornersOf } from './primitives.ts';
import { ARC_RADIUS_TOLERANCE_NM, type Contour, type PointNm, type Ring, type Shape } from './shape.ts';

/** Shortest edge allowed [nm]: a fabricator's tools drop or distort shorter ones. */
export const SHORTEST_EDGE_NM = 1000;
/** Chord error for the tests that need polygons [nm]. */
const CHORD_NM = 100;

/** A truth that does not hold. */
export interface GeometryFault {
  readonly code:
    | 'notWhole'
    | 'fewEdges'
    | 'notClosed'
    | 'shortEdge'
    | 'arcRadius'
    | 'meetsItself'
    | 'orientation'
    | 'holeOutside'
    | 'regionsMeet'
    | 'outsideProfile';
  readonly where: string;
  readonly at: PointNm;
}

function isWhole({ xNm, yNm }: PointNm): boolean {
  return Number.isSafeInteger(xNm) && Number.isSafeInteger(yNm);
}

/** Faults of one contour; `counterClockwise` is how it must run. */
export function validateContour(contour: Contour, counterClockwise: boolean, where: string): readonly GeometryFault[] {
  const faults: GeometryFault[] = [];
  const fault = (code: GeometryFault['code'], at: PointNm): void => {
    faults.push({ code, where, at });
  };
  const corners = cornersOf(contour);
  const last = contour.edges.at(-1);
  if (contour.edges.length < 2 || (contour.edges.length < 3 && contour.edges.every(({ kind }) => kind === 'line'))) {
    fault('fewEdges', contour.start);
    return faults;
  }
  if (last === undefined || !samePoint(last.to, contour.start)) fault('notClosed', contour.start);
  contour.edges.forEach((edge, i) => {
    const from = corners[i]!;
    if (!isWhole(from)) fault('notWhole', from);
    let length = Math.hypot(edge.to.xNm - from.xNm, edge.to.yNm - from.yNm);
    if (edge.kind === 'arc') {
      const r1 = Math.hypot(from.xNm - edge.centre.xNm, from.yNm - edge.centre.yNm);
      const r2 = Math.hypot(edge.to.xNm - edge.centre.xNm, edge.to.yNm - edge.centre.yNm);
      if (!isWhole(edge.centre) || Math.abs(r1 - r2) > ARC_RADIUS_TOLERANCE_NM) fault('arcRadius', from);
      length = r1 * Math.abs(arcSweepRad(from, edge));
    }
    if (length < SHORTEST_EDGE_NM) fault('shortEdge', from);
  });
  if (faults.length > 0) return faults;
  const ring = flatten(contour, CHORD_NM);
  const meeting = selfMeeting(ring);
  if (meeting !== null) fault('meetsItself', meeting);
  if (contourAreaNm2(contour) > 0 !== counterClockwise) fault('orientation', contour.start);
  return faults;
}

/** A point where a ring crosses or touches itself, or null. Neighbouring sides share their corner and nothing else. */
function selfMeeting(ring: Ring): PointNm | null {
  const n = ring.length;
  for (let i = 0; i < n; i++) {
    const a = ring[i]!;
    const b = ring[(i + 1) % n]!;
    const minX = Math.min(a.xNm, b.xNm);
    const maxX = Math.max(a.xNm, b.xNm);
    for (let j = i + 1; j < n; j++) {
      const c = ring[j]!;
      const d = ring[(j + 1) % n]!;
      if (Math.max(c.xNm, d.xNm) < minX || Math.min(c.xNm, d.xNm) > maxX) continue;
      if (j === i + 1) {
        if (runsBack(a, b, d)) return b;
      } else if (i === 0 && j === n - 1) {
        if (runsBack(c, a, b)) return a;
      } else if (segmentsMeet(a, b, c, d)) return c;
    }
  }
  return null;
}

/** Whether the way from b to c runs back over the one from a to b. */
function runsBack(a: PointNm, b: PointNm, c: PointNm): boolean {
  return turn(a, b, c) === 0 && dotSign(b.xNm - a.xNm, b.yNm - a.yNm, c.xNm - b.xNm, c.yNm - b.yNm) < 0;
}

/** A point where the sides of two rings meet, or null. */
function ringsMeet(a: Ring, b: Ring): PointNm | null {
  for (let i = 0; i < a.length; i++) {
    for (let j = 0; j < b.length; j++) {
      if (segmentsMeet(a[i]!, a[(i + 1) % a.length]!, b[j]!, b[(j + 1) % b.length]!)) return a[i]!;
    }
  }
  return null;
}

/** Faults of a shape: of each contour, of holes that leave their outline, of regions that meet. */
export function validateShape(shape: Shape, where: string): readonly GeometryFault[] {
  const faults: GeometryFault[] = [];
  shape.forEach((region, i) => {
    const name = `${where}[${i}]`;
    faults.push(...validateContour(region.outer, true, `${name}.outer`));
    region.holes.forEach((hole, j) => {
      faults.push(...validateContour(hole, false, `${name}.holes[${j}]`));
    });
  });
  if (faults.length > 0) return faults;
  const rings = shape.map(({ outer, holes }) => ({
    outer: flatten(outer, CHORD_NM),
    holes: holes.map((hole) => flatten(hole, CHORD_NM)),
  }));
  rings.forEach(({ outer, holes }, i) => {
    holes.forEach((hole, j) => {
      const apart = holes.slice(0, j).every((other) => ringsMeet(hole, other) === null && !areNested(hole, other));
      if (!apart || ringsMeet(hole, outer) !== null || !isWithin(hole, outer)) {
        faults.push({ code: 'holeOutside', where: `${where}[${i}].holes[${j}]`, at: hole[0]! });
      }
    });
    for (const other of rings.slice(0, i)) {
      const meeting = ringsMeet(outer, other.outer);
      // One inside the other is apart from it only inside one of its holes.
      const apart =
        !areNested(outer, other.outer) ||
        other.holes.some((hole) => isWithin(outer, hole)) ||
        holes.some((hole) => isWithin(other.outer, hole));
      if (meeting !== null || !apart) faults.push({ code: 'regionsMeet', where: `${where}[${i}]`, at: outer[0]! });
    }
  });
  return faults;
}

/** Whether the inner of two rings that do not meet lies in the other. */
function isWithin(inner: Ring, outer: Ring): boolean {
  return locate(inner[0]!, outer) === 'inside';
}

function areNested(a: Ring, b: Ring): boolean {
  return isWithin(a, b) || isWithin(b, a);
}

/** Faults of a shape that must lie within an outline (touching it is allowed): no corner of the shape outside, none of
 *  the outline inside. */
export function validateWithin(shape: Shape, outline: Contour, where: string): readonly GeometryFault[] {
  const border = flatten(outline, CHORD_NM);
  const faults: GeometryFault[] = [];
  for (const region of shape) {
    const ring = flatten(region.outer, CHORD_NM);
    const outside =
      ring.find((p) => locate(p, border) === 'outside' && !isNear(p, border)) ??
      border.find((p) => locate(p, ring) === 'inside' && !isNear(p, ring));
    if (outside !== undefined) faults.push({ code: 'outsideProfile', where, at: outside });
  }
  return faults;
}

/** Points of a flattened arc may lie a chord error beyond another flattened arc. */
function isNear(p: PointNm, ring: Ring): boolean {
  return ring.some((a, i) => {
    const onSide = nearestOnSegment(p, a, ring[(i + 1) % ring.length]!);
    return distanceBetween(p, onSide).distanceNm <= 2 * CHORD_NM;
  });
}
