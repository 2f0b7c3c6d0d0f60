// The fields of a brief as a flat list, for help texts.

import {
  allowedValues,
  BAND_FIELDS,
  BOARD_FIELDS,
  BRIEF_FIELDS,
  FEED_FIELDS,
  type Field,
  LAMINATE_FIELDS,
  MATCH_FIELDS,
  PINNED_FEED_FIELDS,
  PINNED_RADIATOR_FIELDS,
  RADIATOR_FIELDS,
} from './fields.ts';

export interface ListedField {
  readonly path: string;
  readonly help: string;
  readonly allowed: string;
  /** In the brief's own words; empty where there is none. */
  readonly fallback: string;
}

const RECORDS: readonly (readonly [prefix: string, fields: Readonly<Record<string, Field>>])[] = [
  ['', BRIEF_FIELDS],
  ['band.', BAND_FIELDS],
  ['match.', MATCH_FIELDS],
  ['laminate.', LAMINATE_FIELDS],
  ['radiator.', RADIATOR_FIELDS],
  ['radiator.pinned.', PINNED_RADIATOR_FIELDS],
  ['feed.', FEED_FIELDS],
  ['feed.pinned.', PINNED_FEED_FIELDS],
  ['board.', BOARD_FIELDS],
];

export function listBriefFields(): readonly ListedField[] {
  return RECORDS.flatMap(([prefix, fields]) =>
    Object.entries(fields).map(([key, field]) => ({
      path: prefix + key,
      help: field.help,
      allowed: allowedValues(field),
      fallback: 'fallback' in field && field.fallback !== undefined ? field.fallback : '',
    })),
  );
}
