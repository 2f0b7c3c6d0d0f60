// An issue of the schema library → a fault in the house's words, naming what is wrong and what is allowed.

import type * as z from 'zod';
import type { Fault } from '../errors.ts';
import { allowedUnits } from '../units.ts';
import {
  allowedValues,
  BAND_FIELDS,
  BOARD_FIELDS,
  BRIEF_FIELDS,
  COPPER_ROW_FIELDS,
  FABRICATOR_FIELDS,
  FEED_FIELDS,
  type Field,
  LAMINATE_FIELDS,
  LEGEND_FIELDS,
  MASK_FIELDS,
  MATCH_FIELDS,
  PINNED_FEED_FIELDS,
  PINNED_RADIATOR_FIELDS,
  PLATED_FIELDS,
  RADIATOR_FIELDS,
} from './fields.ts';
import { nearest } from './nearest.ts';
import type { CheckParams } from './schema.ts';
import { shownText, shownValue } from './text.ts';

/** A record of fields, a list of them, or a field. */
type Node = Field | { readonly [key: string]: Node } | readonly [Node];

const PINNED_BOARD_FIELDS = { width: BOARD_FIELDS.width, length: BOARD_FIELDS.length };
const FINISH: Field = { kind: 'text', label: 'Finish', help: 'A surface finish.', longest: 60 };

const TREE: Node = {
  ...BRIEF_FIELDS,
  band: BAND_FIELDS,
  match: MATCH_FIELDS,
  laminate: LAMINATE_FIELDS,
  radiator: { ...RADIATOR_FIELDS, pinned: PINNED_RADIATOR_FIELDS },
  feed: { ...FEED_FIELDS, pinned: PINNED_FEED_FIELDS },
  board: { ...BOARD_FIELDS, pinned: PINNED_BOARD_FIELDS },
  fabricator: {
    ...FABRICATOR_FIELDS,
    copperRows: [COPPER_ROW_FIELDS],
    mask: MASK_FIELDS,
    legend: LEGEND_FIELDS,
    plated: PLATED_FIELDS,
    finishes: [FINISH],
  },
};

/** Where a piece of JSON stands, so that its faults can be told. */
export interface Place {
  readonly file: string;
  /** Path of the piece within a whole brief, which says what its keys mean. */
  readonly path: readonly string[];
  /** Path of the piece within its own file. */
  readonly pathInFile: readonly string[];
  /** Whether the piece came from a file that the brief refers to: such content is never shown. */
  readonly secret: boolean;
}

type Path = readonly PropertyKey[];

function isField(node: Node | undefined): node is Field {
  return node !== undefined && !Array.isArray(node) && typeof (node as { kind?: unknown }).kind === 'string';
}

function nodeAt(path: Path): Node | undefined {
  let node: Node | undefined = TREE;
  for (const key of path) {
    if (node === undefined || isField(node)) return undefined;
    if (Array.isArray(node)) node = node[0];
    else node = Object.hasOwn(node, key) ? (node as Record<PropertyKey, Node>)[key] : undefined;
  }
  return node;
}

function keysAt(path: Path): readonly string[] {
  const node = nodeAt(path);
  return node === undefined || isField(node) || Array.isArray(node) ? [] : Object.keys(node);
}

function valueAt(value: unknown, path: Path): unknown {
  let here = value;
  for (const key of path) {
    if (typeof here !== 'object' || here === null) return undefined;
    here = (here as Record<PropertyKey, unknown>)[key];
  }
  return here;
}

function shownPath(path: Path): string {
  return path.map((key) => shownText(String(key))).join('.');
}

