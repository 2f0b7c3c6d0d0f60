// design.json and manifest.json: the public keys, and nothing that JSON would drop.

import { describe, expect, it } from 'vitest';
import { designRecord, encodeJson, exportDesign } from '../../geometry/exports/design-json.ts';
import { writeManifest } from '../../geometry/exports/manifest.ts';
import { inputOf, soilSensor } from './board.ts';

const read = (bytes: Uint8Array) => JSON.parse(Buffer.from(bytes).toString('utf8'));

describe('design.json', () => {
  const record = read(exportDesign(inputOf(soilSensor))[0]!.bytes);

  it('carries the results under the public names', () => {
    expect(record.format).toBe('etchwave-design/1');
    const [widthMm, lengthMm] = soilSensor.patch;
    expect(record.radiator).toEqual({ family: 'rectangular', lengthM: lengthMm / 1000, widthM: widthMm / 1000 });
    expect(record.feed.insetDepthM).toBe(0.0085);
    expect(record.board.widthM).toBe(0.06);
    expect(record.prediction.resonanceHz).toBe(2.4418e9);
    expect(record.prediction.resonanceKind).toBe('loadedPole');
    expect(record.requirement).toHaveLength(2);
    expect(record.notices[0].code).toBe('ground.small');
  });

  it('puts the shortfall before the results', () => {
    expect(record.shortfalls).toEqual(['return loss over the band']);
    const keys = Object.keys(record);
    expect(keys.indexOf('shortfalls')).toBeLessThan(keys.indexOf('radiator'));
  });

  it('belongs to a build and holds rules and violations with units', () => {
    expect(record.buildId).toBe('EW0123456789');
    expect(record.rules[0]).toEqual({
      rule: 'width',
      layer: 'copper-top',
      limitNm: 200_000,
      smallestNm: 2_900_000,
      marginNm: 2_700_000,
      holds: true,
    });
    expect(record.violations).toEqual([]);
  });

  it('has the keys of designRecord, which other outputs share', () => {
    for (const key of Object.keys(designRecord(inputOf(soilSensor).design))) expect(record).toHaveProperty(key);
  });
});

describe('encodeJson', () => {
  it('refuses a number that JSON would turn into null', () => {
    expect(() => encodeJson({ gainDbi: Number.NEGATIVE_INFINITY })).toThrow('gainDbi is not a finite number');
    expect(() => encodeJson([Number.NaN])).toThrow('not a finite number');
  });
});

describe('manifest.json', () => {
  it('counts what an order form asks for', () => {
    const manifest = read(writeManifest(inputOf(soilSensor), []).bytes);
    expect(manifest.board).toEqual({
      widthNm: 60_000_000,
      lengthNm: 55_000_000,
      copperLayers: 2,
      solderMask: true,
      legend: true,
      platedHoles: 0,
      unplatedHoles: 0,
    });
    expect(manifest.rules[1].smallestNm).toBe(1_000_000);
    expect(manifest.violations).toBe(0);
  });
});
