// How wide a text will be when nobody knows the font: estimates on the wide side, so that nothing is cut off.

import { breakWords } from './plain-text.ts';

/** Widths in parts of the type size, by the widest of the common sans-serif faces (estimated, no source). */
const NARROW = 0.37;
const MEDIUM = 0.62;
const CAPITAL = 0.74;
const WIDE = 1;

function characterWidth(character: string): number {
  if (/[ijl.,:;'|!()[\] ftr·-]/.test(character)) return NARROW;
  if (/[mwMWΩ@%—…]/.test(character)) return WIDE;
  if (character.codePointAt(0)! >= 0x1100) return WIDE;
  return /[A-ZΑ-ЯÀ-Þ]/.test(character) ? CAPITAL : MEDIUM;
}

/** Estimated width of one line [mm]. */
export function textWidthMm(text: string, sizeMm: number): number {
  let width = 0;
  for (const character of text) width += characterWidth(character);
  return width * sizeMm;
}

/** Breaks text into lines no wider than `widthMm` by that estimate. */
export function wrapMm(text: string, sizeMm: number, widthMm: number): readonly string[] {
  return breakWords(text, (line) => textWidthMm(line, sizeMm) <= widthMm);
}
