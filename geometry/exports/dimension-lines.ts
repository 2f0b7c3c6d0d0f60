// Draws dimensions where the layout put them: extension lines, dimension line, arrows, label, value.

import {
  ARROW_MM,
  FRAME_MM,
  LABEL_GAP_MM,
  LABEL_SIZE_MM,
  labelWidthMm,
  type PlacedDimension,
  TAIL_MM,
  VALUE_SIZE_MM,
  valueText,
  valueWidthMm,
} from './dimension-layout.ts';
import { at, type DrawingItem, type Path, type PointMm, polyline } from './display-list.ts';
import { INK, PAPER, SECOND_INK } from './inks.ts';

/** The board on the sheet [mm]. */
export interface BoardFrame {
  readonly leftMm: number;
  readonly bottomMm: number;
  readonly widthMm: number;
  readonly heightMm: number;
}

const LINE = { colour: INK, widthMm: 0.18 };
const EXTENSION = { colour: SECOND_INK, widthMm: 0.11 };
/** Gap between a feature and its extension line, and what the extension line stands over. */
const GAP_MM = 1;
const OVERRUN_MM = 1.5;
const ARROW_HALF_WIDTH_MM = 0.36;
/** From the middle of a figure to its base line, in parts of the size. */
const BASE_LINE = 0.36;

/** All dimensions. Lines come first, so that the paper behind a value interrupts whatever crosses it. */
export function drawDimensions(placed: readonly PlacedDimension[], board: BoardFrame): readonly DrawingItem[] {
  return [
    ...placed.flatMap((item) => lines(item, sheetOf(item, board))),
    ...placed.flatMap((item) => texts(item, sheetOf(item, board))),
  ];
}

/** From along-the-side and away-from-the-board to the sheet. */
type ToSheet = (alongMm: number, awayMm: number) => PointMm;

function sheetOf(item: PlacedDimension, board: BoardFrame): ToSheet {
  const { leftMm, bottomMm, widthMm, heightMm } = board;
  switch (item.side) {
    case 'above':
      return (along, away) => at(leftMm + along, bottomMm + heightMm + away);
    case 'below':
      return (along, away) => at(leftMm + along, bottomMm - away);
    case 'left':
      return (along, away) => at(leftMm - away, bottomMm + along);
    case 'right':
      return (along, away) => at(leftMm + widthMm + away, bottomMm + along);
  }
}

function lines(item: PlacedDimension, sheet: ToSheet): readonly DrawingItem[] {
  const { startMm, endMm, distanceMm, depthStartMm, depthEndMm } = item;
  const inside = item.text === 'between';
  const tailStart = inside ? startMm : startMm - TAIL_MM;
  const tailEnd = inside ? endMm : endMm + TAIL_MM;
  const extensions = [
    [startMm, depthStartMm],
    [endMm, depthEndMm],
  ].map(([along, depth]) => polyline([sheet(along!, GAP_MM - depth!), sheet(along!, distanceMm + OVERRUN_MM)]));
  return [
    { kind: 'path', paths: extensions, pen: EXTENSION },
    { kind: 'path', paths: [polyline([sheet(tailStart, distanceMm), sheet(tailEnd, distanceMm)])], pen: LINE },
    {
      kind: 'path',
      paths: [arrow(sheet, startMm, distanceMm, inside ? 1 : -1), arrow(sheet, endMm, distanceMm, inside ? -1 : 1)],
      fill: { kind: 'solid', colour: INK },
    },
  ];
}

/** A filled head with its tip at `alongMm`, lying on the side that `direction` points to. */
function arrow(sheet: ToSheet, alongMm: number, awayMm: number, direction: 1 | -1): Path {
  const back = alongMm + direction * ARROW_MM;
  return polyline(
    [sheet(alongMm, awayMm), sheet(back, awayMm - ARROW_HALF_WIDTH_MM), sheet(back, awayMm + ARROW_HALF_WIDTH_MM)],
    true,
  );
}

function texts(item: PlacedDimension, sheet: ToSheet): readonly DrawingItem[] {
  const { dimension, startMm, endMm, distanceMm } = item;
  const upwards = dimension.axis === 'y';
  const valueWidth = valueWidthMm(dimension);
  const labelWidth = labelWidthMm(dimension);
  // Of a text that reads upwards the top points left: towards the board on its right side, away from it on its left.
  const topIsAway = item.side === 'above' || item.side === 'left';
  const raised = (byMm: number): number => distanceMm + (topIsAway ? byMm : -byMm);

  // Between the arrows the label stands above the value; beside them the two stand in a row, label first.
  let valueMiddle = (startMm + endMm) / 2;
  let labelMiddle = valueMiddle;
  let labelAway = raised(VALUE_SIZE_MM / 2 + FRAME_MM + 0.5 + BASE_LINE * LABEL_SIZE_MM);
  if (item.text !== 'between') {
    const rowWidth = labelWidth + LABEL_GAP_MM + valueWidth;
    const rowStart = item.text === 'after' ? endMm + TAIL_MM + 1 : startMm - TAIL_MM - 1 - rowWidth;
    labelMiddle = rowStart + labelWidth / 2;
    valueMiddle = rowStart + rowWidth - valueWidth / 2;
    labelAway = distanceMm;
  }
  const paper = (middle: number, away: number, width: number, height: number): Path =>
    polyline(
      [
        sheet(middle - width / 2, away - height / 2),
        sheet(middle + width / 2, away - height / 2),
        sheet(middle + width / 2, away + height / 2),
        sheet(middle - width / 2, away + height / 2),
      ],
      true,
    );
  const down = (away: number, size: number): number => away - (topIsAway ? 1 : -1) * BASE_LINE * size;
  const word = (text: string, middle: number, away: number, sizeMm: number, colour: string): DrawingItem => ({
    kind: 'text',
    at: sheet(middle, down(away, sizeMm)),
    text,
    sizeMm,
    face: 'sans',
    colour,
    anchor: 'middle',
    upwards,
  });
  return [
    {
      kind: 'path',
      paths: [paper(labelMiddle, labelAway, labelWidth, LABEL_SIZE_MM)],
      fill: { kind: 'solid', colour: PAPER },
    },
    {
      kind: 'path',
      paths: [paper(valueMiddle, distanceMm, valueWidth, VALUE_SIZE_MM + FRAME_MM)],
      fill: { kind: 'solid', colour: PAPER },
      ...(dimension.critical ? { pen: { colour: INK, widthMm: 0.25 } } : {}),
    },
    word(dimension.label, labelMiddle, labelAway, LABEL_SIZE_MM, SECOND_INK),
    word(valueText(dimension), valueMiddle, distanceMm, VALUE_SIZE_MM, INK),
  ];
}
