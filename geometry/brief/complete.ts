// What a record leaves out, filled in: every default is taken here, and noted.

import { invariant } from '../errors.ts';
import { findFabricator } from '../fabricator/catalogue.ts';
import type { Fabricator } from '../fabricator/fabricator.ts';
import type { Laminate } from '../laminate/laminate.ts';
import { formatQuantity, parseQuantity } from '../units.ts';
import { LAMINATE_FIELDS, type QuantityField } from './fields.ts';
import { formatFabricator } from './format.ts';
import type { FabricatorRecord, LaminateRecord } from './schema.ts';

/** Takes what was given or else the default, and notes the default in the brief's own words. */
export type Take = <T>(path: string, given: T | undefined, fallback: T, written: string) => T;

/** The default that a field states, in SI. */
export function fallbackOf(field: QuantityField): { readonly value: number; readonly written: string } {
  const written = field.fallback;
  invariant(written !== undefined, `${field.label} states a default`);
  const parsed = parseQuantity(written, field.dimension);
  invariant(parsed.kind === 'value', `the default of ${field.label} is a quantity`);
  return { value: parsed.value, written };
}

/** Usual copper foils [m]. */
const FOILS_M = [5e-6, 9e-6, 12e-6, 18e-6, 35e-6, 70e-6, 105e-6, 140e-6, 175e-6, 210e-6];
/** Share of a foil's nominal thickness that copper may have lost and still count as that foil. */
const FOIL_LEAST = 0.9;
/** Where nothing else is known, of the permittivity and of the thickness. */
const PERMITTIVITY_SPREAD = 0.05;
const THICKNESS_SPREAD = 0.1;

/** The base copper that stands behind a finished thickness: the heaviest foil that it can be without plating. A heavier
 *  base has the wider rules, so this guess is the safe one. */
export function baseCopperOf(copperThicknessM: number): number {
  return FOILS_M.findLast((foilM) => FOIL_LEAST * foilM <= copperThicknessM) ?? copperThicknessM;
}

/** To six significant digits: a default is a round number, not the noise of a product. */
function round(value: number): number {
  return Number(value.toPrecision(6));
}

const lengthText = (lengthM: number): string => formatQuantity(lengthM, 'length');

export function completeLaminate(record: LaminateRecord, take: Take): Laminate {
  const { permittivity, lossTangent, thickness: thicknessM } = record;
  // Air has no lots; and no spread may reach below it.
  const spread = round(Math.min(PERMITTIVITY_SPREAD * permittivity, permittivity - 1));
  const thin = round(THICKNESS_SPREAD * thicknessM);
  const foil = fallbackOf(LAMINATE_FIELDS.copperThickness);
  const conductivity = fallbackOf(LAMINATE_FIELDS.conductivity);
  const roughness = fallbackOf(LAMINATE_FIELDS.roughness);
  const name = take('name', record.name, LAMINATE_FIELDS.name.fallback, LAMINATE_FIELDS.name.fallback);
  const permittivityTolerance = take('permittivityTolerance', record.permittivityTolerance, spread, String(spread));
  const thicknessToleranceM = take('thicknessTolerance', record.thicknessTolerance, thin, lengthText(thin));
  const copperThicknessM = take('copperThickness', record.copperThickness, foil.value, foil.written);
  const base = baseCopperOf(copperThicknessM);
  return {
    name,
    permittivity,
    permittivityTolerance,
    lossTangent,
    thicknessM,
    thicknessToleranceM,
    copperThicknessM,
    copperBaseM: take('copperBase', record.copperBase, base, lengthText(base)),
    conductivitySPerM: take('conductivity', record.conductivity, conductivity.value, conductivity.written),
    roughnessM: take('roughness', record.roughness, roughness.value, roughness.written),
  };
}

/** What a sheet leaves out is taken from this one. */
export const FALLBACK_FABRICATOR = 'shop-standard';

export function completeFabricator(record: FabricatorRecord, take: Take): Fabricator {
  const standard = findFabricator(FALLBACK_FABRICATOR)?.fabricator;
  invariant(standard !== undefined, 'the catalogue holds the fallback');
  const written = formatFabricator(standard) as Readonly<Record<string, unknown>>;
  const text = (key: string): string => {
    const value = written[key];
    return typeof value === 'string' ? value : JSON.stringify(value);
  };
  const or = <T>(key: string, given: T | undefined, fallback: T): T => take(key, given, fallback, text(key));
  const { mask, legend, plated } = record;
  return {
    name: take('name', record.name, 'unnamed fabricator', 'unnamed fabricator'),
    copperRows: record.copperRows.map(({ base, trace, space, ring }) => ({
      baseM: base,
      traceM: trace,
      spaceM: space,
      ringM: ring,
    })),
    edgeToleranceM: or('edgeTolerance', record.edgeTolerance, standard.edgeToleranceM),
    etchCompensation: or('etchCompensation', record.etchCompensation, standard.etchCompensation),
    copperToEdgeM: record.copperToEdge,
    boardMaxWidthM: or('boardMaxWidth', record.boardMaxWidth, standard.boardMaxWidthM),
    boardMaxLengthM: or('boardMaxLength', record.boardMaxLength, standard.boardMaxLengthM),
    outlineToleranceM: or('outlineTolerance', record.outlineTolerance, standard.outlineToleranceM),
    registrationM: or('registration', record.registration, standard.registrationM),
    minimumInnerRadiusM: or('minimumInnerRadius', record.minimumInnerRadius, standard.minimumInnerRadiusM),
    mask: or('mask', mask && { expansionM: mask.expansion, webM: mask.web }, standard.mask),
    legend: or('legend', legend && { lineM: legend.line, heightM: legend.height }, standard.legend),
    plated: or(
      'plated',
      plated && {
        minimumHoleM: plated.minimumHole,
        largestHoleM: plated.largestHole,
        aspectRatio: plated.aspectRatio,
      },
      standard.plated,
    ),
    minimumUnplatedHoleM: or('minimumUnplatedHole', record.minimumUnplatedHole, standard.minimumUnplatedHoleM),
    unplatedHoleToCopperM: or('unplatedHoleToCopper', record.unplatedHoleToCopper, standard.unplatedHoleToCopperM),
    unplatedRingM: or('unplatedRing', record.unplatedRing, standard.unplatedRingM),
    holeToleranceM: or('holeTolerance', record.holeTolerance, standard.holeToleranceM),
    drillStepM: or('drillStep', record.drillStep, standard.drillStepM),
    finishes: or('finishes', record.finishes, standard.finishes),
  };
}
