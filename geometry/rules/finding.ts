// What a rule finds: the tightest place, and every place that is too tight.

import type { PointNm } from '../shape/shape.ts';
import type { LayerName } from './violation.ts';

export interface Place {
  readonly layer: LayerName;
  readonly measuredNm: number;
  /** How much is to spare [nm]; negative where the rule does not hold. */
  readonly marginNm: number;
  readonly from: PointNm;
  readonly to: PointNm;
  /** A whole sentence for a violation. */
  readonly message: string;
}

export interface Finding {
  readonly layer: LayerName;
  readonly limitNm: number;
  /** Null where the rule has no subject. */
  readonly nearest: Place | null;
  readonly below: readonly Place[];
}

/** Nanometres as millimetres, to the last nanometre that is there. */
export function millimetres(nm: number): string {
  return `${nm / 1e6} mm`;
}

/** The place with the smallest measure, the first of equals; null for none. */
export function tightest(places: readonly Place[]): Place | null {
  return places.reduce<Place | null>(
    (best, place) => (best === null || place.measuredNm < best.measuredNm ? place : best),
    null,
  );
}

/** Places of several layers as one finding, the tightest first. */
export function gather(
  limitNm: number,
  layer: LayerName,
  parts: readonly { readonly nearest: Place | null; readonly below: readonly Place[] }[],
): Finding {
  const nearest = tightest(parts.map((part) => part.nearest).filter((place): place is Place => place !== null));
  return { layer, limitNm, nearest, below: parts.flatMap((part) => part.below) };
}
