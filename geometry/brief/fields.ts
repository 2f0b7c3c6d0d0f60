// Every field of a brief, a laminate and a fabricator, once: label, unit, range, default. Parser, help, forms and the
// JSON schema are built from it.

import { formatQuantity, type UnitDimension } from '../units.ts';

interface FieldBase {
  readonly label: string;
  /** One sentence for help and editors. */
  readonly help: string;
}

export interface QuantityField extends FieldBase {
  readonly kind: 'quantity';
  readonly dimension: UnitDimension;
  /** SI, both ends allowed unless `above` says that the lower one is not. */
  readonly minimum: number;
  readonly maximum: number;
  readonly above?: true;
  /** In the brief's own words; absent where the field must be given or its default is worked out. */
  readonly fallback?: string;
}

export interface NumberField extends FieldBase {
  readonly kind: 'number';
  readonly minimum: number;
  readonly maximum: number;
}

export interface TextField extends FieldBase {
  readonly kind: 'text';
  readonly longest: number;
  readonly fallback?: string;
}

export interface ChoiceField extends FieldBase {
  readonly kind: 'choice';
  readonly choices: readonly [string, ...string[]];
  readonly fallback?: string;
}

export type Field = QuantityField | NumberField | TextField | ChoiceField;

const length = (label: string, help: string, minimum: number, maximum: number, fallback?: string): QuantityField => ({
  kind: 'quantity',
  dimension: 'length',
  label,
  help,
  minimum,
  maximum,
  ...(fallback === undefined ? {} : { fallback }),
});

const frequency = (label: string, help: string): QuantityField => ({
  kind: 'quantity',
  dimension: 'frequency',
  label,
  help,
  minimum: 30e6,
  maximum: 110e9,
});

const MAXIMUM_BOARD_M = 1;
/** Dimensions that copper can have at all: from what no shop etches to the largest board. */
const MINIMUM_COPPER_M = 10e-6;
const copper = (label: string, help: string): QuantityField => length(label, help, MINIMUM_COPPER_M, MAXIMUM_BOARD_M);

export const TITLE_LONGEST = 120;
const NAME_LONGEST = 120;

export const BRIEF_FIELDS = {
  format: {
    kind: 'choice',
    label: 'Format',
    help: 'Names the kind and version of the file.',
    choices: ['etchwave-brief/1'],
    fallback: 'etchwave-brief/1',
  },
  title: {
    kind: 'text',
    label: 'Title',
    help: 'Stands on the drawing and the legend, and gives the files their names.',
    longest: TITLE_LONGEST,
    fallback: 'Untitled antenna',
  },
  polarization: {
    kind: 'choice',
    label: 'Polarization',
    help: 'Linear, along the resonant length.',
    choices: ['linear'],
    fallback: 'linear',
  },
} as const satisfies Record<string, Field>;

export const BAND_FIELDS = {
  low: frequency('Lower band edge', 'The lowest frequency at which the return loss must hold.'),
  high: frequency('Upper band edge', 'The highest frequency at which the return loss must hold.'),
  centre: frequency('Band centre', 'With "width", instead of the two edges.'),
  width: {
    kind: 'quantity',
    dimension: 'frequency',
    label: 'Band width',
    help: 'From edge to edge; with "centre", instead of the two edges.',
    minimum: 0,
    above: true,
    maximum: 110e9,
  },
} as const satisfies Record<string, Field>;

export const MATCH_FIELDS = {
  returnLoss: {
    kind: 'quantity',
    dimension: 'decibel',
    label: 'Return loss',
    help: 'The least return loss wanted over the whole band, as a positive number.',
    minimum: 0,
    above: true,
    maximum: 60,
    fallback: '10 dB',
  },
  reference: {
    kind: 'quantity',
    dimension: 'resistance',
    label: 'Reference',
    help: 'Resistance of the connected line.',
    minimum: 1,
    maximum: 1000,
    fallback: '50 ohm',
  },
} as const satisfies Record<string, Field>;

