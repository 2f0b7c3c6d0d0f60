// Bare and fed patches against computed references, measured boards and handbook figures.

import { describe, expect, it } from 'vitest';
import { bareResonance, textbookResonanceHz } from '../../geometry/patch/bare-resonance.ts';
import { qualitySplit } from '../../geometry/patch/quality.ts';
import { modePowers } from '../../geometry/patch/radiation.ts';
import { criticalBandwidthHz, predictBare } from '../../geometry/patch/rectangular.ts';
import {
  campaignRows,
  fedRows,
  isInset,
  measuredRows,
  pinRows,
  qualityRows,
  readCsv,
  resonanceRows,
  summarise,
  workedExample,
} from './tables.ts';

describe('natural resonance of the bare patch', () => {
  it('resonance_reference.csv (computed): mean 0.2 %, worst 0.6 %', () => {
    const rows = resonanceRows();
    expect(rows.length).toBe(88);
    const { mean, worst } = summarise(rows);
    expect(mean).toBeLessThan(0.002);
    expect(worst).toBeLessThan(0.006);
  });

  it('measured boards (values from memory), nothing fitted: mean 1.5 %, none over 2.5 %', () => {
    const rows = measuredRows();
    expect(rows.map(({ name }) => name.slice(0, 3))).toEqual(['K01', 'K03', 'K11', 'K12', 'K14', 'K16']);
    const { mean, worst } = summarise(rows);
    expect(mean).toBeLessThan(0.015);
    expect(worst).toBeLessThan(0.025);
  });

  it('half a wavelength in the dielectric: 10 cm on permittivity 4 is about 750 MHz (common practice, no source)', () => {
    const f = bareResonance({ lengthM: 0.1, widthM: 0.1, heightM: 0.8e-3, permittivity: 4 }).resonanceHz;
    // Without fringing 749.5 MHz; fringing only lowers it, by a few per cent on a thin board.
    expect(f).toBeLessThan(749.5e6);
    expect(f).toBeGreaterThan(720e6);
  });

  it('is continuous across the border of the calibration, and says when it is outside', () => {
    const at = (permittivity: number) => bareResonance({ lengthM: 20e-3, widthM: 24e-3, heightM: 1e-3, permittivity });
    expect(at(10.2).notices).toHaveLength(0);
    expect(at(10.3).notices.map(({ code }) => code)).toEqual(['resonance.range']);
    expect(at(10.2001).resonanceHz / at(10.2).resonanceHz).toBeCloseTo(1, 4);
    expect(at(12).modelError).toBeGreaterThan(at(10.3).modelError);
    expect(at(10.3).modelError).toBeGreaterThan(at(10.2).modelError);
  });

  it('scales: sizes times k give the frequency over k', () => {
    const f = (k: number): number =>
      bareResonance({ lengthM: 29e-3 * k, widthM: 37e-3 * k, heightM: 1.53e-3 * k, permittivity: 4.3 }).resonanceHz;
    expect((f(3) * 3) / f(1)).toBeCloseTo(1, 10);
    expect(f(0.1) / 10 / f(1)).toBeCloseTo(1, 10);
  });

  it('the textbook example (Balanis 4th ed., ex. 14.1) comes out of the textbook formula and only of it', () => {
    const { inputs, outputs } = workedExample('BAL-14.1');
    const patch = {
      lengthM: outputs.L_mm! / 1e3,
      widthM: outputs.W_mm! / 1e3,
      heightM: inputs.h_mm! / 1e3,
      permittivity: inputs.eps_r!,
    };
    expect(Math.abs(textbookResonanceHz(patch) / 10e9 - 1)).toBeLessThan(0.002);
    // An independent full-wave pole of the same patch: 9.3965 GHz (input_resistance.csv).
    expect(Math.abs(bareResonance(patch).resonanceHz / 9.3965e9 - 1)).toBeLessThan(0.006);
  });
});

