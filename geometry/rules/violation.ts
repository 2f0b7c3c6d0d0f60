// What a rule check returns.

import type { PointNm } from '../shape/shape.ts';

export type LayerName =
  | 'copper-top'
  | 'copper-bottom'
  | 'mask-top'
  | 'mask-bottom'
  | 'legend-top'
  | 'profile'
  | 'drill';

/** A rule that does not hold, with the two points between which it was measured. */
export interface Violation {
  readonly rule: string;
  readonly layer: LayerName;
  readonly measuredNm: number;
  readonly limitNm: number;
  readonly from: PointNm;
  readonly to: PointNm;
  /** A whole sentence: what will happen and what is allowed. */
  readonly message: string;
}

/** The smallest value found for one rule, violated or not; nulls where the rule has no subject here. */
export interface RuleResult {
  readonly rule: string;
  readonly layer: LayerName;
  readonly limitNm: number;
  readonly smallestNm: number | null;
  readonly from: PointNm | null;
  readonly to: PointNm | null;
  /** smallest − limit (for board size: limit − size); null where smallestNm is. */
  readonly marginNm: number | null;
  readonly holds: boolean;
}

export interface RuleReport {
  readonly kind: 'rule-report';
  readonly fabricator: string;
  readonly rules: readonly RuleResult[];
  readonly violations: readonly Violation[];
  /** Exemptions made by intent and other remarks, as whole sentences. */
  readonly remarks: readonly string[];
}
