// How the documents of a package write quantities: the millimetre, the gigahertz and the percent exist only here.

import type { ResonanceKind } from '../patch/design.ts';
import { formatFrequency, toNm } from '../units.ts';

const NM_PER_MM = 1_000_000;

/** Whole nanometres as millimetres, exact: two decimals, more where the value has them. */
export function millimetres(lengthNm: number): string {
  const sign = lengthNm < 0 ? '-' : '';
  const digits = String(Math.abs(lengthNm)).padStart(7, '0');
  const decimals = digits.slice(-6).replace(/0{1,4}$/, '');
  return `${sign}${digits.slice(0, -6)}.${decimals}`;
}

/** A measured length as millimetres to the micrometre, rounded down: what is to spare is never overstated. */
export function millimetresAtLeast(lengthNm: number): string {
  return millimetres(Math.floor(lengthNm / 1000) * 1000);
}

/** Metres as millimetres, to the nanometre. */
export function millimetresOf(lengthM: number): string {
  return millimetres(toNm(lengthM));
}

/** Metres as micrometres, to the nanometre, without idle zeros. */
export function micrometresOf(lengthM: number): string {
  return String(toNm(lengthM) / 1000);
}

/** A length on paper or in a drawing file [mm] from nanometres. */
export function mmFromNm(lengthNm: number): number {
  return lengthNm / NM_PER_MM;
}

/** A frequency to five digits: 0.1 MHz at 2.4 GHz. */
export function frequency(frequencyHz: number): string {
  return formatFrequency(frequencyHz, 5);
}

/** A width of frequencies, of which three digits mean something. */
export function bandwidth(widthHz: number): string {
  return formatFrequency(widthHz, 3);
}

/** Beyond this no real board and no bench can tell one return loss from another [dB]. */
const PERFECT_DB = 40;

/** A return loss. */
export function returnLoss(valueDb: number | null): string {
  if (valueDb === null) return 'not predicted';
  return valueDb > PERFECT_DB ? `more than ${PERFECT_DB} dB` : `${valueDb.toFixed(1)} dB`;
}

export function percent(fraction: number): string {
  return `${(100 * fraction).toFixed(1)} %`;
}

/** Which frequency is meant, in words. */
export const RESONANCE_IN_WORDS: Readonly<Record<ResonanceKind, string>> = {
  bare: 'natural resonance of the patch without its feed',
  loadedPole: 'natural resonance with feed and generator attached',
  bestMatch: 'frequency of least reflection at the feed',
};
