// The board as drawn: its geometry, its truths, what it refuses.

import { describe, expect, it } from 'vitest';
import type { Artwork } from '../../geometry/artwork/artwork.ts';
import { legendText } from '../../geometry/artwork/legend.ts';
import { slugOf } from '../../geometry/artwork/slug.ts';
import { validateArtwork } from '../../geometry/artwork/validate.ts';
import { EngineError } from '../../geometry/errors.ts';
import type { PatchDesign } from '../../geometry/patch/design.ts';
import { flatten } from '../../geometry/shape/flatten.ts';
import { areaNm2, locate, shapeBox } from '../../geometry/shape/measure.ts';
import { rectangle, reverse } from '../../geometry/shape/primitives.ts';
import { point } from '../../geometry/shape/shape.ts';
import { designWith, sampleArtwork, sampleBrief, sampleDesign, sampleFabricator } from './sample.ts';

const MM2 = 1e12;

describe('composeArtwork', () => {
  it('draws the copper that the dimensions say, one contour, sound', () => {
    const artwork = sampleArtwork();
    expect(artwork.copperTop).toHaveLength(1);
    expect(artwork.copperTop[0]!.holes).toHaveLength(0);
    // Patch less two notches, and the line outside: by hand.
    expect(areaNm2(artwork.copperTop) / MM2).toBeCloseTo(37 * 29 - 2 * 8.7 * 1 + 2.98 * 29.1, 9);
    expect(validateArtwork(artwork)).toEqual([]);
    expect(shapeBox(artwork.copperTop)).toEqual({ minX: 9_300_000, minY: 0, maxX: 46_300_000, maxY: 58_100_000 });
  });

  it('is the same on both sides of its axis', () => {
    const artwork = sampleArtwork(designWith({ feed: { lineWidthInNotchM: 1.8e-3 } }));
    const axis = artwork.board.widthNm / 2;
    const corners = flatten(artwork.copperTop[0]!.outer, 1).map(({ xNm, yNm }) => `${xNm},${yNm}`);
    for (const corner of flatten(artwork.copperTop[0]!.outer, 1)) {
      expect(corners).toContain(`${2 * axis - corner.xNm},${corner.yNm}`);
    }
  });

  it('dimensions measure what they name, in electrical order', () => {
    const { dimensions } = sampleArtwork();
    expect(dimensions.map(({ name, valueNm }) => [name, valueNm])).toEqual([
      ['length', 29_000_000],
      ['width', 37_000_000],
      ['insetDepth', 8_700_000],
      ['notchGap', 1_000_000],
      ['lineWidthInNotch', 2_980_000],
      ['lineWidth', 2_980_000],
      ['lineLength', 29_100_000],
      ['boardWidth', 55_600_000],
      ['boardLength', 67_400_000],
    ]);
  });

  it('ground reaches the edge under the line, and is pulled back elsewhere', () => {
    const artwork = sampleArtwork();
    const ring = flatten(artwork.copperBottom[0]!.outer, 1);
    expect(locate(point(27_800_000, 1), ring)).toBe('inside');
    expect(locate(point(1_000_000, 100_000), ring)).toBe('outside');
    expect(locate(point(100_000, 30_000_000), ring)).toBe('outside');
    expect(locate(point(27_800_000, 67_300_000), ring)).toBe('outside');
  });

  it('mask is open over radiator and feed with room to spare, and over the ground at the launch', () => {
    const artwork = sampleArtwork();
    const open = artwork.maskTop.map((region) => flatten(region.outer, 1));
    for (const corner of flatten(artwork.copperTop[0]!.outer, 1)) {
      expect(open.some((ring) => locate(corner, ring) !== 'outside')).toBe(true);
    }
    expect(areaNm2(artwork.maskBottom)).toBeGreaterThan(0);
    const bare = sampleArtwork(sampleDesign, { ...sampleBrief, fabricator: { ...sampleFabricator, mask: null } });
    expect(bare.hasSolderMask).toBe(false);
    expect(areaNm2(bare.maskTop)).toBe(bare.board.widthNm * bare.board.lengthNm);
  });

  it('the legend keeps clear of copper and mask opening, and says when it does not fit', () => {
    const artwork = sampleArtwork();
    expect(artwork.legendTop.length).toBeGreaterThan(10);
    const open = artwork.maskTop.map((region) => flatten(region.outer, 1));
    for (const { points } of artwork.legendTop) {
      for (const p of points) expect(open.every((ring) => locate(p, ring) === 'outside')).toBe(true);
    }
    const tight = sampleArtwork(
      designWith({ board: { widthM: 37.6e-3, lengthM: 34.5e-3 }, feed: { lineLengthM: 5e-3 } }),
    );
    expect(tight.legendTop).toEqual([]);
    expect(tight.remarks.join(' ')).toContain('too narrow');
  });

  it('stays sound over random boards (seed 11)', () => {
    let state = 11;
    const random = (): number => {
      state = (Math.imul(state, 1103515245) + 12345) & 0x7fffffff;
      return state / 0x7fffffff;
    };
    for (let i = 0; i < 200; i++) {
      const lengthM = 5e-3 + random() * 0.1;
      const widthM = lengthM * (0.7 + random() * 1.3);
      const lineWidthM = widthM * (0.03 + 0.2 * random());
      const radius = random() < 0.5 ? 0 : random() * 4e-3;
      const marginM = 4.5e-3 + random() * 10e-3;
      const design = designWith({
        radiator: { lengthM, widthM },
        feed: {
          lineWidthM,
          lineWidthInNotchM: lineWidthM * (0.7 + 0.5 * random()),
          notchGapM: widthM * (0.03 + 0.1 * random()),
          insetDepthM: random() < 0.2 ? 0 : lengthM * 0.45 * random() + 1e-4,
          lineLengthM: marginM,
        },
        board: { widthM: widthM + 2 * marginM, lengthM: lengthM + 2 * marginM, cornerRadiusM: radius },
      });
      expect(validateArtwork(sampleArtwork(design)), JSON.stringify(design)).toEqual([]);
    }
  });

  it('draws corners hardly rounder than the copper’s distance from the edge', () => {
    for (const cornerRadiusM of [0.25e-3, 0.2503e-3, 0.251e-3, 0.1e-3]) {
      const artwork = sampleArtwork(designWith({ board: { cornerRadiusM } }));
      expect(validateArtwork(artwork), `${cornerRadiusM}`).toEqual([]);
    }
  });

  it('validateArtwork finds what is wrong with a board, by layer', () => {
    const artwork = sampleArtwork();
    const codes = (change: Partial<Artwork>) =>
      validateArtwork({ ...artwork, ...change }).map(({ code, where }) => `${where} ${code}`);
    const beyond = [rectangle(-1_000_000, 5_000_000, 5_000_000, 9_000_000)];
    expect(codes({ copperTop: beyond })).toEqual(['copperTop outsideProfile']);
    expect(codes({ maskBottom: beyond })).toEqual(['maskBottom outsideProfile']);
    expect(codes({ copperBottom: [{ outer: reverse(artwork.copperBottom[0]!.outer), holes: [] }] })).toEqual([
      'copperBottom[0].outer orientation',
    ]);
    expect(codes({ legendTop: [{ points: [point(-1, 5)], widthNm: 1 }] })).toEqual(['legendTop[0] outsideProfile']);
    expect(codes({ legendTop: [{ points: [point(1.5, 5)], widthNm: 1 }] })).toEqual(['legendTop[0] notWhole']);
  });

  it('says when the legend holds the build id alone', () => {
    const longTitle = { ...sampleBrief, title: 'a title that is far too long for any margin of so small a board' };
    const artwork = sampleArtwork(designWith({ board: { widthM: 40e-3 } }), longTitle);
    expect(artwork.legendTop.length).toBeGreaterThan(10);
    expect(artwork.remarks.join(' ')).toContain('build id alone');
    expect(sampleArtwork().remarks).toEqual([]);
  });

  it.each<[string, PatchDesign]>([
    ['board.width', designWith({ board: { widthM: 0.03 } })],
    ['board.length', designWith({ board: { lengthM: 0.04 } })],
    ['board.cornerRadius', designWith({ board: { cornerRadiusM: 0.03 } })],
    ['feed.pinned.lineWidthInNotch', designWith({ feed: { lineWidthInNotchM: 9e-3 } })],
    ['feed.pinned.lineWidth', designWith({ feed: { lineWidthM: 40e-3, insetDepthM: 0 } })],
    ['feed.pinned.notchGap', designWith({ feed: { lineWidthM: 30e-3, lineWidthInNotchM: 30e-3, notchGapM: 3.5e-3 } })],
    ['feed.pinned.notchGap', designWith({ feed: { notchGapM: 0 } })],
    ['feed.pinned.insetDepth', designWith({ feed: { insetDepthM: 29e-3 } })],
    ['feed.pinned.insetDepth', designWith({ feed: { insetDepthM: 0.4e-6 } })],
    ['feed.pinned.lineWidthInNotch', designWith({ feed: { lineWidthInNotchM: 2.9804e-3 } })],
    ['board.cornerRadius', designWith({ board: { cornerRadiusM: 0.3e-6 } })],
  ])('refuses what cannot be drawn: %s', (path, design) => {
    try {
      sampleArtwork(design);
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(EngineError);
      const fault = (error as EngineError).faults.find((one) => one.path === path);
      expect(fault, (error as EngineError).message).toBeDefined();
      expect(fault!.allowed).not.toBe('');
    }
  });
});

