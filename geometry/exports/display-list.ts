// A drawing as a list of paths and texts in millimetres on a sheet; origin lower left, x right, y up.
// Whatever shows a drawing (an SVG, a PDF, a screen) takes this list and nothing else.

import { arcSweepRad } from '../shape/flatten.ts';
import type { Contour, Shape } from '../shape/shape.ts';

export interface PointMm {
  readonly xMm: number;
  readonly yMm: number;
}

export type PathStep =
  | { readonly kind: 'line'; readonly to: PointMm }
  | { readonly kind: 'arc'; readonly to: PointMm; readonly radiusMm: number; readonly sweepRad: number };

export interface Path {
  readonly start: PointMm;
  readonly steps: readonly PathStep[];
  readonly closed: boolean;
}

export interface Pen {
  readonly colour: string;
  readonly widthMm: number;
  /** Dash, gap, dash, … [mm]; a full line without it. */
  readonly dashMm?: readonly number[];
  readonly roundEnds?: boolean;
}

/** Paint inside a path; `hatch` draws lines at 45°, rising to the right. */
export type Fill =
  | { readonly kind: 'solid'; readonly colour: string }
  | {
      readonly kind: 'hatch';
      readonly colour: string;
      readonly ground: string;
      readonly spacingMm: number;
      readonly lineMm: number;
    }
  | { readonly kind: 'dots'; readonly colour: string; readonly spacingMm: number; readonly radiusMm: number };

/** Paths that share a fill are filled by the even-odd rule, so that holes stay open. */
export interface PathItem {
  readonly kind: 'path';
  readonly paths: readonly Path[];
  readonly pen?: Pen;
  readonly fill?: Fill;
}

export type Face = 'sans' | 'sans-bold' | 'serif' | 'serif-italic';

export interface TextItem {
  readonly kind: 'text';
  /** Where the base line starts, has its middle, or ends. */
  readonly at: PointMm;
  readonly text: string;
  readonly sizeMm: number;
  readonly face: Face;
  readonly colour: string;
  readonly anchor: 'start' | 'middle' | 'end';
  /** Reads upwards: turned by 90° counter-clockwise about `at`. */
  readonly upwards?: boolean;
}

export type DrawingItem = PathItem | TextItem;

export interface DisplayList {
  readonly title: string;
  readonly widthMm: number;
  readonly heightMm: number;
  /** In the order of painting. */
  readonly items: readonly DrawingItem[];
}

export function at(xMm: number, yMm: number): PointMm {
  return { xMm, yMm };
}

/** A chain of straight lines. */
export function polyline(points: readonly PointMm[], closed = false): Path {
  const [start, ...rest] = points;
  return { start: start ?? at(0, 0), steps: rest.map((to) => ({ kind: 'line', to })), closed };
}

export function rectangle(xMm: number, yMm: number, widthMm: number, heightMm: number): Path {
  const right = xMm + widthMm;
  const top = yMm + heightMm;
  return polyline([at(xMm, yMm), at(right, yMm), at(right, top), at(xMm, top)], true);
}

/** Where the board lies on the sheet: its lower left corner, and millimetres on paper for one millimetre of board. */
export interface Placement {
  readonly origin: PointMm;
  readonly scale: number;
}

/** A point of the board on the sheet. */
export function onSheet(placement: Placement, xNm: number, yNm: number): PointMm {
  const scale = placement.scale / 1e6;
  return at(placement.origin.xMm + xNm * scale, placement.origin.yMm + yNm * scale);
}

/** A contour on the sheet, its arcs kept as arcs; a full circle becomes two halves, for the formats that have none. */
export function pathOfContour(contour: Contour, placement: Placement): Path {
  const steps: PathStep[] = [];
  let from = contour.start;
  for (const edge of contour.edges) {
    const to = onSheet(placement, edge.to.xNm, edge.to.yNm);
    if (edge.kind === 'line') {
      steps.push({ kind: 'line', to });
    } else {
      const { centre } = edge;
      const sweepRad = arcSweepRad(from, edge);
      const radiusMm = (Math.hypot(from.xNm - centre.xNm, from.yNm - centre.yNm) * placement.scale) / 1e6;
      if (Math.abs(sweepRad) > (3 / 2) * Math.PI) {
        const angle = Math.atan2(from.yNm - centre.yNm, from.xNm - centre.xNm) + sweepRad / 2;
        const middle = onSheet(placement, centre.xNm, centre.yNm);
        const half = at(middle.xMm + radiusMm * Math.cos(angle), middle.yMm + radiusMm * Math.sin(angle));
        steps.push({ kind: 'arc', to: half, radiusMm, sweepRad: sweepRad / 2 });
        steps.push({ kind: 'arc', to, radiusMm, sweepRad: sweepRad / 2 });
      } else {
        steps.push({ kind: 'arc', to, radiusMm, sweepRad });
      }
    }
    from = edge.to;
  }
  return { start: onSheet(placement, contour.start.xNm, contour.start.yNm), steps, closed: true };
}

/** All contours of a shape on the sheet. */
export function pathsOfShape(shape: Shape, placement: Placement): readonly Path[] {
  return shape.flatMap((region) => [region.outer, ...region.holes].map((contour) => pathOfContour(contour, placement)));
}
