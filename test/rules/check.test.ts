// The rule check on boards and on small shapes whose answer is plain.

import { describe, expect, it } from 'vitest';
import { EngineError } from '../../geometry/errors.ts';
import { checkRules } from '../../geometry/rules/check.ts';
import { findFacing } from '../../geometry/rules/facing.ts';
import type { RuleReport } from '../../geometry/rules/violation.ts';
import { contourOf, rectangle } from '../../geometry/shape/primitives.ts';
import { point, type Shape } from '../../geometry/shape/shape.ts';
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
