// Where the legend goes: in a margin, clear of the antenna, or nowhere.

import { point, type Stroke } from '../shape/shape.ts';
import { toNm } from '../units.ts';
import type { Layout } from './layout.ts';
import { legendText } from './legend.ts';

/** Ink this many board heights away from radiator and feed does not touch their fields. */
const CLEAR_OVER_HEIGHT = 3;
/** Ink nearer to the board's edge than its copper rule and this looks cramped, and suffers from the router [nm]. */
const FROM_EDGE_NM = 600_000;
/** Space between two lines of text over their height. */
const LINE_SPACE = 0.5;

export interface LegendWish {
  readonly slug: string;
  readonly buildId: string;
  readonly legend: { readonly lineM: number; readonly heightM: number } | null;
  /** How far the mask opening reaches beyond the copper [nm]. */
  readonly reliefNm: number;
  /** How far one print may lie astray from another [nm]. */
  readonly registrationNm: number;
  /** Board height [nm]. */
  readonly heightNm: number;
}

interface Space {
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
}

/** Build id and slug on the top side, in the first margin that holds them; the build id alone where both do not fit. */
export function composeLegend(
  l: Layout,
  wish: LegendWish,
): { readonly strokes: readonly Stroke[]; readonly remarks: readonly string[] } {
  if (wish.legend === null)
    return { strokes: [], remarks: ['The fabricator prints no legend: the board carries no build id.'] };
  const pen = toNm(wish.legend.lineM);
  const height = toNm(wish.legend.heightM);
  // A rounded corner takes (1 − √½) of its radius from the diagonal.
  const edge = Math.max(l.pullBack, Math.ceil(0.3 * l.cornerRadius)) + FROM_EDGE_NM;
  const clear = Math.max(CLEAR_OVER_HEIGHT * wish.heightNm, wish.reliefNm + wish.registrationNm);
  const inner = { left: edge, right: l.boardWidth - edge, bottom: edge, top: l.boardLength - edge };
  const spaces: readonly Space[] = [
    ...(l.line === null
      ? [{ x0: inner.left, y0: inner.bottom, x1: inner.right, y1: l.front - clear }]
      : [
          { x0: inner.left, y0: inner.bottom, x1: l.axis - l.line.half - clear, y1: l.front - clear },
          { x0: l.axis + l.line.half + clear, y0: inner.bottom, x1: inner.right, y1: l.front - clear },
        ]),
    { x0: inner.left, y0: l.back + clear, x1: inner.right, y1: inner.top },
  ];
  const alone = ['The margins are too narrow for the title: the legend carries the build id alone.'];
  for (const [lines, remarks] of [
    [[wish.buildId, wish.slug], []],
    [[wish.buildId], alone],
  ] as const) {
    for (const space of spaces) {
      const placed = placeIn(space, lines, height, pen);
      if (placed !== null) return { strokes: placed, remarks };
    }
  }
  return {
    strokes: [],
    remarks: [
      `The margins are too narrow for a legend of ${wish.legend.heightM * 1e3} mm clear of the antenna: the board carries no build id.`,
    ],
  };
}

function placeIn(space: Space, lines: readonly string[], heightNm: number, penNm: number): readonly Stroke[] | null {
  const strokes: Stroke[] = [];
  const pitch = Math.round(heightNm * (1 + LINE_SPACE));
  let y = space.y0;
  for (const line of [...lines].reverse()) {
    const text = legendText(line, point(space.x0, y), heightNm, penNm);
    if (space.x0 + text.widthNm > space.x1 || y + text.heightNm > space.y1) return null;
    strokes.push(...text.strokes);
    y += pitch;
  }
  return strokes;
}
