// The name of one build, and the other identifiers that follow from it; nothing here is random or knows the time.

import type { Platform } from './exporter.ts';

const encoder = new TextEncoder();

/** JSON with the keys of every record sorted by code unit, without blanks: one text for one value.
 *  Throws a TypeError on what JSON cannot hold (functions, symbols, numbers that are not finite). */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'string' || typeof value === 'boolean') return JSON.stringify(value);
  if (typeof value === 'number' && Number.isFinite(value)) return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value === 'object') {
    const entries = Object.entries(value)
      .filter(([, item]) => item !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : 1));
    return `{${entries.map(([key, item]) => `${JSON.stringify(key)}:${canonicalJson(item)}`).join(',')}}`;
  }
  throw new TypeError(`no JSON for ${typeof value} ${String(value)}`);
}

/** The short name of a build, as it stands in every file and on the legend: EW and ten hexadecimal digits of the
 *  SHA-256 over the resolved brief and the program's version, so that any change of either gives another name.
 *  Forty bits: among a thousand builds of one user two agree with a chance of 5·10⁻⁷.
 *  @param canonicalText  the resolved brief as `canonicalJson` writes it */
export function buildIdOf(canonicalText: string, version: string, platform: Pick<Platform, 'sha256Hex'>): string {
  const digest = platform.sha256Hex(encoder.encode(`${version}\n${canonicalText}`));
  return `EW${digest.slice(0, 10).toUpperCase()}`;
}

/** A GUID in the shape of RFC 4122 version 4, which the Gerber format asks for. Its bits come from a SHA-256 over the
 *  build id and a purpose instead of a random source: the same board gets the same GUID, and every other one another. */
export function guidOf(buildId: string, purpose: string, platform: Pick<Platform, 'sha256Hex'>): string {
  const hex = platform.sha256Hex(encoder.encode(`${purpose}:${buildId}`));
  const variant = '89ab'[Number.parseInt(hex[16]!, 16) % 4]!;
  return [
    hex.slice(0, 8),
    hex.slice(8, 12),
    `4${hex.slice(13, 16)}`,
    `${variant}${hex.slice(17, 20)}`,
    hex.slice(20, 32),
  ].join('-');
}
