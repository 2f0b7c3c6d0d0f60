// The inks of a printed sheet: black on white first, colour only where it repeats what a line or hatch already says.

import type { Fill } from './display-list.ts';

export const PAPER = '#FFFFFF';
export const INK = '#23201B';
export const SECOND_INK = '#5A544A';
export const RULE = '#A59B88';
const COPPER_GROUND = '#F8EBDC';
const COPPER_HATCH = '#C08A55';
export const COPPER_EDGE = '#5F3715';
const GROUND_DOTS = '#C9BFA9';
export const MASK_EDGE = '#4E6A58';

export const COPPER_FILL: Fill = {
  kind: 'hatch',
  colour: COPPER_HATCH,
  ground: COPPER_GROUND,
  spacingMm: 1.3,
  lineMm: 0.16,
};
export const GROUND_FILL: Fill = { kind: 'dots', colour: GROUND_DOTS, spacingMm: 1.6, radiusMm: 0.14 };
