// The rule check: one list, one function a rule.

import type { Artwork } from '../artwork/artwork.ts';
import type { Fabricator } from '../fabricator/fabricator.ts';
import { findBoardSize, findToEdge } from './board.ts';
import { findCorners, findGaps, findWidths } from './copper.ts';
import {
  findDepths,
  findHolesToCopper,
  findHolesToEdge,
  findPlatedHoles,
  findRings,
  findUnplatedHoles,
} from './drill.ts';
import { type Finding, millimetres } from './finding.ts';
import { type Limits, limitsOf } from './limits.ts';
import { findLegendClearance, findLegendWidth, findMaskWebs } from './print.ts';
import type { RuleReport, RuleResult, Violation } from './violation.ts';

/** A rule: its name, and what it finds. */
interface Rule {
  readonly name: string;
  readonly find: (artwork: Artwork, limits: Limits) => Finding;
}

/** Every rule that is checked. A new one is a function and a line here. */
const RULES: readonly Rule[] = [
  { name: 'gap', find: findGaps },
  { name: 'width', find: findWidths },
  { name: 'corner', find: findCorners },
  { name: 'copper-to-edge', find: findToEdge },
  { name: 'board-size', find: findBoardSize },
  { name: 'mask-web', find: findMaskWebs },
  { name: 'legend-width', find: findLegendWidth },
  { name: 'legend-clearance', find: findLegendClearance },
  { name: 'plated-hole', find: findPlatedHoles },
  { name: 'plated-depth', find: findDepths },
  { name: 'unplated-hole', find: findUnplatedHoles },
  { name: 'ring', find: findRings },
  { name: 'hole-to-copper', find: findHolesToCopper },
  { name: 'hole-to-edge', find: findHolesToEdge },
];

export interface CheckInput {
  readonly artwork: Artwork;
  readonly fabricator: Fabricator;
  readonly copperBaseM: number;
  /** Finished board with its coppers; 0 where no hole is plated. */
  readonly boardThicknessM?: number;
}

function exemptions(artwork: Artwork): readonly string[] {
  return artwork.launches.map(
    ({ name, from, to }) =>
      `Copper reaches the board's edge at ${name}, from x = ${millimetres(from.xNm)} to ${millimetres(to.xNm)}, by intent: copper-to-edge is not checked there, and the fabricator must not clip it.`,
  );
}

/** Checks an artwork against a fabricator's limits for its copper: every rule with its limit, the smallest found and
 *  where, and every place where one does not hold.
 *  Throws: EngineError "copper.tooHeavy". */
export function checkRules({ artwork, fabricator, copperBaseM, boardThicknessM = 0 }: CheckInput): RuleReport {
  const limits = limitsOf(fabricator, copperBaseM, boardThicknessM);
  const rules: RuleResult[] = [];
  const violations: Violation[] = [];
  for (const { name, find } of RULES) {
    const { layer, limitNm, nearest, below } = find(artwork, limits);
    const smallest = nearest?.measuredNm ?? null;
    rules.push({
      rule: name,
      layer: nearest?.layer ?? layer,
      limitNm,
      smallestNm: smallest,
      from: nearest?.from ?? null,
      to: nearest?.to ?? null,
      marginNm: nearest?.marginNm ?? null,
      holds: below.length === 0,
    });
    for (const place of below) {
      violations.push({
        rule: name,
        layer: place.layer,
        measuredNm: place.measuredNm,
        limitNm,
        from: place.from,
        to: place.to,
        message: place.message,
      });
    }
  }
  return {
    kind: 'rule-report',
    fabricator: fabricator.name,
    rules,
    violations,
    remarks: [...exemptions(artwork), ...artwork.remarks],
  };
}
