// A stroke alphabet of our own for the legend: capitals, figures and a few signs on a grid of 4 by 6.

import { type PointNm, point, type Stroke } from '../shape/shape.ts';

const GRID_HEIGHT = 6;
/** From one letter's left side to the next one's, in grid steps. */
const ADVANCE = 6;

/** Each word is a line through grid points, two digits a point: x then y, y upwards. */
const LETTERS: { readonly [letter: string]: string } = {
  ' ': '',
  '-': '1333',
  '.': '1020',
  '/': '0046',
  '+': '1333 2224',
  '0': '10304145361605011030 0145',
  '1': '152620 1030',
  '2': '05163645440040',
  '3': '05163645443341301001 1333',
  '4': '30360242',
  '5': '460603334241301001',
  '6': '36160501103041423303',
  '7': '064620',
  '8': '13040516364544331302011030414233',
  '9': '10304145361605041343',
  A: '002640 1232',
  B: '000636454433033342413000',
  C: '4536160501103041',
  D: '00062644422000',
  E: '46060040 0333',
  F: '460600 0333',
  G: '4536160501103041 4323',
  H: '0006 4046 0343',
  I: '1030 2026 1636',
  J: '4641301001',
  K: '0006 460340',
  L: '060040',
  M: '0006234640',
  N: '00064046',
  O: '103041453616050110',
  P: '00063645443303',
  Q: '103041453616050110 2240',
  R: '00063645443303 2340',
  S: '453616050413334241301001',
  T: '2026 0646',
  U: '060110304146',
  V: '062046',
  W: '0610233046',
  X: '0046 0640',
  Y: '062346 2320',
  Z: '06460040',
};

export interface LegendText {
  readonly strokes: readonly Stroke[];
  readonly widthNm: number;
  readonly heightNm: number;
}

/** A line of text as strokes, its lower left corner (pen included) at `corner`. Letters that the alphabet lacks are
 *  drawn as a hyphen: the legend carries only names that the program makes.
 *  @param heightNm  height of a capital over all, pen included
 *  @param penNm  pen width; the grid is stretched so that strokes keep their distance */
export function legendText(text: string, corner: PointNm, heightNm: number, penNm: number): LegendText {
  const step = Math.round((heightNm - penNm) / GRID_HEIGHT);
  const strokes: Stroke[] = [];
  [...text.toUpperCase()].forEach((letter, i) => {
    const x0 = corner.xNm + Math.round(penNm / 2) + i * ADVANCE * step;
    const y0 = corner.yNm + Math.round(penNm / 2);
    for (const word of (LETTERS[letter] ?? LETTERS['-']!).split(' ')) {
      const points: PointNm[] = [];
      for (let k = 0; k + 1 < word.length; k += 2) {
        points.push(point(x0 + Number(word[k]) * step, y0 + Number(word[k + 1]) * step));
      }
      if (points.length > 1) strokes.push({ points, widthNm: penNm });
    }
  });
  return {
    strokes,
    widthNm: Math.max(0, [...text].length * ADVANCE - 2) * step + penNm,
    heightNm: GRID_HEIGHT * step + penNm,
  };
}
