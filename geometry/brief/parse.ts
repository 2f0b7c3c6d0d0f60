// JSON text → Brief, or every fault of it at once.

import type * as z from 'zod';
import { EngineError, type Fault, invariant } from '../errors.ts';
import { findFabricator, listFabricators } from '../fabricator/catalogue.ts';
import type { Fabricator } from '../fabricator/fabricator.ts';
import { findLaminate, listLaminates } from '../laminate/catalogue.ts';
import type { Laminate } from '../laminate/laminate.ts';
import type { Brief, FeedWish, PinnedRadiator } from './brief.ts';
import { completeFabricator, completeLaminate, FALLBACK_FABRICATOR, fallbackOf, type Take } from './complete.ts';
import { faultsOf, type Place } from './faults.ts';
import { BOARD_FIELDS, BRIEF_FIELDS, FEED_FIELDS, MATCH_FIELDS, RADIATOR_FIELDS } from './fields.ts';
import { LARGEST_INPUT_BYTES, readJson } from './json-text.ts';
import { nearest } from './nearest.ts';
import { BRIEF_SHAPE, briefSchema, fabricatorRecordSchema, laminateRecordSchema } from './schema.ts';
import { holdsControlCharacters, shownText } from './text.ts';

export interface ParseContext {
  /** The file as the user named it; it heads every fault. */
  readonly file: string;
  /** Content of a file that the brief refers to. Throws EngineError where it cannot be had. */
  readonly resolve: (reference: string) => string;
}

function isTooLarge(text: string): boolean {
  return text.length > LARGEST_INPUT_BYTES || new TextEncoder().encode(text).length > LARGEST_INPUT_BYTES;
}

/** JSON of a size that is worth reading. */
function readInput(text: string, file: string): unknown {
  if (isTooLarge(text)) {
    const problem = 'is larger than 1 MB';
    throw new EngineError([
      { code: 'file.large', file, path: '', value: '', problem, allowed: 'allowed is up to 1 MB' },
    ]);
  }
  return readJson(text, file);
}

/** Whether a reference stays, as text, under the folder of the brief; links are the platform's business. */
function isContained(reference: string): boolean {
  if (holdsControlCharacters(reference) || /^[/\\~]|[\\:]/.test(reference)) return false;
  return !reference.split('/').includes('..');
}

interface Reading {
  readonly context: ParseContext;
  readonly faults: Fault[];
  readonly defaults: { readonly path: string; readonly value: string }[];
}

/** Takes defaults of one section of the brief. */
function takerFor(reading: Reading, section: string): Take {
  return (path, given, fallback, written) => {
    if (given !== undefined) return given;
    reading.defaults.push({ path: section === '' ? path : `${section}.${path}`, value: written });
    return fallback;
  };
}

/** Holds a piece of JSON against its schema; faults go to the reading. */
function check<Schema extends z.ZodType>(
  reading: Reading,
  schema: Schema,
  value: unknown,
  place: Place,
): z.output<Schema> | undefined {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  reading.faults.push(...result.error.issues.flatMap((issue) => faultsOf(issue, value, place)));
  return undefined;
}

/** What may stand in for a whole record: its name in a catalogue, or a file. */
interface Kind<Full, Schema extends z.ZodType> {
  readonly section: 'laminate' | 'fabricator';
  readonly schema: Schema;
  readonly find: (name: string) => Full | undefined;
  readonly names: () => readonly string[];
  readonly complete: (record: z.output<Schema>, take: Take) => Full;
}

const laminateKind: Kind<Laminate, typeof laminateRecordSchema> = {
  section: 'laminate',
  schema: laminateRecordSchema,
  find: (name) => findLaminate(name)?.laminate,
  names: () => listLaminates().map(({ laminate }) => laminate.name),
  complete: completeLaminate,
};

const fabricatorKind: Kind<Fabricator, typeof fabricatorRecordSchema> = {
  section: 'fabricator',
  schema: fabricatorRecordSchema,
  find: (name) => findFabricator(name)?.fabricator,
  names: () => listFabricators().map(({ fabricator }) => fabricator.name),
  complete: completeFabricator,
};