describe('slugOf', () => {
  it.each([
    ['Orchard soil sensor, 2.4 GHz', 'orchard-soil-sensor-2-4-ghz'],
    ['"*%\n<b>ε Антенна ../CON"', 'b-con'],
    ['CON', 'board'],
    ['', 'board'],
    ['Антенна', 'board'],
    [`${'a'.repeat(47)} b`, 'a'.repeat(47)],
  ])('%j → %s', (title, slug) => {
    expect(slugOf(title)).toBe(slug);
  });
});

describe('legendText', () => {
  it('has a drawing of its own for every capital and figure', () => {
    const seen = new Set<string>();
    for (const letter of 'ABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789-./+') {
      const { strokes } = legendText(letter, point(0, 0), 1_000_000, 150_000);
      expect(strokes.length, letter).toBeGreaterThan(0);
      for (const { points } of strokes) {
        for (const { xNm, yNm } of points) {
          expect(Number.isInteger(xNm) && Number.isInteger(yNm)).toBe(true);
          expect(xNm).toBeGreaterThanOrEqual(0);
          expect(yNm).toBeLessThanOrEqual(1_000_000);
        }
      }
      seen.add(JSON.stringify(strokes.map(({ points }) => points)));
    }
    // O and 0 are told apart by the stroke through the nought.
    expect(seen.size).toBe(40);
  });
});
