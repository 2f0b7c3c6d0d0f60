// A package that was changed by a few micrometres, or had its files mixed up, is caught by reading it back.

import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { Brief } from '../../geometry/brief/brief.ts';
import type { NamedFile } from '../../geometry/exports/exporter.ts';
import { packageFiles } from '../../geometry/exports/package.ts';
import { readBack } from '../../geometry/exports/read-back/read-back.ts';
import { sizePatch } from '../../geometry/patch/size.ts';
import { checkRules } from '../../geometry/rules/check.ts';
import { sampleArtwork, sampleBrief } from '../artwork/sample.ts';

const SEED = 77;
const hash = (name: string) => (bytes: Uint8Array) => createHash(name).update(bytes).digest('hex');
const platform = { sha256Hex: hash('sha256'), md5Hex: hash('md5') };

function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1103515245) + 12345) & 0x7fffffff;
    return state / 0x7fffffff;
  };
}

const probe: Brief = {
  ...sampleBrief,
  feed: { kind: 'probe', pinned: {}, plated: false },
  board: { marginM: 'auto', cornerRadiusM: 2e-3 },
};

async function built(brief: Brief) {
  const design = sizePatch(brief);
  const artwork = sampleArtwork(design, brief);
  const report = checkRules({ artwork, fabricator: brief.fabricator, copperBaseM: 35e-6, boardThicknessM: 1.6e-3 });
  const files = await packageFiles({ brief, design, artwork, report, platform, version: '0.0.0' });
  return { artwork, files };
}

function decode(file: NamedFile): string {
  return Buffer.from(file.bytes).toString('latin1');
}

/** The files with one replaced; the manifest made to vouch for it, so that the geometry itself must give it away. */
function withFile(files: readonly NamedFile[], name: string, text: string): readonly NamedFile[] {
  const before = files.find((file) => file.name === name)!;
  const bytes = Buffer.from(text, 'latin1');
  const manifest = files.find((file) => file.name === 'manifest.json')!;
  const vouched = decode(manifest).replace(platform.sha256Hex(before.bytes), platform.sha256Hex(bytes));
  return files.map((file) => {
    if (file.name === name) return { name, bytes };
    return file.name === 'manifest.json' ? { name: file.name, bytes: Buffer.from(vouched, 'latin1') } : file;
  });
}

describe(`read-back, seed ${SEED}`, () => {
  it.each([
    ['an inset feed', sampleBrief],
    ['a probe', probe],
  ])('a package of %s reads back', async (_, brief) => {
    const { files, artwork } = await built(brief);
    expect(readBack(files, artwork, platform)).toEqual([]);
  });

  it('500 packages with one coordinate moved by 2 to 20 µm: each is caught', async () => {
    const random = generator(SEED);
    const packages = [await built(sampleBrief), await built(probe)];
    for (let i = 0; i < 500; i++) {
      const { files, artwork } = packages[i % 2]!;
      const targets = files.filter(
        ({ name }) => /\.(gbr|drl|dxf)$/.test(name) && !(name.includes('legend') && artwork.legendTop.length === 0),
      );
      const target = targets[Math.floor(random() * targets.length)]!;
      const text = decode(target);
      const shift = (random() < 0.5 ? -1 : 1) * (2000 + Math.round(random() * 18_000));
      const places = placesIn(target.name, text);
      const place = places[Math.floor(random() * places.length)]!;
      const { at, value } = place;
      const moved = target.name.endsWith('.gbr')
        ? String(Math.max(0, Number(value) + shift))
        : (Number(value) + shift / 1e6).toFixed(6);
      if (moved === value) continue;
      const changed = text.slice(0, at) + moved + text.slice(at + value.length);
      const faults = readBack(withFile(files, target.name, changed), artwork, platform);
      expect(faults.length, `${target.name}: ${value} → ${moved} at ${at}`).toBeGreaterThan(0);
    }
  });

  it('files swapped, dropped, of another build, or unlike the manifest are caught', async () => {
    const { files, artwork } = await built(sampleBrief);
    const named = (suffix: string): NamedFile => files.find(({ name }) => name.endsWith(suffix))!;
    const swap = (a: string, b: string): readonly NamedFile[] =>
      files.map((file) =>
        file === named(a)
          ? { ...file, bytes: named(b).bytes }
          : file === named(b)
            ? { ...file, bytes: named(a).bytes }
            : file,
      );
    const check = (changed: readonly NamedFile[]): number => readBack(changed, artwork, platform).length;
    expect(check(swap('copper-top.gbr', 'copper-bottom.gbr'))).toBeGreaterThan(0);
    expect(check(swap('mask-top.gbr', 'mask-bottom.gbr'))).toBeGreaterThan(0);
    for (const file of files) expect(check(files.filter((other) => other !== file)), file.name).toBeGreaterThan(0);
    const other = named('profile.gbr');
    expect(check(withFile(files, other.name, decode(other).replace(artwork.buildId, 'EW0000000000')))).toBeGreaterThan(
      0,
    );
    const notes = named('FABRICATION.txt');
    expect(
      check(files.map((file) => (file === notes ? { ...file, bytes: Buffer.from('short') } : file))),
    ).toBeGreaterThan(0);
  });
});

interface Place {
  readonly at: number;
  readonly value: string;
}

/** Where a file holds coordinates: every X and Y, in the DXF the codes 10 and 20 of contours and holes (its notes are
 *  text at no exact place, and its header speaks of extents). */
function placesIn(name: string, text: string): readonly Place[] {
  if (!name.endsWith('.dxf')) {
    const pattern = name.endsWith('.gbr') ? /[XY](\d+)/g : /[XY](\d+\.\d+)/g;
    return [...text.matchAll(pattern)].map((match) => ({ at: match.index + 1, value: match[1]! }));
  }
  const places: Place[] = [];
  const lines = text.split('\n');
  let at = 0;
  let entity = '';
  let inEntities = false;
  for (let i = 0; i + 1 < lines.length; i += 2) {
    const code = Number(lines[i]!.trim());
    const value = lines[i + 1]!.trim();
    const valueAt = at + lines[i]!.length + 1 + lines[i + 1]!.indexOf(value);
    if (code === 2 && value === 'ENTITIES') inEntities = true;
    if (code === 0) entity = value;
    if (inEntities && (code === 10 || code === 20) && (entity === 'LWPOLYLINE' || entity === 'CIRCLE')) {
      places.push({ at: valueAt, value });
    }
    at += lines[i]!.length + lines[i + 1]!.length + 2;
  }
  return places;
}
