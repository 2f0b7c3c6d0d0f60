// The fabrication drawing: the board at a stated scale with its dimensions, on a framed A4 or A3 sheet.

import type { Artwork, Hole } from '../artwork/artwork.ts';
import { disc } from '../shape/primitives.ts';
import { type DimensionLayout, layOutDimensions } from './dimension-layout.ts';
import { drawDimensions } from './dimension-lines.ts';
import {
  at,
  type DisplayList,
  type DrawingItem,
  type Fill,
  onSheet,
  type Path,
  type Pen,
  type Placement,
  pathOfContour,
  pathsOfShape,
  polyline,
  rectangle,
  type TextItem,
} from './display-list.ts';
import { COLUMN_MM, drawColumn } from './drawing-column.ts';
import type { ExportInput, NamedFile } from './exporter.ts';
import { COPPER_EDGE, COPPER_FILL, GROUND_FILL, INK, MASK_EDGE, PAPER, RULE, SECOND_INK } from './inks.ts';
import { writeSvg } from './svg.ts';
import { textWidthMm } from './text-width.ts';
import { mmFromNm } from './wording.ts';

/** A sheet of ISO 216, landscape. */
interface Sheet {
  readonly name: string;
  readonly widthMm: number;
  readonly heightMm: number;
}

const A4: Sheet = { name: 'A4', widthMm: 297, heightMm: 210 };
const A3: Sheet = { name: 'A3', widthMm: 420, heightMm: 297 };

/** Scales of ISO 5455 (from memory), paper over board. */
const ENLARGED = [50, 20, 10, 5, 2, 1] as const;
const REDUCED = [1 / 2, 1 / 5, 1 / 10, 1 / 20] as const;

/** The neat line, inside the sheet's edge by as much as any office printer needs. */
const FRAME_MM = 8;
/** The band on the neat line whose blocks are 10 mm long, to check a print with a ruler. */
const BAND_MM = 1.3;
/** Room above the view for its caption and below it for the key. */
const CAPTION_MM = 9;
const KEY_MM = 10;
const MARGIN_MM = 5;
/** What is smaller than this on paper wants a larger sheet. */
const PLAIN_MM = 1;

const COPPER_PEN: Pen = { colour: COPPER_EDGE, widthMm: 0.3 };
const GROUND_PEN: Pen = { colour: SECOND_INK, widthMm: 0.15, dashMm: [1.6, 0.9] };
const MASK_PEN: Pen = { colour: MASK_EDGE, widthMm: 0.2, dashMm: [3, 0.8, 0.4, 0.8] };

/** Writes `<slug>-drawing.svg`. */
export function exportDrawing(input: ExportInput): readonly NamedFile[] {
  const bytes = new TextEncoder().encode(writeSvg(drawBoard(input)));
  return [{ name: `${input.artwork.slug}-drawing.svg`, bytes, purpose: 'fabrication drawing with dimensions' }];
}

/** The drawing as a display list, for whatever shows or prints it. */
export function drawBoard(input: ExportInput): DisplayList {
  const { artwork } = input;
  const fit = chooseSheet(artwork);
  const { sheet, scale } = fit;
  const placement: Placement = { origin: originOf(fit), scale };
  const scaleText = scale >= 1 ? `${scale} : 1` : `1 : ${Math.round(1 / scale)}`;
  return {
    title: `${artwork.title}, fabrication drawing, build ${artwork.buildId}`,
    widthMm: sheet.widthMm,
    heightMm: sheet.heightMm,
    items: [
      ...neatLine(sheet),
      ...boardItems(artwork, placement),
      ...drawDimensions(fit.layout.placed, {
        leftMm: placement.origin.xMm,
        bottomMm: placement.origin.yMm,
        widthMm: mmFromNm(artwork.board.widthNm) * scale,
        heightMm: mmFromNm(artwork.board.lengthNm) * scale,
      }),
      ...launchMarks(artwork, placement),
      ...captions(sheet, scaleText, artwork.hasSolderMask),
      ...drawColumn(input, {
        leftMm: sheet.widthMm - FRAME_MM - BAND_MM - COLUMN_MM,
        bottomMm: FRAME_MM + BAND_MM,
        heightMm: sheet.heightMm - 2 * (FRAME_MM + BAND_MM),
        scaleText,
        sheetName: sheet.name,
      }),
    ],
  };
}

interface Fit {
  readonly sheet: Sheet;
  readonly scale: number;
  readonly layout: DimensionLayout;
}

