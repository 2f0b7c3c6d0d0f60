// Sizing around what is pinned.

import { describe, expect, it } from 'vitest';
import type { Brief } from '../../geometry/brief/brief.ts';
import { EngineError } from '../../geometry/errors.ts';
import { predictBare } from '../../geometry/patch/rectangular.ts';
import { sizePatch } from '../../geometry/patch/size.ts';
import { sampleBrief } from '../artwork/sample.ts';

function brief(change: Partial<Brief> = {}): Brief {
  return { ...sampleBrief, ...change };
}

describe('sizePatch', () => {
  it('puts the best match at band centre, and matches', () => {
    const { prediction, radiator, feed } = sizePatch(brief());
    const centre = (sampleBrief.band.lowHz + sampleBrief.band.highHz) / 2;
    expect(Math.abs(prediction.resonanceHz / centre - 1)).toBeLessThan(2e-4);
    expect(prediction.resonanceKind).toBe('bestMatch');
    expect(prediction.returnLossAtCentreDb!).toBeGreaterThan(30);
    if (feed.kind !== 'inset') throw new Error('an inset was asked for');
    expect(feed.insetDepthM / radiator.lengthM).toBeGreaterThan(0.1);
    expect(prediction.resonanceHz).toBeGreaterThan(prediction.bareResonanceHz * 1.01);
    expect(prediction.resonanceLowHz).toBeLessThan(prediction.resonanceHz);
    expect(prediction.contributions[0]!.cause).toBe('permittivity');
  });

  it('sizes in whole micrometres', () => {
    const { radiator, feed, board } = sizePatch(brief());
    if (feed.kind !== 'inset') throw new Error('an inset was asked for');
    for (const m of [
      radiator.lengthM,
      radiator.widthM,
      feed.insetDepthM,
      feed.notchGapM,
      feed.lineWidthM,
      board.widthM,
      board.lengthM,
    ]) {
      expect(Math.abs(m * 1e6 - Math.round(m * 1e6))).toBeLessThan(1e-6);
    }
  });

  it('never moves a pinned dimension and sizes the rest around it', () => {
    const pinnedLength = sizePatch(
      brief({ radiator: { family: 'rectangular', pinned: { lengthM: 0.028, widthM: 0.04 } } }),
    );
    expect(pinnedLength.radiator).toEqual({ family: 'rectangular', lengthM: 0.028, widthM: 0.04 });
    expect(pinnedLength.prediction.resonanceHz).toBeGreaterThan(2.5e9);
    const pinnedFeed = sizePatch(
      brief({
        feed: {
          kind: 'inset',
          pinned: {
            insetDepthM: 0.005,
            notchGapM: 0.0015,
            lineWidthM: 0.0025,
            lineWidthInNotchM: 0.002,
            lineLengthM: 0.02,
          },
        },
      }),
    );
    expect(pinnedFeed.feed).toEqual({
      kind: 'inset',
      insetDepthM: 0.005,
      notchGapM: 0.0015,
      lineWidthM: 0.0025,
      lineWidthInNotchM: 0.002,
      lineLengthM: 0.02,
    });
    const centre = (sampleBrief.band.lowHz + sampleBrief.band.highHz) / 2;
    expect(Math.abs(pinnedFeed.prediction.resonanceHz / centre - 1)).toBeLessThan(2e-3);
  });

  it('works for an air-spaced patch, and says that no reference covers it', () => {
    const air = {
      ...sampleBrief.laminate,
      permittivity: 1,
      permittivityTolerance: 0,
      lossTangent: 0,
      thicknessM: 3e-3,
    };
    const design = sizePatch(brief({ laminate: air }));
    expect(design.prediction.resonanceHz / 2.44175e9).toBeCloseTo(1, 3);
    expect(design.notices.map(({ code }) => code)).toContain('feed.range');
  });

  it('refuses a line wider than the patch, naming the field', () => {
    try {
      sizePatch(brief({ feed: { kind: 'inset', pinned: { lineWidthM: 0.05 } } }));
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(EngineError);
      expect((error as EngineError).faults[0]!.path).toBe('feed.pinned.lineWidth');
    }
  });

  it('keeps the requirement honest: a band wider than the match is a shortfall', () => {
    const design = sizePatch(brief());
    expect(design.requirement[0]!.holds).toBe(
      design.prediction.returnLossWorstInBandDb! >= sampleBrief.match.returnLossDb,
    );
    const wide = sizePatch(brief({ band: { lowHz: 2.3e9, highHz: 2.6e9 } }));
    expect(wide.requirement[0]!.holds).toBe(false);
    const narrow = sizePatch(brief({ band: { lowHz: 2.44e9, highHz: 2.443e9 } }));
    expect(narrow.requirement[0]!.holds).toBe(true);
  });
});

describe('predictBare', () => {
  it('has no feed, no loss where none is given, and names its resonance', () => {
    const { prediction } = predictBare({ lengthM: 0.029, widthM: 0.037, thicknessM: 1.53e-3, permittivity: 4.3 });
    expect(prediction.resonanceKind).toBe('bare');
    expect(prediction.qualityDielectric).toBeNull();
    expect(prediction.qualityConductor).toBeNull();
    expect(prediction.bandwidthHz).toBeNull();
    expect(prediction.inputResistanceOhm).toBeNull();
    expect(1 / prediction.qualityTotal).toBeCloseTo(
      1 / prediction.qualityRadiation + 1 / prediction.qualitySurfaceWave!,
      9,
    );
  });

  it('loss lowers the edge resistance and the efficiency together', () => {
    const size = { lengthM: 0.029, widthM: 0.037, thicknessM: 1.53e-3, permittivity: 4.3 };
    const clean = predictBare(size).prediction;
    const lossy = predictBare({ ...size, lossTangent: 0.02, copperThicknessM: 35e-6 }).prediction;
    expect(lossy.edgeResistanceOhm / clean.edgeResistanceOhm).toBeCloseTo(lossy.qualityTotal / clean.qualityTotal, 9);
    expect(lossy.radiationEfficiency).toBeLessThan(clean.radiationEfficiency);
    expect(lossy.resonanceHz).toBe(clean.resonanceHz);
  });

  it('names every value out of range at once', () => {
    try {
      predictBare({ lengthM: -1, widthM: 0.03, thicknessM: 1, permittivity: 0.5 });
      expect.unreachable();
    } catch (error) {
      expect((error as EngineError).faults.map(({ path }) => path)).toEqual(['length', 'thickness', 'permittivity']);
    }
  });
});
