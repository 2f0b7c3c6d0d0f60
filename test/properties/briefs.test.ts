// Random valid briefs through the whole line: no crash, no number that is none, no unsound board, or a reasoned refusal.

import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { validateArtwork } from '../../geometry/artwork/validate.ts';
import { packageFiles } from '../../geometry/exports/package.ts';
import { checkArtwork, EngineError, makeArtwork, type Platform, parseBrief, sizePatch } from '../../geometry/index.ts';

const SEED = 20261201;
/** ETCHWAVE_BRIEFS=2000 runs as many; the suite runs a sample. */
const COUNT = Number(process.env.ETCHWAVE_BRIEFS ?? 120);

/** Packages cost more than all else: every so many boards. */
const PACKAGE_EVERY = process.env.ETCHWAVE_BRIEFS === undefined ? 4 : 1;

function generator(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const digest = (name: string) => (bytes: Uint8Array) => createHash(name).update(bytes).digest('hex');
const platform: Platform = { sha256Hex: digest('sha256'), md5Hex: digest('md5') };

function randomBrief(random: () => number): Record<string, unknown> {
  const pick = <T>(values: readonly T[]): T => values[Math.floor(random() * values.length)]!;
  const between = (low: number, high: number): number => low * (high / low) ** random();
  const centre = between(0.3, 12);
  const kind = pick(['inset', 'inset', 'quarter-wave', 'probe']);
  const permittivity = Number(between(1, 12).toFixed(3));
  // From very thin to thick for the wavelength.
  const thickness = (300 / centre / Math.sqrt(permittivity)) * between(0.004, 0.09);
  return {
    format: 'etchwave-brief/1',
    title: `Random ${Math.floor(random() * 1e6)}`,
    band: { centre: `${centre.toFixed(4)} GHz`, width: `${(centre * between(0.001, 0.1) * 1000).toFixed(3)} MHz` },
    match: { returnLoss: '10 dB', reference: pick(['50 ohm', '50 ohm', '75 ohm']) },
    laminate: {
      permittivity,
      lossTangent: Number(between(0.0001, 0.04).toFixed(5)),
      thickness: `${Math.min(20, Math.max(0.1, thickness)).toFixed(3)} mm`,
      copperThickness: pick(['18 um', '35 um']),
    },
    radiator: random() < 0.2 ? { pinned: { width: `${((300 / centre) * between(0.1, 0.6)).toFixed(3)} mm` } } : {},
    feed: { kind },
    board: random() < 0.3 ? { margin: `${between(0.5, 40).toFixed(2)} mm`, cornerRadius: pick(['0 mm', '2 mm']) } : {},
    fabricator: pick([
      'kitchen-toner',
      'bench-photo',
      'desk-mill',
      'pool-proto',
      'shop-standard',
      'shop-advanced',
      'microwave-shop',
    ]),
  };
}

function isFiniteThroughout(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value);
  if (typeof value === 'object' && value !== null) return Object.values(value).every(isFiniteThroughout);
  return true;
}

describe(`random briefs, seed ${SEED}`, () => {
  it(`${COUNT} of them: sound boards with finite predictions, or a refusal that names field and remedy`, async () => {
    const random = generator(SEED);
    let refused = 0;
    for (let i = 0; i < COUNT; i++) {
      const text = JSON.stringify(randomBrief(random));
      try {
        const brief = parseBrief(text, { file: 'random.brief.json', resolve: () => expect.fail('no file is named') });
        const design = sizePatch(brief);
        expect(isFiniteThroughout(design), text).toBe(true);
        expect(design.prediction.resonanceLowHz, text).toBeLessThanOrEqual(design.prediction.resonanceHz);
        expect(design.prediction.radiationEfficiency, text).toBeGreaterThan(0);
        expect(design.prediction.radiationEfficiency, text).toBeLessThanOrEqual(1);
        const artwork = makeArtwork(brief, design, platform, 'test');
        expect(validateArtwork(artwork), text).toEqual([]);
        const report = checkArtwork(brief, artwork);
        expect(isFiniteThroughout(report), text).toBe(true);
        // Building a package reads it back and refuses one that disagrees with its artwork.
        if (i % PACKAGE_EVERY === 0) {
          await packageFiles({ brief, design, artwork, report, platform, version: 'test' });
        }
      } catch (error) {
        if (!(error instanceof EngineError)) throw new Error(`${text}\n${String(error)}`, { cause: error });
        for (const fault of error.faults) {
          expect(fault.path, text).not.toBe('');
          expect(fault.allowed, text).not.toBe('');
        }
        refused += 1;
      }
    }
    // Most wishes can be met.
    expect(refused).toBeLessThan(COUNT / 3);
  });
});
