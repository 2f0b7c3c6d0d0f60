// What corners see, against rays cast at every side.

import { describe, expect, it } from 'vitest';
import { lookAround, sidesOf } from '../../geometry/rules/sight.ts';
import { point, type Ring } from '../../geometry/shape/shape.ts';

const SEED = 5;

function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1103515245) + 12345) & 0x7fffffff;
    return state / 0x7fffffff;
  };
}

describe(`lookAround, seed ${SEED}`, () => {
  const random = generator(SEED);
  /** A star of long thin rays around a point: near sides that stretch far away, corners that hide others. */
  const star = (cx: number, cy: number): Ring =>
    Array.from({ length: 9 }, (_, i) => {
      const angle = (2 * Math.PI * (i + 0.6 * random())) / 9;
      const radius = 1e6 * (0.2 + 2.6 * random());
      return point(Math.round(cx + radius * Math.cos(angle)), Math.round(cy + radius * Math.sin(angle)));
    });

  it('every view is of the side that a ray meets first, and views do not overlap', () => {
    let views = 0;
    for (let round = 0; round < 12; round++) {
      const rings = [star(0, 0), star(6e6, 0), star(3e6, 5.5e6)];
      for (const medium of ['clearance', 'copper'] as const) {
        const edges = rings.map((ring) => ring.map((_, number) => ({ number, circle: null })));
        const sides = sidesOf(rings, edges, medium);
        for (const leaving of sides) {
          const arriving = sides.find(
            ({ ring, index, count }) => ring === leaving.ring && (index + 1) % count === leaving.index,
          )!;
          const corner = lookAround(arriving, leaving, sides, medium);
          let last = 0;
          for (const view of corner.views) {
            expect(view.from).toBeGreaterThanOrEqual(last);
            expect(view.to).toBeLessThanOrEqual(corner.width + 1e-12);
            last = view.to;
            for (const share of [0.01, 0.5, 0.99]) {
              const angle = corner.start + view.from + share * (view.to - view.from);
              const [c, s] = [Math.cos(angle), Math.sin(angle)];
              // Solve corner + t (c, s) = a + k (b − a) for every side by Cramer's rule.
              const met = sides
                .filter((side) => side !== arriving && side !== leaving)
                .map((side) => {
                  const [ex, ey] = [side.bx - side.ax, side.by - side.ay];
                  const [rx, ry] = [side.ax - corner.x, side.ay - corner.y];
                  const det = ex * s - ey * c;
                  return { side, t: (ex * ry - ey * rx) / det, k: (c * ry - s * rx) / det };
                })
                .filter(({ t, k }) => t > 0 && k >= 0 && k <= 1)
                .sort((a, b) => a.t - b.t)[0];
              expect(met?.side).toBe(view.side);
              views += 1;
            }
          }
        }
      }
    }
    expect(views).toBeGreaterThan(1000);
  });
});
