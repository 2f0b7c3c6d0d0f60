// Union, difference and intersection of shapes on whole nanometres.
//
// The clipper is general and quick, but loops for ever on a spike that runs back on itself. Two guards, each enough
// alone: rings are cleaned exactly before they go in, and collinear points are not kept inside.

import { Clipper64, ClipType, FillRule, type Paths64, type PolyPath64, PolyTree64 } from 'clipper2-ts';
import { invariant } from '../errors.ts';
import { flatten } from './flatten.ts';
import { contourAreaNm2 } from './measure.ts';
import { samePoint, turn } from './predicates.ts';
import { contourOf } from './primitives.ts';
import { type Contour, type PointNm, point, type Region, type Ring, type Shape } from './shape.ts';

/** Chord error for contours with arcs [nm]; straight contours pass through unchanged. */
export const BOOLEAN_CHORD_NM = 100;

/** A ring without repeated points and without corners of 0° or 180°; empty where nothing with an area is left.
 *  One point goes at a time, for its neighbours' corners change with it. */
export function cleanRing(ring: Ring): Ring {
  const points = [...ring];
  for (let i = 0, unchanged = 0; points.length >= 3 && unchanged < points.length; ) {
    const n = points.length;
    const before = points[(i + n - 1) % n]!;
    const here = points[i % n]!;
    const after = points[(i + 1) % n]!;
    if (samePoint(here, after) || turn(before, here, after) === 0) {
      points.splice(i % n, 1);
      i = Math.max(0, (i % n) - 1);
      unchanged = 0;
    } else {
      i = (i + 1) % n;
      unchanged += 1;
    }
  }
  return points.length >= 3 ? points : [];
}

function pathsOf(shape: Shape): Paths64 {
  const rings = shape
    .flatMap((region) => [region.outer, ...region.holes])
    .map((c) => cleanRing(flatten(c, BOOLEAN_CHORD_NM)));
  return rings.filter((ring) => ring.length > 0).map((ring) => ring.map(({ xNm, yNm }) => ({ x: xNm, y: yNm })));
}

/** Splits a ring that touches itself in a corner into rings that do not: Gerber allows no such touch. */
export function splitAtTouches(ring: Ring): readonly Ring[] {
  const seen = new Map<string, number>();
  for (let i = 0; i < ring.length; i++) {
    const key = `${ring[i]!.xNm},${ring[i]!.yNm}`;
    const first = seen.get(key);
    if (first !== undefined) {
      return [ring.slice(first, i), [...ring.slice(0, first), ...ring.slice(i)]]
        .map(cleanRing)
        .filter((part) => part.length > 0)
        .flatMap(splitAtTouches);
    }
    seen.set(key, i);
  }
  return [ring];
}

function oriented(ring: Ring, counterClockwise: boolean): Contour {
  const contour = contourOf(ring);
  return contourAreaNm2(contour) > 0 === counterClockwise ? contour : contourOf([...ring].reverse());
}

/** Regions from a tree of outlines, holes, islands in holes, and so on. */
function regionsOf(node: PolyPath64 | PolyTree64): Region[] {
  const regions: Region[] = [];
  for (let i = 0; i < node.count; i++) {
    const outer = node.child(i);
    const outers = splitAtTouches(cleanRing(ringOf(outer)));
    const holes: Contour[] = [];
    for (let j = 0; j < outer.count; j++) {
      const hole = outer.child(j);
      holes.push(...splitAtTouches(cleanRing(ringOf(hole))).map((ring) => oriented(ring, false)));
      regions.push(...regionsOf(hole));
    }
    invariant(outers.length <= 1 || holes.length === 0, 'an outline that touches itself has no holes to give away');
    for (const ring of outers) if (ring.length > 0) regions.push({ outer: oriented(ring, true), holes });
  }
  return regions;
}

function ringOf(node: PolyPath64): readonly PointNm[] {
  return (node.poly ?? []).map(({ x, y }) => point(x, y));
}

function combine(type: ClipType, subject: Shape, clip: Shape): Shape {
  const clipper = new Clipper64();
  clipper.preserveCollinear = false;
  clipper.addSubject(pathsOf(subject));
  if (clip.length > 0) clipper.addClip(pathsOf(clip));
  const tree = new PolyTree64();
  clipper.execute(type, FillRule.NonZero, tree);
  return regionsOf(tree);
}

/** Everything that lies in any of the shapes. Arcs become chords within BOOLEAN_CHORD_NM, as in all three. */
export function union(...shapes: readonly Shape[]): Shape {
  return combine(ClipType.Union, shapes.flat(), []);
}

/** What lies in the first shape and not in the second. */
export function difference(subject: Shape, clip: Shape): Shape {
  return combine(ClipType.Difference, subject, clip);
}

/** What lies in both shapes. */
export function intersection(a: Shape, b: Shape): Shape {
  return combine(ClipType.Intersection, a, b);
}
