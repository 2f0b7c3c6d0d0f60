// The shape of a brief's JSON, built from the fields; every text with a unit leaves it as an SI number.

import * as z from 'zod';
import { parseQuantity } from '../units.ts';
import {
  allowedValues,
  BAND_FIELDS,
  BOARD_FIELDS,
  BRIEF_FIELDS,
  type ChoiceField,
  COPPER_ROW_FIELDS,
  FABRICATOR_FIELDS,
  FEED_FIELDS,
  inRange,
  LAMINATE_FIELDS,
  LEGEND_FIELDS,
  MASK_FIELDS,
  MATCH_FIELDS,
  type NumberField,
  PINNED_FEED_FIELDS,
  PINNED_OF_FEED,
  PINNED_RADIATOR_FIELDS,
  PLATED_FIELDS,
  type QuantityField,
  RADIATOR_FIELDS,
  type TextField,
} from './fields.ts';
import { characterCount, holdsControlCharacters, shownText } from './text.ts';

/** What a check of our own hands to the fault: carried through the library as the issue's params. */
export interface CheckParams {
  readonly code: string;
  readonly problem: string;
  readonly allowed: string;
}

type Context = z.core.$RefinementCtx<unknown>;

/** @param at  field within the record that the fault is about, where it is not the record itself */
function complain(context: Context, input: unknown, params: CheckParams, at: readonly string[] = []): never {
  const path = [...at];
  context.issues.push({ code: 'custom', input, message: params.problem, params: { ...params }, path });
  return z.NEVER as never;
}

const CONTROL: CheckParams = {
  code: 'text.control',
  problem: 'holds control characters',
  allowed: 'printable text on one line is taken',
};

function describe(field: { readonly label: string; readonly help: string; readonly fallback?: string }) {
  const fallback = field.fallback === undefined ? {} : { examples: [field.fallback] };
  return { title: field.label, description: field.help, ...fallback };
}

function readQuantity(text: string, field: QuantityField, context: Context): number {
  if (holdsControlCharacters(text)) return complain(context, text, CONTROL);
  const parsed = parseQuantity(text, field.dimension);
  if (parsed.kind === 'refused') {
    return complain(context, text, { code: 'quantity.syntax', problem: parsed.problem, allowed: parsed.allowed });
  }
  if (!inRange(field, parsed.value)) {
    const problem = `"${shownText(text)}" is out of range`;
    return complain(context, text, { code: 'value.range', problem, allowed: allowedValues(field) });
  }
  return parsed.value;
}

function quantity(field: QuantityField) {
  return z
    .string()
    .transform((text, context) => readQuantity(text, field, context))
    .meta(describe(field));
}

/** A quantity, or one word that stands for "work it out". */
function quantityOr<Word extends string>(field: QuantityField, word: Word) {
  return z
    .string()
    .transform((text, context): number | Word => (text === word ? word : readQuantity(text, field, context)))
    .meta(describe(field));
}

function number(field: NumberField) {
  return z.number().min(field.minimum).max(field.maximum).meta(describe(field));
}

function text(field: TextField) {
  return z
    .string()
    .transform((value, context): string => {
      if (holdsControlCharacters(value)) return complain(context, value, CONTROL);
      if (characterCount(value) <= field.longest) return value;
      const problem = `has ${characterCount(value)} characters`;
      return complain(context, value, { code: 'text.long', problem, allowed: allowedValues(field) });
    })
    .meta({ ...describe(field), maxLength: field.longest });
}

function choice<const Choices extends readonly [string, ...string[]]>(field: ChoiceField & { choices: Choices }) {
  return z.enum(field.choices).meta(describe(field));
}

export const bandSchema = z
  .strictObject({
    low: quantity(BAND_FIELDS.low).optional(),
    high: quantity(BAND_FIELDS.high).optional(),
    centre: quantity(BAND_FIELDS.centre).optional(),
    width: quantity(BAND_FIELDS.width).optional(),
  })
  .transform((band, context) => {
    const { low, high, centre, width } = band;
    const edges = low !== undefined && high !== undefined;
    const middle = centre !== undefined && width !== undefined;
    const either = '{ "low", "high" } or { "centre", "width" } is taken';
    if (!edges && !middle) {
      return complain(context, band, { code: 'band.incomplete', problem: 'does not name a band', allowed: either });
    }
    if (low !== undefined || high !== undefined ? centre !== undefined || width !== undefined : false) {
      return complain(context, band, { code: 'band.twice', problem: 'names the band twice', allowed: either });
    }
    const lowHz = edges ? low : centre! - width! / 2;
    const highHz = edges ? high : centre! + width! / 2;
    if (!(lowHz < highHz)) {
      const params = { code: 'band.upsideDown', problem: 'the lower edge is not below the upper edge' };
      return complain(context, band, { ...params, allowed: 'low must be less than high' });
    }
    if (!inRange(BAND_FIELDS.low, lowHz) || !inRange(BAND_FIELDS.high, highHz)) {
      const params = { code: 'value.range', problem: 'an edge of the band is out of range' };
      return complain(context, band, { ...params, allowed: allowedValues(BAND_FIELDS.low) });
    }
    return { lowHz, highHz };
  })
  .meta({
    oneOf: [{ required: ['low', 'high'] }, { required: ['centre', 'width'] }],
  });