function fault(reading: Reading, path: string, code: string, value: string, problem: string, allowed: string): void {
  reading.faults.push({ code, file: reading.context.file, path, value, problem, allowed });
}

function readReference<Full, Schema extends z.ZodType>(
  reading: Reading,
  reference: string,
  kind: Kind<Full, Schema>,
): Full | undefined {
  const { section } = kind;
  if (!isContained(reference)) {
    const problem = `"${shownText(reference)}" leaves the folder of the brief`;
    const allowed = 'a file reference is relative, with "/" between folders, and stays under the folder of the brief';
    fault(reading, section, 'reference.outside', shownText(reference), problem, allowed);
    return undefined;
  }
  try {
    const value = readInput(reading.context.resolve(reference), reference);
    const place: Place = { file: reference, path: [section], pathInFile: [], secret: true };
    const record = check(reading, kind.schema, value, place);
    return record === undefined ? undefined : kind.complete(record, takerFor(reading, section));
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    reading.faults.push(
      ...error.faults.map((inner) =>
        inner.file === '' ? { ...inner, file: reading.context.file, path: section } : inner,
      ),
    );
    return undefined;
  }
}

function readNamed<Full, Schema extends z.ZodType>(
  reading: Reading,
  value: unknown,
  kind: Kind<Full, Schema>,
): Full | undefined {
  const { section } = kind;
  if (typeof value !== 'string') {
    const schema = typeof value === 'object' && value !== null ? kind.schema : BRIEF_SHAPE[section];
    const place: Place = { file: reading.context.file, path: [section], pathInFile: [section], secret: false };
    const record = check(reading, schema, value, place);
    return record === undefined ? undefined : kind.complete(record as z.output<Schema>, takerFor(reading, section));
  }
  if (value.endsWith('.json')) return readReference(reading, value, kind);
  const found = kind.find(value);
  if (found === undefined) {
    const close = nearest(value, kind.names());
    const allowed = `did you mean "${close}"? "etchwave catalogue" lists all names; a file ends in .json`;
    fault(
      reading,
      section,
      `${section}.unknown`,
      shownText(value),
      `"${shownText(value)}" is not in the catalogue`,
      allowed,
    );
  }
  return found;
}

/** What no single field can say about a laminate. */
function checkLaminate(reading: Reading, laminate: Laminate): void {
  const { permittivity, permittivityTolerance, thicknessM, thicknessToleranceM, copperThicknessM, copperBaseM } =
    laminate;
  const complain = (key: string, problem: string, allowed: string): void =>
    fault(reading, `laminate.${key}`, 'value.range', '', problem, allowed);
  if (permittivity - permittivityTolerance < 1) {
    complain('permittivityTolerance', 'reaches below a permittivity of 1', 'allowed is up to the permittivity less 1');
  }
  if (thicknessToleranceM > thicknessM / 2) {
    complain('thicknessTolerance', 'is more than half of the thickness', 'allowed is up to half of the thickness');
  }
  // Base copper can lose a little in cleaning, not a fifth.
  if (copperBaseM > 1.2 * copperThicknessM) {
    complain('copperBase', 'is heavier than the finished copper', 'allowed is up to 1.2 times "copperThickness"');
  }
}

/** A record with the unit put back on the keys, and without what is undefined. */
function withUnit(pinned: Readonly<Record<string, number | undefined>> | undefined): Readonly<Record<string, number>> {
  const entries: [string, number][] = [];
  for (const [key, value] of Object.entries(pinned ?? {})) if (value !== undefined) entries.push([`${key}M`, value]);
  return Object.fromEntries(entries);
}

type Sections = {
  -readonly [Key in keyof typeof BRIEF_SHAPE]: z.output<(typeof BRIEF_SHAPE)[Key]> | undefined;
};

function readSections(reading: Reading, record: Readonly<Record<string, unknown>>): Sections {
  const { file } = reading.context;
  const sections: Record<string, unknown> = {};
  for (const key of Object.keys(BRIEF_SHAPE) as (keyof typeof BRIEF_SHAPE)[]) {
    if (key === 'laminate' || key === 'fabricator') continue;
    const place: Place = { file, path: [key], pathInFile: [key], secret: false };
    sections[key] = check(reading, BRIEF_SHAPE[key], record[key], place);
  }
  return sections as Sections;
}

