// The right-hand column of the drawing: notes and prediction, the stack-up, the title block.

import { at, type DrawingItem, type Face, polyline, rectangle } from './display-list.ts';
import type { ExportInput } from './exporter.ts';
import { boardThicknessM, predictionSentence, shortfalls, standingNotes } from './fabrication-statements.ts';
import { COPPER_EDGE, COPPER_FILL, INK, RULE, SECOND_INK } from './inks.ts';
import { textWidthMm, wrapMm } from './text-width.ts';
import { micrometresOf, millimetresOf } from './wording.ts';

/** Width of the column. */
export const COLUMN_MM = 88;

export interface ColumnPlace {
  readonly leftMm: number;
  readonly bottomMm: number;
  readonly heightMm: number;
  readonly scaleText: string;
  readonly sheetName: string;
}

const PADDING_MM = 4;
const TEXT_MM = COLUMN_MM - 2 * PADDING_MM;
const STACK_MM = 27;
const THIN = { colour: RULE, widthMm: 0.2 };

/** Draws the column from the bottom up: title block, stack-up, and in what is left the notes. */
export function drawColumn(input: ExportInput, place: ColumnPlace): readonly DrawingItem[] {
  const top = place.bottomMm + place.heightMm;
  const block = titleBlock(input, place);
  const stackBottom = place.bottomMm + block.heightMm;
  return [
    { kind: 'path', paths: [polyline([at(place.leftMm, place.bottomMm), at(place.leftMm, top)])], pen: THIN },
    ...block.items,
    ...stackUp(input, place.leftMm, stackBottom),
    ...notes(input, place.leftMm, stackBottom + STACK_MM, top),
  ];
}

function ruleAcross(leftMm: number, yMm: number): DrawingItem {
  return { kind: 'path', paths: [polyline([at(leftMm, yMm), at(leftMm + COLUMN_MM, yMm)])], pen: THIN };
}

function text(xMm: number, yMm: number, words: string, sizeMm: number, face: Face = 'sans', colour = INK): DrawingItem {
  return { kind: 'text', at: at(xMm, yMm), text: words, sizeMm, face, colour, anchor: 'start' };
}

/** One cell of the title block: a small label above its value; widths are parts of the row. */
interface Cell {
  readonly label: string;
  readonly value: string;
  readonly part: number;
}

function titleBlock(input: ExportInput, place: ColumnPlace): { items: readonly DrawingItem[]; heightMm: number } {
  const { artwork, brief } = input;
  const { laminate, fabricator } = brief;
  const rows: readonly (readonly Cell[])[] = [
    [
      { label: 'scale', value: place.scaleText, part: 0.2 },
      { label: 'sheet', value: `${place.sheetName}, 1 of 1`, part: 0.25 },
      { label: 'units', value: 'mm', part: 0.15 },
      { label: 'view', value: 'seen from the top', part: 0.4 },
    ],
    [
      { label: 'build and revision', value: artwork.buildId, part: 0.45 },
      { label: 'fabricator profile', value: fabricator.name, part: 0.55 },
    ],
    [
      { label: 'thickness over copper', value: `${millimetresOf(boardThicknessM(input))} mm`, part: 0.45 },
      {
        label: 'copper, finished (base)',
        value: `${micrometresOf(laminate.copperThicknessM)} (${micrometresOf(laminate.copperBaseM)}) µm`,
        part: 0.55,
      },
    ],
    [{ label: 'laminate, no substitution', value: laminate.name, part: 1 }],
  ];
  const items: DrawingItem[] = [];
  let y = place.bottomMm;
  for (const row of rows) {
    // A row is as tall as its tallest cell.
    const wrapped = row.map((cell) => wrapMm(cell.value, 2.9, cell.part * COLUMN_MM - 5));
    const height = 5 + 3.7 * Math.max(...wrapped.map((lines) => lines.length));
    let x = place.leftMm;
    row.forEach((cell, column) => {
      items.push(text(x + 2.5, y + height - 3.2, cell.label, 2, 'sans', SECOND_INK));
      wrapped[column]!.forEach((line, index) => {
        items.push(text(x + 2.5, y + height - 6.6 - 3.7 * index, line, 2.9));
      });
      if (x > place.leftMm) items.push({ kind: 'path', paths: [polyline([at(x, y), at(x, y + height)])], pen: THIN });
      x += cell.part * COLUMN_MM;
    });
    y += height;
    items.push(ruleAcross(place.leftMm, y));
  }
  const size = textWidthMm(artwork.title, 4.6) <= 2 * TEXT_MM ? 4.6 : 3.6;
  const title = wrapMm(artwork.title, size, TEXT_MM);
  y += 3.4 + (title.length - 1) * size * 1.25;
  title.forEach((line, index) => {
    items.push(text(place.leftMm + PADDING_MM, y - index * size * 1.25, line, size, 'serif'));
  });
  y += size + 2;
  items.push({
    kind: 'path',
    paths: [polyline([at(place.leftMm, y), at(place.leftMm + COLUMN_MM, y)])],
    pen: { colour: INK, widthMm: 0.35 },
  });
  return { items, heightMm: y - place.bottomMm };
}

