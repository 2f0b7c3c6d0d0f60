// SI constants, and the one place where text with a unit becomes a number and back.

/** Speed of light in vacuum [m/s], exact by definition of the metre. */
export const SPEED_OF_LIGHT_M_PER_S = 299_792_458;
/** Vacuum permeability [H/m]; CODATA 2018 differs from 4π·10⁻⁷ by 5·10⁻¹⁰, which no formula here can see. */
export const MU0_H_PER_M = 4e-7 * Math.PI;
/** Vacuum permittivity [F/m]. */
export const EPSILON0_F_PER_M = 1 / (MU0_H_PER_M * SPEED_OF_LIGHT_M_PER_S ** 2);
/** Wave impedance of vacuum [Ω]. */
export const ETA0_OHM = MU0_H_PER_M * SPEED_OF_LIGHT_M_PER_S;

export const NM_PER_M = 1e9;

/** Metres to whole nanometres. */
export function toNm(lengthM: number): number {
  return Math.round(lengthM * NM_PER_M);
}

/** Whole nanometres to metres. */
export function fromNm(lengthNm: number): number {
  return lengthNm / NM_PER_M;
}
