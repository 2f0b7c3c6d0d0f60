// Shapes: booleans against an independent clipper, exact predicates, arcs, the validator.

import ClipperLib from 'clipper-lib';
import { describe, expect, it } from 'vitest';
import { difference, intersection, union } from '../../geometry/shape/boolean.ts';
import { flatten } from '../../geometry/shape/flatten.ts';
import { areaNm2, contourAreaNm2, locate } from '../../geometry/shape/measure.ts';
import { crossSign, segmentsMeet, turn } from '../../geometry/shape/predicates.ts';
import { contourOf, rectangle, reverse } from '../../geometry/shape/primitives.ts';
import { cleanRing, splitAtTouches } from '../../geometry/shape/rings.ts';
import { type Contour, point, type Ring, type Shape } from '../../geometry/shape/shape.ts';
import { validateContour, validateShape, validateWithin } from '../../geometry/shape/validate.ts';

const MM = 1_000_000;

/** A disc of two half circles. */
function disc(xNm: number, yNm: number, radiusNm: number): Contour {
  const centre = point(xNm, yNm);
  const left = point(xNm - radiusNm, yNm);
  const right = point(xNm + radiusNm, yNm);
  return {
    start: right,
    edges: [
      { kind: 'arc', to: left, centre, clockwise: false },
      { kind: 'arc', to: right, centre, clockwise: false },
    ],
  };
}

let state = 7;
function random(): number {
  state = (Math.imul(state, 1103515245) + 12345) & 0x7fffffff;
  return state / 0x7fffffff;
}

describe('booleans', () => {
  it('union, difference and intersection of random rectangles have the areas of an independent clipper (seed 7)', () => {
    for (let round = 0; round < 30; round++) {
      const make = (): Shape =>
        union(
          ...Array.from({ length: 6 }, () => {
            const x = Math.round(random() * 20 * MM);
            const y = Math.round(random() * 20 * MM);
            return [rectangle(x, y, x + Math.round((1 + 8 * random()) * MM), y + Math.round((1 + 8 * random()) * MM))];
          }),
        );
      const a = make();
      const b = make();
      const paths = (shape: Shape) =>
        shape.flatMap(({ outer, holes }) =>
          [outer, ...holes].map((c) => flatten(c, 1).map(({ xNm, yNm }) => ({ X: xNm, Y: yNm }))),
        );
      const reference = (type: number): number => {
        const clipper = new ClipperLib.Clipper();
        clipper.AddPaths(paths(a), ClipperLib.PolyType.ptSubject, true);
        clipper.AddPaths(paths(b), ClipperLib.PolyType.ptClip, true);
        const solution: { X: number; Y: number }[][] = [];
        clipper.Execute(type, solution, ClipperLib.PolyFillType.pftNonZero, ClipperLib.PolyFillType.pftNonZero);
        return solution.reduce((sum, path) => sum + ClipperLib.Clipper.Area(path), 0);
      };
      const { ctUnion, ctDifference, ctIntersection } = ClipperLib.ClipType;
      for (const [ours, type] of [
        [union(a, b), ctUnion],
        [difference(a, b), ctDifference],
        [intersection(a, b), ctIntersection],
      ] as const) {
        expect(areaNm2(ours)).toBe(reference(type));
        expect(validateShape(ours, 'result')).toEqual([]);
      }
    }
  });

  it('a hole comes out as a hole, an island in it as a region', () => {
    const frame = difference([rectangle(0, 0, 10 * MM, 10 * MM)], [rectangle(2 * MM, 2 * MM, 8 * MM, 8 * MM)]);
    const withIsland = union(frame, [rectangle(4 * MM, 4 * MM, 6 * MM, 6 * MM)]);
    expect(withIsland.map(({ holes }) => holes.length).sort()).toEqual([0, 1]);
    expect(areaNm2(withIsland)).toBe((100 - 36 + 4) * MM * MM);
  });

  it('islands in holes of islands keep their own holes', () => {
    const square = (inset: number): Shape => [rectangle(inset * MM, inset * MM, (20 - inset) * MM, (20 - inset) * MM)];
    const frame = difference(square(0), square(2));
    const inner = difference(square(4), square(6));
    const both = union(frame, inner, square(8));
    expect(both.map(({ holes }) => holes.length)).toEqual([1, 1, 0]);
    expect(validateShape(both, 'both')).toEqual([]);
    expect(areaNm2(both) / MM / MM).toBe(400 - 256 + 144 - 64 + 16);
  });

  it('a spike that runs back on itself ends, and leaves nothing', () => {
    const spike: Ring = [point(9, 15), point(15, 15), point(16, 15), point(6, 15), point(15, 19)].map(({ xNm, yNm }) =>
      point(xNm * MM, yNm * MM),
    );
    expect(areaNm2(union([{ outer: contourOf(spike), holes: [] }]))).toBeGreaterThan(0);
    expect(cleanRing([point(0, 0), point(5, 0), point(2, 0)])).toEqual([]);
    expect(cleanRing([point(0, 0), point(1, 0), point(2, 0), point(2, 2), point(2, 2), point(0, 2)])).toHaveLength(4);
  });

  it('a ring that touches itself in a corner is split there', () => {
    const eight: Ring = [
      point(0, 0),
      point(2, 0),
      point(2, 2),
      point(4, 2),
      point(4, 4),
      point(2, 4),
      point(2, 2),
      point(0, 2),
    ];
    const parts = splitAtTouches(eight);
    expect(parts).toHaveLength(2);
    expect(parts.map((ring) => contourAreaNm2(contourOf(ring)))).toEqual([4, 4]);
  });
});

