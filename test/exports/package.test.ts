// The package of a board that the engine itself composed.

import { describe, expect, it } from 'vitest';
import { parseBrief } from '../../geometry/brief/parse.ts';
import type { ExportInput } from '../../geometry/exports/exporter.ts';
import { packageFiles } from '../../geometry/exports/package.ts';
import { checkRules } from '../../geometry/rules/check.ts';
import { areaNm2 } from '../../geometry/shape/measure.ts';
import type { Shape } from '../../geometry/shape/shape.ts';
import { sampleArtwork, sampleBrief, sampleDesign } from '../artwork/sample.ts';
import { platform } from './board.ts';
import { netArea, readGerber, realWarnings } from './gerber-reader.ts';

const artwork = sampleArtwork();
const input: ExportInput = {
  brief: sampleBrief,
  design: sampleDesign,
  artwork,
  report: checkRules({
    artwork,
    fabricator: sampleBrief.fabricator,
    copperBaseM: sampleBrief.laminate.copperBaseM,
  }),
  platform,
  version: '0.1.0',
};

describe('the package of a composed board', () => {
  it('shows an independent reader the areas of the artwork to 1e-9', async () => {
    const files = await packageFiles(input);
    const layers: readonly (readonly [string, Shape])[] = [
      ['copper-top', artwork.copperTop],
      ['copper-bottom', artwork.copperBottom],
      ['mask-top', artwork.maskTop],
      ['mask-bottom', artwork.maskBottom],
    ];
    for (const [layer, shape] of layers) {
      const reading = await readGerber(files.find(({ name }) => name === `${artwork.slug}-${layer}.gbr`)!.bytes);
      expect(realWarnings(reading), layer).toEqual([]);
      expect(Math.abs((netArea(reading) * 1e12) / areaNm2(shape) - 1), layer).toBeLessThan(1e-9);
    }
  });

  it('holds a brief that reads back as the same brief where no catalogue is at hand', async () => {
    const files = await packageFiles(input);
    const text = Buffer.from(files.find(({ name }) => name === 'brief.json')!.bytes).toString('utf8');
    const again = parseBrief(text, { file: 'brief.json', resolve: () => expect.fail('the brief refers to a file') });
    expect({ ...again, defaults: [] }).toEqual({ ...sampleBrief, defaults: [] });
    expect(again.defaults).toEqual([]);
  });

  it('carries the build id in every file', async () => {
    for (const { name, bytes } of await packageFiles(input)) {
      if (name === 'brief.json') continue;
      expect(Buffer.from(bytes).toString('utf8'), name).toContain(artwork.buildId);
    }
  });

  it('writes a drill file for each kind of hole there is', async () => {
    const at = { xNm: 5_000_000, yNm: 6_000_000 };
    const plated = { centre: at, finishedDiameterNm: 1_000_000, plated: true, use: 'pin', label: 'pin' } as const;
    const files = await packageFiles({ ...input, artwork: { ...artwork, holes: [plated] } });
    const drills = files.map(({ name }) => name).filter((name) => name.endsWith('.drl'));
    expect(drills).toEqual([`${artwork.slug}-plated.drl`]);
  });
});
