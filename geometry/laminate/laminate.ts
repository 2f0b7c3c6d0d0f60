// A copper-clad laminate as the engine uses it.

export interface Laminate {
  readonly name: string;
  /** Relative permittivity across the thickness, design value at the working frequency. */
  readonly permittivity: number;
  /** ± of the permittivity, taken as three sigma. */
  readonly permittivityTolerance: number;
  readonly lossTangent: number;
  /** Finished dielectric between the coppers [m]. */
  readonly thicknessM: number;
  /** ± of the thickness [m], three sigma. */
  readonly thicknessToleranceM: number;
  /** Finished copper thickness [m]. */
  readonly copperThicknessM: number;
  /** Base copper before plating [m]; chooses the fabricator's row. */
  readonly copperBaseM: number;
  /** Copper conductivity [S/m]. */
  readonly conductivitySPerM: number;
  /** Root-mean-square roughness of the foil on the dielectric side [m]. */
  readonly roughnessM: number;
}
