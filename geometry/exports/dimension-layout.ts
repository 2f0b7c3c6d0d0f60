// Puts dimension lines round a board: short ones near it, long ones outside, no two on top of each other.
//
//        side 'above'            Along a side, u runs with the axis and v away from the board.
//     +----------------+         A line whose text fits between its arrows carries it there;
//  l  |                |  r      a shorter one has its arrows outside and the text beside them.
//     +----------------+
//        side 'below'

import type { Artwork, Dimension } from '../artwork/artwork.ts';
import { textWidthMm } from './text-width.ts';
import { millimetres, mmFromNm } from './wording.ts';

export type Side = 'above' | 'below' | 'left' | 'right';

/** One dimension with its place; lengths on the sheet, from the board's lower left corner [mm]. */
export interface PlacedDimension {
  readonly dimension: Dimension;
  readonly side: Side;
  /** Ends of the dimension line along the side, ascending. */
  readonly startMm: number;
  readonly endMm: number;
  /** Distance of the line from the board's edge. */
  readonly distanceMm: number;
  /** Where the text stands: between the arrows, or beside the arrow at the end or the start. */
  readonly text: 'between' | 'after' | 'before';
  /** How far inside the board's edge the two extension lines begin, in the order of startMm and endMm. */
  readonly depthStartMm: number;
  readonly depthEndMm: number;
}

export interface DimensionLayout {
  readonly placed: readonly PlacedDimension[];
  /** Room that board and dimensions take, from the board's lower left corner [mm]. */
  readonly leftMm: number;
  readonly rightMm: number;
  readonly bottomMm: number;
  readonly topMm: number;
}

export const VALUE_SIZE_MM = 3;
export const LABEL_SIZE_MM = 2.3;
export const ARROW_MM = 2.2;
/** Between a value and the frame round it. */
export const FRAME_MM = 0.8;
/** Between a label and the value after it. */
export const LABEL_GAP_MM = 1.5;
/** Length of the tails that carry arrows from outside. */
export const TAIL_MM = 5;

const FIRST_LINE_MM = 8;
const NEXT_LINE_MM = 9;
const CLEARANCE_MM = 2.5;
/** Rounding of one tip against the next. */
const TOUCH_MM = 1e-6;
/** What the outermost line needs beyond itself for its label. */
const OUTER_ROOM_MM = 5.5;

export function valueText(dimension: Dimension): string {
  return millimetres(dimension.valueNm);
}

/** Widths of the texts of a dimension, with the frame [mm]. */
export function valueWidthMm(dimension: Dimension): number {
  return textWidthMm(valueText(dimension), VALUE_SIZE_MM) + 2 * FRAME_MM;
}

export function labelWidthMm(dimension: Dimension): number {
  return textWidthMm(dimension.label, LABEL_SIZE_MM);
}

/** Lays out every dimension of an artwork at a scale (millimetres on paper for one of board). */
export function layOutDimensions(artwork: Artwork, scale: number): DimensionLayout {
  const shortFirst = [...artwork.dimensions].sort((a, b) => a.valueNm - b.valueNm);
  const rows: Record<Side, Row[]> = { above: [], below: [], left: [], right: [] };
  const placed = shortFirst.map((dimension) => place(dimension, artwork, scale, rows));

  const widthMm = mmFromNm(artwork.board.widthNm) * scale;
  const lengthMm = mmFromNm(artwork.board.lengthNm) * scale;
  const alongX = [...rows.above, ...rows.below].flat();
  const alongY = [...rows.left, ...rows.right].flat();
  return {
    placed,
    leftMm: Math.min(-depthOf(rows.left), ...alongX.map((span) => span.fromMm)),
    rightMm: Math.max(widthMm + depthOf(rows.right), ...alongX.map((span) => span.toMm)),
    bottomMm: Math.min(-depthOf(rows.below), ...alongY.map((span) => span.fromMm)),
    topMm: Math.max(lengthMm + depthOf(rows.above), ...alongY.map((span) => span.toMm)),
  };
}

interface Span {
  readonly text: PlacedDimension['text'];
  readonly fromMm: number;
  readonly toMm: number;
}

type Row = readonly Span[];

function depthOf(rows: readonly Row[]): number {
  return rows.length === 0 ? 0 : FIRST_LINE_MM + (rows.length - 1) * NEXT_LINE_MM + OUTER_ROOM_MM;
}

/** The side nearest to the feature: a dimension measured along x stands above or below, one along y left or right. */
function sideOf(dimension: Dimension, artwork: Artwork): Side {
  const { from, to } = dimension;
  if (dimension.axis === 'x') return from.yNm + to.yNm > artwork.board.lengthNm ? 'above' : 'below';
  return from.xNm + to.xNm > artwork.board.widthNm ? 'right' : 'left';
}

function place(
  dimension: Dimension,
  artwork: Artwork,
  scale: number,
  rows: Readonly<Record<Side, Row[]>>,
): PlacedDimension {
  const side = sideOf(dimension, artwork);
  const onX = dimension.axis === 'x';
  const ends = [dimension.from, dimension.to]
    .map((end) => ({
      alongMm: mmFromNm(onX ? end.xNm : end.yNm) * scale,
      depthMm: depthBehind(side, end, artwork) * scale,
    }))
    .sort((a, b) => a.alongMm - b.alongMm);
  const [start, end] = ends as [(typeof ends)[0], (typeof ends)[0]];
  const spanMm = end.alongMm - start.alongMm;

  const between = Math.max(valueWidthMm(dimension) + 2 * ARROW_MM + 1, labelWidthMm(dimension)) <= spanMm;
  const besideMm = TAIL_MM + 1 + labelWidthMm(dimension) + LABEL_GAP_MM + valueWidthMm(dimension);
  const choices: readonly Span[] = between
    ? [{ text: 'between', fromMm: start.alongMm, toMm: end.alongMm }]
    : [
        { text: 'after', fromMm: start.alongMm - TAIL_MM, toMm: end.alongMm + besideMm },
        { text: 'before', fromMm: start.alongMm - besideMm, toMm: end.alongMm + TAIL_MM },
      ];

  for (let level = 0; ; level++) {
    const row = rows[side][level] ?? [];
    const choice = choices.find((span) => row.every((other) => apart(span, other)));
    if (choice === undefined) continue;
    rows[side][level] = [...row, choice];
    return {
      dimension,
      side,
      startMm: start.alongMm,
      endMm: end.alongMm,
      distanceMm: FIRST_LINE_MM + level * NEXT_LINE_MM,
      text: choice.text,
      depthStartMm: start.depthMm,
      depthEndMm: end.depthMm,
    };
  }
}

/** Two lines that carry their texts between their arrows may meet tip to tip, as a chain; others keep a distance. */
function apart(a: Span, b: Span): boolean {
  const clearanceMm = a.text === 'between' && b.text === 'between' ? -TOUCH_MM : CLEARANCE_MM;
  return a.toMm + clearanceMm <= b.fromMm || b.toMm + clearanceMm <= a.fromMm;
}

/** Distance of a point from the board's edge at a side, inwards [mm of board]. */
function depthBehind(side: Side, end: Dimension['from'], { board }: Artwork): number {
  switch (side) {
    case 'above':
      return mmFromNm(board.lengthNm - end.yNm);
    case 'below':
      return mmFromNm(end.yNm);
    case 'left':
      return mmFromNm(end.xNm);
    case 'right':
      return mmFromNm(board.widthNm - end.xNm);
  }
}
