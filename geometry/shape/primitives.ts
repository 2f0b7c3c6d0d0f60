// Contours made directly: rectangles and polygons.

import { type Contour, type PointNm, point, type Region, type Ring } from './shape.ts';

/** A closed contour of straight edges through the corners, in their order. */
export function contourOf(ring: Ring): Contour {
  const start = ring[0]!;
  return { start, edges: [...ring.slice(1), start].map((to) => ({ kind: 'line', to })) };
}

/** A rectangle, counter-clockwise from its lower left corner. */
export function rectangle(x0Nm: number, y0Nm: number, x1Nm: number, y1Nm: number): Region {
  return {
    outer: contourOf([point(x0Nm, y0Nm), point(x1Nm, y0Nm), point(x1Nm, y1Nm), point(x0Nm, y1Nm)]),
    holes: [],
  };
}

/** A circle as two half circles, counter-clockwise; centre and radius are whole. */
export function disc(centre: PointNm, radiusNm: number): Contour {
  const left = point(centre.xNm - radiusNm, centre.yNm);
  const right = point(centre.xNm + radiusNm, centre.yNm);
  return {
    start: right,
    edges: [
      { kind: 'arc', to: left, centre, clockwise: false },
      { kind: 'arc', to: right, centre, clockwise: false },
    ],
  };
}

/** The corners of a contour: the ends of its edges, arcs reduced to their ends. */
export function cornersOf(contour: Contour): readonly PointNm[] {
  return [contour.start, ...contour.edges.slice(0, -1).map(({ to }) => to)];
}

/** The same contour walked the other way. */
export function reverse(contour: Contour): Contour {
  const corners = cornersOf(contour);
  const edges = contour.edges
    .map((edge, i) => {
      const to = corners[i]!;
      return edge.kind === 'line' ? { ...edge, to } : { ...edge, to, clockwise: !edge.clockwise };
    })
    .reverse();
  return { start: contour.start, edges };
}
