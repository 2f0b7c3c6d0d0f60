// Shapes made larger or smaller by a distance all around.

import { ClipperOffset, EndType, JoinType, type Paths64 } from 'clipper2-ts';
import { BOOLEAN_CHORD_NM } from './boolean.ts';
import { flatten } from './flatten.ts';
import { cleanRing, regionsOf } from './rings.ts';
import { point, type Shape } from './shape.ts';

/** How corners that open come out. Mitred ones keep shapes of straight edges as they are under an opening or closing;
 *  sharper than about 11° they are cut off. Round ones keep the distance everywhere. */
export type Join = 'mitre' | 'round';

/** Length of a mitre over the distance, beyond which it is cut off. */
const MITRE_LIMIT = 10;

/** Moves every edge of a shape outward by a distance, inward where it is negative. What becomes empty is gone, what
 *  comes to overlap is one.
 *  @param deltaNm  whole nanometres
 *  Arcs become chords within BOOLEAN_CHORD_NM, round corners too, inscribed. Slanted edges to 1 nm. */
export function offset(shape: Shape, deltaNm: number, join: Join = 'mitre'): Shape {
  const clipper = new ClipperOffset(MITRE_LIMIT, BOOLEAN_CHORD_NM);
  clipper.preserveCollinear = false;
  const paths: Paths64 = shape
    .flatMap(({ outer, holes }) => [outer, ...holes])
    .map((contour) => cleanRing(flatten(contour, BOOLEAN_CHORD_NM)))
    .filter((ring) => ring.length > 0)
    .map((ring) => ring.map(({ xNm, yNm }) => ({ x: xNm, y: yNm })));
  clipper.addPaths(paths, join === 'mitre' ? JoinType.Miter : JoinType.Round, EndType.Polygon);
  const solution: Paths64 = [];
  clipper.execute(deltaNm, solution);
  return regionsOf(solution.map((path) => path.map(({ x, y }) => point(x, y))));
}
