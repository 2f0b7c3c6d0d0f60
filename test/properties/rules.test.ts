// Gap and width against brute force by sampling, which shares no code with the rule.

import { describe, expect, it } from 'vitest';
import { findFacing } from '../../geometry/rules/facing.ts';
import { contourOf } from '../../geometry/shape/primitives.ts';
import { point, type Shape } from '../../geometry/shape/shape.ts';

type Xy = readonly [number, number];

const SEED = 20261201;

/** mulberry32: a small seeded generator. */
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

const UM = 1000;

/** A comb: teeth of random widths and heights on a bar. */
function comb(random: () => number, x0: number, y0: number): Xy[] {
  const points: Xy[] = [[x0, y0]];
  let x = x0;
  const teeth = 2 + Math.floor(random() * 3);
  const top: Xy[] = [];
  for (let i = 0; i < teeth; i++) {
    const w = Math.round(300 + random() * 900);
    const g = Math.round(200 + random() * 900);
    const h = Math.round(900 + random() * 2000);
    const base = Math.round(300 + random() * 500);
    top.push([x, y0 + base + h], [x + w, y0 + base + h]);
    x += w;
    if (i < teeth - 1) {
      top.push([x, y0 + base], [x + g, y0 + base]);
      x += g;
    }
  }
  points.push([x, y0]);
  return [...points, ...top.reverse()];
}

/** Whether some corner is sharper than 61°: such corners are another rule's, and their sides face at no distance. */
function hasSharpCorner(polygon: readonly Xy[]): boolean {
  return polygon.some(([x, y], i) => {
    const [ax, ay] = polygon[(i + polygon.length - 1) % polygon.length]!;
    const [bx, by] = polygon[(i + 1) % polygon.length]!;
    const cos = ((ax - x) * (bx - x) + (ay - y) * (by - y)) / (Math.hypot(ax - x, ay - y) * Math.hypot(bx - x, by - y));
    return cos > Math.cos((61 * Math.PI) / 180);
  });
}

/** A star-shaped polygon with slanted sides and no sharp corner. */
function star(random: () => number, cx: number, cy: number, size = 1): Xy[] {
  for (;;) {
    const points = anyStar(random, cx, cy, size);
    if (!hasSharpCorner(points)) return points;
  }
}

function anyStar(random: () => number, cx: number, cy: number, size: number): Xy[] {
  const n = 5 + Math.floor(random() * 5);
  const points: Xy[] = [];
  for (let i = 0; i < n; i++) {
    const angle = (2 * Math.PI * (i + 0.6 * random())) / n;
    const r = size * (700 + random() * 2200);
    points.push([Math.round(cx + r * Math.cos(angle)), Math.round(cy + r * Math.sin(angle))]);
  }
  return points;
}

function isInside(x: number, y: number, polygons: readonly Xy[][]): boolean {
  let winding = 0;
  for (const polygon of polygons) {
    for (let i = 0; i < polygon.length; i++) {
      const [ax, ay] = polygon[i]!;
      const [bx, by] = polygon[(i + 1) % polygon.length]!;
      const side = (bx - ax) * (y - ay) - (x - ax) * (by - ay);
      if (ay <= y && by > y && side > 0) winding += 1;
      if (ay > y && by <= y && side < 0) winding -= 1;
    }
  }
  return winding !== 0;
}

/** Smallest distance between boundary samples whose connection meets both sides at 60° or more and runs, sampled,
 *  wholly in copper or wholly outside. Coordinates in µm. */
function bruteForce(polygons: readonly Xy[][], across: 'clearance' | 'copper', step: number): number {
  const samples: { x: number; y: number; ux: number; uy: number; key: number }[] = [];
  let key = 0;
  for (const polygon of polygons) {
    for (let i = 0; i < polygon.length; i++) {
      const [ax, ay] = polygon[i]!;
      const [bx, by] = polygon[(i + 1) % polygon.length]!;
      const length = Math.hypot(bx - ax, by - ay);
      const count = Math.max(2, Math.ceil(length / step));
      for (let k = 0; k <= count; k++) {
        const t = k / count;
        samples.push({
          x: ax + t * (bx - ax),
          y: ay + t * (by - ay),
          ux: (bx - ax) / length,
          uy: (by - ay) / length,
          key,
        });
      }
      key += 1;
    }
  }
  let best = Number.POSITIVE_INFINITY;
  for (let i = 0; i < samples.length; i++) {
    const p = samples[i]!;
    for (let j = i + 1; j < samples.length; j++) {
      const q = samples[j]!;
      if (p.key === q.key) continue;
      const dx = q.x - p.x;
      const dy = q.y - p.y;
      const d = Math.hypot(dx, dy);
      if (d >= best || d < 1e-9) continue;
      // 60° between segment and side: |cos| ≤ ½, with a hair for samples that stand on the limit.
      if (Math.abs(dx * p.ux + dy * p.uy) > 0.5001 * d || Math.abs(dx * q.ux + dy * q.uy) > 0.5001 * d) continue;
      // Copper lies to the left of every side: the connection must leave p, and reach q, on the right kind of side,
      // or it would run along a boundary that the probes cannot tell from either.
      const out = across === 'clearance' ? 1 : -1;
      if (out * (dx * p.uy - dy * p.ux) <= 0 || out * (dx * q.uy - dy * q.ux) >= 0) continue;
      const probes = Math.max(5, Math.ceil(d / (step / 2)));
      let open = true;
      for (let k = 1; k < probes && open; k++) {
        const t = k / probes;
        open = isInside(p.x + t * dx, p.y + t * dy, polygons) === (across === 'copper');
      }
      if (open) best = d;
    }
  }
  return best;
}

