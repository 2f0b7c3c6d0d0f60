// SI constants, and the one place where text with a unit becomes a number and back.

/** Speed of light in vacuum [m/s], exact by definition of the metre. */
export const SPEED_OF_LIGHT_M_PER_S = 299_792_458;
/** Vacuum permeability [H/m]; CODATA 2018 differs from 4π·10⁻⁷ by 5·10⁻¹⁰, which no formula here can see. */
export const MU0_H_PER_M = 4e-7 * Math.PI;
/** Vacuum permittivity [F/m]. */
export const EPSILON0_F_PER_M = 1 / (MU0_H_PER_M * SPEED_OF_LIGHT_M_PER_S ** 2);
/** Wave impedance of vacuum [Ω]. */
export const ETA0_OHM = MU0_H_PER_M * SPEED_OF_LIGHT_M_PER_S;

export const NM_PER_M = 1e9;

/** Metres to whole nanometres. */
export function toNm(lengthM: number): number {
  return Math.round(lengthM * NM_PER_M);
}

/** Whole nanometres to metres. */
export function fromNm(lengthNm: number): number {
  return lengthNm / NM_PER_M;
}

/** What a text with a unit can measure. */
export type UnitDimension = 'frequency' | 'length' | 'resistance' | 'decibel' | 'conductivity';

/** A unit as an exact decimal: SI value = number · factor · 10^exponent. */
interface Unit {
  readonly symbol: string;
  readonly factor: bigint;
  readonly exponent: number;
}

const unit = (symbol: string, exponent: number, factor = 1n): Unit => ({ symbol, factor, exponent });

const UNITS: Readonly<Record<UnitDimension, readonly Unit[]>> = {
  frequency: [unit('Hz', 0), unit('kHz', 3), unit('MHz', 6), unit('GHz', 9)],
  length: [
    unit('m', 0),
    unit('cm', -2),
    unit('mm', -3),
    unit('um', -6),
    unit('µm', -6),
    unit('nm', -9),
    unit('mil', -7, 254n),
    unit('in', -4, 254n),
    unit('inch', -4, 254n),
  ],
  resistance: [unit('ohm', 0), unit('Ω', 0)],
  decibel: [unit('dB', 0)],
  conductivity: [unit('S/m', 0), unit('MS/m', 6)],
};

const EXAMPLE: Readonly<Record<UnitDimension, string>> = {
  frequency: '2.45 GHz',
  length: '1.6 mm',
  resistance: '50 ohm',
  decibel: '10 dB',
  conductivity: '58 MS/m',
};

/** Units in which a value is written, largest first; the last one also takes what is smaller. */
const WRITTEN: Readonly<Record<UnitDimension, readonly string[]>> = {
  frequency: ['GHz', 'MHz', 'kHz', 'Hz'],
  length: ['mm', 'um', 'nm'],
  resistance: ['ohm'],
  decibel: ['dB'],
  conductivity: ['MS/m', 'S/m'],
};

export type Parsed =
  | { readonly kind: 'value'; readonly value: number }
  | { readonly kind: 'refused'; readonly problem: string; readonly allowed: string };

/** Longest text that is read as a quantity; it covers every double in its shortest form with room to spare. */
const LONGEST_QUANTITY = 64;
/** More zeros than this after or before the digits are written as a power of ten. */
const MOST_ZEROS = 15;

/** Which units a dimension takes, as a sentence's end. */
export function allowedUnits(dimension: UnitDimension): string {
  const symbols = UNITS[dimension].map(({ symbol }) => symbol);
  const last = symbols.pop()!;
  const list = symbols.length === 0 ? last : `${symbols.join(', ')} or ${last}`;
  return `takes a number with ${list}, as in "${EXAMPLE[dimension]}"`;
}

interface Decimal {
  readonly negative: boolean;
  readonly digits: string;
  readonly exponent: number;
}

/** A decimal number; the comma is a decimal mark only where there is no dot. A reason where it is none. */
function readDecimal(text: string): Decimal | string {
  const match = /^([+\-\u2212]?)([0-9.,]*)(?:[eE]([+-]?[0-9]{1,4}))?$/.exec(text);
  if (match === null || !/[0-9]/.test(match[2]!)) return 'is not a number';
  const body = match[2]!;
  const marks = body.replace(/[0-9]/g, '');
  if (marks.length > 1) {
    if (marks === ',.' || marks === '.,') {
      const grouped = marks === ',.' ? body.replace(',', '') : body.replace('.', '').replace(',', '.');
      const cut = body.slice(0, body.indexOf(marks[1]!)).replace(',', '.') + body.slice(body.indexOf(marks[1]!) + 1);
      return `could mean ${grouped} or ${cut}`;
    }
    return 'holds more than one decimal mark';
  }
  const [whole, fraction = ''] = body.split(/[.,]/);
  return {
    negative: match[1] === '-' || match[1] === '\u2212',
    digits: whole! + fraction,
    exponent: Number(match[3] ?? 0) - fraction.length,
  };
}

