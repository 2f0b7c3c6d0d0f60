// The capability sheets: complete, in order, and each shop no worse than the one before where that must be so.

import { describe, expect, it } from 'vitest';
import { findFabricator, listFabricators } from '../../geometry/fabricator/catalogue.ts';
import { copperRow } from '../../geometry/fabricator/fabricator.ts';

const entries = listFabricators();

describe('the fabricator catalogue', () => {
  it('holds the seven kinds of shop', () => {
    expect(entries.map(({ fabricator }) => fabricator.name)).toEqual([
      'kitchen-toner',
      'bench-photo',
      'desk-mill',
      'pool-proto',
      'shop-standard',
      'shop-advanced',
      'microwave-shop',
    ]);
    expect(findFabricator('constructor')).toBeUndefined();
  });

  it.each(entries.map((entry) => [entry.fabricator.name, entry] as const))('%s holds together', (_, entry) => {
    const { fabricator, marks } = entry;
    const { copperRows } = fabricator;
    for (const [i, row] of copperRows.entries()) {
      const lighter = copperRows[i - 1];
      if (lighter === undefined) continue;
      // Heavier copper etches no finer.
      expect(row.baseM).toBeGreaterThan(lighter.baseM);
      expect(row.traceM).toBeGreaterThanOrEqual(lighter.traceM);
      expect(row.spaceM).toBeGreaterThanOrEqual(lighter.spaceM);
      expect(row.ringM).toBeGreaterThanOrEqual(lighter.ringM);
    }
    expect(Object.keys(marks).sort()).toEqual(
      Object.keys(fabricator)
        .filter((key) => key !== 'name')
        .sort(),
    );
    expect(fabricator.edgeToleranceM).toBeGreaterThan(0);
    expect(fabricator.edgeToleranceM).toBeLessThanOrEqual(50e-6);
    expect(fabricator.finishes.length).toBeGreaterThan(0);
  });

  it('has the rows of common public tables for ordinary copper', () => {
    const { fabricator } = findFabricator('shop-standard')!;
    // 18 um base 0.125/0.15 mm, 35 um 0.20/0.20 mm, 70 um 0.25/0.25 mm, as board houses publish them.
    expect(copperRow(fabricator, 18e-6)).toMatchObject({ traceM: 0.125e-3, spaceM: 0.15e-3 });
    expect(copperRow(fabricator, 35e-6)).toMatchObject({ traceM: 0.2e-3, spaceM: 0.2e-3 });
    expect(copperRow(fabricator, 70e-6)).toMatchObject({ traceM: 0.25e-3, spaceM: 0.25e-3 });
    expect(copperRow(fabricator, 105e-6)).toBeUndefined();
    expect(copperRow(findFabricator('kitchen-toner')!.fabricator, 70e-6)).toBeUndefined();
  });

  it('plates no holes where no shop does', () => {
    for (const name of ['kitchen-toner', 'bench-photo', 'desk-mill']) {
      expect(findFabricator(name)!.fabricator).toMatchObject({ plated: null, mask: null, legend: null });
    }
  });
});