export const LAMINATE_FIELDS = {
  name: {
    kind: 'text',
    label: 'Laminate',
    help: 'As it is ordered.',
    longest: NAME_LONGEST,
    fallback: 'unnamed laminate',
  },
  permittivity: {
    kind: 'number',
    label: 'Relative permittivity',
    help: 'Across the thickness, the design value at the working frequency; 1 is an air-spaced patch.',
    minimum: 1,
    maximum: 30,
  },
  permittivityTolerance: {
    kind: 'number',
    label: 'Permittivity, ±',
    help: 'Three sigma. Left out: 5 % of the permittivity.',
    minimum: 0,
    maximum: 10,
  },
  lossTangent: {
    kind: 'number',
    label: 'Loss tangent',
    help: 'Of the dielectric at the working frequency. It has no default: too low a guess promises gain that is not there.',
    minimum: 0,
    maximum: 0.2,
  },
  thickness: length(
    'Dielectric thickness',
    'Finished dielectric between the coppers, not the board with its copper.',
    20e-6,
    20e-3,
  ),
  thicknessTolerance: length('Thickness, ±', 'Three sigma. Left out: 10 % of the thickness.', 0, 10e-3),
  copperThickness: length('Finished copper', 'Thickness after plating.', 0.1e-6, 1e-3, '35 um'),
  copperBase: length(
    'Base copper',
    "Before plating; chooses the row of the fabricator's rules. Left out: the heaviest usual foil (5, 9, 12, 18, 35, 70, 105, 140, 175, 210 um) of which nine tenths are not more than the finished copper.",
    0.1e-6,
    1e-3,
  ),
  conductivity: {
    kind: 'quantity',
    dimension: 'conductivity',
    label: 'Conductivity',
    help: 'Of the copper; annealed copper where left out.',
    minimum: 1e3,
    maximum: 1e9,
    fallback: '58 MS/m',
  },
  roughness: length(
    'Foil roughness',
    'Root mean square, dielectric side. Left out: usual electrodeposited foil (common practice, no source).',
    0,
    50e-6,
    '1.8 um',
  ),
} as const satisfies Record<string, Field>;

export const RADIATOR_FIELDS = {
  family: {
    kind: 'choice',
    label: 'Patch family',
    help: 'The shape of the radiator.',
    choices: ['rectangular'],
    fallback: 'rectangular',
  },
} as const satisfies Record<string, Field>;

export const PINNED_RADIATOR_FIELDS = {
  length: copper('Patch length', 'The resonant dimension, along y.'),
  width: copper('Patch width', 'Along x.'),
} as const satisfies Record<string, Field>;

export const FEED_FIELDS = {
  kind: {
    kind: 'choice',
    label: 'Feed',
    help: 'How the line meets the patch: in a notch, at its edge through a quarter-wave transformer, or a pin from below.',
    choices: ['inset', 'quarter-wave', 'probe'],
    fallback: 'inset',
  },
} as const satisfies Record<string, Field>;

export const PINNED_FEED_FIELDS = {
  insetDepth: length(
    'Inset depth',
    'From the front edge to the end of the notch; 0 mm is a plain edge feed.',
    0,
    MAXIMUM_BOARD_M,
  ),
  notchGap: copper('Notch gap', 'From the edge of the line, at its width outside, to the flank of the notch.'),
  lineWidth: copper('Line width', 'Of the feed line.'),
  lineWidthInNotch: copper('Line width in the notch', 'Of the feed line within the notch.'),
  lineLength: copper(
    'Line length',
    'From the edge of the board to the front edge of the patch, or to its transformer.',
  ),
  transformerWidth: copper('Transformer width', 'Of the quarter-wave section.'),
  transformerLength: copper('Transformer length', 'Of the quarter-wave section.'),
  offset: length('Pin offset', 'From the centre of the patch towards its front edge.', 0, MAXIMUM_BOARD_M),
  pinDiameter: length('Pin diameter', 'Of the coaxial pin.', 50e-6, 20e-3),
  holeDiameter: length('Hole diameter', 'Finished, for the pin.', 50e-6, 20e-3),
  padDiameter: length('Pad diameter', 'Copper around the pin on the patch.', 50e-6, 50e-3),
  clearanceDiameter: length('Clearance diameter', 'Opening in the ground around the pin.', 50e-6, 50e-3),
} as const satisfies Record<string, Field>;

/** Which dimensions each feed has. */
export const PINNED_OF_FEED = {
  inset: ['insetDepth', 'notchGap', 'lineWidth', 'lineWidthInNotch', 'lineLength'],
  'quarter-wave': ['lineWidth', 'lineLength', 'transformerWidth', 'transformerLength'],
  probe: ['offset', 'pinDiameter', 'holeDiameter', 'padDiameter', 'clearanceDiameter'],
} as const satisfies Record<(typeof FEED_FIELDS.kind.choices)[number], readonly (keyof typeof PINNED_FEED_FIELDS)[]>;

