// The rule check on boards and on small shapes whose answer is plain.

import { describe, expect, it } from 'vitest';
import type { Artwork } from '../../geometry/artwork/artwork.ts';
import { EngineError } from '../../geometry/errors.ts';
import { checkRules } from '../../geometry/rules/check.ts';
import { findFacing } from '../../geometry/rules/facing.ts';
import type { RuleReport } from '../../geometry/rules/violation.ts';
import { contourOf, disc, rectangle, reverse } from '../../geometry/shape/primitives.ts';
import { type PointNm, point, type Shape } from '../../geometry/shape/shape.ts';
import { designWith, sampleArtwork, sampleBrief, sampleDesign, sampleFabricator } from '../artwork/sample.ts';

const MM = 1_000_000;

function check(design = sampleDesign, fabricator = sampleFabricator, copperBaseM = 35e-6): RuleReport {
  return checkRules({ artwork: sampleArtwork(design, { ...sampleBrief, fabricator }), fabricator, copperBaseM });
}

function rule(report: RuleReport, name: string) {
  return report.rules.find((candidate) => candidate.rule === name)!;
}

describe('checkRules', () => {
  it('a sound board: every rule with its limit, the smallest found and the margin', () => {
    const report = check();
    expect(report.violations).toEqual([]);
    expect(report.rules.map((r) => [r.rule, r.limitNm, r.smallestNm, r.marginNm])).toEqual([
      ['gap', 200_000, 1_000_000, 800_000],
      ['width', 200_000, 2_980_000, 2_780_000],
      ['corner', 200_000, 282_843, 82_843],
      ['copper-to-edge', 250_000, 250_000, 0],
      ['board-size', 300_000_000, 55_600_000, 244_400_000],
      ['mask-web', 100_000, null, null],
      ['legend-width', 150_000, 150_000, 0],
      // Far away, whatever the letters are; tests of its own below.
      ['legend-clearance', 150_000, expect.any(Number), expect.any(Number)],
      ['plated-hole', 250_000, null, null],
      ['plated-depth', 0, null, null],
      ['unplated-hole', 350_000, null, null],
      ['ring', 0, null, null],
      ['hole-to-copper', 250_000, null, null],
      ['hole-to-edge', 250_000, null, null],
    ]);
    expect(report.rules.every(({ holds }) => holds)).toBe(true);
    expect(report.remarks.join(' ')).toContain('J1');
  });

  it('a notch below the limit is found on both sides, to the nanometre, with its ends', () => {
    const report = check(designWith({ feed: { notchGapM: 0.15e-3 } }));
    expect(report.violations.map(({ rule: name, measuredNm, limitNm }) => [name, measuredNm, limitNm])).toEqual([
      ['gap', 150_000, 200_000],
      ['gap', 150_000, 200_000],
    ]);
    const [first] = report.violations;
    expect(Math.abs(first!.to.xNm - first!.from.xNm)).toBe(150_000);
    expect(first!.message).toContain('0.15 mm');
    expect(first!.message).toContain('sample-shop');
    expect(check(designWith({ feed: { notchGapM: 0.2e-3 } })).violations).toEqual([]);
    expect(check(designWith({ feed: { notchGapM: 0.199999e-3 } })).violations).toHaveLength(2);
  });

  it('a trace below the limit for its copper; the lighter copper’s row allows it', () => {
    const thin = designWith({ feed: { lineWidthM: 0.18e-3, lineWidthInNotchM: 0.18e-3 } });
    expect(check(thin).violations.map(({ rule: name, measuredNm }) => [name, measuredNm])).toEqual([
      ['width', 180_000],
    ]);
    expect(check(thin, sampleFabricator, 18e-6).violations).toEqual([]);
  });

  it('copper too near the edge, and the launch left alone', () => {
    const near = { ...sampleFabricator, copperToEdgeM: 0.5e-3 };
    const artwork = sampleArtwork(sampleDesign);
    const report = checkRules({ artwork, fabricator: near, copperBaseM: 35e-6 });
    const found = report.violations.filter(({ rule: name }) => name === 'copper-to-edge');
    // Ground on all four sides, 0.25 mm; nothing along the launch itself.
    expect(found.map(({ measuredNm }) => measuredNm)).toEqual([250_000, 250_000, 250_000, 250_000]);
    for (const { from } of found.filter(({ to }) => to.yNm === 0)) {
      expect(from.xNm <= artwork.launches[0]!.from.xNm || from.xNm >= artwork.launches[0]!.to.xNm).toBe(true);
    }
  });

  it('rounded corners keep their distance exactly', () => {
    const report = check(designWith({ board: { cornerRadiusM: 3e-3 } }));
    expect(rule(report, 'copper-to-edge').smallestNm).toBe(250_000);
    expect(report.violations).toEqual([]);
  });

  it('a board too large in either way it is turned', () => {
    expect(check(designWith({ board: { widthM: 0.39, lengthM: 0.29 } })).violations).toEqual([]);
    expect(check(designWith({ board: { widthM: 0.29, lengthM: 0.39 } })).violations).toEqual([]);
    const report = check(designWith({ board: { widthM: 0.31, lengthM: 0.31 } }));
    expect(report.violations.map(({ rule: name, measuredNm, limitNm }) => [name, measuredNm, limitNm])).toEqual([
      ['board-size', 310_000_000, 300_000_000],
    ]);
  });

  it('no mask, no legend: no subject', () => {
    const report = check(sampleDesign, { ...sampleFabricator, mask: null, legend: null });
    expect(rule(report, 'mask-web').smallestNm).toBeNull();
    expect(rule(report, 'legend-width').smallestNm).toBeNull();
    expect(report.remarks.join(' ')).toContain('no legend');
  });

  it('legend ink against mask openings and copper, from the edge of the pen', () => {
    const artwork = sampleArtwork(sampleDesign);
    const opening = artwork.dimensions.find(({ name }) => name === 'lineWidth')!.from.xNm - 200_000;
    const withInk = (points: readonly PointNm[], change: Partial<Artwork> = {}): RuleReport =>
      checkRules({
        artwork: { ...artwork, legendTop: [{ points, widthNm: 150_000 }], ...change },
        fabricator: sampleFabricator,
        copperBaseM: 35e-6,
      });
    const upright = (fromOpening: number) => [
      point(opening - fromOpening, 5 * MM),
      point(opening - fromOpening, 6 * MM),
    ];
    // 0.3 mm from pen's middle to the opening leaves 0.225 mm of ink-free board.
    expect(rule(withInk(upright(300_000)), 'legend-clearance').smallestNm).toBe(225_000);
    expect(withInk(upright(225_000)).violations).toEqual([]);
    expect(withInk(upright(224_999)).violations.map((v) => [v.rule, v.measuredNm])).toEqual([
      ['legend-clearance', 149_999],
    ]);
    // Inside the opening, and across its border.
    expect(rule(withInk(upright(-MM)), 'legend-clearance').smallestNm).toBe(0);
    const across = [point(opening - MM, 5 * MM), point(opening + 100_000, 5.5 * MM)];
    expect(rule(withInk(across), 'legend-clearance').smallestNm).toBe(0);
    // Without a mask only the copper counts: the same ink is 0.2 mm farther off.
    const bare = { hasSolderMask: false, maskTop: [{ outer: artwork.board.outline, holes: [] }] };
    expect(rule(withInk(upright(300_000), bare), 'legend-clearance').smallestNm).toBe(425_000);
  });

  it('on a thin laminate the legend stands as near as the shop prints true, and no nearer', () => {
    const thin = { ...sampleBrief, laminate: { ...sampleBrief.laminate, thicknessM: 0.1e-3 } };
    const design = designWith({ feed: { lineLengthM: 1.5e-3 }, board: { lengthM: 36.5e-3 } });
    const report = checkRules({
      artwork: sampleArtwork(design, thin),
      fabricator: sampleFabricator,
      copperBaseM: 35e-6,
    });
    expect(rule(report, 'legend-clearance').smallestNm).toBe(150_000);
    expect(rule(report, 'legend-clearance').holds).toBe(true);
  });

  it('names the notch and the line in its sentences', () => {
    const [first] = check(designWith({ feed: { notchGapM: 0.15e-3 } })).violations;
    expect(first!.message).toBe(
      'The notch gap is drawn at 0.15 mm; sample-shop etches no space below 0.2 mm in 35 µm copper, and would bridge it or send the board back.',
    );
    const thin = designWith({ feed: { lineWidthM: 0.18e-3, lineWidthInNotchM: 0.18e-3 } });
    expect(check(thin).violations[0]!.message).toMatch(/line width.* is drawn at 0\.18 mm/);
  });

  it('copper heavier than any row is refused by name', () => {
    try {
      check(sampleDesign, sampleFabricator, 70e-6);
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(EngineError);
      expect((error as EngineError).faults[0]!.path).toBe('laminate.copperBase');
    }
  });
});

