// From dimensions in metres to copper in whole nanometres: the only place where the one becomes the other.
//
//      y ↑   ┌───────────────────────────┐ board outline
//            │   ┌───────────────────┐   │
//            │   │     radiator      │   │  L
//            │   │    ┌─┐     ┌─┐    │   │
//            │   └────┘ │     │ └────┘   │  ← front edge, y = line length
//            │  notches │line │          │
//            └──────────┴─────┴──────────┘ → x,  launch edge y = 0

import type { Brief } from '../brief/brief.ts';
import { invariant } from '../errors.ts';
import type { PatchDesign } from '../patch/design.ts';
import { intersection } from '../shape/boolean.ts';
import { contourOf, disc, rectangle, reverse } from '../shape/primitives.ts';
import { cleanRing } from '../shape/rings.ts';
import { type Contour, type Edge, type PointNm, point, type Region, type Shape } from '../shape/shape.ts';
import { SHORTEST_EDGE_NM } from '../shape/validate.ts';
import { toNm } from '../units.ts';
import type { Artwork, Dimension, Hole, LaunchEdge, Pad } from './artwork.ts';
import { type Layout, layOut } from './layout.ts';
import { composeLegend } from './legend-place.ts';
import { boardOutline } from './outline.ts';
import { slugOf } from './slug.ts';
import { validateArtwork } from './validate.ts';

/** Mask opening beyond radiator and feed [nm]: room for the mask's own misplacement, so that none lies on them. */
const MASK_RELIEF_NM = 200_000;
/** Depth of the bare ground at the launch, for soldering a connector's legs [nm]. */
const SOLDER_DEPTH_NM = 5_000_000;

/** Side of a usual panel flange (common practice, no source) [nm]: its ground is left bare. */
const FLANGE_SIDE_NM = 12_700_000;

export interface ComposeInput {
  readonly brief: Brief;
  readonly design: PatchDesign;
  readonly buildId: string;
}

/** Mirrors the right half of an outline, given from the axis upwards, into a whole contour. */
function mirrored(axis: number, right: readonly PointNm[]): Contour {
  const left = [...right].reverse().map(({ xNm, yNm }) => point(2 * axis - xNm, yNm));
  return contourOf(cleanRing([...right, ...left]));
}

function radiatorWithFeed(l: Layout): Region {
  const x = (offset: number): number => l.axis + offset;
  const right: PointNm[] = [];
  if (l.line !== null) {
    right.push(point(x(l.line.half), 0), point(x(l.line.half), l.transformer?.from ?? l.front));
  }
  if (l.transformer !== null) {
    right.push(point(x(l.transformer.half), l.transformer.from), point(x(l.transformer.half), l.front));
  }
  if (l.notch !== null) {
    const { halfLine, outer, depth } = l.notch;
    right.push(
      point(x(halfLine), l.front),
      point(x(halfLine), l.front + depth),
      point(x(outer), l.front + depth),
      point(x(outer), l.front),
    );
  }
  right.push(point(x(l.halfPatch), l.front), point(x(l.halfPatch), l.back));
  return { outer: mirrored(l.axis, right), holes: [] };
}

/** Ground over the whole board, pulled back from its edge but for the launch stretch, open around a pin. */
function ground(l: Layout): Region {
  const p = l.pullBack;
  // An arc too small to draw is drawn a little larger, which takes copper farther from the edge.
  const radius = l.cornerRadius > p ? Math.max(SHORTEST_EDGE_NM, l.cornerRadius - p) : 0;
  const right = l.boardWidth - p;
  const top = l.boardLength - p;
  const edges: Edge[] = [];
  const line = (xNm: number, yNm: number): void => {
    edges.push({ kind: 'line', to: point(xNm, yNm) });
  };
  const corner = (toX: number, toY: number, centreX: number, centreY: number): void => {
    if (radius > 0) {
      edges.push({ kind: 'arc', to: point(toX, toY), centre: point(centreX, centreY), clockwise: false });
    }
  };
  let start = point(p + radius, p);
  if (l.line !== null) {
    start = point(l.axis - l.line.halfLaunch, 0);
    line(l.axis + l.line.halfLaunch, 0);
    line(l.axis + l.line.halfLaunch, p);
  }
  line(right - radius, p);
  corner(right, p + radius, right - radius, p + radius);
  line(right, top - radius);
  corner(right - radius, top, right - radius, top - radius);
  line(p + radius, top);
  corner(p, top - radius, p + radius, top - radius);
  line(p, p + radius);
  corner(p + radius, p, p + radius, p + radius);
  if (l.line !== null) {
    line(start.xNm, p);
    line(start.xNm, 0);
  }
  const holes = l.pin === null ? [] : [reverse(disc(point(l.axis, l.pin.y), l.pin.clearance / 2))];
  return { outer: { start, edges: withoutEmpty(start, edges) }, holes };
}