describe('predicates', () => {
  it('turn is exact where doubles are not', () => {
    // Spans of 300 mm: the products differ in their last bit only.
    const a = point(0, 0);
    const b = point(299_999_999, 300_000_000);
    const c = point(299_999_998, 299_999_999);
    expect(BigInt(b.xNm) * BigInt(c.yNm) - BigInt(b.yNm) * BigInt(c.xNm)).toBe(1n);
    expect(turn(a, b, c)).toBe(1);
    expect(turn(a, c, b)).toBe(-1);
    expect(turn(a, b, point(2 * b.xNm, 2 * b.yNm))).toBe(0);
    expect(crossSign(1, 0, 0, 1)).toBe(1);
  });

  it('segments that touch meet, segments apart do not', () => {
    expect(segmentsMeet(point(0, 0), point(4, 0), point(2, 0), point(2, 5))).toBe(true);
    expect(segmentsMeet(point(0, 0), point(4, 0), point(2, 1), point(2, 5))).toBe(false);
    expect(segmentsMeet(point(0, 0), point(4, 4), point(0, 4), point(4, 0))).toBe(true);
    expect(segmentsMeet(point(0, 0), point(4, 0), point(5, 0), point(9, 0))).toBe(false);
  });

  it('locates points inside, outside and on', () => {
    const ring: Ring = [point(0, 0), point(10, 0), point(10, 10), point(5, 3), point(0, 10)];
    expect(locate(point(5, 2), ring)).toBe('inside');
    expect(locate(point(5, 3), ring)).toBe('on');
    expect(locate(point(5, 4), ring)).toBe('outside');
    expect(locate(point(10, 5), ring)).toBe('on');
    expect(locate(point(5, 2), [...ring].reverse())).toBe('inside');
  });
});

describe('arcs', () => {
  it('a disc has the area πr², and its polygons fall short by what their chord error allows', () => {
    const contour = disc(7 * MM, 3 * MM, 5 * MM);
    const exact = Math.PI * (5 * MM) ** 2;
    expect(contourAreaNm2(contour) / exact).toBeCloseTo(1, 12);
    expect(contourAreaNm2(reverse(contour)) / exact).toBeCloseTo(-1, 12);
    for (const chordNm of [100, 1000, 20_000]) {
      const short = 1 - contourAreaNm2(contourOf(flatten(contour, chordNm))) / exact;
      expect(short).toBeGreaterThan(0);
      // The area lost is at most two thirds of the sagitta times the circumference.
      expect(short).toBeLessThan(((4 / 3) * chordNm) / (5 * MM) + 1e-9);
    }
  });
});