/** The feed with its own dimensions; that they are its own has been checked. */
function feedWish(feed: Sections['feed'], take: Take): FeedWish {
  const kind = feed?.kind ?? FEED_FIELDS.kind.fallback;
  const pinned = withUnit(feed?.pinned);
  if (kind !== 'probe') return { kind, pinned };
  return { kind, pinned, plated: take('feed.plated', feed?.plated, false, 'false') };
}

function assemble(reading: Reading, sections: Sections, laminate: Laminate, fabricator: Fabricator): Brief {
  const { band, match, board, radiator, feed } = sections;
  invariant(band !== undefined, 'a brief without faults has a band');
  const take = takerFor(reading, '');
  const text = (path: string, given: string | undefined, fallback: string): string =>
    take(path, given, fallback, fallback);
  const loss = fallbackOf(MATCH_FIELDS.returnLoss);
  const reference = fallbackOf(MATCH_FIELDS.reference);
  const corner = fallbackOf(BOARD_FIELDS.cornerRadius);
  text('format', sections.format, BRIEF_FIELDS.format.fallback);
  const title = text('title', sections.title, BRIEF_FIELDS.title.fallback);
  const sized = board?.width !== undefined && board.length !== undefined;
  text('polarization', sections.polarization, BRIEF_FIELDS.polarization.fallback);
  text('radiator.family', radiator?.family, RADIATOR_FIELDS.family.fallback);
  text('feed.kind', feed?.kind, FEED_FIELDS.kind.fallback);
  return {
    kind: 'brief',
    title,
    band,
    match: {
      returnLossDb: take('match.returnLoss', match?.returnLoss, loss.value, loss.written),
      referenceOhm: take('match.reference', match?.reference, reference.value, reference.written),
    },
    polarization: 'linear',
    laminate,
    radiator: { family: 'rectangular', pinned: withUnit(radiator?.pinned) as PinnedRadiator },
    feed: feedWish(feed, take),
    board: {
      marginM: sized ? 'auto' : take('board.margin', board?.margin, 'auto', 'auto'),
      ...withUnit({ width: board?.width, length: board?.length }),
      cornerRadiusM: take('board.cornerRadius', board?.cornerRadius, corner.value, corner.written),
    },
    fabricator,
    defaults: [...reading.defaults],
  };
}

/** Reads a brief. All faults are reported together; what is left out takes its default, listed in `defaults`.
 *  Throws: EngineError with every fault as `file: path.to.field: what is wrong; what is allowed` */
export function parseBrief(text: string, context: ParseContext): Brief {
  const reading: Reading = { context, faults: [], defaults: [] };
  const value = readInput(text, context.file);
  const whole: Place = { file: context.file, path: [], pathInFile: [], secret: false };
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    check(reading, briefSchema, value, whole);
    throw new EngineError(reading.faults);
  }
  const record = value as Readonly<Record<string, unknown>>;
  const strangers = Object.keys(record).filter((key) => !Object.hasOwn(BRIEF_SHAPE, key));
  if (strangers.length > 0) {
    const issue = { code: 'unrecognized_keys', keys: strangers, path: [], message: '' } as const;
    reading.faults.push(...faultsOf({ ...issue, keys: [...strangers], path: [] }, value, whole));
  }
  const sections = readSections(reading, record);
  const laminate = readNamed(reading, record.laminate, laminateKind);
  if (laminate !== undefined) checkLaminate(reading, laminate);
  const chosen = takerFor(reading, '')('fabricator', record.fabricator, FALLBACK_FABRICATOR, FALLBACK_FABRICATOR);
  const fabricator = readNamed(reading, chosen, fabricatorKind);
  if (reading.faults.length > 0) throw new EngineError(reading.faults);
  invariant(laminate !== undefined && fabricator !== undefined, 'a brief without faults has laminate and fabricator');
  return assemble(reading, sections, laminate, fabricator);
}