export const matchSchema = z.strictObject({
  returnLoss: quantity(MATCH_FIELDS.returnLoss).optional(),
  reference: quantity(MATCH_FIELDS.reference).optional(),
});

export const laminateRecordSchema = z.strictObject({
  name: text(LAMINATE_FIELDS.name).optional(),
  permittivity: number(LAMINATE_FIELDS.permittivity),
  permittivityTolerance: number(LAMINATE_FIELDS.permittivityTolerance).optional(),
  lossTangent: number(LAMINATE_FIELDS.lossTangent),
  thickness: quantity(LAMINATE_FIELDS.thickness),
  thicknessTolerance: quantity(LAMINATE_FIELDS.thicknessTolerance).optional(),
  copperThickness: quantity(LAMINATE_FIELDS.copperThickness).optional(),
  copperBase: quantity(LAMINATE_FIELDS.copperBase).optional(),
  conductivity: quantity(LAMINATE_FIELDS.conductivity).optional(),
  roughness: quantity(LAMINATE_FIELDS.roughness).optional(),
});

export const radiatorSchema = z.strictObject({
  family: choice(RADIATOR_FIELDS.family).optional(),
  pinned: z
    .strictObject({
      length: quantity(PINNED_RADIATOR_FIELDS.length).optional(),
      width: quantity(PINNED_RADIATOR_FIELDS.width).optional(),
    })
    .optional(),
});

const pinnedFeedSchema = z.strictObject({
  insetDepth: quantity(PINNED_FEED_FIELDS.insetDepth).optional(),
  notchGap: quantity(PINNED_FEED_FIELDS.notchGap).optional(),
  lineWidth: quantity(PINNED_FEED_FIELDS.lineWidth).optional(),
  lineWidthInNotch: quantity(PINNED_FEED_FIELDS.lineWidthInNotch).optional(),
  lineLength: quantity(PINNED_FEED_FIELDS.lineLength).optional(),
  transformerWidth: quantity(PINNED_FEED_FIELDS.transformerWidth).optional(),
  transformerLength: quantity(PINNED_FEED_FIELDS.transformerLength).optional(),
  offset: quantity(PINNED_FEED_FIELDS.offset).optional(),
  pinDiameter: quantity(PINNED_FEED_FIELDS.pinDiameter).optional(),
  holeDiameter: quantity(PINNED_FEED_FIELDS.holeDiameter).optional(),
  padDiameter: quantity(PINNED_FEED_FIELDS.padDiameter).optional(),
  clearanceDiameter: quantity(PINNED_FEED_FIELDS.clearanceDiameter).optional(),
});

export const feedSchema = z
  .strictObject({
    kind: choice(FEED_FIELDS.kind).optional(),
    plated: z
      .boolean()
      .meta({ title: 'Plated', description: "Whether a probe's hole is plated; not, where left out." })
      .optional(),
    pinned: pinnedFeedSchema.optional(),
  })
  .transform((feed, context) => {
    const kind = feed.kind ?? FEED_FIELDS.kind.fallback;
    const own: readonly string[] = PINNED_OF_FEED[kind];
    const stranger = Object.keys(feed.pinned ?? {}).find((key) => !own.includes(key));
    if (stranger !== undefined) {
      const params = { code: 'feed.pinned', problem: `a feed of kind "${kind}" has no such dimension` };
      return complain(context, feed, { ...params, allowed: `allowed are ${own.join(', ')}` }, ['pinned', stranger]);
    }
    if (feed.plated !== undefined && kind !== 'probe') {
      const params = { code: 'feed.plated', problem: `a feed of kind "${kind}" has no hole` };
      return complain(context, feed, { ...params, allowed: 'only a probe may be plated' }, ['plated']);
    }
    return feed;
  });

export const boardSchema = z
  .strictObject({
    margin: quantityOr(BOARD_FIELDS.margin, 'auto').optional(),
    width: quantity(BOARD_FIELDS.width).optional(),
    length: quantity(BOARD_FIELDS.length).optional(),
    cornerRadius: quantity(BOARD_FIELDS.cornerRadius).optional(),
    pinned: z
      .strictObject({
        width: quantity(BOARD_FIELDS.width).optional(),
        length: quantity(BOARD_FIELDS.length).optional(),
      })
      .optional(),
  })
  .transform((board, context) => {
    for (const key of ['width', 'length'] as const) {
      if (board[key] !== undefined && board.pinned?.[key] !== undefined) {
        const params = { code: 'board.twice', problem: `the board's ${key} is given twice` };
        return complain(context, board, { ...params, allowed: `"${key}" or "pinned.${key}" is taken` }, [key]);
      }
    }
    const width = board.width ?? board.pinned?.width;
    const length = board.length ?? board.pinned?.length;
    if (width !== undefined && length !== undefined && board.margin !== undefined && board.margin !== 'auto') {
      const params = { code: 'board.margin', problem: 'a margin beside both width and length says it twice' };
      const allowed = 'leave out the margin, or the width or the length';
      return complain(context, board, { ...params, allowed }, ['margin']);
    }
    const radius = board.cornerRadius ?? 0;
    if (Math.min(width ?? Number.POSITIVE_INFINITY, length ?? Number.POSITIVE_INFINITY) < 2 * radius) {
      const params = { code: 'board.cornerRadius', problem: 'the corners do not fit on the board' };
      return complain(context, board, { ...params, allowed: 'allowed is up to half of the shorter side' }, [
        'cornerRadius',
      ]);
    }
    return { margin: board.margin, width, length, cornerRadius: board.cornerRadius };
  });