function withoutEmpty(start: PointNm, edges: readonly Edge[]): readonly Edge[] {
  let from = start;
  return edges.filter(({ to, kind }) => {
    const empty = kind === 'line' && to.xNm === from.xNm && to.yNm === from.yNm;
    from = to;
    return !empty;
  });
}

/** Where the mask is left open: over radiator and feed, over the ground at the launch or under a probe's flange. */
function maskOpenings(l: Layout, outline: Region, reliefNm: number): { readonly top: Shape; readonly bottom: Shape } {
  const patchSide = Math.min(l.halfPatch + reliefNm, l.axis);
  const front = Math.max(0, l.front - reliefNm);
  const back = Math.min(l.boardLength, l.back + reliefNm);
  const right = [point(l.axis + patchSide, front), point(l.axis + patchSide, back)];
  if (l.line !== null) {
    const lineSide = Math.min(l.line.half + reliefNm, patchSide);
    right.unshift(point(l.axis + lineSide, 0), point(l.axis + lineSide, front));
  }
  const top: Region = { outer: mirrored(l.axis, right), holes: [] };
  const bottom = l.line === null ? flangeArea(l) : launchArea(l, l.line.halfLaunch);
  // Square boards need no clipping: the openings are within them by their making.
  if (l.cornerRadius === 0) return { top: [top], bottom: [bottom] };
  return { top: intersection([top], [outline]), bottom: intersection([bottom], [outline]) };
}

function launchArea(l: Layout, halfLaunch: number): Region {
  return rectangle(l.axis - halfLaunch, 0, l.axis + halfLaunch, Math.min(SOLDER_DEPTH_NM, l.boardLength));
}

/** A square around the pin, cut to the board. */
function flangeArea(l: Layout): Region {
  const y = l.pin?.y ?? 0;
  const side = FLANGE_SIDE_NM / 2;
  return rectangle(
    Math.max(0, l.axis - side),
    Math.max(0, y - side),
    Math.min(l.boardWidth, l.axis + side),
    Math.min(l.boardLength, y + side),
  );
}

