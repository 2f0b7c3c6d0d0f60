// Rules on holes: size, ring, distance to copper, to each other and to the edge, depth over width.

import type { Artwork, Hole } from '../artwork/artwork.ts';
import { flatten } from '../shape/flatten.ts';
import { locate } from '../shape/measure.ts';
import { type PointNm, point, type Ring, type Shape } from '../shape/shape.ts';
import { FACING_CHORD_NM } from './facing.ts';
import { type Finding, millimetres, type Place } from './finding.ts';
import type { Limits } from './limits.ts';

interface Measured {
  readonly hole: Hole;
  readonly measuredNm: number;
  readonly from: PointNm;
  readonly to: PointNm;
}

/** Places from measures, each against the same limit. */
function findingOf(limitNm: number, measures: readonly Measured[], say: (m: Measured) => string): Finding {
  const places = measures.map(
    (m): Place => ({
      layer: 'drill',
      measuredNm: m.measuredNm,
      marginNm: m.measuredNm - limitNm,
      from: m.from,
      to: m.to,
      message: say(m),
    }),
  );
  const nearest = places.reduce<Place | null>(
    (best, place) => (best === null || place.measuredNm < best.measuredNm ? place : best),
    null,
  );
  return { layer: 'drill', limitNm, nearest, below: places.filter(({ marginNm }) => marginNm < 0) };
}

function across({ centre, finishedDiameterNm }: Hole): { readonly from: PointNm; readonly to: PointNm } {
  const radius = Math.round(finishedDiameterNm / 2);
  return { from: point(centre.xNm - radius, centre.yNm), to: point(centre.xNm + radius, centre.yNm) };
}

/** Diameters of the holes of one kind against the smallest that the shop drills, for plated holes the deepest too. */
function findSizes(artwork: Artwork, limits: Limits, plated: boolean): Finding {
  const holes = artwork.holes.filter((hole) => hole.plated === plated);
  const limitNm = plated ? (limits.platedHole ?? 0) : limits.unplatedHole;
  return findingOf(
    limitNm,
    holes.map((hole) => ({
      hole,
      // A shop that plates none has no size that would do.
      measuredNm: plated && limits.platedHole === null ? -1 : hole.finishedDiameterNm,
      ...across(hole),
    })),
    ({ hole, measuredNm }) =>
      measuredNm < 0
        ? `The hole for the ${hole.label} is plated by intent; ${limits.fabricator} plates no holes.`
        : `The hole for the ${hole.label} is ${millimetres(measuredNm)}; ${limits.fabricator} drills none below ${millimetres(limitNm)}${plated ? ' that is plated' : ''}.`,
  );
}

export function findPlatedHoles(artwork: Artwork, limits: Limits): Finding {
  return findSizes(artwork, limits, true);
}

export function findUnplatedHoles(artwork: Artwork, limits: Limits): Finding {
  return findSizes(artwork, limits, false);
}

/** Copper around a soldered hole: from its wall to the end of the copper that it stands in. */
export function findRings(artwork: Artwork, limits: Limits): Finding {
  const soldered = artwork.holes.filter(({ use }) => use === 'pin');
  const limitOf = (hole: Hole): number => (hole.plated ? limits.ring : limits.unplatedRing);
  const limitNm = Math.max(0, ...soldered.map(limitOf));
  return findingOf(
    limitNm,
    soldered.map((hole) => {
      const { distance, at } = toBoundary(hole.centre, artwork.copperTop, 'inside');
      const from = wall(hole, at);
      return { hole, measuredNm: Math.round(distance - hole.finishedDiameterNm / 2), from, to: at };
    }),
    ({ hole, measuredNm }) =>
      `The copper around the hole for the ${hole.label} is ${millimetres(measuredNm)} wide; ${limits.fabricator} wants ${millimetres(limitNm)}, or the drill may break out of it.`,
  );
}

