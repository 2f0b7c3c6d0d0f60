// The board's outline, drawn with makerjs and taken over as an exact contour.

import makerjs from 'makerjs';
import { invariant } from '../errors.ts';
import { reverse } from '../shape/primitives.ts';
import { type Contour, type Edge, type PointNm, point } from '../shape/shape.ts';

/** A rectangle from (0, 0) with its corners rounded, as a contour that runs counter-clockwise; arcs stay arcs.
 *  @param radiusNm  0 for square corners, at most half the shorter side */
export function boardOutline(widthNm: number, lengthNm: number, radiusNm: number): Contour {
  const model: makerjs.IModel =
    radiusNm > 0
      ? new makerjs.models.RoundRectangle(widthNm, lengthNm, radiusNm)
      : new makerjs.models.Rectangle(widthNm, lengthNm);
  const chain = makerjs.model.findSingleChain(model);
  invariant(chain.endless === true, 'the outline is one closed chain');
  return contourOfChain(chain);
}

/** A closed chain as a contour, every end rounded to whole nanometres; turned counter-clockwise. */
function contourOfChain(chain: makerjs.IChain): Contour {
  const whole = (p: makerjs.IPoint): PointNm => point(Math.round(p[0]!), Math.round(p[1]!));
  const edges: Edge[] = [];
  let start: PointNm | null = null;
  let twice = 0;
  for (const { walkedPath, reversed, endPoints } of chain.links) {
    const [a, b] = reversed ? [endPoints[1]!, endPoints[0]!] : [endPoints[0]!, endPoints[1]!];
    const from = whole(a);
    const to = whole(b);
    start ??= from;
    // A straight side as long as nothing is left between two full arcs.
    if (from.xNm === to.xNm && from.yNm === to.yNm) continue;
    twice += from.xNm * to.yNm - to.xNm * from.yNm;
    if (makerjs.isPathArc(walkedPath.pathContext)) {
      const origin = walkedPath.pathContext.origin;
      const { offset } = walkedPath;
      // makerjs arcs run counter-clockwise; walked backwards they run clockwise.
      edges.push({
        kind: 'arc',
        to,
        centre: whole([origin[0]! + offset[0]!, origin[1]! + offset[1]!]),
        clockwise: reversed === true,
      });
    } else edges.push({ kind: 'line', to });
  }
  invariant(start !== null, 'a chain has links');
  const contour: Contour = { start, edges };
  return twice > 0 ? contour : reverse(contour);
}
