// Rules on mask and legend.

import type { Artwork } from '../artwork/artwork.ts';
import { placesOf } from './copper.ts';
import { type Finding, gather, millimetres, type Place } from './finding.ts';
import type { Limits } from './limits.ts';

/** Webs of mask between openings. */
export function findMaskWebs(artwork: Artwork, limits: Limits): Finding {
  const limitNm = limits.maskWeb ?? 0;
  if (!artwork.hasSolderMask) return { layer: 'mask-top', limitNm, nearest: null, below: [] };
  const say = (measured: string): string =>
    `A web of solder mask ${measured} wide is left between openings; ${limits.fabricator} holds none below ${millimetres(limitNm)}, and it would lift.`;
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
  const nearest = places.reduce<Place | null>(
    (best, place) => (best === null || place.measuredNm < best.measuredNm ? place : best),
    null,
  );
  return { layer: 'legend-top', limitNm, nearest, below };
}
