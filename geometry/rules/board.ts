// Rules on the board: copper to its edge, and its size.

import type { Artwork, LaunchEdge } from '../artwork/artwork.ts';
import { flatten } from '../shape/flatten.ts';
import { type DistanceNm, distanceBetween, nearerOf, segmentDistance } from '../shape/measure.ts';
import { cornersOf } from '../shape/primitives.ts';
import { type Edge, type PointNm, point } from '../shape/shape.ts';
import { FACING_CHORD_NM } from './facing.ts';
import { type Finding, gather, millimetres, type Place, tightest } from './finding.ts';
import type { Limits } from './limits.ts';
import type { LayerName } from './violation.ts';

/** From a point of the copper to a rounded corner of the outline. The corner bulges outward, so a stretch of copper
 *  comes nearest to it with an end, and the ends of flattened arcs lie on their arcs. */
function toArc(p: PointNm, from: PointNm, edge: Extract<Edge, { kind: 'arc' }>): DistanceNm {
  const dx = p.xNm - edge.centre.xNm;
  const dy = p.yNm - edge.centre.yNm;
  const away = Math.hypot(dx, dy);
  const sector =
    (from.xNm - edge.centre.xNm) * dy - (from.yNm - edge.centre.yNm) * dx >= 0 &&
    dx * (edge.to.yNm - edge.centre.yNm) - dy * (edge.to.xNm - edge.centre.xNm) >= 0;
  if (!sector || away === 0) {
    return nearerOf(distanceBetween(p, from), distanceBetween(p, edge.to));
  }
  const radius = Math.hypot(from.xNm - edge.centre.xNm, from.yNm - edge.centre.yNm);
  return distanceBetween(p, point(edge.centre.xNm + (dx / away) * radius, edge.centre.yNm + (dy / away) * radius));
}

/** The parts of a segment outside a launch's strip: along its stretch of edge, as deep as the limit, both borders
 *  included. */
function outsideStrip(
  a: PointNm,
  b: PointNm,
  launch: LaunchEdge,
  depthNm: number,
): readonly (readonly [PointNm, PointNm])[] {
  const ex = launch.to.xNm - launch.from.xNm;
  const ey = launch.to.yNm - launch.from.yNm;
  const length = Math.hypot(ex, ey);
  // The outline runs counter-clockwise: the board lies to the left of the launch.
  const frame = (p: PointNm) => ({
    along: ((p.xNm - launch.from.xNm) * ex + (p.yNm - launch.from.yNm) * ey) / length,
    deep: ((p.yNm - launch.from.yNm) * ex - (p.xNm - launch.from.xNm) * ey) / length,
  });
  const p = frame(a);
  const q = frame(b);
  let enter = 0;
  let leave = 1;
  const bounds = [
    [p.along, q.along - p.along],
    [length - p.along, p.along - q.along],
    [depthNm - p.deep, p.deep - q.deep],
  ] as const;
  for (const [start, change] of bounds) {
    // start + t·change ≥ 0 inside
    if (change === 0) {
      if (start < 0) return [[a, b]];
    } else if (change > 0) enter = Math.max(enter, -start / change);
    else leave = Math.min(leave, -start / change);
  }
  if (enter >= leave) return [[a, b]];
  const at = (t: number): PointNm => point(a.xNm + t * (b.xNm - a.xNm), a.yNm + t * (b.yNm - a.yNm));
  const parts: [PointNm, PointNm][] = [];
  if (enter > 0) parts.push([a, at(enter)]);
  if (leave < 1) parts.push([at(leave), b]);
  return parts;
}

/** Rounding of ends and centres of arcs to whole nanometres [nm]. */
const ROUNDING_NM = 3;

/** Copper to the board's edge, but where it runs to the edge by intent. Straight edges exactly; rounded corners to
 *  within the rounding of their arcs. */
export function findToEdge(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.copperToEdge;
  const { outline } = artwork.board;
  const corners = cornersOf(outline);
  const parts = (['copper-top', 'copper-bottom'] as const).map((layer) => {
    const copper = layer === 'copper-top' ? artwork.copperTop : artwork.copperBottom;
    let stretches = copper.flatMap((region) => {
      const ring = flatten(region.outer, FACING_CHORD_NM);
      return ring.map((a, i) => [a, ring[(i + 1) % ring.length]!] as const);
    });
    for (const launch of artwork.launches) {
      stretches = stretches.flatMap(([a, b]) => [...outsideStrip(a, b, launch, limitNm)]);
    }
    const found = outline.edges.flatMap((edge, i): Place[] => {
      const from = corners[i]!;
      const distances = stretches.map(([a, b]) =>
        edge.kind === 'line'
          ? segmentDistance(a, b, from, edge.to)
          : nearerOf(toArc(a, from, edge), toArc(b, from, edge)),
      );
      return distances.length === 0 ? [] : [placeOf(distances.reduce(nearerOf), edge.kind, layer, limits)];
    });
    return { nearest: tightest(found), below: found.filter(({ marginNm }) => marginNm < 0) };
  });
  return gather(limitNm, 'copper-top', parts);
}

function placeOf(nearest: DistanceNm, kind: Edge['kind'], layer: LayerName, limits: Limits): Place {
  const found = Math.round(nearest.distanceNm);
  const isRounding = kind === 'arc' && Math.abs(found - limits.copperToEdge) <= ROUNDING_NM;
  const measuredNm = isRounding ? limits.copperToEdge : found;
  const whole = ({ xNm, yNm }: PointNm): PointNm => point(Math.round(xNm), Math.round(yNm));
  return {
    layer,
    measuredNm,
    marginNm: measuredNm - limits.copperToEdge,
    from: whole(nearest.from),
    to: whole(nearest.to),
    message: `Copper comes within ${millimetres(measuredNm)} of the board's edge; ${limits.fabricator} keeps ${millimetres(limits.copperToEdge)} free for the router and would cut copper or send the board back.`,
  };
}

/** The board against the largest that the shop takes, in whichever way it is turned. */
export function findBoardSize(artwork: Artwork, limits: Limits): Finding {
  const { widthNm, lengthNm } = artwork.board;
  const [longLimit, shortLimit] = [
    Math.max(limits.boardWidth, limits.boardLength),
    Math.min(limits.boardWidth, limits.boardLength),
  ];
  const isWide = widthNm >= lengthNm;
  const sides = [
    { size: Math.max(widthNm, lengthNm), limit: longLimit, alongX: isWide },
    { size: Math.min(widthNm, lengthNm), limit: shortLimit, alongX: !isWide },
  ];
  const tight = sides.reduce((a, b) => (b.limit - b.size < a.limit - a.size ? b : a));
  const place: Place = {
    layer: 'profile',
    measuredNm: tight.size,
    marginNm: tight.limit - tight.size,
    from: point(0, 0),
    to: tight.alongX ? point(tight.size, 0) : point(0, tight.size),
    message: `The board is ${millimetres(tight.size)} on a side; ${limits.fabricator} makes none over ${millimetres(tight.limit)} there.`,
  };
  return { layer: 'profile', limitNm: tight.limit, nearest: place, below: place.marginNm < 0 ? [place] : [] };
}