function dimensionsOf(l: Layout): readonly Dimension[] {
  const at = (
    name: string,
    label: string,
    axis: 'x' | 'y',
    from: PointNm,
    to: PointNm,
    critical: boolean,
  ): Dimension => ({
    name,
    label,
    axis,
    from,
    to,
    critical,
    valueNm: axis === 'x' ? Math.abs(to.xNm - from.xNm) : Math.abs(to.yNm - from.yNm),
  });
  const x = (offset: number): number => l.axis + offset;
  const across = (name: string, label: string, halfNm: number, y: number): Dimension =>
    at(name, label, 'x', point(x(-halfNm), y), point(x(halfNm), y), true);
  const feed: Dimension[] = [];
  if (l.notch !== null) {
    const { halfLine, gap, outer, depth } = l.notch;
    const end = l.front + depth;
    feed.push(
      at('insetDepth', 'inset depth', 'y', point(x(-outer), l.front), point(x(-outer), end), true),
      at('notchGap', 'notch gap', 'x', point(x(outer - gap), l.front), point(x(outer), l.front), true),
      across('lineWidthInNotch', 'line width in the notch', halfLine, end),
    );
  }
  if (l.transformer !== null) {
    const { half, from } = l.transformer;
    feed.push(
      across('transformerWidth', 'transformer width', half, from),
      at('transformerLength', 'transformer length', 'y', point(x(-half), from), point(x(-half), l.front), true),
    );
  }
  if (l.line !== null) {
    feed.push(
      across('lineWidth', 'feed line width', l.line.half, 0),
      at(
        'lineLength',
        'feed line length',
        'y',
        point(x(l.line.half), 0),
        point(x(l.line.half), l.transformer?.from ?? l.front),
        false,
      ),
    );
  }
  if (l.pin !== null) {
    const middle = l.front + Math.round((l.back - l.front) / 2);
    feed.push(
      at('offset', 'pin from the centre', 'y', point(l.axis, l.pin.y), point(l.axis, middle), true),
      across('padDiameter', 'pad', l.pin.pad / 2, l.pin.y),
      across('clearanceDiameter', 'opening in the ground', l.pin.clearance / 2, l.pin.y),
    );
  }
  return [
    at('length', 'patch length L', 'y', point(x(l.halfPatch), l.front), point(x(l.halfPatch), l.back), true),
    at('width', 'patch width W', 'x', point(x(-l.halfPatch), l.back), point(x(l.halfPatch), l.back), true),
    ...feed,
    at('boardWidth', 'board width', 'x', point(0, 0), point(l.boardWidth, 0), false),
    at('boardLength', 'board length', 'y', point(0, 0), point(0, l.boardLength), false),
  ];
}

function launchesOf(l: Layout): readonly LaunchEdge[] {
  if (l.line === null) return [];
  const { halfLaunch } = l.line;
  return [{ name: 'J1', from: point(l.axis - halfLaunch, 0), to: point(l.axis + halfLaunch, 0) }];
}

/** The pin's hole, and on request those of a flange. */
function holesOf(l: Layout): readonly Hole[] {
  if (l.pin === null) return [];
  const centre = point(l.axis, l.pin.y);
  return [{ centre, finishedDiameterNm: l.pin.hole, plated: l.pin.plated, use: 'pin', label: 'pin of J1' }];
}

function padsOf(l: Layout): readonly Pad[] {
  if (l.pin === null) return [];
  return [{ layer: 'copper-top', centre: point(l.axis, l.pin.y), diameterNm: l.pin.pad, label: 'pin of J1' }];
}

/** Draws the board: copper, ground, outline, mask openings, legend, dimensions.
 *  Throws: EngineError "board.small", "board.cornerRadius", "board.launch", "feed.notch" for what cannot be drawn. */
export function composeArtwork(input: ComposeInput): Artwork {
  const { brief, buildId } = input;
  const l = layOut(input.brief, input.design);
  const outline = boardOutline(l.boardWidth, l.boardLength, l.cornerRadius);
  const board: Region = { outer: outline, holes: [] };
  const { mask, legend } = brief.fabricator;
  const relief = mask === null ? 0 : Math.max(MASK_RELIEF_NM, toNm(mask.expansionM));
  const openings = mask === null ? { top: [board], bottom: [board] } : maskOpenings(l, board, relief);
  const slug = slugOf(brief.title);
  const printed = composeLegend(l, {
    slug,
    buildId,
    legend,
    reliefNm: relief,
    registrationNm: toNm(brief.fabricator.registrationM),
    heightNm: toNm(brief.laminate.thicknessM),
  });
  const artwork: Artwork = {
    kind: 'artwork',
    title: brief.title,
    slug,
    buildId,
    board: { outline, widthNm: l.boardWidth, lengthNm: l.boardLength },
    copperTop: [radiatorWithFeed(l)],
    copperBottom: [ground(l)],
    maskTop: openings.top,
    maskBottom: openings.bottom,
    hasSolderMask: mask !== null,
    legendTop: printed.strokes,
    holes: holesOf(l),
    pads: padsOf(l),
    launches: launchesOf(l),
    dimensions: dimensionsOf(l),
    remarks: printed.remarks,
  };
  // Sizes that no shape can have were refused above: what is left would be a fault of the drawing.
  const [unsound] = validateArtwork(artwork);
  invariant(unsound === undefined, `the artwork is sound: ${JSON.stringify(unsound)}`);
  return artwork;
}
