// Rules on mask and legend.

import type { Artwork } from '../artwork/artwork.ts';
import { flatten } from '../shape/flatten.ts';
import {
  type DistanceNm,
  distanceBetween,
  locate,
  nearerOf,
  nearestOnSegment,
  segmentDistance,
} from '../shape/measure.ts';
import { point, type Ring, type Stroke } from '../shape/shape.ts';
import { placesOf } from './copper.ts';
import { DISTANCE_SLACK_NM, FACING_CHORD_NM } from './facing.ts';
import { type Finding, gather, millimetres, type Place, tightest } from './finding.ts';
import type { Limits } from './limits.ts';

/** Webs of mask between openings. */
export function findMaskWebs(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.maskWeb ?? 0;
  if (!artwork.hasSolderMask) return { layer: 'mask-top', limitNm, nearest: null, below: [] };
  const say = (measuredNm: number): string =>
    `A web of solder mask ${millimetres(measuredNm)} wide is left between openings; ${limits.fabricator} holds none below ${millimetres(limitNm)}, and it would lift.`;
  return gather(limitNm, 'mask-top', [
    placesOf(artwork.maskTop, 'clearance', limitNm, 'mask-top', say),
    placesOf(artwork.maskBottom, 'clearance', limitNm, 'mask-bottom', say),
  ]);
}

/** Lines of the legend. */
export function findLegendWidth(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.legendLine ?? 0;
  const places = artwork.legendTop.map(
    ({ points, widthNm }): Place => ({
      layer: 'legend-top',
      measuredNm: widthNm,
      marginNm: widthNm - limitNm,
      from: points[0]!,
      to: points.at(-1)!,
      message: `A legend line is ${millimetres(widthNm)} wide; ${limits.fabricator} prints none below ${millimetres(limitNm)}, and it would break up.`,
    }),
  );
  const below = places.filter(({ marginNm }) => marginNm < 0);
  return { layer: 'legend-top', limitNm, nearest: tightest(places), below };
}

/** Legend ink to mask openings and to the antenna's copper: ink that is printed as far astray as the shop allows itself
 *  must still miss both. */
export function findLegendClearance(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.registration;
  // Without a mask the one opening is the whole board, and only copper is left to keep clear of.
  const targets = (artwork.hasSolderMask ? [artwork.maskTop, artwork.copperTop] : [artwork.copperTop])
    .flat()
    .flatMap(({ outer, holes }) => [outer, ...holes])
    .map((contour) => flatten(contour, FACING_CHORD_NM));
  const places = artwork.legendTop.map((stroke): Place => {
    const { distanceNm, from, to } = targets.map((ring) => strokeToRing(stroke, ring)).reduce(nearerOf);
    const measuredNm = Math.max(0, Math.floor(distanceNm - stroke.widthNm / 2 + DISTANCE_SLACK_NM));
    return {
      layer: 'legend-top',
      measuredNm,
      marginNm: measuredNm - limitNm,
      from: point(Math.round(from.xNm), Math.round(from.yNm)),
      to: point(Math.round(to.xNm), Math.round(to.yNm)),
      message: `The legend comes within ${millimetres(measuredNm)} of bare copper; ${limits.fabricator} prints no better than to ${millimetres(limitNm)}, and ink on the antenna changes it and spoils soldering.`,
    };
  });
  const below = places.filter(({ marginNm }) => marginNm < 0);
  return { layer: 'legend-top', limitNm, nearest: tightest(places), below };
}

/** From the middle of a stroke to a ring: 0 where it crosses the ring or lies inside. */
function strokeToRing({ points }: Stroke, ring: Ring): DistanceNm {
  const start = points[0]!;
  let nearest: DistanceNm = { distanceNm: 0, from: start, to: start };
  if (locate(start, ring) !== 'outside') return nearest;
  const reach = Math.max(...points.map((p) => distanceBetween(start, p).distanceNm));
  nearest = distanceBetween(start, ring[0]!);
  ring.forEach((c, i) => {
    const d = ring[(i + 1) % ring.length]!;
    const fromStart = distanceBetween(start, nearestOnSegment(start, c, d));
    nearest = nearerOf(nearest, fromStart);
    // No point of the stroke is nearer to this side than that.
    if (fromStart.distanceNm - reach >= nearest.distanceNm) return;
    for (let k = 1; k < points.length; k++) {
      nearest = nearerOf(nearest, segmentDistance(points[k - 1]!, points[k]!, c, d));
    }
  });
  return nearest;
}
