// A brief written out and read again is the same brief.

import { readdirSync, readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Brief } from '../../geometry/brief/brief.ts';
import { formatBrief } from '../../geometry/brief/format.ts';
import { listFabricators } from '../../geometry/fabricator/catalogue.ts';
import { listLaminates } from '../../geometry/laminate/catalogue.ts';
import { example, read } from './reading.ts';

function expectRoundTrip(brief: Brief): void {
  const again = read(formatBrief(brief));
  expect(again).toEqual({ ...brief, defaults: [] });
}

describe('formatBrief', () => {
  const folder = new URL('../../fixtures/briefs/', import.meta.url);
  const names = readdirSync(folder).filter((name) => name.endsWith('.brief.json'));

  it.each(names)('%s reads back the same', (name) => {
    expectRoundTrip(read(readFileSync(new URL(name, folder), 'utf8')));
  });

  it('every fabricator and laminate of the catalogues reads back the same', () => {
    for (const { fabricator } of listFabricators()) expectRoundTrip(read({ ...example, fabricator: fabricator.name }));
    for (const { laminate } of listLaminates()) expectRoundTrip(read({ ...example, laminate: laminate.name }));
  });

  it('any numbers read back to the last bit', () => {
    const within = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    const length = within(20e-6, 0.9);
    fc.assert(
      fc.property(
        fc.record({
          lowHz: within(30e6, 50e9),
          widthHz: within(1e3, 50e9),
          loss: within(0.1, 60),
          reference: within(1, 1000),
          permittivity: within(1, 30),
          lossTangent: within(0, 0.2),
          thickness: within(20e-6, 20e-3),
          copper: within(1e-6, 1e-3),
          pinned: length,
          depth: length,
          boardWidth: fc.option(
            length.filter((m) => m > 1e-3),
            { nil: undefined },
          ),
          margin: length,
          title: fc.string({ unit: 'grapheme', maxLength: 100 }).filter((text) => [...text].length <= 120),
        }),
        (seed) => {
          const base = read(example);
          const brief: Brief = {
            ...base,
            title: seed.title.replace(/\p{C}|\u2028|\u2029/gu, ''),
            band: { lowHz: seed.lowHz, highHz: seed.lowHz + seed.widthHz },
            match: { returnLossDb: seed.loss, referenceOhm: seed.reference },
            laminate: {
              ...base.laminate,
              permittivity: seed.permittivity,
              permittivityTolerance: 0,
              lossTangent: seed.lossTangent,
              thicknessM: seed.thickness,
              thicknessToleranceM: seed.thickness / 3,
              copperThicknessM: seed.copper,
              copperBaseM: seed.copper,
            },
            radiator: { family: 'rectangular', pinned: { lengthM: seed.pinned } },
            feed: { kind: 'inset', pinned: { insetDepthM: seed.depth, lineLengthM: seed.pinned } },
            board: {
              marginM: seed.margin,
              ...(seed.boardWidth === undefined ? {} : { widthM: seed.boardWidth }),
              cornerRadiusM: 0,
            },
          };
          expectRoundTrip(brief);
        },
      ),
      { numRuns: 300 },
    );
  });
});