describe('validator', () => {
  const sound = contourOf([point(0, 0), point(5 * MM, 0), point(5 * MM, 5 * MM), point(0, 5 * MM)]);

  it('passes sound contours, with arcs too', () => {
    expect(validateContour(sound, true, 'c')).toEqual([]);
    expect(validateContour(disc(0, 0, MM), true, 'c')).toEqual([]);
  });

  it.each([
    ['notWhole', contourOf([point(0, 0), point(5 * MM + 0.5, 0), point(5 * MM, 5 * MM), point(0, 5 * MM)])],
    ['shortEdge', contourOf([point(0, 0), point(5 * MM, 0), point(5 * MM, 999), point(0, 5 * MM)])],
    ['meetsItself', contourOf([point(0, 0), point(5 * MM, 5 * MM), point(5 * MM, 0), point(0, 5 * MM)])],
    [
      'meetsItself',
      contourOf([point(0, 0), point(5 * MM, 0), point(5 * MM, 5 * MM), point(2 * MM, 0), point(0, 5 * MM)]),
    ],
    ['meetsItself', contourOf([point(0, 0), point(5 * MM, 0), point(2 * MM, 0)])],
    [
      'meetsItself',
      contourOf([point(0, 0), point(5 * MM, 0), point(5 * MM, 9 * MM), point(5 * MM, 5 * MM), point(0, 5 * MM)]),
    ],
    ['orientation', reverse(sound)],
    ['notClosed', { ...sound, edges: sound.edges.slice(0, 3) }],
    ['fewEdges', contourOf([point(0, 0), point(5 * MM, 0)])],
    [
      'arcRadius',
      {
        start: point(0, 0),
        edges: [
          { kind: 'arc', to: point(2 * MM, 0), centre: point(MM, 100), clockwise: true },
          { kind: 'arc', to: point(0, 0), centre: point(MM + 50, 0), clockwise: true },
        ],
      },
    ],
  ] as const)('finds %s', (code, contour) => {
    expect(validateContour(contour as Contour, true, 'c').map((fault) => fault.code)).toContain(code);
  });

  it('finds holes that leave their outline and regions that meet', () => {
    const hole = (x: number) => reverse(rectangle(x, MM, x + MM, 2 * MM).outer);
    expect(validateShape([{ outer: sound, holes: [hole(MM)] }], 's')).toEqual([]);
    expect(validateShape([{ outer: sound, holes: [hole(4.5 * MM)] }], 's').map(({ code }) => code)).toEqual([
      'holeOutside',
    ]);
    expect(
      validateShape([{ outer: sound, holes: [] }, rectangle(4 * MM, 4 * MM, 9 * MM, 9 * MM)], 's').map(
        ({ code }) => code,
      ),
    ).toEqual(['regionsMeet']);
    expect(
      validateShape([{ outer: sound, holes: [] }, rectangle(MM, MM, 2 * MM, 2 * MM)], 's').map(({ code }) => code),
    ).toEqual(['regionsMeet']);
  });

  it('finds regions that lie in one another, in either order, and lets islands in holes be', () => {
    const inner = rectangle(MM, MM, 2 * MM, 2 * MM);
    const around = { outer: sound, holes: [] };
    const codes = (shape: Shape) => validateShape(shape, 's').map(({ code }) => code);
    expect(codes([inner, around])).toEqual(['regionsMeet']);
    expect(codes([around, inner])).toEqual(['regionsMeet']);
    const hole = reverse(rectangle(MM / 2, MM / 2, 3 * MM, 3 * MM).outer);
    expect(codes([inner, { outer: sound, holes: [hole] }])).toEqual([]);
    expect(codes([{ outer: sound, holes: [hole] }, inner])).toEqual([]);
    expect(codes([{ outer: sound, holes: [hole, reverse(inner.outer)] }])).toEqual(['holeOutside']);
  });

  it('finds what leaves an outline, by a corner or across a bay', () => {
    const bay = contourOf([
      point(0, 0),
      point(9 * MM, 0),
      point(9 * MM, 9 * MM),
      point(5 * MM, 9 * MM),
      point(4.5 * MM, 2 * MM),
      point(4 * MM, 9 * MM),
      point(0, 9 * MM),
    ]);
    const codes = (shape: Shape) => validateWithin(shape, bay, 's').map(({ code }) => code);
    expect(codes([rectangle(0, 0, 9 * MM, MM)])).toEqual([]);
    expect(codes([rectangle(MM, MM, 10 * MM, 1.5 * MM)])).toEqual(['outsideProfile']);
    // All four corners are inside; the bay's tip is in it.
    expect(codes([rectangle(MM, MM, 8 * MM, 3 * MM)])).toEqual(['outsideProfile']);
  });
});
