// A fabricator's capability sheet. Lengths in metres; null means that the shop does not offer the thing at all.

/** Smallest conductor width and space for one weight of base copper. */
export interface CopperRow {
  /** Base copper up to and including this thickness [m]. */
  readonly baseM: number;
  readonly traceM: number;
  readonly spaceM: number;
  /** Annular ring on outer layers for this weight [m]. */
  readonly ringM: number;
}

export interface Fabricator {
  readonly name: string;
  /** Ascending in baseM; heavier copper than the last row is refused. */
  readonly copperRows: readonly CopperRow[];
  /** ± of each etched edge of wide copper, three sigma [m]: enters the interval of every prediction. */
  readonly edgeToleranceM: number;
  /** Who corrects the artwork for etching: the fabricator as a rule. */
  readonly etchCompensation: 'fabricator' | 'owner';
  readonly copperToEdgeM: number;
  readonly boardMaxWidthM: number;
  readonly boardMaxLengthM: number;
  readonly outlineToleranceM: number;
  readonly registrationM: number;
  readonly minimumInnerRadiusM: number | null;
  readonly mask: { readonly expansionM: number; readonly webM: number } | null;
  readonly legend: { readonly lineM: number; readonly heightM: number } | null;
  readonly plated: {
    readonly minimumHoleM: number;
    readonly largestHoleM: number;
    readonly aspectRatio: number;
  } | null;
  readonly minimumUnplatedHoleM: number;
  readonly unplatedHoleToCopperM: number;
  readonly unplatedRingM: number;
  readonly holeToleranceM: number;
  /** Finished hole sizes come in steps of this [m]; null means any. */
  readonly drillStepM: number | null;
  readonly finishes: readonly string[];
}

/** The row for a weight of base copper, or undefined where the shop takes none so heavy. */
export function copperRow(fabricator: Fabricator, copperBaseM: number): CopperRow | undefined {
  // A base given as "35 um" must meet a row of 35 um whatever its last bit.
  const slackM = 1e-9;
  return fabricator.copperRows.find((row) => copperBaseM <= row.baseM + slackM);
}
