// The laminates that a brief can name: one entry for every usual thickness of every generic class, no maker's product.

import { LAMINATE_CLASSES, type LaminateClass, type Range } from './classes.ts';
import type { Laminate } from './laminate.ts';

export interface LaminateEntry {
  readonly description: string;
  readonly laminate: Laminate;
  readonly sheets: string;
  readonly lossTangentRange: Range;
  readonly temperatureCoefficient: Range;
  readonly moisture: Range | null;
  readonly anisotropy: Range | null;
  readonly source: string;
}

/** Copper that an entry is given: usual electrodeposited foil of 35 um, unplated; common practice, no source. */
const FOIL = { copperThicknessM: 35e-6, copperBaseM: 35e-6, conductivitySPerM: 5.8e7, roughnessM: 1.8e-6 } as const;

function entryOf(kind: LaminateClass, thicknessM: number, thicknessToleranceM: number): LaminateEntry {
  const { key, permittivity, permittivityTolerance, lossTangent, thicknesses: _, ...rest } = kind;
  const micrometres = String(Math.round(thicknessM * 1e6)).padStart(4, '0');
  const millimetres = `${micrometres.slice(0, -3)}.${micrometres.slice(-3)}`.replace(/\.?0+$/, '');
  return {
    ...rest,
    laminate: {
      name: `${key}-${millimetres}mm`,
      permittivity,
      permittivityTolerance,
      lossTangent,
      thicknessM,
      thicknessToleranceM,
      ...FOIL,
    },
  };
}

const ENTRIES: readonly LaminateEntry[] = LAMINATE_CLASSES.flatMap((kind) =>
  kind.thicknesses.map(([thicknessM, toleranceM]) => entryOf(kind, thicknessM, toleranceM)),
);

/** Every entry, class by class, thinnest first. The name ends in the dielectric's thickness. */
export function listLaminates(): readonly LaminateEntry[] {
  return ENTRIES;
}

/** The entry of that name, or undefined. */
export function findLaminate(name: string): LaminateEntry | undefined {
  return ENTRIES.find((entry) => entry.laminate.name === name);
}