export const BOARD_FIELDS = {
  margin: length('Margin', 'Laminate around the patch, or "auto".', 0, MAXIMUM_BOARD_M, 'auto'),
  width: length('Board width', 'Along x, instead of a margin.', 1e-3, MAXIMUM_BOARD_M),
  length: length('Board length', 'Along y, instead of a margin.', 1e-3, MAXIMUM_BOARD_M),
  cornerRadius: length('Corner radius', 'Of the board; 0 mm gives square corners.', 0, 0.5, '0 mm'),
} as const satisfies Record<string, Field>;

export const COPPER_ROW_FIELDS = {
  base: length('Base copper', 'The row holds for base copper up to and including this.', 1e-6, 1e-3),
  trace: length('Trace', 'Smallest conductor width.', 1e-6, 10e-3),
  space: length('Space', 'Smallest clear space between conductors.', 1e-6, 10e-3),
  ring: length('Ring', 'Smallest annular ring on outer layers.', 0, 10e-3),
} as const satisfies Record<string, Field>;

export const MASK_FIELDS = {
  expansion: length('Mask expansion', 'Clearance of a mask opening around copper, each side.', 0, 5e-3),
  web: length('Mask web', 'Smallest width of mask between two openings.', 0, 5e-3),
} as const satisfies Record<string, Field>;

export const LEGEND_FIELDS = {
  line: length('Legend line', 'Smallest line width.', 1e-6, 5e-3),
  height: length('Legend height', 'Smallest height of letters.', 0.1e-3, 20e-3),
} as const satisfies Record<string, Field>;

export const PLATED_FIELDS = {
  minimumHole: length('Smallest plated hole', 'Finished.', 10e-6, 20e-3),
  largestHole: length('Largest plated hole', 'Finished.', 10e-6, 50e-3),
  aspectRatio: { kind: 'number', label: 'Aspect ratio', help: 'Board thickness over hole.', minimum: 0.1, maximum: 50 },
} as const satisfies Record<string, Field>;

export const FABRICATOR_FIELDS = {
  name: {
    kind: 'text',
    label: 'Fabricator',
    help: 'Name of the capability sheet.',
    longest: NAME_LONGEST,
    fallback: 'unnamed fabricator',
  },
  edgeTolerance: length('Etched edge, ±', 'Of each edge of wide copper, three sigma.', 0, 1e-3),
  etchCompensation: {
    kind: 'choice',
    label: 'Etch compensation',
    help: 'Who corrects the artwork for etching.',
    choices: ['fabricator', 'owner'],
  },
  copperToEdge: length('Copper to edge', 'Smallest distance from copper to the routed edge.', 0, 20e-3),
  boardMaxWidth: length('Largest width', 'Of a board.', 1e-3, 5),
  boardMaxLength: length('Largest length', 'Of a board.', 1e-3, 5),
  outlineTolerance: length('Outline, ±', 'Of the routed outline.', 0, 10e-3),
  registration: length('Registration', 'Front to back.', 0, 5e-3),
  minimumInnerRadius: length('Smallest inner radius', 'Of a routed outline; null where it does not matter.', 0, 20e-3),
  minimumUnplatedHole: length('Smallest unplated hole', 'Finished.', 10e-6, 20e-3),
  unplatedHoleToCopper: length('Unplated hole to copper', 'Smallest distance.', 0, 20e-3),
  unplatedRing: length('Ring of an unplated hole', 'Of a soldered hole without plating.', 0, 10e-3),
  holeTolerance: length('Hole, ±', 'Of a finished hole.', 0, 5e-3),
  drillStep: length('Drill step', 'Steps of finished hole sizes; null means any.', 1e-6, 5e-3),
} as const satisfies Record<string, Field>;

/** What a field takes, as the end of a sentence: its range, its choices or its longest text. */
export function allowedValues(field: Field): string {
  switch (field.kind) {
    case 'quantity': {
      const low = formatQuantity(field.minimum, field.dimension);
      const high = formatQuantity(field.maximum, field.dimension);
      return field.above === true ? `allowed is more than ${low}, up to ${high}` : `allowed is ${low} to ${high}`;
    }
    case 'number':
      return `allowed is ${field.minimum} to ${field.maximum}`;
    case 'text':
      return `allowed are at most ${field.longest} characters`;
    case 'choice':
      return `allowed is ${field.choices.map((choice) => `"${choice}"`).join(' or ')}`;
  }
}

/** Whether an SI number lies in the field's range. */
export function inRange(field: QuantityField | NumberField, value: number): boolean {
  const above = field.kind === 'quantity' && field.above === true;
  return (above ? value > field.minimum : value >= field.minimum) && value <= field.maximum;
}
