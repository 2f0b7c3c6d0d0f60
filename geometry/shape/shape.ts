// Plane shapes in integer nanometres: the records that artwork, rules and exports share. y points up.
//
//        outer contour counter-clockwise        edge i runs from the end of edge i-1
//        hole contours clockwise                (from `start` for i = 0) to its own `to`;
//   y    copper always lies to the left         the last `to` equals `start`
//   |
//   +--x

/** A point; both coordinates are integers [nm]. */
export interface PointNm {
  readonly xNm: number;
  readonly yNm: number;
}

/** A straight edge or a circular arc, ending at `to`. An arc's centre is an integer point too; both ends lie on its
 *  circle to within ARC_RADIUS_TOLERANCE_NM, which is what integer centres cost. */
export type Edge =
  | { readonly kind: 'line'; readonly to: PointNm }
  | { readonly kind: 'arc'; readonly to: PointNm; readonly centre: PointNm; readonly clockwise: boolean };

/** Greatest difference between the radii at an arc's two ends [nm]: both centre and ends are rounded to 1 nm. */
export const ARC_RADIUS_TOLERANCE_NM = 3;

/** A closed chain of edges. */
export interface Contour {
  readonly start: PointNm;
  readonly edges: readonly Edge[];
}

/** One connected piece: an outer contour (counter-clockwise) less its holes (clockwise). */
export interface Region {
  readonly outer: Contour;
  readonly holes: readonly Contour[];
}

/** Disjoint regions; an empty list is the empty shape. */
export type Shape = readonly Region[];

/** A polygon without arcs: corners in order, the first not repeated at the end. */
export type Ring = readonly PointNm[];

/** A line drawn with a round pen: legend strokes. */
export interface Stroke {
  readonly points: readonly PointNm[];
  readonly widthNm: number;
}

export function point(xNm: number, yNm: number): PointNm {
  return { xNm, yNm };
}
