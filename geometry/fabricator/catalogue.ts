// Capability sheets of seven kinds of shop: starting points to be edited, none of them a particular house.

import type { CopperRow, Fabricator } from './fabricator.ts';

/** Where a value comes from: "published" is a fabricator's public table, "common" is common practice without a source,
 *  "own" was derived here as the note says. */
export type FabricatorMark = 'published' | 'common' | 'own';

export interface FabricatorEntry {
  readonly description: string;
  readonly fabricator: Fabricator;
  /** By field of the record. Where the source gives a range, the end that is safe for the board was taken. */
  readonly marks: Readonly<Record<Exclude<keyof Fabricator, 'name'>, FabricatorMark>>;
  readonly notes: readonly string[];
}

const row = (baseM: number, traceM: number, spaceM: number, ringM: number): CopperRow => ({
  baseM,
  traceM,
  spaceM,
  ringM,
});

/** What holds where a sheet says nothing else. */
const COMMON: FabricatorEntry['marks'] = {
  copperRows: 'common',
  edgeToleranceM: 'own',
  etchCompensation: 'common',
  copperToEdgeM: 'common',
  boardMaxWidthM: 'common',
  boardMaxLengthM: 'common',
  outlineToleranceM: 'common',
  registrationM: 'common',
  minimumInnerRadiusM: 'common',
  mask: 'common',
  legend: 'common',
  plated: 'common',
  minimumUnplatedHoleM: 'common',
  unplatedHoleToCopperM: 'common',
  unplatedRingM: 'common',
  holeToleranceM: 'common',
  drillStepM: 'common',
  finishes: 'common',
};

const OUNCE_HALF_M = 18e-6;
const OUNCE_ONE_M = 35e-6;
const OUNCE_TWO_M = 70e-6;

const EDGE_FROM_WIDTH = 'Edge tolerance: half of the width tolerance, because a width has two edges.';
const NO_PLATING = 'No plated holes, no solder mask, no printed legend.';

const kitchenToner: FabricatorEntry = {
  description: 'toner transfer and etching at home, cut with a saw',
  fabricator: {
    name: 'kitchen-toner',
    copperRows: [row(OUNCE_HALF_M, 0.4e-3, 0.4e-3, 0.5e-3), row(OUNCE_ONE_M, 0.5e-3, 0.5e-3, 0.5e-3)],
    edgeToleranceM: 50e-6,
    etchCompensation: 'owner',
    copperToEdgeM: 1e-3,
    boardMaxWidthM: 0.148,
    boardMaxLengthM: 0.21,
    outlineToleranceM: 0.5e-3,
    registrationM: 0.5e-3,
    minimumInnerRadiusM: null,
    mask: null,
    legend: null,
    plated: null,
    minimumUnplatedHoleM: 0.8e-3,
    unplatedHoleToCopperM: 0.5e-3,
    unplatedRingM: 0.6e-3,
    holeToleranceM: 0.1e-3,
    drillStepM: null,
    finishes: ['bare copper', 'tin', 'rosin'],
  },
  marks: COMMON,
  notes: [
    `${EDGE_FROM_WIDTH} Here ±0.10 mm of width.`,
    NO_PLATING,
    'Ring of copper: the 0.50 mm of a land around a hole without plating. Size of board: the smaller of A5 and A4 film.',
  ],
};

const benchPhoto: FabricatorEntry = {
  description: 'photoresist film and etching on the bench, cut with a saw',
  fabricator: {
    name: 'bench-photo',
    copperRows: [
      row(OUNCE_HALF_M, 0.2e-3, 0.2e-3, 0.4e-3),
      row(OUNCE_ONE_M, 0.25e-3, 0.25e-3, 0.4e-3),
      row(OUNCE_TWO_M, 0.4e-3, 0.4e-3, 0.4e-3),
    ],
    edgeToleranceM: 25e-6,
    etchCompensation: 'owner',
    copperToEdgeM: 1e-3,
    boardMaxWidthM: 0.21,
    boardMaxLengthM: 0.297,
    outlineToleranceM: 0.5e-3,
    registrationM: 0.3e-3,
    minimumInnerRadiusM: null,
    mask: null,
    legend: null,
    plated: null,
    minimumUnplatedHoleM: 0.8e-3,
    unplatedHoleToCopperM: 0.4e-3,
    unplatedRingM: 0.5e-3,
    holeToleranceM: 0.1e-3,
    drillStepM: null,
    finishes: ['tin', 'bare copper'],
  },
  marks: COMMON,
  notes: [`${EDGE_FROM_WIDTH} Here ±0.05 mm of width.`, NO_PLATING, 'Size of board: A4.'],
};

