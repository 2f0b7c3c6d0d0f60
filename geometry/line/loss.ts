// Loss of copper and dielectric.

import { ETA0_OHM, MU0_H_PER_M, SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import type { StripGeometry } from './microstrip.ts';
import { dispersiveLine } from './microstrip-dispersion.ts';

/** Skin depth δ = 1/√(π f μ0 σ) [m]. */
export function skinDepthM(frequencyHz: number, conductivitySPerM: number): number {
  return 1 / Math.sqrt(Math.PI * frequencyHz * MU0_H_PER_M * conductivitySPerM);
}

/** Surface resistance Rs = √(π f μ0/σ) [Ω]. */
export function surfaceResistanceOhm(frequencyHz: number, conductivitySPerM: number): number {
  return Math.sqrt((Math.PI * frequencyHz * MU0_H_PER_M) / conductivitySPerM);
}

/** Factor by which roughness raises the surface resistance; 1 for smooth foil, at most 2.
 *  K = 1 + (2/π) atan(1.4 (Rq/δ)²)
 *  @param roughnessM  root-mean-square roughness Rq [m]
 *  Valid: up to a few GHz beyond Rq ≈ δ; saturates at 2, where measured foils go on rising.
 *  Source: E. Hammerstad, F. Bekkadal, Microstrip Handbook, 1975 (from memory; limits checked) */
export function roughnessFactor(roughnessM: number, skinM: number): number {
  return 1 + (2 / Math.PI) * Math.atan(1.4 * (roughnessM / skinM) ** 2);
}

/** Attenuation by the dielectric.
 *  α = k0 εr (ε−1) tanδ / (2 √ε (εr−1)) [Np/m]; at εr = 1 the limit k0 tanδ/2.
 *  Source: D. M. Pozar, Microwave Engineering, 4th ed., eq. (3.198) */
export function dielectricLossNpPerM(
  frequencyHz: number,
  permittivity: number,
  effectivePermittivity: number,
  lossTangent: number,
): number {
  const k0 = (2 * Math.PI * frequencyHz) / SPEED_OF_LIGHT_M_PER_S;
  const filling = permittivity === 1 ? 1 : (permittivity * (effectivePermittivity - 1)) / (permittivity - 1);
  return (k0 * filling * lossTangent) / (2 * Math.sqrt(effectivePermittivity));
}

/** Attenuation by strip and ground, current crowding included.
 *  α = (Rs K / Z0 w) exp(−1.2 (Z0√ε/η0)^0.7): the uniform-current value reduced by the share of the current that the
 *  strip's upper side carries.
 *  @returns α [Np/m]
 *  Accuracy: the paper claims none beyond "sufficient for design"; the textbook example in the tests gives a check.
 *  Source: Hammerstad & Jensen 1980, as in microstrip.ts (current distribution factor from memory) */
export function conductorLossNpPerM(
  strip: StripGeometry,
  frequencyHz: number,
  metal: { readonly conductivitySPerM: number; readonly roughnessM: number },
): number {
  const line = dispersiveLine(strip, frequencyHz);
  const rs = surfaceResistanceOhm(frequencyHz, metal.conductivitySPerM);
  const k = roughnessFactor(metal.roughnessM, skinDepthM(frequencyHz, metal.conductivitySPerM));
  const airOhm = line.staticImpedanceOhm * Math.sqrt(line.staticEffectivePermittivity);
  const crowding = Math.exp(-1.2 * (airOhm / ETA0_OHM) ** 0.7);
  return (rs * k * crowding) / (line.staticImpedanceOhm * strip.widthM);
}