const copperRowSchema = z.strictObject({
  base: quantity(COPPER_ROW_FIELDS.base),
  trace: quantity(COPPER_ROW_FIELDS.trace),
  space: quantity(COPPER_ROW_FIELDS.space),
  ring: quantity(COPPER_ROW_FIELDS.ring),
});

/** More rows or finishes than any shop has. */
const LONGEST_LIST = 20;

export const fabricatorRecordSchema = z.strictObject({
  name: text(FABRICATOR_FIELDS.name).optional(),
  copperRows: z
    .array(copperRowSchema)
    .min(1)
    .max(LONGEST_LIST)
    .transform((rows, context) => {
      if (rows.every((row, i) => i === 0 || row.base > rows[i - 1]!.base)) return rows;
      const params = { code: 'fabricator.copperRows', problem: 'the rows do not stand in order' };
      return complain(context, rows, { ...params, allowed: 'each base must be heavier than the one before' });
    })
    .meta({ title: 'Copper', description: 'One row for each weight of base copper, lightest first.' }),
  edgeTolerance: quantity(FABRICATOR_FIELDS.edgeTolerance).optional(),
  etchCompensation: choice(FABRICATOR_FIELDS.etchCompensation).optional(),
  copperToEdge: quantity(FABRICATOR_FIELDS.copperToEdge),
  boardMaxWidth: quantity(FABRICATOR_FIELDS.boardMaxWidth).optional(),
  boardMaxLength: quantity(FABRICATOR_FIELDS.boardMaxLength).optional(),
  outlineTolerance: quantity(FABRICATOR_FIELDS.outlineTolerance).optional(),
  registration: quantity(FABRICATOR_FIELDS.registration).optional(),
  minimumInnerRadius: quantity(FABRICATOR_FIELDS.minimumInnerRadius).nullable().optional(),
  mask: z
    .strictObject({ expansion: quantity(MASK_FIELDS.expansion), web: quantity(MASK_FIELDS.web) })
    .nullable()
    .optional(),
  legend: z
    .strictObject({ line: quantity(LEGEND_FIELDS.line), height: quantity(LEGEND_FIELDS.height) })
    .nullable()
    .optional(),
  plated: z
    .strictObject({
      minimumHole: quantity(PLATED_FIELDS.minimumHole),
      largestHole: quantity(PLATED_FIELDS.largestHole),
      aspectRatio: number(PLATED_FIELDS.aspectRatio),
    })
    .nullable()
    .optional(),
  minimumUnplatedHole: quantity(FABRICATOR_FIELDS.minimumUnplatedHole).optional(),
  unplatedHoleToCopper: quantity(FABRICATOR_FIELDS.unplatedHoleToCopper).optional(),
  unplatedRing: quantity(FABRICATOR_FIELDS.unplatedRing).optional(),
  holeTolerance: quantity(FABRICATOR_FIELDS.holeTolerance).optional(),
  drillStep: quantity(FABRICATOR_FIELDS.drillStep).nullable().optional(),
  finishes: z
    .array(text({ kind: 'text', label: 'Finish', help: 'A surface finish.', longest: 60 }))
    .max(LONGEST_LIST)
    .optional(),
});

const reference = z
  .string()
  .meta({ description: 'A name from the catalogue, or a file ending in .json beside the brief.' });

/** Every key of a brief with the schema of its value. */
export const BRIEF_SHAPE = {
  format: choice(BRIEF_FIELDS.format).optional(),
  title: text(BRIEF_FIELDS.title).optional(),
  band: bandSchema,
  match: matchSchema.optional(),
  polarization: choice(BRIEF_FIELDS.polarization).optional(),
  laminate: z.union([reference, laminateRecordSchema]),
  radiator: radiatorSchema.optional(),
  feed: feedSchema.optional(),
  board: boardSchema.optional(),
  fabricator: z.union([reference, fabricatorRecordSchema]).optional(),
} as const;

export const briefSchema = z.strictObject(BRIEF_SHAPE);

export type LaminateRecord = z.output<typeof laminateRecordSchema>;
export type FabricatorRecord = z.output<typeof fabricatorRecordSchema>;
