// One-dimensional root and minimum, bracketed: slow in no case, deterministic in all.

import { invariant } from '../errors.ts';

/** A root of f between a and b, where f changes sign (bisection, sped up by interpolation).
 *  @param tolerance  greatest distance of the result from a sign change, in the unit of a and b
 *  Throws: invariant when f does not change sign.
 *  Source: R. P. Brent, Algorithms for Minimization without Derivatives, 1973, chapter 4 */
export function findRoot(f: (x: number) => number, from: number, to: number, tolerance: number): number {
  let a = from;
  let b = to;
  let fa = f(a);
  let fb = f(b);
  if (fa === 0) return a;
  if (fb === 0) return b;
  invariant(fa * fb < 0, `findRoot: no sign change between ${from} and ${to}`);
  let c = a;
  let fc = fa;
  let step = b - a;
  let lastStep = step;
  for (let i = 0; i < 200; i++) {
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const middle = (c - b) / 2;
    const limit = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2;
    if (Math.abs(middle) <= limit || fb === 0) return b;
    if (Math.abs(lastStep) >= limit && Math.abs(fa) > Math.abs(fb)) {
      const s = fb / fa;
      let p: number;
      let q: number;
      if (a === c) {
        p = 2 * middle * s;
        q = 1 - s;
      } else {
        const r = fb / fc;
        const t = fa / fc;
        p = s * (2 * middle * t * (t - r) - (b - a) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * middle * q - Math.abs(limit * q), Math.abs(lastStep * q))) {
        lastStep = step;
        step = p / q;
      } else {
        step = middle;
        lastStep = middle;
      }
    } else {
      step = middle;
      lastStep = middle;
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > limit ? step : Math.sign(middle) * limit;
    fb = f(b);
    if (fb * fc > 0) {
      c = a;
      fc = fa;
      step = b - a;
      lastStep = step;
    }
  }
  return b;
}

/** The place of the smallest f between a and b, f having one minimum there (golden section).
 *  @param tolerance  width of the last bracket, in the unit of a and b */
export function findMinimum(f: (x: number) => number, from: number, to: number, tolerance: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let a = from;
  let b = to;
  let c = b - ratio * (b - a);
  let d = a + ratio * (b - a);
  let fc = f(c);
  let fd = f(d);
  while (b - a > tolerance) {
    if (fc < fd) {
      b = d;
      d = c;
      fd = fc;
      c = b - ratio * (b - a);
      fc = f(c);
    } else {
      a = c;
      c = d;
      fc = fd;
      d = a + ratio * (b - a);
      fd = f(d);
    }
  }
  return (a + b) / 2;
}
