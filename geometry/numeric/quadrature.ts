// Gauss–Legendre quadrature.

export interface QuadratureRule {
  /** Nodes in (−1, 1), ascending. */
  readonly nodes: readonly number[];
  readonly weights: readonly number[];
}

/** Nodes and weights of the n-point rule, exact for polynomials of degree 2n − 1, by Newton's method on P_n.
 *  Source: M. Abramowitz, I. Stegun, Handbook of Mathematical Functions, 1964, 25.4.29 */
export function gaussLegendre(n: number): QuadratureRule {
  const nodes: number[] = new Array<number>(n);
  const weights: number[] = new Array<number>(n);
  for (let i = 0; i < n; i++) {
    let x = -Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 0;
    for (let round = 0; round < 100; round++) {
      let p = 1;
      let before = 0;
      for (let k = 1; k <= n; k++) {
        [p, before] = [((2 * k - 1) * x * p - (k - 1) * before) / k, p];
      }
      slope = (n * (x * p - before)) / (x * x - 1);
      const step = p / slope;
      x -= step;
      if (Math.abs(step) < 1e-15) break;
    }
    nodes[i] = x;
    weights[i] = 2 / ((1 - x * x) * slope * slope);
  }
  return { nodes, weights };
}

/** ∫ f over [from, to] by a given rule. */
export function integrate(f: (x: number) => number, from: number, to: number, rule: QuadratureRule): number {
  const half = (to - from) / 2;
  const middle = (to + from) / 2;
  let sum = 0;
  for (let i = 0; i < rule.nodes.length; i++) sum += rule.weights[i]! * f(middle + half * rule.nodes[i]!);
  return sum * half;
}
