// Complex numbers as plain pairs, for circuit algebra outside hot loops.

export interface Complex {
  readonly re: number;
  readonly im: number;
}

export function complex(re: number, im = 0): Complex {
  return { re, im };
}

export function add(a: Complex, b: Complex): Complex {
  return { re: a.re + b.re, im: a.im + b.im };
}

export function subtract(a: Complex, b: Complex): Complex {
  return { re: a.re - b.re, im: a.im - b.im };
}

export function multiply(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

export function scale(a: Complex, factor: number): Complex {
  return { re: a.re * factor, im: a.im * factor };
}

export function divide(a: Complex, b: Complex): Complex {
  const d = b.re * b.re + b.im * b.im;
  return { re: (a.re * b.re + a.im * b.im) / d, im: (a.im * b.re - a.re * b.im) / d };
}

export function magnitude(a: Complex): number {
  return Math.hypot(a.re, a.im);
}

/** tanh(x + jy), without overflow for large |x|. */
export function tanh(a: Complex): Complex {
  if (Math.abs(a.re) > 20) return { re: Math.sign(a.re), im: 0 };
  const d = Math.cosh(2 * a.re) + Math.cos(2 * a.im);
  return { re: Math.sinh(2 * a.re) / d, im: Math.sin(2 * a.im) / d };
}

export function negate(a: Complex): Complex {
  return { re: -a.re, im: -a.im };
}

/** Product with the imaginary unit. */
export function timesJ(a: Complex): Complex {
  return { re: -a.im, im: a.re };
}

export function cosine(a: Complex): Complex {
  return { re: Math.cos(a.re) * Math.cosh(a.im), im: -Math.sin(a.re) * Math.sinh(a.im) };
}

export function sine(a: Complex): Complex {
  return { re: Math.sin(a.re) * Math.cosh(a.im), im: Math.cos(a.re) * Math.sinh(a.im) };
}

export function tangent(a: Complex): Complex {
  return divide(sine(a), cosine(a));
}
