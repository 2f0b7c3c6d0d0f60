// The one validator of geometric truths, for every shape that is ever built.

import { arcSweepRad, flatten } from './flatten.ts';
import { contourAreaNm2, locate } from './measure.ts';
import { samePoint, segmentsMeet } from './predicates.ts';
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
        // The next side may not run back over this one.
        if (n > 3 && segmentsMeet(a, b, d, d)) return d;
      } else if (i === 0 && j === n - 1) {
        if (n > 3 && segmentsMeet(c, d, b, b)) return b;
      } else if (segmentsMeet(a, b, c, d)) return c;
    }
  }
  return null;
}

/** Whether two rings have a point of their sides in common. */
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
  const outers = shape.map((region) => flatten(region.outer, CHORD_NM));
  shape.forEach((region, i) => {
    const holes = region.holes.map((hole) => flatten(hole, CHORD_NM));
    holes.forEach((hole, j) => {
      const others = [outers[i]!, ...holes.slice(0, j)];
      const meeting = others.map((other) => ringsMeet(hole, other)).find((at) => at !== null);
      if (meeting || locate(hole[0]!, outers[i]!) !== 'inside') {
        faults.push({ code: 'holeOutside', where: `${where}[${i}].holes[${j}]`, at: hole[0]! });
      }
    });
    for (let j = 0; j < i; j++) {
      const meeting = ringsMeet(outers[i]!, outers[j]!);
      const nested =
        locate(outers[i]![0]!, outers[j]!) === 'inside' &&
        !shape[j]!.holes.some((hole) => locate(outers[i]![0]!, flatten(hole, CHORD_NM)) === 'inside');
      if (meeting || nested) faults.push({ code: 'regionsMeet', where: `${where}[${i}]`, at: outers[i]![0]! });
    }
  });
  return faults;
}

/** Faults of a shape that must lie within an outline (touching it is allowed). */
export function validateWithin(shape: Shape, outline: Contour, where: string): readonly GeometryFault[] {
  const border = flatten(outline, CHORD_NM);
  const faults: GeometryFault[] = [];
  for (const region of shape) {
    const outside = flatten(region.outer, CHORD_NM).find(
      (p) => locate(p, border) === 'outside' && !nearBorder(p, border),
    );
    if (outside !== undefined) faults.push({ code: 'outsideProfile', where, at: outside });
  }
  return faults;
}

/** Points of a flattened arc may lie a chord error outside the flattened outline. */
function nearBorder(p: PointNm, border: Ring): boolean {
  return border.some((a, i) => {
    const b = border[(i + 1) % border.length]!;
    const dx = b.xNm - a.xNm;
    const dy = b.yNm - a.yNm;
    const t = Math.min(1, Math.max(0, ((p.xNm - a.xNm) * dx + (p.yNm - a.yNm) * dy) / (dx * dx + dy * dy)));
    return Math.hypot(p.xNm - a.xNm - t * dx, p.yNm - a.yNm - t * dy) <= 2 * CHORD_NM;
  });
}