describe('quality and resistance', () => {
  it('lossless Q (resonance_reference.csv, computed, good to 1 %): mean 1.5 %, worst 4 %', () => {
    const { mean, worst } = summarise(qualityRows());
    expect(mean).toBeLessThan(0.015);
    expect(worst).toBeLessThan(0.04);
  });

  it('edge resistance against full-wave probe feeds (input_resistance.csv, computed): within 12 %', () => {
    const rows = readCsv('input_resistance.csv');
    const ids = [...new Set(rows.map((row) => row.id))];
    expect(ids.length).toBeGreaterThanOrEqual(3);
    for (const id of ids) {
      const row = rows.find((candidate) => candidate.id === id)!;
      const patch = {
        widthM: Number(row.W_mm) / 1e3,
        lengthM: Number(row.L_mm) / 1e3,
        heightM: Number(row.h_mm) / 1e3,
        permittivity: Number(row.eps_r),
      };
      const split = qualitySplit(
        patch,
        Number(row.tan_d),
        { conductivitySPerM: null, roughnessM: 0 },
        Number(row.f_res_GHz) * 1e9,
      );
      expect(Math.abs(split.edgeResistanceOhm / Number(row.R_edge_fit_sin2_ohm) - 1)).toBeLessThan(0.12);
      expect(Math.abs(split.total / Number(row.Q_fullwave) - 1)).toBeLessThan(0.03);
    }
  });

  it('Balanis 4th ed., ex. 14.2 and 14.3: a few per cent of Q apart, the textbook neglects slab and edges', () => {
    const patch = { widthM: 11.86e-3, lengthM: 9.06e-3, heightM: 1.588e-3, permittivity: 2.2 };
    const split = qualitySplit(patch, 0, { conductivitySPerM: null, roughnessM: 0 }, 9.4e9);
    // The book's slots give 228 ohm at 10 GHz and 7.35 dBi (recomputed, see the row's note).
    expect(split.edgeResistanceOhm).toBeGreaterThan(150);
    expect(split.edgeResistanceOhm).toBeLessThan(228.35);
    expect(Math.abs(split.directivityDbi - 7.35)).toBeLessThan(1);
  });

  it('lossless edge resistance of a square patch is a few hundred ohms, about 400 near permittivity 4 (common practice, no source)', () => {
    const r = (permittivity: number): number =>
      qualitySplit(
        { lengthM: 30e-3, widthM: 30e-3, heightM: 1e-3, permittivity },
        0,
        { conductivitySPerM: null, roughnessM: 0 },
        2.4e9,
      ).losslessEdgeResistanceOhm;
    expect(r(4)).toBeGreaterThan(300);
    expect(r(4)).toBeLessThan(500);
    expect(r(2.2)).toBeGreaterThan(100);
  });

  it('directivity 5–7 dBi on ordinary laminates (common practice, no source)', () => {
    for (const permittivity of [3, 3.66, 4.4, 6.15, 10.2]) {
      const lengthM = 0.48 * (0.1224 / Math.sqrt(permittivity));
      const { prediction } = predictBare({ lengthM, widthM: 1.2 * lengthM, thicknessM: 1.5e-3, permittivity });
      expect(prediction.directivityDbi).toBeGreaterThan(5);
      expect(prediction.directivityDbi).toBeLessThan(7.2);
    }
  });

  it('bandwidth: a few per cent, rising with height and width; 3 % is typical for a square patch (common practice, no source)', () => {
    const band = (widthM: number, thicknessM: number): number => {
      const { prediction } = predictBare({
        lengthM: 0.07,
        widthM,
        thicknessM,
        permittivity: 4,
        lossTangent: 0.02,
        copperThicknessM: 35e-6,
      });
      return prediction.bandwidthCriticalHz / prediction.resonanceHz;
    };
    expect(band(0.07, 6e-3)).toBeGreaterThan(0.02);
    expect(band(0.07, 6e-3)).toBeLessThan(0.05);
    expect(band(0.07, 8e-3)).toBeGreaterThan(band(0.07, 6e-3));
    expect(band(0.1, 6e-3)).toBeGreaterThan(band(0.07, 6e-3));
  });

  it('bandwidth times Q at a standing-wave ratio (Balanis 4th ed., eq. 14-88a)', () => {
    for (const [s, product] of [
      [1.5, 0.4082],
      [2, 0.7071],
      [3, 1.1547],
    ] as const) {
      expect(criticalBandwidthHz(1, 1, s)).toBeCloseTo(product, 4);
    }
  });

  it('a thin lossless dipole limit: the surface wave’s share is 3πk0h(1−1/εr)³/(4c1) (Jackson & Alexopoulos 1991)', () => {
    const er = 4;
    const f = 1e9;
    const k0 = (2 * Math.PI * f) / 299_792_458;
    const h = 0.002 / k0;
    const size = 0.001 / k0;
    const { spaceWaveW, surfaceWaveW } = modePowers({
      lengthM: size,
      widthM: size,
      heightM: h,
      permittivity: er,
      frequencyHz: f,
    });
    const c1 = 1 - 1 / er + 0.4 / er ** 2;
    const expected = (0.75 * Math.PI * k0 * h * (1 - 1 / er) ** 3) / c1;
    expect(surfaceWaveW / spaceWaveW / expected).toBeCloseTo(1, 2);
  });
});

describe('fed patches (fed_reference.json, computed)', () => {
  const rows = fedRows();
  const insets = rows.filter(isInset);

  it('best match of insets of 0.15–0.4 L: mean 0.2 %, worst 0.6 %', () => {
    expect(insets.length).toBeGreaterThan(15);
    const { mean, worst } = summarise(insets.map(({ bestMatch }) => bestMatch));
    expect(mean).toBeLessThan(0.002);
    expect(worst).toBeLessThan(0.006);
  });

  it('resistance at the inset end within 15 %', () => {
    for (const row of insets) {
      expect(Math.abs(row.peakResistance.error), row.name).toBeLessThan(0.15);
      expect(Math.abs(row.matchResistance.error), row.name).toBeLessThan(0.15);
    }
  });

  it('plain edge feeds too: best match within 0.6 %', () => {
    for (const row of rows.filter(({ depthOverLength }) => depthOverLength === 0)) {
      expect(Math.abs(row.bestMatch.error), row.name).toBeLessThan(0.006);
    }
  });
});

describe('fed patches of our own field solution (fixtures/computed/fed_campaign.json)', () => {
  it('best match lies within the model error that the engine states for itself, on every board', () => {
    const rows = campaignRows();
    expect(rows.length).toBeGreaterThan(140);
    for (const row of rows) expect(Math.abs(row.bestMatch.error), row.name).toBeLessThan(row.statedError);
  });
});

describe('resistance at a pin (input_resistance.csv, computed)', () => {
  it('within 6 % up to 0.3 of the length from the centre and 12 % everywhere; the usual law is 9 to 45 % high there', () => {
    const rows = pinRows();
    expect(rows).toHaveLength(27);
    for (const row of rows) {
      expect(Math.abs(row.error), row.name).toBeLessThan(row.offsetOverLength <= 0.3 ? 0.06 : 0.12);
      if (row.offsetOverLength <= 0.25) expect(row.usualError, row.name).toBeGreaterThan(0.08);
    }
  });
});
