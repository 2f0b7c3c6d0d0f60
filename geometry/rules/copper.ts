// Rules on copper: gaps, widths and sharp corners.

import type { Artwork } from '../artwork/artwork.ts';
import { crossSign } from '../shape/predicates.ts';
import { cornersOf } from '../shape/primitives.ts';
import type { PointNm, Shape } from '../shape/shape.ts';
import { DISTANCE_SLACK_NM, type Facing, findFacing } from './facing.ts';
import { type Finding, gather, millimetres, type Place, tightest } from './finding.ts';
import type { Limits } from './limits.ts';
import type { Medium } from './sight.ts';
import type { LayerName } from './violation.ts';

const COPPER_LAYERS = [
  ['copper-top', 'copperTop'],
  ['copper-bottom', 'copperBottom'],
] as const satisfies readonly (readonly [LayerName, keyof Artwork])[];

/** Places found by distance, with a sentence for each. A distance between two whole nanometres counts as the lower. */
export function placesOf(
  shape: Shape,
  across: Medium,
  limitNm: number,
  layer: LayerName,
  say: (measuredNm: number) => string,
): { readonly nearest: Place | null; readonly below: readonly Place[] } {
  const { nearest, below } = findFacing(shape, across, limitNm);
  const place = (facing: Facing): Place => {
    const measuredNm = Math.floor(facing.distanceNm + DISTANCE_SLACK_NM);
    return {
      layer,
      measuredNm,
      marginNm: measuredNm - limitNm,
      from: facing.from,
      to: facing.to,
      message: say(measuredNm),
    };
  };
  return { nearest: nearest === null ? null : place(nearest), below: below.map(place) };
}

function weight(limits: Limits): string {
  return `${(limits.copperBaseM * 1e6).toFixed(0)} µm copper`;
}

/** What is drawn, by the dimension that has this size on this layer, if one of those named has. */
function drawn(artwork: Artwork, layer: LayerName, names: readonly string[], measuredNm: number): string | null {
  if (layer !== 'copper-top') return null;
  const dimension = artwork.dimensions.find(({ name, valueNm }) => names.includes(name) && valueNm === measuredNm);
  return dimension === undefined ? null : `The ${dimension.label} is drawn at ${millimetres(measuredNm)}`;
}

/** Clearance between copper that faces copper, in one contour or in two. */
export function findGaps(artwork: Artwork, limits: Limits): Finding {
  const parts = COPPER_LAYERS.map(([layer, key]) =>
    placesOf(artwork[key], 'clearance', limits.space, layer, (measuredNm) => {
      const what = drawn(artwork, layer, ['notchGap'], measuredNm) ?? `A gap of ${millimetres(measuredNm)} is drawn`;
      return `${what}; ${limits.fabricator} etches no space below ${millimetres(limits.space)} in ${weight(limits)}, and would bridge it or send the board back.`;
    }),
  );
  return gather(limits.space, 'copper-top', parts);
}

/** Copper between clearance and clearance. */
export function findWidths(artwork: Artwork, limits: Limits): Finding {
  const names = ['lineWidth', 'lineWidthInNotch'];
  const parts = COPPER_LAYERS.map(([layer, key]) =>
    placesOf(artwork[key], 'copper', limits.trace, layer, (measuredNm) => {
      const what = drawn(artwork, layer, names, measuredNm) ?? `Copper ${millimetres(measuredNm)} wide is drawn`;
      return `${what}; ${limits.fabricator} etches no trace below ${millimetres(limits.trace)} in ${weight(limits)}, and would thin it, break it or send the board back.`;
    }),
  );
  return gather(limits.trace, 'copper-top', parts);
}

/** Corners sharper than 60°, of copper or of clearance. One is measured across, as far from its tip as the limit is
 *  wide: at 60° that chord is the limit itself. */
export function findCorners(artwork: Artwork, limits: Limits): Finding {
  const limitNm = Math.max(limits.trace, limits.space);
  const parts = COPPER_LAYERS.map(([layer, key]) => {
    const sharp = artwork[key]
      .flatMap((region) => [region.outer, ...region.holes])
      .flatMap((contour) => {
        const corners = cornersOf(contour);
        return corners.flatMap((tip, i) => {
          const arriving = contour.edges[(i + corners.length - 1) % corners.length]!;
          const leaving = contour.edges[i]!;
          // Arcs here are fillets, tangent to their neighbours: no corner.
          if (arriving.kind === 'arc' || leaving.kind === 'arc') return [];
          const before = corners[(i + corners.length - 1) % corners.length]!;
          return [chordAt(tip, before, leaving.to, limitNm)];
        });
      });
    const places = sharp.map((facing): Place => {
      const measuredNm = Math.round(facing.distanceNm);
      return {
        layer,
        measuredNm,
        marginNm: measuredNm - limitNm,
        from: facing.from,
        to: facing.to,
        message: `A corner sharper than 60° is drawn at x = ${millimetres(facing.from.xNm)}, y = ${millimetres(facing.from.yNm)}: its tip etches away or traps etchant.`,
      };
    });
    return { nearest: tightest(places), below: places.filter(({ marginNm }) => marginNm < 0) };
  });
  return gather(limitNm, 'copper-top', parts);
}

/** The chord across a corner at a distance from its tip: 2 d sin(θ/2), θ the smaller angle between the sides. */
function chordAt(tip: PointNm, before: PointNm, after: PointNm, distanceNm: number): Facing {
  const ux = before.xNm - tip.xNm;
  const uy = before.yNm - tip.yNm;
  const vx = after.xNm - tip.xNm;
  const vy = after.yNm - tip.yNm;
  const at = (x: number, y: number): PointNm => {
    const length = Math.hypot(x, y);
    return {
      xNm: Math.round(tip.xNm + (x / length) * distanceNm),
      yNm: Math.round(tip.yNm + (y / length) * distanceNm),
    };
  };
  const angle = Math.atan2(Math.abs(ux * vy - uy * vx), ux * vx + uy * vy);
  // Collinear sides are no corner; the exact sign decides, not the rounded angle.
  const straight = crossSign(ux, uy, vx, vy) === 0;
  const distance = straight ? 2 * distanceNm : 2 * distanceNm * Math.sin(angle / 2);
  return { distanceNm: distance, from: at(ux, uy), to: at(vx, vy) };
}
