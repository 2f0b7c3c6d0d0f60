// How the documents of a package write quantities: the millimetre, the gigahertz and the percent exist only here.

import type { ResonanceKind } from '../patch/design.ts';
import { toNm } from '../units.ts';

const NM_PER_MM = 1_000_000;

/** Whole nanometres as millimetres, exact: two decimals, more where the value has them. */
export function millimetres(lengthNm: number): string {
  const sign = lengthNm < 0 ? '-' : '';
  const digits = String(Math.abs(lengthNm)).padStart(7, '0');
  const decimals = digits.slice(-6).replace(/0{1,4}$/, '');
  return `${sign}${digits.slice(0, -6)}.${decimals}`;
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

/** A frequency in the unit that suits it, with a resolution of 0.1 MHz above 1 GHz and 0.01 MHz below. */
export function frequency(frequencyHz: number): string {
  return frequencyHz >= 1e9 ? `${(frequencyHz / 1e9).toFixed(4)} GHz` : `${(frequencyHz / 1e6).toFixed(2)} MHz`;
}

export function decibel(value: number | null): string {
  return value === null ? 'not predicted' : `${value.toFixed(1)} dB`;
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