/** A4 at its largest scale where that shows every dimension plainly, else A3 at its own largest. A board too large for
 *  every scale, which the brief's limit of 1 m rules out, would run over the edge at the smallest. */
function chooseSheet(artwork: Artwork): Fit {
  const smallestMm = mmFromNm(Math.min(...artwork.dimensions.map((dimension) => dimension.valueNm)));
  const onA4 = largestFit(artwork, A4, ENLARGED);
  if (onA4.fits && smallestMm * onA4.scale >= PLAIN_MM) return onA4;
  const onA3 = largestFit(artwork, A3, [...ENLARGED, ...REDUCED]);
  return onA4.fits && onA4.scale >= onA3.scale ? onA4 : onA3;
}

function largestFit(artwork: Artwork, sheet: Sheet, scales: readonly number[]): Fit & { readonly fits: boolean } {
  const room = viewOf(sheet);
  const candidates = scales.map((scale) => {
    const layout = layOutDimensions(artwork, scale);
    const fits = layout.rightMm - layout.leftMm <= room.widthMm && layout.topMm - layout.bottomMm <= room.heightMm;
    return { sheet, scale, layout, fits };
  });
  return candidates.find(({ fits }) => fits) ?? candidates[candidates.length - 1]!;
}

/** The part of a sheet that is the view's. */
function viewOf(sheet: Sheet): { leftMm: number; bottomMm: number; widthMm: number; heightMm: number } {
  const inside = FRAME_MM + BAND_MM;
  return {
    leftMm: inside + MARGIN_MM,
    bottomMm: inside + KEY_MM,
    widthMm: sheet.widthMm - 2 * inside - COLUMN_MM - 2 * MARGIN_MM,
    heightMm: sheet.heightMm - 2 * inside - CAPTION_MM - KEY_MM,
  };
}

/** The board's lower left corner, so that board and dimensions together stand in the middle of the view. */
function originOf({ sheet, layout }: Fit): Placement['origin'] {
  const view = viewOf(sheet);
  return at(
    view.leftMm + view.widthMm / 2 - (layout.leftMm + layout.rightMm) / 2,
    view.bottomMm + view.heightMm / 2 - (layout.bottomMm + layout.topMm) / 2,
  );
}

function boardItems(artwork: Artwork, placement: Placement): readonly DrawingItem[] {
  const outline = pathOfContour(artwork.board.outline, placement);
  return [
    { kind: 'path', paths: pathsOfShape(artwork.copperBottom, placement), fill: GROUND_FILL, pen: GROUND_PEN },
    { kind: 'path', paths: pathsOfShape(artwork.copperTop, placement), fill: COPPER_FILL, pen: COPPER_PEN },
    ...(artwork.hasSolderMask
      ? [{ kind: 'path', paths: pathsOfShape(artwork.maskTop, placement), pen: MASK_PEN } as const]
      : []),
    ...artwork.legendTop.map(
      (stroke): DrawingItem => ({
        kind: 'path',
        paths: [polyline(stroke.points.map((point) => onSheet(placement, point.xNm, point.yNm)))],
        pen: { colour: SECOND_INK, widthMm: mmFromNm(stroke.widthNm) * placement.scale, roundEnds: true },
      }),
    ),
    ...artwork.holes.flatMap((hole) => holeItems(hole, placement)),
    { kind: 'path', paths: [outline], pen: { colour: INK, widthMm: 0.5 } },
  ];
}

/** How far the centre lines of a hole reach beyond its wall, on paper. */
const CENTRE_LINE_MM = 1.5;

/** A hole at its finished size, with its centre lines. */
function holeItems({ centre, finishedDiameterNm }: Hole, placement: Placement): readonly DrawingItem[] {
  const wall = pathOfContour(disc(centre, Math.round(finishedDiameterNm / 2)), placement);
  const reach = Math.round(finishedDiameterNm / 2 + (CENTRE_LINE_MM / placement.scale) * 1e6);
  const line = (dx: number, dy: number): Path =>
    polyline([
      onSheet(placement, centre.xNm - dx, centre.yNm - dy),
      onSheet(placement, centre.xNm + dx, centre.yNm + dy),
    ]);
  return [
    { kind: 'path', paths: [wall], fill: { kind: 'solid', colour: PAPER }, pen: { colour: INK, widthMm: 0.35 } },
    {
      kind: 'path',
      paths: [line(reach, 0), line(0, reach)],
      pen: { colour: INK, widthMm: 0.15, dashMm: [2, 0.6, 0.4, 0.6] },
    },
  ];
}

