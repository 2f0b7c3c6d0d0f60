// From rings as a clipper leaves them to regions: cleaned, free of touches, each hole with its outline.

import { contourAreaNm2, locate } from './measure.ts';
import { onSegment, samePoint, turn } from './predicates.ts';
import { contourOf } from './primitives.ts';
import { type PointNm, point, type Region, type Ring, type Shape } from './shape.ts';

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

/** A ring with a corner wherever one of its own corners lies on one of its sides. */
function withTouchedSidesCut(ring: Ring): Ring {
  return ring.flatMap((a, i) => {
    const b = ring[(i + 1) % ring.length]!;
    const on = ring.filter((p) => !samePoint(p, a) && !samePoint(p, b) && onSegment(p, a, b));
    const away = (p: PointNm): number => Math.abs(p.xNm - a.xNm) + Math.abs(p.yNm - a.yNm);
    return [a, ...on.sort((p, q) => away(p) - away(q))];
  });
}

/** A closed walk as rings that visit no point twice. Each keeps the sense in which the walk ran around it. */
function withoutRepeats(walk: Ring): readonly Ring[] {
  const parts: Ring[] = [];
  const path: PointNm[] = [];
  const placeOf = new Map<string, number>();
  for (const p of walk) {
    const key = `${p.xNm},${p.yNm}`;
    const first = placeOf.get(key);
    if (first !== undefined) {
      const loop = path.splice(first);
      for (const q of loop) placeOf.delete(`${q.xNm},${q.yNm}`);
      parts.push(loop);
    }
    placeOf.set(key, path.length);
    path.push(p);
  }
  return [...parts, path];
}

/** Splits a ring that touches itself, corner to corner or corner to side, into rings that do not: Gerber allows no
 *  such touch. What lay to the left of the ring lies to the left of its parts, so that a part that runs the other way
 *  round is a hole that touched its outline from within. */
export function splitAtTouches(ring: Ring): readonly Ring[] {
  return withoutRepeats(withTouchedSidesCut(ring))
    .map(cleanRing)
    .filter((part) => part.length > 0);
}

/** Twice as large, so that the middle of a side is a whole point too. */
function doubled(ring: Ring): Ring {
  return ring.map(({ xNm, yNm }) => point(2 * xNm, 2 * yNm));
}

/** Whether an outline holds a hole: corners and middles of sides vote. Those on the outline abstain, and one that
 *  rounding has put a nanometre beyond it is outvoted. */
function holds(outer: Ring, hole: Ring): boolean {
  const border = doubled(outer);
  let votes = 0;
  hole.forEach((a, i) => {
    const b = hole[(i + 1) % hole.length]!;
    for (const p of [point(2 * a.xNm, 2 * a.yNm), point(a.xNm + b.xNm, a.yNm + b.yNm)]) {
      const place = locate(p, border);
      if (place !== 'on') votes += place === 'inside' ? 1 : -1;
    }
  });
  return votes > 0;
}

/** Regions from rings that run counter-clockwise around what is filled and clockwise around holes, in any order.
 *  Rings may touch but not cross. A hole goes to the smallest outline that holds it. */
export function regionsOf(rings: readonly Ring[]): Shape {
  const parts = rings
    .flatMap((ring) => splitAtTouches(cleanRing(ring)))
    .map((ring) => ({ ring, area: contourAreaNm2(contourOf(ring)) }));
  const outers = parts.filter(({ area }) => area > 0).sort((a, b) => a.area - b.area);
  const holes = parts.filter(({ area }) => area < 0);
  const owner = holes.map((hole) =>
    outers.findIndex((outer) => outer.area > -hole.area && holds(outer.ring, hole.ring)),
  );
  const regions = outers.map(
    ({ ring }, i): Region => ({
      outer: contourOf(ring),
      holes: holes.filter((_, j) => owner[j] === i).map((hole) => contourOf(hole.ring)),
    }),
  );
  // Largest first: the order does not hang on the clipper's.
  return regions.reverse();
}