describe('facing', () => {
  it('the two sides of a right corner do not count against each other', () => {
    const l: Shape = [
      {
        outer: contourOf([
          point(0, 0),
          point(3 * MM, 0),
          point(3 * MM, MM),
          point(MM, MM),
          point(MM, 3 * MM),
          point(0, 3 * MM),
        ]),
        holes: [],
      },
    ];
    expect(findFacing(l, 'clearance', 0).nearest).toBeNull();
    expect(findFacing(l, 'copper', 0).nearest!.distanceNm).toBe(MM);
  });

  it('two bars side by side, overlapping or shifted: 60° is the limit', () => {
    const bars = (shift: number): Shape => [
      rectangle(0, 0, 10 * MM, MM),
      rectangle(shift, 2 * MM, shift + 10 * MM, 3 * MM),
    ];
    expect(findFacing(bars(0), 'clearance', 0).nearest!.distanceNm).toBe(MM);
    expect(findFacing(bars(9 * MM), 'clearance', 0).nearest!.distanceNm).toBe(MM);
    // 0.5 mm past the end: √(1 + 0.25) mm, at 63°.
    expect(findFacing(bars(10.5 * MM), 'clearance', 0).nearest!.distanceNm).toBeCloseTo(Math.hypot(1, 0.5) * MM, 0);
    // 0.6 mm past the end: 59°, too slanted.
    expect(findFacing(bars(10.6 * MM), 'clearance', 0).nearest).toBeNull();
  });

  it('sees past what stands between, where there is a way', () => {
    const diamond = (x: number): Shape[number] => ({
      outer: contourOf([
        point(x - 200_000, 1.5 * MM),
        point(x, 1.05 * MM),
        point(x + 200_000, 1.5 * MM),
        point(x, 1.95 * MM),
      ]),
      holes: [],
    });
    // Diamonds at both ends turn no side to the bars; between them the bars still face.
    const shape: Shape = [
      rectangle(0, 0, 10 * MM, MM),
      rectangle(0, 2 * MM, 10 * MM, 3 * MM),
      diamond(0),
      diamond(10 * MM),
    ];
    const { nearest } = findFacing(shape, 'clearance', 0);
    expect(nearest!.distanceNm).toBe(MM);
    expect(nearest!.from.xNm).toBeGreaterThanOrEqual(200_000);
    expect(nearest!.from.xNm).toBeLessThanOrEqual(9_800_000);
  });

  it('the sides of a sharp corner do not face: that corner is a rule of its own', () => {
    const triangle: Shape = [
      { outer: contourOf([point(0, 0), point(10 * MM, -2 * MM), point(10 * MM, 2 * MM)]), holes: [] },
    ];
    expect(findFacing(triangle, 'copper', 0).nearest).toBeNull();
    const equilateral: Shape = [
      { outer: contourOf([point(0, 0), point(10 * MM, 0), point(5 * MM, 8_660_254)]), holes: [] },
    ];
    expect(findFacing(equilateral, 'copper', 0).nearest).toBeNull();
  });

  it('past a tip between slanted bars: the lean that shares both normals, not either foot', () => {
    // Bars open to the right at a slope of 1/4 on either side of the x axis; a needle on the axis bars the way up to its
    // tip of 90° at x = 2 mm. By symmetry the shortest way past is upright there: 2 · (1 + 2/4) mm.
    const um = (points: readonly (readonly [number, number])[]): Shape[number] => ({
      outer: contourOf(points.map(([x, y]) => point(x * 1000, y * 1000))),
      holes: [],
    });
    const shape = [
      um([
        [0, 1000],
        [8000, 3000],
        [8000, 5000],
        [0, 5000],
      ]),
      um([
        [0, -1000],
        [0, -5000],
        [8000, -5000],
        [8000, -3000],
      ]),
      um([
        [-1000, -100],
        [1900, -100],
        [2000, 0],
        [1900, 100],
        [-1000, 100],
      ]),
    ];
    // Behind the bars, and seen from the tip nearly upright: they only break up the directions in which it looks.
    for (const y of [-8000, 7900]) {
      for (const x of [1700, 2200])
        shape.push(
          um([
            [x, y],
            [x + 100, y],
            [x + 100, y + 100],
            [x, y + 100],
          ]),
        );
    }
    const betweenBars = findFacing(shape, 'clearance', 20 * MM).below.find(
      ({ from, to }) => Math.min(from.yNm, to.yNm) < -0.5 * MM && Math.max(from.yNm, to.yNm) > 0.5 * MM,
    )!;
    expect(betweenBars.distanceNm).toBeCloseTo(3 * MM, 3);
    expect([betweenBars.from.xNm, betweenBars.to.xNm]).toEqual([2 * MM, 2 * MM]);
  });

  it('arcs are measured as arcs: a disc by a bar, a land in its clearance, a ring of copper', () => {
    const gap = (shape: Shape) => findFacing(shape, 'clearance', 0).nearest!.distanceNm;
    const width = (shape: Shape) => findFacing(shape, 'copper', 0).nearest!.distanceNm;
    const round = (x: number, y: number, radius: number) => disc(point(x, y), radius);
    const bar = rectangle(-5 * MM, -MM, 5 * MM, 0);
    expect(gap([bar, { outer: round(0.3 * MM, 2.15 * MM, 2 * MM), holes: [] }])).toBeCloseTo(150_000, 2);
    const [land, clearance] = [round(7_123_457, 3 * MM, 600_000), round(7_123_457, 3 * MM, 800_000)];
    const plate = { ...rectangle(0, 0, 20 * MM, 20 * MM), holes: [reverse(clearance)] };
    expect(gap([plate, { outer: land, holes: [] }])).toBeCloseTo(200_000, 2);
    expect(width([{ outer: clearance, holes: [reverse(land)] }])).toBeCloseTo(200_000, 2);
    // Two discs side by side on a slant: distance of centres 5 mm less two radii.
    const discs: Shape = [
      { outer: round(0, 0, MM), holes: [] },
      { outer: round(3 * MM, 4 * MM, 2 * MM), holes: [] },
    ];
    expect(gap(discs)).toBeCloseTo(2 * MM, 1);
  });

  it('a hole has a gap across it and copper around it', () => {
    const ring: Shape = [
      {
        ...rectangle(0, 0, 5 * MM, 5 * MM),
        holes: [contourOf([point(MM, 2 * MM), point(MM, 3 * MM), point(4 * MM, 3 * MM), point(4 * MM, 2 * MM)])],
      },
    ];
    expect(findFacing(ring, 'clearance', 0).nearest!.distanceNm).toBe(MM);
    expect(findFacing(ring, 'copper', 0).nearest!.distanceNm).toBe(MM);
  });

  it('is exact on a board of over 94.9 mm', () => {
    const far: Shape = [rectangle(0, 0, 400 * MM, 150_000), rectangle(0, 300_001, 400 * MM, 5 * MM)];
    expect(findFacing(far, 'clearance', 0).nearest!.distanceNm).toBe(150_001);
    expect(findFacing(far, 'copper', 0).nearest!.distanceNm).toBe(150_000);
  });
});