/** The double nearest to digits · factor · 10^exponent; the decimal is shifted as text, so nothing is rounded twice. */
function toDouble(decimal: Decimal, factor: bigint, exponent: number): number {
  const value = Number(`${BigInt(decimal.digits) * factor}e${decimal.exponent + exponent}`);
  return decimal.negative && value !== 0 ? -value : value;
}

function refused(problem: string, allowed: string): Parsed {
  return { kind: 'refused', problem, allowed };
}

function readValue(text: string, number: string, units: Unit, allowed: string): Parsed {
  const decimal = readDecimal(number);
  if (typeof decimal === 'string') return refused(`"${text}" ${decimal}`, allowed);
  const value = toDouble(decimal, units.factor, units.exponent);
  return Number.isFinite(value) ? { kind: 'value', value } : refused(`"${text}" is too large a number`, allowed);
}

/** Reads a text such as "2.45 GHz", "63 mil", "35 um" as the SI number nearest to it.
 *  @returns the value, or what is wrong and which units are taken; a number without a unit is refused */
export function parseQuantity(text: string, dimension: UnitDimension): Parsed {
  const allowed = allowedUnits(dimension);
  if (text.length > LONGEST_QUANTITY) return refused('is too long for a number with a unit', allowed);
  // Two code points look like Ω and two like µ; one of each is the one that the tables hold.
  const trimmed = text.trim().replaceAll('\u2126', 'Ω').replaceAll('\u03bc', 'µ');
  const split = /^([+\-\u2212]?[0-9.,]+(?:[eE][+-]?[0-9]+)?)\s*(.*)$/s.exec(trimmed);
  if (split === null) return refused(`"${trimmed}" is not a number with a unit`, allowed);
  const [, number, symbol] = split;
  if (symbol === '') return refused(`"${trimmed}" has no unit`, allowed);
  const found = UNITS[dimension].find((candidate) => candidate.symbol === symbol);
  if (found === undefined) return refused(`"${trimmed}" has a unit that is not taken here`, allowed);
  return readValue(trimmed, number!, found, allowed);
}

/** Reads a number without a unit, such as a permittivity on a command line. */
export function parseNumber(text: string): Parsed {
  const allowed = 'takes a number without a unit, as in "4.3"';
  if (text.length > LONGEST_QUANTITY) return refused('is too long for a number', allowed);
  return readValue(text.trim(), text.trim(), unit('', 0), allowed);
}

/** Digits without zeros at the end, and the power of ten of the last one. */
function shortestDecimal(value: number): Decimal {
  const [mantissa, power = '0'] = String(Math.abs(value)).split('e');
  const [whole, fraction = ''] = mantissa!.split('.');
  const all = (whole! + fraction).replace(/^0+(?=[0-9])/, '');
  const digits = all.replace(/(?<=[0-9])0+$/, '');
  return { negative: value < 0, digits, exponent: Number(power) - fraction.length + all.length - digits.length };
}

function writeDecimal({ negative, digits, exponent }: Decimal): string {
  const sign = negative ? '-' : '';
  if (digits === '0') return '0';
  if (exponent > MOST_ZEROS || exponent < -MOST_ZEROS - digits.length) return `${sign}${digits}e${exponent}`;
  if (exponent >= 0) return sign + digits + '0'.repeat(exponent);
  const padded = digits.padStart(1 - exponent, '0');
  return `${sign}${padded.slice(0, exponent)}.${padded.slice(exponent)}`;
}

/** Writes an SI number with the unit that suits it: the shortest text that `parseQuantity` reads as the same double. */
export function formatQuantity(value: number, dimension: UnitDimension): string {
  const decimal = shortestDecimal(value);
  const units = WRITTEN[dimension].map((symbol) => UNITS[dimension].find((known) => known.symbol === symbol)!);
  // The leading digit stands at this power of ten.
  const size = decimal.exponent + decimal.digits.length - 1;
  // A tenth of a millimetre reads better as "0.1 mm", anything else from one up.
  const floor = (known: Unit): number => (known.symbol === 'mm' ? known.exponent - 1 : known.exponent);
  const chosen = value === 0 ? units[0]! : (units.find((known) => size >= floor(known)) ?? units.at(-1)!);
  return `${writeDecimal({ ...decimal, exponent: decimal.exponent - chosen.exponent })} ${chosen.symbol}`;
}

/** A length for reading, in millimetres with so many decimals. */
export function formatLengthMm(lengthM: number, digits: number): string {
  return `${(lengthM * 1e3).toFixed(digits)} mm`;
}

/** A frequency or a width of frequencies for reading, with so many significant digits: "2.442 GHz", "54 MHz". */
export function formatFrequency(frequencyHz: number, significant = 4): string {
  const size = Math.abs(frequencyHz);
  const [scale, symbol] =
    size >= 1e9 ? [1e9, 'GHz'] : size >= 1e6 ? [1e6, 'MHz'] : size >= 1e3 ? [1e3, 'kHz'] : [1, 'Hz'];
  const whole = Math.max(1, Math.floor(Math.log10(Math.max(size / scale, 1))) + 1);
  return `${(frequencyHz / scale).toFixed(Math.max(0, significant - whole))} ${symbol}`;
}
