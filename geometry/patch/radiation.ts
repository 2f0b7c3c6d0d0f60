// What the current of a patch's first mode radiates: into the half space above, and into the slab's surface waves.
//
// The current runs along y as cos(πy/L) and is uniform along x. The slab's effect is exact (transmission-line
// voltages of the grounded slab), so nothing here is a thin-board approximation; the copper's edge currents and the
// losses of the slab are left out.

import { gaussLegendre } from '../numeric/quadrature.ts';
import { findRoot } from '../numeric/search.ts';
import { EPSILON0_F_PER_M, ETA0_OHM, SPEED_OF_LIGHT_M_PER_S } from '../units.ts';

export interface ModeOnSlab {
  /** Length over which the current is half a cosine [m]. */
  readonly lengthM: number;
  readonly widthM: number;
  readonly heightM: number;
  readonly permittivity: number;
  readonly frequencyHz: number;
}

/** Powers for a current density of 1 A/m (peak) at the patch's centre. */
export interface ModePowers {
  readonly spaceWaveW: number;
  readonly surfaceWaveW: number;
  /** Towards the zenith, against the space wave alone. */
  readonly directivityDbi: number;
}

// 20 nodes in θ and 10 in a quarter turn of φ: 1e-7 of a 60 × 40 rule for patches up to a wavelength.
const THETA_RULE = gaussLegendre(20);
const PHI_RULE = gaussLegendre(10);

/** Squared magnitude of the current's Fourier transform at (kx, ky) [(A·m)²]. */
function currentSpectrumSquared(mode: ModeOnSlab, kx: number, ky: number): number {
  const x = (kx * mode.widthM) / 2;
  const across = Math.abs(x) < 1e-6 ? 1 - (x * x) / 6 : Math.sin(x) / x;
  const y = (ky * mode.lengthM) / 2;
  // cos(y) / ((π/2)² − y²) has a removable zero at y = π/2.
  const near = Math.PI / 2 - Math.abs(y);
  const along = Math.abs(near) < 1e-6 ? 1 / Math.PI : Math.cos(y) / ((Math.PI / 2) ** 2 - y * y);
  const value = mode.widthM * across * ((Math.PI / 2) * mode.lengthM) * along;
  return value * value;
}

/** |V|² of the slab's TM and TE transmission lines, seen from the copper at elevation angle θ from the zenith [Ω²]. */
function slabVoltagesSquared(mode: ModeOnSlab, k0: number, sine: number): { readonly tm: number; readonly te: number } {
  const cosine = Math.sqrt(Math.max(0, 1 - sine * sine));
  const n = Math.sqrt(mode.permittivity - sine * sine);
  const tangent = Math.tan(k0 * mode.heightM * n);
  // TM: Zu = η0 cosθ, Zd = jη0 n tan/εr; TE: Zu = η0/cosθ, Zd = jη0 tan/n.
  const downTm = (ETA0_OHM * n * tangent) / mode.permittivity;
  const upTm = ETA0_OHM * cosine;
  const tm = (downTm * upTm) ** 2 / (downTm * downTm + upTm * upTm);
  const downTe = (ETA0_OHM * tangent) / n;
  // Zd Zu/(Zd + Zu) with Zu = η0/cosθ, written so that θ → 90° stays finite.
  const te = (downTe * ETA0_OHM) ** 2 / ((downTe * cosine) ** 2 + ETA0_OHM * ETA0_OHM);
  return { tm, te };
}

/** ∮|J·direction|² dφ around the circle kρ: TM takes the radial part of a current along y, TE the tangential one. */
function ringIntegral(mode: ModeOnSlab, radius: number, part: 'radial' | 'tangential'): number {
  let sum = 0;
  for (let i = 0; i < PHI_RULE.nodes.length; i++) {
    const phi = (Math.PI / 4) * (1 + PHI_RULE.nodes[i]!);
    const s = Math.sin(phi);
    const c = Math.cos(phi);
    const share = part === 'radial' ? s * s : c * c;
    sum += PHI_RULE.weights[i]! * share * currentSpectrumSquared(mode, radius * c, radius * s);
  }
  return 4 * (Math.PI / 4) * sum;
}