/** What a place takes, whatever was given there. */
function expectation(path: Path): string {
  if (path.length === 1 && path[0] === 'laminate') return 'takes a catalogue name, a .json file or a record';
  if (path.length === 1 && path[0] === 'fabricator') return 'takes a catalogue name, a .json file or a record';
  const node = nodeAt(path);
  if (isField(node)) {
    if (node.kind === 'quantity') return allowedUnits(node.dimension);
    if (node.kind === 'number') return `takes a number without a unit; ${allowedValues(node)}`;
    return node.kind === 'text' ? 'takes a text in double quotes' : allowedValues(node);
  }
  if (Array.isArray(node)) return 'takes a list';
  return `takes a record with ${keysAt(path).join(', ')}`;
}

function kindOf(value: unknown): string {
  if (value === undefined) return 'is missing';
  if (value === null) return 'is null';
  if (Array.isArray(value)) return 'is a list';
  if (typeof value === 'object') return 'is a record';
  if (typeof value === 'string') return 'is a text';
  return typeof value === 'number' ? 'is a bare number' : `is ${String(value)}`;
}

function typeProblem(value: unknown, path: Path, secret: boolean): string {
  if (value === undefined) return 'is missing';
  const node = nodeAt(path);
  if (typeof value === 'number' && isField(node) && node.kind === 'quantity') {
    return secret ? 'has no unit' : `${value} has no unit`;
  }
  return kindOf(value);
}

/** The branch of a union that the value means to be: a record where it is one, the text otherwise. */
function branchOf(issue: z.core.$ZodIssueInvalidUnion, value: unknown): readonly z.core.$ZodIssue[] | undefined {
  const isRecord = typeof value === 'object' && value !== null && !Array.isArray(value);
  return isRecord ? issue.errors.at(-1) : undefined;
}

/** All faults behind one issue.
 *  @param value  the piece of JSON that the schema was held against */
export function faultsOf(issue: z.core.$ZodIssue, value: unknown, place: Place): readonly Fault[] {
  const path = [...place.path, ...issue.path];
  const given = valueAt(value, issue.path);
  const fault = (code: string, problem: string, allowed: string, key?: string): Fault => ({
    code,
    file: place.file,
    path: shownPath([...place.pathInFile, ...issue.path, ...(key === undefined ? [] : [key])]),
    value: place.secret || key !== undefined ? '' : shownValue(given),
    problem,
    allowed,
  });
  switch (issue.code) {
    case 'unrecognized_keys':
      return issue.keys.map((key) => unknownKey(key, path, place, fault));
    case 'invalid_union': {
      const branch = branchOf(issue, given);
      if (branch === undefined) return [fault('value.type', kindOf(given), expectation(path))];
      return branch.flatMap((inner) => faultsOf({ ...inner, path: [...issue.path, ...inner.path] }, value, place));
    }
    case 'custom': {
      const { code, problem, allowed } = issue.params as unknown as CheckParams;
      return [fault(code, place.secret && problem.includes('"') ? 'is not what is taken here' : problem, allowed)];
    }
    case 'invalid_type':
      return [
        fault(
          given === undefined ? 'value.missing' : 'value.type',
          typeProblem(given, path, place.secret),
          expectation(path),
        ),
      ];
    case 'invalid_value': {
      const problem = given === undefined ? 'is missing' : `"${shownValue(given)}" is not known here`;
      return [fault('value.choice', place.secret ? 'is not known here' : problem, expectation(path))];
    }
    default: {
      const node = nodeAt(path);
      const problem = place.secret ? 'is out of range' : `${shownValue(given)} is out of range`;
      return [fault('value.range', problem, isField(node) ? allowedValues(node) : 'allowed are 1 to 20 entries')];
    }
  }
}

function unknownKey(
  key: string,
  path: Path,
  place: Place,
  fault: (code: string, problem: string, allowed: string, key?: string) => Fault,
): Fault {
  const known = keysAt(path);
  const list = `known are ${known.join(', ')}`;
  if (place.secret) return fault('key.unknown', 'holds a key that is not known', list);
  const close = nearest(key, known);
  return fault(
    'key.unknown',
    'is not a known key',
    close === undefined ? list : `did you mean "${close}"? ${list}`,
    key,
  );
}
