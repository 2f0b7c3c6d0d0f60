// The predicted reflection as a file, read back by a reader of the format written here.

import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { encodeTouchstoneComment, exportTouchstone } from '../../geometry/exports/touchstone.ts';
import { sizePatch } from '../../geometry/patch/size.ts';
import { checkRules } from '../../geometry/rules/check.ts';
import { sampleArtwork, sampleBrief } from '../artwork/sample.ts';

const hash = (name: string) => (bytes: Uint8Array) => createHash(name).update(bytes).digest('hex');

describe('exportTouchstone', () => {
  const design = sizePatch(sampleBrief);
  const artwork = { ...sampleArtwork(design), title: '"*%\n<b>ε Антенна ../CON' };
  const [file] = exportTouchstone({
    brief: sampleBrief,
    design,
    artwork,
    report: checkRules({ artwork, fabricator: sampleBrief.fabricator, copperBaseM: 35e-6 }),
    platform: { sha256Hex: hash('sha256'), md5Hex: hash('md5') },
    version: '0.0.0',
  }) as [{ name: string; bytes: Uint8Array }];
  const text = Buffer.from(file.bytes).toString('latin1');
  const rows = text
    .split('\n')
    .map((line) => line.split('!')[0]!.trim())
    .filter((line) => line !== '' && !line.startsWith('#'))
    .map((line) => line.split(/\s+/).map(Number));

  it('is plain ASCII with one option line, frequencies ascending in whole hertz', () => {
    expect(/^[\x20-\x7e\n]*$/.test(text)).toBe(true);
    expect(text.split('\n').filter((line) => line.startsWith('#'))).toEqual(['# Hz S RI R 50']);
    expect(rows.every((row) => row.length === 3 && row.every(Number.isFinite))).toBe(true);
    for (let i = 1; i < rows.length; i++) expect(rows[i]![0]!).toBeGreaterThan(rows[i - 1]![0]!);
  });

  it('is passive, and dips at the predicted best match', () => {
    const sizes = rows.map(([f, re, im]) => [f!, Math.hypot(re!, im!)] as const);
    for (const [, size] of sizes) expect(size).toBeLessThan(1);
    const [dip] = sizes.reduce((best, row) => (row[1] < best[1] ? row : best));
    const step = rows[1]![0]! - rows[0]![0]!;
    expect(Math.abs(dip - design.prediction.resonanceHz)).toBeLessThan(step);
  });

  it('keeps a title on its comment line', () => {
    expect(text.split('\n')[0]).toBe(`! ${encodeTouchstoneComment(artwork.title)}`);
    expect(encodeTouchstoneComment('ε\n# Hz')).toBe('\\u03B5 # Hz');
  });
});