/** Walls of holes to copper that they do not belong to: the ground around a pin, any copper around a screw. */
export function findHolesToCopper(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.holeToCopper;
  const measures = artwork.holes.flatMap((hole) => {
    const layers = hole.use === 'pin' ? [artwork.copperBottom] : [artwork.copperTop, artwork.copperBottom];
    return layers.map((shape) => {
      const { distance, at } = toBoundary(hole.centre, shape, 'outside');
      return { hole, measuredNm: Math.round(distance - hole.finishedDiameterNm / 2), from: wall(hole, at), to: at };
    });
  });
  return findingOf(
    limitNm,
    measures,
    ({ hole, measuredNm }) =>
      `Copper that does not belong to it comes within ${millimetres(measuredNm)} of the hole for the ${hole.label}; ${limits.fabricator} keeps ${millimetres(limitNm)}, for the drill wanders.`,
  );
}

export function findHolesToEdge(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.copperToEdge;
  const board: Shape = [{ outer: artwork.board.outline, holes: [] }];
  return findingOf(
    limitNm,
    artwork.holes.map((hole) => {
      const { distance, at } = toBoundary(hole.centre, board, 'inside');
      return { hole, measuredNm: Math.round(distance - hole.finishedDiameterNm / 2), from: wall(hole, at), to: at };
    }),
    ({ hole, measuredNm }) =>
      `The hole for the ${hole.label} comes within ${millimetres(measuredNm)} of the board's edge; ${limits.fabricator} keeps ${millimetres(limitNm)}.`,
  );
}

/** Thickness over diameter of plated holes, as the smallest diameter that the shop plates through this board. */
export function findDepths(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.platedThrough;
  return findingOf(
    limitNm,
    artwork.holes
      .filter(({ plated }) => plated)
      .map((hole) => ({ hole, measuredNm: hole.finishedDiameterNm, ...across(hole) })),
    ({ hole, measuredNm }) =>
      `The hole for the ${hole.label} is ${millimetres(measuredNm)} in a board that ${limits.fabricator} plates through from ${millimetres(limitNm)} on: too deep for its width.`,
  );
}

/** The point of a hole's wall that faces a place. */
function wall({ centre, finishedDiameterNm }: Hole, at: PointNm): PointNm {
  const dx = at.xNm - centre.xNm;
  const dy = at.yNm - centre.yNm;
  const away = Math.hypot(dx, dy) || 1;
  const radius = finishedDiameterNm / 2;
  return point(Math.round(centre.xNm + (dx / away) * radius), Math.round(centre.yNm + (dy / away) * radius));
}

/** From a centre to the nearest boundary of a shape; negative where the centre lies on the wrong side of it. Arcs to
 *  within FACING_CHORD_NM. */
function toBoundary(
  centre: PointNm,
  shape: Shape,
  side: 'inside' | 'outside',
): { readonly distance: number; readonly at: PointNm } {
  const rings: Ring[] = shape.flatMap(({ outer, holes }) => [outer, ...holes].map((c) => flatten(c, FACING_CHORD_NM)));
  let distance = Number.POSITIVE_INFINITY;
  let at = centre;
  for (const ring of rings) {
    ring.forEach((a, i) => {
      const b = ring[(i + 1) % ring.length]!;
      const dx = b.xNm - a.xNm;
      const dy = b.yNm - a.yNm;
      const t = Math.min(1, Math.max(0, ((centre.xNm - a.xNm) * dx + (centre.yNm - a.yNm) * dy) / (dx * dx + dy * dy)));
      const foot = point(a.xNm + t * dx, a.yNm + t * dy);
      const d = Math.hypot(foot.xNm - centre.xNm, foot.yNm - centre.yNm);
      if (d < distance) {
        distance = d;
        at = foot;
      }
    });
  }
  const isIn = rings.filter((ring) => locate(centre, ring) === 'inside').length % 2 === 1;
  const right = isIn === (side === 'inside');
  return { distance: right ? distance : -distance, at: point(Math.round(at.xNm), Math.round(at.yNm)) };
}