const deskMill: FabricatorEntry = {
  description: 'isolation milling on a desk-top machine',
  fabricator: {
    name: 'desk-mill',
    copperRows: [
      row(OUNCE_HALF_M, 0.25e-3, 0.2e-3, 0.3e-3),
      row(OUNCE_ONE_M, 0.25e-3, 0.2e-3, 0.3e-3),
      row(OUNCE_TWO_M, 0.3e-3, 0.25e-3, 0.3e-3),
    ],
    edgeToleranceM: 30e-6,
    etchCompensation: 'owner',
    copperToEdgeM: 0.3e-3,
    boardMaxWidthM: 0.2,
    boardMaxLengthM: 0.15,
    outlineToleranceM: 0.1e-3,
    registrationM: 0.1e-3,
    minimumInnerRadiusM: null,
    mask: null,
    legend: null,
    plated: null,
    minimumUnplatedHoleM: 0.5e-3,
    unplatedHoleToCopperM: 0.3e-3,
    unplatedRingM: 0.4e-3,
    holeToleranceM: 0.05e-3,
    drillStepM: null,
    finishes: ['bare copper'],
  },
  marks: COMMON,
  notes: [
    'Edge tolerance: 0.03 mm of tool wear, more than half of the ±0.05 mm of width.',
    NO_PLATING,
    'The smallest inner radius is that of the tool in use.',
  ],
};

const poolProto: FabricatorEntry = {
  description: 'pooled prototype panel, cheap tier',
  fabricator: {
    name: 'pool-proto',
    copperRows: [
      row(OUNCE_HALF_M, 0.15e-3, 0.15e-3, 0.15e-3),
      row(OUNCE_ONE_M, 0.15e-3, 0.2e-3, 0.15e-3),
      row(OUNCE_TWO_M, 0.2e-3, 0.2e-3, 0.15e-3),
    ],
    edgeToleranceM: 25e-6,
    etchCompensation: 'fabricator',
    copperToEdgeM: 0.3e-3,
    boardMaxWidthM: 0.1,
    boardMaxLengthM: 0.1,
    outlineToleranceM: 0.25e-3,
    registrationM: 0.15e-3,
    minimumInnerRadiusM: 0.5e-3,
    mask: { expansionM: 0.1e-3, webM: 0.15e-3 },
    legend: { lineM: 0.15e-3, heightM: 1e-3 },
    plated: { minimumHoleM: 0.3e-3, largestHoleM: 5.65e-3, aspectRatio: 8 },
    minimumUnplatedHoleM: 0.5e-3,
    unplatedHoleToCopperM: 0.25e-3,
    unplatedRingM: 0.3e-3,
    holeToleranceM: 0.13e-3,
    drillStepM: 50e-6,
    finishes: ['lead-free solder', 'nickel and gold'],
  },
  marks: {
    ...COMMON,
    copperRows: 'published',
    edgeToleranceM: 'own',
    outlineToleranceM: 'published',
    plated: 'published',
    unplatedHoleToCopperM: 'published',
    unplatedRingM: 'published',
    holeToleranceM: 'published',
    drillStepM: 'published',
    mask: 'published',
    legend: 'published',
  },
  notes: [
    `${EDGE_FROM_WIDTH} The width tolerance is the greater of ±20 % and ±0.05 mm; the 20 % speak of traces near the limit, the ±0.05 mm of wide copper.`,
    'Holes above 2 mm come in steps of 0.1 mm.',
  ],
};

const shopStandard: FabricatorEntry = {
  description: 'ordinary service of an ordinary board house',
  fabricator: {
    name: 'shop-standard',
    copperRows: [
      row(OUNCE_HALF_M, 0.125e-3, 0.15e-3, 0.15e-3),
      row(OUNCE_ONE_M, 0.2e-3, 0.2e-3, 0.2e-3),
      row(OUNCE_TWO_M, 0.25e-3, 0.25e-3, 0.2e-3),
    ],
    edgeToleranceM: 25e-6,
    etchCompensation: 'fabricator',
    copperToEdgeM: 0.25e-3,
    boardMaxWidthM: 0.4,
    boardMaxLengthM: 0.3,
    outlineToleranceM: 0.2e-3,
    registrationM: 0.15e-3,
    minimumInnerRadiusM: 0.5e-3,
    mask: { expansionM: 0.1e-3, webM: 0.15e-3 },
    legend: { lineM: 0.15e-3, heightM: 1e-3 },
    plated: { minimumHoleM: 0.25e-3, largestHoleM: 6.3e-3, aspectRatio: 6 },
    minimumUnplatedHoleM: 0.35e-3,
    unplatedHoleToCopperM: 0.25e-3,
    unplatedRingM: 0.3e-3,
    holeToleranceM: 0.1e-3,
    drillStepM: 50e-6,
    finishes: ['lead-free solder', 'nickel and gold', 'immersion silver', 'tin', 'organic'],
  },
  marks: {
    ...COMMON,
    copperRows: 'published',
    edgeToleranceM: 'common',
    copperToEdgeM: 'published',
    outlineToleranceM: 'published',
    minimumInnerRadiusM: 'published',
    mask: 'published',
    legend: 'published',
    plated: 'published',
    minimumUnplatedHoleM: 'published',
    unplatedHoleToCopperM: 'published',
    unplatedRingM: 'published',
    holeToleranceM: 'published',
    drillStepM: 'published',
  },
  notes: [
    'Edge tolerance: 25 um an edge, usual for wide copper; the ±20 % of the width table (IPC-6012) speak of traces near the limit.',
    'Ring for 70 um copper as for 35 um: no table at hand gives one. Hole tolerance: the wide side of +0.10/−0.05 mm.',
  ],
};