/** A thick line where copper meets the board's edge by intent, and its name beside it on the bare laminate. */
function launchMarks(artwork: Artwork, placement: Placement): readonly DrawingItem[] {
  return artwork.launches.flatMap((launch): DrawingItem[] => {
    const from = onSheet(placement, launch.from.xNm, launch.from.yNm);
    const to = onSheet(placement, launch.to.xNm, launch.to.yNm);
    const name = textItem(Math.max(from.xMm, to.xMm) + 3.4, Math.max(from.yMm, to.yMm) + 2, launch.name, 3);
    const box = rectangle(name.at.xMm - 0.8, name.at.yMm - 0.9, 0.8 * 2 + 3 * 0.74 * launch.name.length, 4);
    return [
      { kind: 'path', paths: [polyline([from, to])], pen: { colour: COPPER_EDGE, widthMm: 0.9 } },
      { kind: 'path', paths: [box], fill: { kind: 'solid', colour: PAPER } },
      { ...name, face: 'serif-italic' },
    ];
  });
}

function neatLine(sheet: Sheet): readonly DrawingItem[] {
  const width = sheet.widthMm - 2 * FRAME_MM;
  const height = sheet.heightMm - 2 * FRAME_MM;
  const blocks: Path[] = [];
  const inner = FRAME_MM + BAND_MM;
  // Both bands count from the inner lower left corner, every second ten millimetres filled.
  for (let along = 0; along < width - 2 * BAND_MM; along += 20) {
    const length = Math.min(10, width - 2 * BAND_MM - along);
    blocks.push(rectangle(inner + along, FRAME_MM, length, BAND_MM));
    blocks.push(rectangle(inner + along, sheet.heightMm - inner, length, BAND_MM));
  }
  for (let along = 0; along < height - 2 * BAND_MM; along += 20) {
    const length = Math.min(10, height - 2 * BAND_MM - along);
    blocks.push(rectangle(FRAME_MM, inner + along, BAND_MM, length));
    blocks.push(rectangle(sheet.widthMm - inner, inner + along, BAND_MM, length));
  }
  return [
    { kind: 'path', paths: blocks, fill: { kind: 'solid', colour: RULE } },
    {
      kind: 'path',
      paths: [
        rectangle(FRAME_MM, FRAME_MM, width, height),
        rectangle(inner, inner, width - 2 * BAND_MM, height - 2 * BAND_MM),
      ],
      pen: { colour: INK, widthMm: 0.2 },
    },
  ];
}

/** Caption above the view, key of the lines below it. */
function captions(sheet: Sheet, scaleText: string, hasSolderMask: boolean): readonly DrawingItem[] {
  const left = FRAME_MM + BAND_MM + MARGIN_MM;
  const top = sheet.heightMm - FRAME_MM - BAND_MM - 6.5;
  const y = FRAME_MM + BAND_MM + 4;
  const sample = (x: number, pen: Pen, fill?: Fill): DrawingItem => ({
    kind: 'path',
    paths: [rectangle(x, y - 0.6, 8, 3.2)],
    pen,
    ...(fill === undefined ? {} : { fill }),
  });
  const caption = 'Top copper, seen from the top';
  return [
    { ...textItem(left, top, caption, 4.4), face: 'serif-italic' },
    textItem(left + textWidthMm(caption, 4.4) + 5, top, `scale ${scaleText}, dimensions in mm; boxed: critical`, 2.6),
    sample(left, COPPER_PEN, COPPER_FILL),
    textItem(left + 10, y, 'top copper', 2.6),
    sample(left + 32, GROUND_PEN, GROUND_FILL),
    textItem(left + 42, y, 'ground, bottom side', 2.6),
    ...(hasSolderMask
      ? [sample(left + 74, MASK_PEN), textItem(left + 84, y, 'opening in the solder mask', 2.6)]
      : [textItem(left + 84, y, 'no solder mask', 2.6)]),
    textItem(left + 126, y, 'blocks on the frame: 10 mm', 2.6),
  ];
}

function textItem(xMm: number, yMm: number, text: string, sizeMm: number): TextItem {
  return { kind: 'text', at: at(xMm, yMm), text, sizeMm, face: 'sans', colour: SECOND_INK, anchor: 'start' };
}