/** Power into the TM0 surface wave, and into TE1 where the board carries it (higher ones need boards beyond use). */
function surfaceWavePowerW(mode: ModeOnSlab, k0: number): number {
  const er = mode.permittivity;
  const height = k0 * mode.heightM;
  if (er <= 1) return 0;
  const omegaEpsilon = k0 * SPEED_OF_LIGHT_M_PER_S * EPSILON0_F_PER_M;
  const omegaMu = k0 * ETA0_OHM;
  let power = 0;
  // With s = kρ/k0: α = √(s²−1) in air, β = √(εr−s²) in the slab. TM: εr α = β tan(βk0h).
  const span = Math.sqrt(er - 1);
  const alphaOf = (beta: number): number => Math.sqrt(Math.max(0, er - 1 - beta * beta));
  {
    // f rises from negative at β → 0⁺… the first branch holds TM0 alone.
    const top = Math.min(span, (Math.PI / 2 / height) * (1 - 1e-12));
    const f = (beta: number): number => beta * Math.sin(beta * height) - er * alphaOf(beta) * Math.cos(beta * height);
    const beta = f(top) <= 0 ? top : findRoot(f, 0, top, 1e-14 * top);
    const alpha = alphaOf(beta);
    if (alpha > 0) {
      const s = Math.sqrt(er - beta * beta);
      const kp = k0 * s;
      const cosine = Math.cos(beta * height);
      const slope =
        kp / (alpha * k0) + (kp / er) * (Math.tan(beta * height) / (beta * k0) + mode.heightM / (cosine * cosine));
      const strength = (Math.PI * (alpha * k0) ** 2) / (omegaEpsilon * slope);
      power += (strength * kp * ringIntegral(mode, kp, 'radial')) / (8 * Math.PI ** 2);
    }
  }
  if (span * height > Math.PI / 2) {
    // TE: α + β cot(βk0h) = 0, first root between π/2 and π.
    const low = Math.PI / 2 / height;
    const high = Math.min(span, (Math.PI / height) * (1 - 1e-12));
    const g = (beta: number): number => alphaOf(beta) * Math.sin(beta * height) + beta * Math.cos(beta * height);
    if (g(low) * g(high) < 0) {
      const beta = findRoot(g, low, high, 1e-14 * high);
      const alpha = alphaOf(beta);
      const s = Math.sqrt(er - beta * beta);
      const kp = k0 * s;
      // V = jωμ0 / (u0 + u1 coth u1h); the denominator's slope over kρ.
      const sine = Math.sin(beta * height);
      const slope =
        kp / (alpha * k0) + kp * (-Math.cos(beta * height) / sine / (beta * k0) + mode.heightM / (sine * sine));
      power +=
        ((Math.PI * omegaMu) / Math.abs(slope)) * ((kp * ringIntegral(mode, kp, 'tangential')) / (8 * Math.PI ** 2));
    }
  }
  return power;
}

/** Powers and directivity of the mode.
 *  P = k0²/(8π²η0) ∫∫ (|V_TM J_u|² + cos²θ |V_TE J_v|²) sinθ dθ dφ over the upper half space;
 *  surface waves by the residues of V at their poles. Derived from the slab's transmission lines.
 *  Valid: any height up to the second TM surface wave. Checked against an independent spectral-domain solution. */
export function modePowers(mode: ModeOnSlab): ModePowers {
  const k0 = (2 * Math.PI * mode.frequencyHz) / SPEED_OF_LIGHT_M_PER_S;
  let spaceWave = 0;
  for (let i = 0; i < THETA_RULE.nodes.length; i++) {
    const theta = (Math.PI / 4) * (1 + THETA_RULE.nodes[i]!);
    const sine = Math.sin(theta);
    const cosine = Math.cos(theta);
    const v = slabVoltagesSquared(mode, k0, sine);
    const radial = v.tm * ringIntegral(mode, k0 * sine, 'radial');
    const tangential = cosine * cosine * v.te * ringIntegral(mode, k0 * sine, 'tangential');
    spaceWave += (Math.PI / 4) * THETA_RULE.weights[i]! * sine * (radial + tangential);
  }
  const factor = (k0 * k0) / (8 * Math.PI ** 2 * ETA0_OHM);
  const spaceWaveW = factor * spaceWave;
  const zenithWPerSr = factor * slabVoltagesSquared(mode, k0, 0).tm * currentSpectrumSquared(mode, 0, 0);
  return {
    spaceWaveW,
    surfaceWaveW: surfaceWavePowerW(mode, k0),
    directivityDbi: 10 * Math.log10((4 * Math.PI * zenithWPerSr) / spaceWaveW),
  };
}
