// The laminates a brief can name: in range, named apart, ordered, sourced.

import { describe, expect, it } from 'vitest';
import { findLaminate, listLaminates } from '../../geometry/laminate/catalogue.ts';

const entries = listLaminates();

describe('the laminate catalogue', () => {
  it.each(entries.map((entry) => [entry.laminate.name, entry] as const))('%s holds together', (name, entry) => {
    const { laminate, lossTangentRange, source, sheets } = entry;
    expect(name).toMatch(/^[a-z0-9.]+(-[a-z0-9.]+)*-[0-9.]+mm$/);
    expect(Number(/([0-9.]+)mm$/.exec(name)![1])).toBeCloseTo(laminate.thicknessM * 1e3, 9);
    expect(laminate.permittivity - laminate.permittivityTolerance).toBeGreaterThanOrEqual(1);
    expect(laminate.permittivityTolerance).toBeGreaterThan(0);
    expect(laminate.thicknessToleranceM).toBeGreaterThan(0);
    expect(laminate.thicknessToleranceM).toBeLessThanOrEqual(0.15 * laminate.thicknessM);
    expect(laminate.lossTangent).toBeGreaterThanOrEqual(lossTangentRange[0]);
    expect(laminate.lossTangent).toBeLessThanOrEqual(lossTangentRange[1]);
    expect(source.length).toBeGreaterThan(10);
    expect(sheets).not.toBe('');
    expect(findLaminate(name)).toBe(entry);
  });

  it('has no name twice, and finds nothing under another', () => {
    expect(new Set(entries.map(({ laminate }) => laminate.name)).size).toBe(entries.length);
    expect(findLaminate('toString')).toBeUndefined();
    expect(findLaminate('')).toBeUndefined();
  });

  it.each([
    // Class values as commonly published for IPC-4101/4103 materials; from memory beyond the class ranges.
    ['woven-glass-epoxy-1.53mm', 4.4, 0.2, 0.02, 1.53e-3, 0.13e-3],
    ['hydrocarbon-3.66-1.524mm', 3.66, 0.05, 0.0037, 1.524e-3, 0.1e-3],
    ['ptfe-microfibre-2.20-0.787mm', 2.2, 0.02, 0.0009, 0.787e-3, 0.05e-3],
    ['ptfe-ceramic-10.2-2.54mm', 10.2, 0.3, 0.0023, 2.54e-3, 0.08e-3],
  ])('%s has the values of its class', (name, permittivity, spread, loss, thickness, tolerance) => {
    expect(findLaminate(name)!.laminate).toMatchObject({
      permittivity,
      permittivityTolerance: spread,
      lossTangent: loss,
      thicknessM: thickness,
      thicknessToleranceM: tolerance,
    });
  });
});
