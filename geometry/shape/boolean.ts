// Union, difference and intersection of shapes on whole nanometres.
//
// The clipper is general and quick, but two faults of it are known here:
// - It loops for ever on a spike that runs back on itself. Two guards, each enough alone: rings are cleaned exactly
//   before they go in, and collinear points are not kept inside.
// - Where a corner lies on a side of another ring, rounding can pinch a hole off its outline, and the hole is then
//   lost: once in 4000 cases on a coarse grid. So every result is held against the law of areas; where that fails, one
//   operand is moved by a nanometre, which takes the corner off the side.

import { Clipper64, ClipType, FillRule, type Paths64 } from 'clipper2-ts';
import { invariant } from '../errors.ts';
import { flatten } from './flatten.ts';
import { areaNm2, contourAreaNm2 } from './measure.ts';
import { contourOf } from './primitives.ts';
import { cleanRing, regionsOf } from './rings.ts';
import { point, type Ring, type Shape } from './shape.ts';

/** Chord error for contours with arcs [nm]; straight contours pass through unchanged. */
export const BOOLEAN_CHORD_NM = 100;

function ringsOf(shape: Shape): readonly Ring[] {
  return shape
    .flatMap((region) => [region.outer, ...region.holes])
    .map((contour) => cleanRing(flatten(contour, BOOLEAN_CHORD_NM)))
    .filter((ring) => ring.length > 0);
}

function clip(type: ClipType, subject: readonly Ring[], other: readonly Ring[]): Shape {
  const clipper = new Clipper64();
  clipper.preserveCollinear = false;
  const paths = (rings: readonly Ring[]): Paths64 =>
    rings.map((ring) => ring.map(({ xNm, yNm }) => ({ x: xNm, y: yNm })));
  clipper.addSubject(paths(subject));
  clipper.addClip(paths(other));
  const solution: Paths64 = [];
  clipper.execute(type, FillRule.NonZero, solution);
  return regionsOf(solution.map((path) => path.map(({ x, y }) => point(x, y))));
}

/** What rounding may add to or take from an area [nm²]: every crossing moves by up to 1 nm, and the sides that end
 *  there with it. */
function roundingNm2(rings: readonly Ring[]): number {
  let length = 0;
  for (const ring of rings) {
    ring.forEach((a, i) => {
      const b = ring[(i + 1) % ring.length]!;
      length += Math.hypot(b.xNm - a.xNm, b.yNm - a.yNm);
    });
  }
  return 2 * length;
}

function moved(rings: readonly Ring[], dx: number, dy: number): readonly Ring[] {
  return rings.map((ring) => ring.map(({ xNm, yNm }) => point(xNm + dx, yNm + dy)));
}

/** Moves of the second operand [nm], tried in turn. */
const NUDGES = [
  [0, 0],
  [1, 0],
  [0, 1],
  [-1, 1],
  [1, -2],
  [-2, -1],
  [2, 3],
  [-3, 2],
] as const;

function combine(type: ClipType, a: Shape, b: Shape): Shape {
  const subject = ringsOf(a);
  const other = ringsOf(b);
  const allowance = roundingNm2([...subject, ...other]);
  const ownArea = (rings: readonly Ring[]): number =>
    rings.reduce((sum, ring) => sum + contourAreaNm2(contourOf(ring)), 0);
  for (const [dx, dy] of NUDGES) {
    const there = moved(other, dx, dy);
    const result = clip(type, subject, there);
    // |A| + |B| = |A ∪ B| + |A ∩ B|, and |A| = |A − B| + |A ∩ B|.
    const isUnion = type === ClipType.Union;
    const complement = clip(
      type === ClipType.Intersection ? ClipType.Difference : ClipType.Intersection,
      subject,
      there,
    );
    const expected = ownArea(subject) + (isUnion ? ownArea(there) : 0);
    if (Math.abs(areaNm2(result) + areaNm2(complement) - expected) <= allowance) return result;
  }
  invariant(false, 'a boolean obeys the law of areas');
}

/** Everything that lies in any of the shapes, whose contours may cross here. Arcs become chords within BOOLEAN_CHORD_NM, as in all three. */
export function union(...shapes: readonly Shape[]): Shape {
  if (shapes.length === 0) return [];
  // One alone is cleaned: contours that cross themselves or one another have no area of their own to hold it against.
  if (shapes.length === 1) return clip(ClipType.Union, ringsOf(shapes[0]!), []);
  // Halves of halves: the work stays small, and the law of areas wants operands that do not overlap themselves.
  const middle = shapes.length >> 1;
  return combine(ClipType.Union, union(...shapes.slice(0, middle)), union(...shapes.slice(middle)));
}

/** What lies in the first shape and not in the second. */
export function difference(subject: Shape, other: Shape): Shape {
  return combine(ClipType.Difference, subject, other);
}

/** What lies in both shapes. */
export function intersection(a: Shape, b: Shape): Shape {
  return combine(ClipType.Intersection, a, b);
}