function shapeOf(polygons: readonly Xy[][]): Shape {
  return polygons.map((polygon) => ({ outer: contourOf(polygon.map(([x, y]) => point(x * UM, y * UM))), holes: [] }));
}

/** Whether a claimed place is one: both ends on sides that the connection meets at 60° or more (less rounding), and
 *  open between. Coordinates in µm. */
function isPlace(p: Xy, q: Xy, polygons: readonly Xy[][], across: 'clearance' | 'copper'): boolean {
  const dx = q[0] - p[0];
  const dy = q[1] - p[1];
  const d = Math.hypot(dx, dy);
  const meets = ([x, y]: Xy): boolean =>
    polygons.some((polygon) =>
      polygon.some(([ax, ay], i) => {
        const [bx, by] = polygon[(i + 1) % polygon.length]!;
        const length = Math.hypot(bx - ax, by - ay);
        const t = ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / length;
        const off = Math.abs((x - ax) * (by - ay) - (y - ay) * (bx - ax)) / length;
        const lean = Math.abs(dx * (bx - ax) + dy * (by - ay)) / (d * length);
        return off < 0.002 && t > -0.002 && t < length + 0.002 && lean < 0.5001;
      }),
    );
  for (let k = 1; k < 200; k++) {
    // A hair to the side: the place may brush a corner.
    const open = [0.01, -0.01].some(
      (side) =>
        isInside(p[0] + (k / 200) * dx - (dy / d) * side, p[1] + (k / 200) * dy + (dx / d) * side, polygons) ===
        (across === 'copper'),
    );
    if (!open) return false;
  }
  return meets(p) && meets(q);
}

function compare(polygons: readonly Xy[][], label: string): void {
  for (const across of ['clearance', 'copper'] as const) {
    const { nearest } = findFacing(shapeOf(polygons), across, 0);
    const sampled = bruteForce(polygons, across, 40);
    const said = `${label}, ${across}: ours ${JSON.stringify(nearest)}, sampled ${sampled}, ${JSON.stringify(polygons)}`;
    // Samples never find a tighter place than there is …
    if (Number.isFinite(sampled)) {
      expect(nearest, said).not.toBeNull();
      expect(nearest!.distanceNm / UM, said).toBeLessThanOrEqual(sampled + 0.5);
    }
    // … and miss places on a knife's edge: so the one that we claim is examined itself.
    if (nearest !== null) {
      const xy = ({ xNm, yNm }: { xNm: number; yNm: number }): Xy => [xNm / UM, yNm / UM];
      const [p, q] = [xy(nearest.from), xy(nearest.to)];
      expect(Math.abs(Math.hypot(q[0] - p[0], q[1] - p[1]) - nearest.distanceNm / UM), said).toBeLessThan(0.002);
      expect(isPlace(p, q, polygons, across), said).toBe(true);
    }
  }
}

describe(`gap and width, seed ${SEED}`, () => {
  const random = generator(SEED);

  it('combs: rectilinear contours', () => {
    for (let i = 0; i < 12; i++) compare([comb(random, 0, 0)], `comb ${i}`);
  });

  it('slanted stars, alone', () => {
    for (let i = 0; i < 20; i++) compare([star(random, 0, 0)], `star ${i}`);
  });

  it('a star beside a comb, two stars side by side', () => {
    for (let i = 0; i < 8; i++) compare([star(random, 0, 0), comb(random, 3200, -1500)], `pair ${i}`);
    for (let i = 0; i < 8; i++) compare([star(random, 0, 0), star(random, 6000, 300)], `stars ${i}`);
  });

  it('a small star between two large ones: views past its corners', () => {
    for (let i = 0; i < 12; i++) {
      const between = star(random, 3500, (random() - 0.5) * 4000, 0.18);
      compare([star(random, 0, 0), star(random, 7000, 300), between], `three ${i}`);
    }
  });
});