const shopAdvanced: FabricatorEntry = {
  description: 'fine-line service of a board house',
  fabricator: {
    name: 'shop-advanced',
    copperRows: [
      row(OUNCE_HALF_M, 0.1e-3, 0.1e-3, 0.125e-3),
      row(OUNCE_ONE_M, 0.125e-3, 0.125e-3, 0.125e-3),
      row(OUNCE_TWO_M, 0.2e-3, 0.2e-3, 0.125e-3),
    ],
    edgeToleranceM: 12.5e-6,
    etchCompensation: 'fabricator',
    copperToEdgeM: 0.2e-3,
    boardMaxWidthM: 0.5,
    boardMaxLengthM: 0.4,
    outlineToleranceM: 0.13e-3,
    registrationM: 75e-6,
    minimumInnerRadiusM: 0.3e-3,
    mask: { expansionM: 50e-6, webM: 0.1e-3 },
    legend: { lineM: 0.12e-3, heightM: 0.8e-3 },
    plated: { minimumHoleM: 0.2e-3, largestHoleM: 6.3e-3, aspectRatio: 10 },
    minimumUnplatedHoleM: 0.25e-3,
    unplatedHoleToCopperM: 0.2e-3,
    unplatedRingM: 0.25e-3,
    holeToleranceM: 50e-6,
    drillStepM: 50e-6,
    finishes: [
      'lead-free solder',
      'nickel and gold',
      'immersion silver',
      'tin',
      'organic',
      'nickel, palladium and gold',
      'soft gold',
    ],
  },
  marks: {
    ...COMMON,
    copperRows: 'published',
    edgeToleranceM: 'own',
    copperToEdgeM: 'published',
    outlineToleranceM: 'published',
    mask: 'published',
    legend: 'published',
    plated: 'published',
  },
  notes: [`${EDGE_FROM_WIDTH} Here ±0.025 mm of width for wide copper.`, 'Inner radius: half of the 0.6 mm slot.'],
};

const microwaveShop: FabricatorEntry = {
  description: 'board house that is used to PTFE and ceramic-filled laminates',
  fabricator: {
    name: 'microwave-shop',
    copperRows: [
      row(OUNCE_HALF_M, 0.1e-3, 0.1e-3, 0.125e-3),
      row(OUNCE_ONE_M, 0.125e-3, 0.125e-3, 0.125e-3),
      row(OUNCE_TWO_M, 0.2e-3, 0.2e-3, 0.125e-3),
    ],
    edgeToleranceM: 10e-6,
    etchCompensation: 'fabricator',
    copperToEdgeM: 0.25e-3,
    boardMaxWidthM: 0.4,
    boardMaxLengthM: 0.25,
    outlineToleranceM: 0.1e-3,
    registrationM: 75e-6,
    minimumInnerRadiusM: 0.4e-3,
    mask: { expansionM: 50e-6, webM: 0.1e-3 },
    legend: null,
    plated: { minimumHoleM: 0.3e-3, largestHoleM: 6.3e-3, aspectRatio: 6 },
    minimumUnplatedHoleM: 0.35e-3,
    unplatedHoleToCopperM: 0.25e-3,
    unplatedRingM: 0.3e-3,
    holeToleranceM: 50e-6,
    drillStepM: 50e-6,
    finishes: ['immersion silver', 'tin', 'soft gold', 'bare copper'],
  },
  marks: { ...COMMON, boardMaxWidthM: 'own', boardMaxLengthM: 'own', minimumInnerRadiusM: 'own' },
  notes: [
    `${EDGE_FROM_WIDTH} Here ±0.020 mm of width.`,
    'Text is etched: no printed legend. Size of board: a cut of a laminate sheet, taken as 400 mm × 250 mm; ask the shop.',
    'Smallest plated hole: the 0.30 mm of PTFE. Inner radius: half of the 0.8 mm slot.',
  ],
};

const ENTRIES: readonly FabricatorEntry[] = [
  kitchenToner,
  benchPhoto,
  deskMill,
  poolProto,
  shopStandard,
  shopAdvanced,
  microwaveShop,
];

/** Every sheet, in the order of what the shop can do. */
export function listFabricators(): readonly FabricatorEntry[] {
  return ENTRIES;
}

/** The sheet of that name, or undefined. */
export function findFabricator(name: string): FabricatorEntry | undefined {
  return ENTRIES.find((entry) => entry.fabricator.name === name);
}
