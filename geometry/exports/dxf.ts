// The board for mechanical CAD: one DXF file in millimetres, one closed entity for each contour.

/// <reference path="./dxf-writer-handle.d.ts" />

import type Drawing from 'dxf-writer';
import { invariant } from '../errors.ts';
import { arcSweepRad } from '../shape/flatten.ts';
import type { Contour, Shape } from '../shape/shape.ts';
import type { ExportInput, NamedFile } from './exporter.ts';
import { plainText } from './plain-text.ts';
import { millimetres, mmFromNm } from './wording.ts';

/** The public layer names with their AutoCAD colour index, so that they can be told apart at first sight. */
const LAYERS = {
  OUTLINE: 7,
  COPPER_TOP: 1,
  COPPER_BOT: 5,
  MASK_TOP: 3,
  MASK_BOT: 4,
  HOLES_PTH: 6,
  HOLES_NPTH: 2,
  NOTES: 8,
} as const;

type LayerName = keyof typeof LAYERS;

const NOTE_HEIGHT_MM = 2;
/** Below this bulge an arc is nearer to its chord than 0.05 nm on 100 µm, and its decimal would need an exponent. */
const LEAST_BULGE = 1e-6;

/** Text of a TEXT entity. Two percent signs begin a control code, a caret a control character, a backslash with U+ or
 *  M+ a character code (DXF reference, from memory). */
export function encodeDxfText(text: string): string {
  return plainText(text)
    .replace(/\\(?=[UuMm]\+)/g, '\\U+005C')
    .replaceAll('^', '^ ')
    .replace(/%{2,}/g, (run) => '%%%'.repeat(run.length));
}

/** Writes `<slug>-board.dxf`: AutoCAD 2007 format, 1:1, origin at the board's lower left corner, arcs as arcs. */
export async function exportDxf(input: ExportInput): Promise<readonly NamedFile[]> {
  // Loaded here, so that what never writes a DXF file does not pay for it.
  const [{ default: Writer }, { default: handle }] = await Promise.all([
    import('dxf-writer'),
    import('dxf-writer/src/Handle.js'),
  ]);
  const { artwork } = input;
  // The library numbers its objects through one counter for all drawings of a run: reset, or two files of one board differ.
  // No other code may run between here and the text.
  handle.seed = 0;
  const drawing = new Writer();
  // The library's own spelling; any other writes an empty unit without complaint.
  drawing.setUnits('Millimeters');
  drawing.header('MEASUREMENT', [[70, 1]]);
  for (const [name, colour] of Object.entries(LAYERS)) drawing.addLayer(name, colour, 'CONTINUOUS');

  drawContour(drawing, 'OUTLINE', artwork.board.outline);
  drawShape(drawing, 'COPPER_TOP', artwork.copperTop);
  drawShape(drawing, 'COPPER_BOT', artwork.copperBottom);
  drawShape(drawing, 'MASK_TOP', artwork.maskTop);
  drawShape(drawing, 'MASK_BOT', artwork.maskBottom);
  for (const hole of artwork.holes) {
    drawing
      .setActiveLayer(hole.plated ? 'HOLES_PTH' : 'HOLES_NPTH')
      .drawCircle(mmFromNm(hole.centre.xNm), mmFromNm(hole.centre.yNm), mmFromNm(hole.finishedDiameterNm) / 2);
  }
  drawing.setActiveLayer('NOTES');
  notes(input).forEach((text, index) => {
    drawing.drawText(0, -2 * NOTE_HEIGHT_MM * (index + 1), NOTE_HEIGHT_MM, 0, encodeDxfText(text));
  });
  const bytes = new TextEncoder().encode(`${drawing.toDxfString()}\n`);
  return [{ name: `${artwork.slug}-board.dxf`, bytes, purpose: 'outline, copper and mask for mechanical CAD' }];
}

function notes({ artwork }: ExportInput): readonly string[] {
  const { widthNm, lengthNm } = artwork.board;
  return [
    artwork.title,
    `Build ${artwork.buildId}`,
    `Millimetres, 1:1, seen from the top; board ${millimetres(widthNm)} x ${millimetres(lengthNm)}`,
    'Holes in copper and mask are contours of their own on the same layer',
  ];
}

function drawShape(drawing: Drawing, layer: LayerName, shape: Shape): void {
  for (const region of shape) {
    for (const contour of [region.outer, ...region.holes]) drawContour(drawing, layer, contour);
  }
}

/** A contour as one closed LWPOLYLINE. Each vertex carries the bulge of the edge that leaves it: the tangent of a
 *  quarter of the arc's angle, positive counter-clockwise. A full circle is a CIRCLE, which has no bulge. */
function drawContour(drawing: Drawing, layer: LayerName, contour: Contour): void {
  drawing.setActiveLayer(layer);
  const [only] = contour.edges;
  if (contour.edges.length === 1 && only?.kind === 'arc') {
    const radius = Math.hypot(contour.start.xNm - only.centre.xNm, contour.start.yNm - only.centre.yNm);
    drawing.drawCircle(mmFromNm(only.centre.xNm), mmFromNm(only.centre.yNm), mmFromNm(Math.round(radius)));
    return;
  }
  const vertices: number[][] = [];
  let from = contour.start;
  for (const edge of contour.edges) {
    const moved = edge.to.xNm !== from.xNm || edge.to.yNm !== from.yNm;
    invariant(moved || edge.kind === 'line', 'a full circle stands alone in its contour');
    if (!moved) continue;
    const bulge = edge.kind === 'line' ? 0 : Math.tan(arcSweepRad(from, edge) / 4);
    const vertex = [mmFromNm(from.xNm), mmFromNm(from.yNm)];
    if (Math.abs(bulge) >= LEAST_BULGE) vertex.push(Math.round(bulge * 1e9) / 1e9);
    vertices.push(vertex);
    from = edge.to;
  }
  // The library's types know points without a bulge only.
  drawing.drawPolyline(vertices as [number, number][], true);
}
