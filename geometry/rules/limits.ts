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
  /** How far one print may lie astray from another. */
  readonly registration: number;
  /** Smallest plated hole; null where the shop plates none. */
  readonly platedHole: number | null;
  /** Smallest hole plated through a board of this thickness. */
  readonly platedThrough: number;
  readonly unplatedHole: number;
  readonly holeToCopper: number;
  /** Copper around a soldered hole, plated and not. */
  readonly ring: number;
  readonly unplatedRing: number;
}

/** Limits for a copper weight.
 *  @param boardThicknessM  with its coppers, for the depth of plated holes
 *  Throws: EngineError "copper.tooHeavy" where the shop etches none so thick. */
export function limitsOf(fabricator: Fabricator, copperBaseM: number, boardThicknessM: number): Limits {
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
    registration: toNm(fabricator.registrationM),
    platedHole: fabricator.plated === null ? null : toNm(fabricator.plated.minimumHoleM),
    platedThrough: fabricator.plated === null ? 0 : toNm(boardThicknessM / fabricator.plated.aspectRatio),
    unplatedHole: toNm(fabricator.minimumUnplatedHoleM),
    holeToCopper: toNm(fabricator.unplatedHoleToCopperM),
    ring: toNm(row.ringM),
    unplatedRing: toNm(fabricator.unplatedRingM),
  };
}