/** A section through the board, thicknesses not to scale. */
function stackUp({ artwork, brief }: ExportInput, leftMm: number, bottomMm: number): readonly DrawingItem[] {
  const { laminate } = brief;
  const x = leftMm + PADDING_MM;
  const y = bottomMm + 4;
  const words = x + 22;
  const copper = `${micrometresOf(laminate.copperThicknessM)} µm`;
  const tolerance = laminate.thicknessToleranceM > 0 ? ` ± ${millimetresOf(laminate.thicknessToleranceM)}` : '';
  const spread = laminate.permittivityTolerance > 0 ? ` ± ${laminate.permittivityTolerance}` : '';
  const pen = { colour: COPPER_EDGE, widthMm: 0.2 };
  return [
    text(x, bottomMm + STACK_MM - 6, 'Stack-up', 3.6, 'serif-italic'),
    text(x + 22, bottomMm + STACK_MM - 6, 'not to scale', 2.2, 'sans', SECOND_INK),
    { kind: 'path', paths: [rectangle(x, y + 2, 18, 9)], pen: { colour: INK, widthMm: 0.2 } },
    { kind: 'path', paths: [rectangle(x + 4, y + 11, 10, 1.8)], pen, fill: COPPER_FILL },
    { kind: 'path', paths: [rectangle(x, y + 0.2, 18, 1.8)], pen, fill: COPPER_FILL },
    text(words, y + 11, `top copper ${copper}: antenna`, 2.5),
    text(words, y + 7.2, `dielectric ${millimetresOf(laminate.thicknessM)}${tolerance} mm`, 2.5),
    text(words, y + 3.8, `permittivity ${laminate.permittivity}${spread}, loss tangent ${laminate.lossTangent}`, 2.5),
    text(words, y + 0.2, `bottom copper ${copper}: ground`, 2.5),
    text(
      words,
      y - 2.6,
      artwork.hasSolderMask ? 'solder mask both sides, open as drawn' : 'no solder mask',
      2.2,
      'sans',
      SECOND_INK,
    ),
    ruleAcross(leftMm, bottomMm + STACK_MM),
  ];
}

/** The notes in the largest type that fits; those that fit in none are left to FABRICATION.txt, and the last line says so. */
function notes(input: ExportInput, leftMm: number, bottomMm: number, topMm: number): readonly DrawingItem[] {
  const missed = shortfalls(input);
  const paragraphs = [
    ...missed.map((sentence) => ({ lead: '!', words: `Not met: ${sentence}` })),
    ...standingNotes(input).map((words, index) => ({ lead: String(index + 1), words })),
    { lead: '', words: predictionSentence(input) },
  ];
  const head = 9;
  const roomMm = topMm - bottomMm - head - 3;
  const indent = 5;
  const wrapAll = (size: number) =>
    paragraphs.map(({ lead, words }) => ({ lead, lines: wrapMm(words, size, TEXT_MM - indent) }));
  const heightOf = (wrapped: ReturnType<typeof wrapAll>, size: number): number =>
    wrapped.reduce((sum, { lines }) => sum + lines.length * size * 1.32 + size * 0.45, 0);
  const size = [2.8, 2.6, 2.4, 2.2, 2].find((candidate) => heightOf(wrapAll(candidate), candidate) <= roomMm) ?? 2;

  const items: DrawingItem[] = [text(leftMm + PADDING_MM, topMm - 6.5, 'Notes', 4.4, 'serif-italic')];
  let y = topMm - head;
  for (const { lead, lines } of wrapAll(size)) {
    if (y - lines.length * size * 1.32 < bottomMm + 4) {
      items.push(text(leftMm + PADDING_MM + indent, y - size, 'More in FABRICATION.txt.', size));
      break;
    }
    if (lead !== '') items.push(text(leftMm + PADDING_MM, y - size, lead, size, lead === '!' ? 'sans-bold' : 'sans'));
    for (const line of lines) {
      y -= size * 1.32;
      items.push(text(leftMm + PADDING_MM + indent, y + size * 0.32, line, size));
    }
    y -= size * 0.45;
  }
  return items;
}
