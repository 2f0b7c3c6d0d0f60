// A fabricator's sheet as limits in whole nanometres, for one weight of copper.

import { refuse } from '../errors.ts';
import { copperRow, type Fabricator } from '../fabricator/fabricator.ts';
import { toNm } from '../units.ts';

export interface Limits {
  readonly fabricator: string;
  /** Base copper [m], for messages. */
  readonly copperBaseM: number;
  readonly trace: number;
  readonly space: number;
  readonly copperToEdge: number;
  readonly boardWidth: number;
  readonly boardLength: number;
  /** Null where the shop lays no mask or prints no legend. */
  readonly maskWeb: number | null;
  readonly legendLine: number | null;
}

/** Limits for a copper weight.
 *  Throws: EngineError "copper.tooHeavy" where the shop etches none so thick. */
export function limitsOf(fabricator: Fabricator, copperBaseM: number): Limits {
  const row = copperRow(fabricator, copperBaseM);
  if (row === undefined) {
    const heaviest = fabricator.copperRows.at(-1)?.baseM ?? 0;
    refuse({
      code: 'copper.tooHeavy',
      path: 'laminate.copperBase',
      value: `${(copperBaseM * 1e6).toFixed(0)} um`,
      problem: `${fabricator.name} etches no base copper of ${(copperBaseM * 1e6).toFixed(0)} um`,
      allowed: `allowed is up to ${(heaviest * 1e6).toFixed(0)} um`,
    });
  }
  return {
    fabricator: fabricator.name,
    copperBaseM,
    trace: toNm(row.traceM),
    space: toNm(row.spaceM),
    copperToEdge: toNm(fabricator.copperToEdgeM),
    boardWidth: toNm(fabricator.boardMaxWidthM),
    boardLength: toNm(fabricator.boardMaxLengthM),
    maskWeb: fabricator.mask === null ? null : toNm(fabricator.mask.webM),
    legendLine: fabricator.legend === null ? null : toNm(fabricator.legend.lineM),
  };
}