describe('opening and closing by an independent clipper', () => {
  it('agree with width and gap on axis-parallel shapes', async () => {
    const { default: ClipperLib } = await import('clipper-lib');
    const offset = (paths: { X: number; Y: number }[][], delta: number) => {
      const tool = new ClipperLib.ClipperOffset(10, 100);
      tool.AddPaths(paths, ClipperLib.JoinType.jtMiter, ClipperLib.EndType.etClosedPolygon);
      const result: { X: number; Y: number }[][] = [];
      tool.Execute(result, delta);
      return result;
    };
    const area = (paths: { X: number; Y: number }[][]): number =>
      paths.reduce((sum, path) => sum + ClipperLib.Clipper.Area(path), 0);
    for (const gapM of [0.15e-3, 0.3e-3]) {
      const artwork = sampleArtwork(designWith({ feed: { notchGapM: gapM } }));
      const corners = artwork.copperTop.map(({ outer }) => [
        outer.start,
        ...outer.edges.slice(0, -1).map(({ to }) => to),
      ]);
      const paths = corners.map((ring) => ring.map(({ xNm, yNm }) => ({ X: xNm, Y: yNm })));
      const survives = (rule: number): boolean => {
        const d = Math.floor(rule / 2) - 1;
        // Closing fills gaps narrower than the rule.
        return Math.abs(area(offset(offset(paths, d), -d)) - area(paths)) < 1e6;
      };
      const { nearest } = findFacing(artwork.copperTop, 'clearance', 0);
      expect(survives(nearest!.distanceNm)).toBe(true);
      expect(survives(nearest!.distanceNm + 4)).toBe(false);
    }
  });
});
