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
import type { PatchDesign } from '../patch/design.ts';
import { intersection } from '../shape/boolean.ts';
import { contourOf, rectangle } from '../shape/primitives.ts';
import { cleanRing } from '../shape/rings.ts';
import { type Contour, type Edge, type PointNm, point, type Region, type Shape } from '../shape/shape.ts';
import { toNm } from '../units.ts';
import type { Artwork, Dimension, LaunchEdge } from './artwork.ts';
import { type Layout, layOut } from './layout.ts';
import { composeLegend } from './legend-place.ts';
import { boardOutline } from './outline.ts';
import { slugOf } from './slug.ts';

/** Mask opening beyond radiator and feed [nm]: room for the mask's own misplacement, so that none lies on them. */
const MASK_RELIEF_NM = 200_000;
/** Depth of the bare ground at the launch, for soldering a connector's legs [nm]. */
const SOLDER_DEPTH_NM = 5_000_000;

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
  const right = [point(x(l.halfLine), 0), point(x(l.halfLine), l.front)];
  if (l.depth > 0) {
    right.push(
      point(x(l.halfInNotch), l.front),
      point(x(l.halfInNotch), l.front + l.depth),
      point(x(l.halfInNotch + l.gap), l.front + l.depth),
      point(x(l.halfInNotch + l.gap), l.front),
    );
  }
  right.push(point(x(l.halfPatch), l.front), point(x(l.halfPatch), l.back));
  return { outer: mirrored(l.axis, right), holes: [] };
}

/** Ground over the whole board, pulled back from its edge but for the launch stretch. */
function ground(l: Layout): Region {
  const p = l.pullBack;
  const radius = Math.max(0, l.cornerRadius - p);
  const right = l.boardWidth - p;
  const top = l.boardLength - p;
  const launchLeft = l.axis - l.halfLaunch;
  const launchRight = l.axis + l.halfLaunch;
  const edges: Edge[] = [];
  const line = (xNm: number, yNm: number): void => {
    edges.push({ kind: 'line', to: point(xNm, yNm) });
  };
  const corner = (toX: number, toY: number, centreX: number, centreY: number): void => {
    if (radius > 0) {
      edges.push({ kind: 'arc', to: point(toX, toY), centre: point(centreX, centreY), clockwise: false });
    }
  };
  line(launchRight, 0);
  if (p > 0) line(launchRight, p);
  if (launchRight < right - radius) line(right - radius, p);
  corner(right, p + radius, right - radius, p + radius);
  line(right, top - radius);
  corner(right - radius, top, right - radius, top - radius);
  line(p + radius, top);
  corner(p, top - radius, p + radius, top - radius);
  line(p, p + radius);
  corner(p + radius, p, p + radius, p + radius);
  if (launchLeft > p + radius) line(launchLeft, p);
  if (p > 0) line(launchLeft, 0);
  return { outer: { start: point(launchLeft, 0), edges: withoutEmpty(point(launchLeft, 0), edges) }, holes: [] };
}

function withoutEmpty(start: PointNm, edges: readonly Edge[]): readonly Edge[] {
  let from = start;
  return edges.filter(({ to, kind }) => {
    const empty = kind === 'line' && to.xNm === from.xNm && to.yNm === from.yNm;
    from = to;
    return !empty;
  });
}

/** Where the mask is left open: over radiator and feed, and over the ground at the launch. */
function maskOpenings(l: Layout, outline: Region, reliefNm: number): { readonly top: Shape; readonly bottom: Shape } {
  const patchSide = Math.min(l.halfPatch + reliefNm, l.axis);
  const lineSide = Math.min(l.halfLine + reliefNm, patchSide);
  const front = Math.max(0, l.front - reliefNm);
  const back = Math.min(l.boardLength, l.back + reliefNm);
  const top: Region = {
    outer: mirrored(l.axis, [
      point(l.axis + lineSide, 0),
      point(l.axis + lineSide, front),
      point(l.axis + patchSide, front),
      point(l.axis + patchSide, back),
    ]),
    holes: [],
  };
  const depth = Math.min(SOLDER_DEPTH_NM, l.boardLength);
  const bottom = rectangle(l.axis - l.halfLaunch, 0, l.axis + l.halfLaunch, depth);
  // Square boards need no clipping: the openings are within them by their making.
  if (l.cornerRadius === 0) return { top: [top], bottom: [bottom] };
  return { top: intersection([top], [outline]), bottom: intersection([bottom], [outline]) };
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
  const end = l.front + l.depth;
  const inset =
    l.depth > 0
      ? [
          at(
            'insetDepth',
            'inset depth',
            'y',
            point(x(-l.halfInNotch - l.gap), l.front),
            point(x(-l.halfInNotch - l.gap), end),
            true,
          ),
          at('notchGap', 'notch gap', 'x', point(x(l.halfInNotch), end), point(x(l.halfInNotch + l.gap), end), true),
          at(
            'lineWidthInNotch',
            'line width in the notch',
            'x',
            point(x(-l.halfInNotch), end),
            point(x(l.halfInNotch), end),
            true,
          ),
        ]
      : [];
  return [
    at('length', 'patch length L', 'y', point(x(l.halfPatch), l.front), point(x(l.halfPatch), l.back), true),
    at('width', 'patch width W', 'x', point(x(-l.halfPatch), l.back), point(x(l.halfPatch), l.back), true),
    ...inset,
    at('lineWidth', 'feed line width', 'x', point(x(-l.halfLine), 0), point(x(l.halfLine), 0), true),
    at('lineLength', 'feed line length', 'y', point(x(l.halfLine), 0), point(x(l.halfLine), l.front), false),
    at('boardWidth', 'board width', 'x', point(0, 0), point(l.boardWidth, 0), false),
    at('boardLength', 'board length', 'y', point(0, 0), point(0, l.boardLength), false),
  ];
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
    heightNm: toNm(brief.laminate.thicknessM),
  });
  const launch: LaunchEdge = {
    name: 'J1',
    from: point(l.axis - l.halfLaunch, 0),
    to: point(l.axis + l.halfLaunch, 0),
  };
  return {
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
    holes: [],
    launches: [launch],
    dimensions: dimensionsOf(l),
    remarks: printed.remarks,
  };
}
