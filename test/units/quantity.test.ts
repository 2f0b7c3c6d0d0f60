// Text with a unit → the nearest double, and back.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatFrequency,
  formatLengthMm,
  formatQuantity,
  parseNumber,
  parseQuantity,
  type UnitDimension,
} from '../../geometry/units.ts';

function value(text: string, dimension: UnitDimension): number {
  const parsed = parseQuantity(text, dimension);
  if (parsed.kind === 'refused') throw new Error(`${text}: ${parsed.problem}; ${parsed.allowed}`);
  return parsed.value;
}

function refusal(text: string, dimension: UnitDimension): string {
  const parsed = parseQuantity(text, dimension);
  if (parsed.kind === 'value') throw new Error(`${text} was taken as ${parsed.value}`);
  return `${parsed.problem}; ${parsed.allowed}`;
}

describe('parseQuantity', () => {
  it.each([
    // The right-hand sides are literals: the language's own correctly rounded reading of the exact decimal.
    ['2.45 GHz', 'frequency', 2.45e9],
    ['2400 MHz', 'frequency', 2.4e9],
    ['868.3MHz', 'frequency', 868.3e6],
    ['32.768 kHz', 'frequency', 32768],
    ['50 Hz', 'frequency', 50],
    ['28.9 mm', 'length', 0.0289],
    ['1.6 mm', 'length', 0.0016],
    ['0.787 mm', 'length', 0.000787],
    ['63 mil', 'length', 0.0016002],
    ['62 mil', 'length', 0.0015748],
    ['0.5 in', 'length', 0.0127],
    ['2 inch', 'length', 0.0508],
    ['3.5 cm', 'length', 0.035],
    ['0.1 m', 'length', 0.1],
    ['35 um', 'length', 0.000035],
    ['35 µm', 'length', 0.000035],
    ['35 \u03bcm', 'length', 0.000035],
    ['250 nm', 'length', 250e-9],
    ['1,6 mm', 'length', 0.0016],
    ['1575,42 MHz', 'frequency', 1575.42e6],
    ['-3 mm', 'length', -0.003],
    ['\u22123 mm', 'length', -0.003],
    ['+3 mm', 'length', 0.003],
    ['.5 mm', 'length', 0.0005],
    ['0 mm', 'length', 0],
    ['-0 mm', 'length', 0],
    ['1e-3 m', 'length', 0.001],
    ['50 ohm', 'resistance', 50],
    ['50 Ω', 'resistance', 50],
    ['50 \u2126', 'resistance', 50],
    ['10 dB', 'decibel', 10],
    ['5.8e7 S/m', 'conductivity', 5.8e7],
    ['58 MS/m', 'conductivity', 5.8e7],
  ] as const)('%s is %s %d', (text, dimension, expected) => {
    expect(Object.is(value(text, dimension), expected)).toBe(true);
  });

  it('names the units where one is missing or not known', () => {
    for (const dimension of ['frequency', 'length', 'resistance', 'decibel', 'conductivity'] as const) {
      expect(refusal('2.45', dimension)).toMatch(/has no unit; takes a number with .+, as in ".+"/);
      expect(refusal('2.45 furlong', dimension)).toMatch(/unit that is not taken here; takes a number with/);
    }
    expect(refusal('2.45', 'frequency')).toContain('Hz, kHz, MHz or GHz');
  });

  it('does not guess between millihertz and megahertz', () => {
    expect(refusal('5 mHz', 'frequency')).toContain('not taken here');
  });

  it('shows both readings of a text that has two', () => {
    expect(refusal('1,575.42 MHz', 'frequency')).toContain('could mean 1575.42 or 1.57542');
    expect(refusal('1.575,42 MHz', 'frequency')).toContain('could mean 1575.42 or 1.57542');
    expect(refusal('1,575,420 Hz', 'frequency')).toContain('more than one decimal mark');
  });

  it.each(['', ' ', 'mm', '- mm', 'e3 mm', '. mm', '1 2 mm', '0x10 mm', 'NaN mm', 'Infinity mm', '1e999 m', '1__0 mm'])(
    'refuses %j',
    (text) => {
      expect(parseQuantity(text, 'length').kind).toBe('refused');
    },
  );

  it('refuses a text too long to be a number, whatever it holds', () => {
    expect(parseQuantity(`${'9'.repeat(100_000)} mm`, 'length').kind).toBe('refused');
  });

  it('reads numbers without a unit for the command line', () => {
    expect(parseNumber('4.3')).toEqual({ kind: 'value', value: 4.3 });
    expect(parseNumber('4,3')).toEqual({ kind: 'value', value: 4.3 });
    expect(parseNumber('4.3 mm').kind).toBe('refused');
    expect(parseNumber('').kind).toBe('refused');
  });
});

describe('formatQuantity', () => {
  it.each([
    [2.45e9, 'frequency', '2.45 GHz'],
    [868.3e6, 'frequency', '868.3 MHz'],
    [0, 'frequency', '0 GHz'],
    [0.00153, 'length', '1.53 mm'],
    [35e-6, 'length', '35 um'],
    [0.0002, 'length', '0.2 mm'],
    [75e-6, 'length', '75 um'],
    [1, 'length', '1000 mm'],
    [-0.003, 'length', '-3 mm'],
    [2.5e-9, 'length', '2.5 nm'],
    [50, 'resistance', '50 ohm'],
    [9.5, 'decibel', '9.5 dB'],
    [5.8e7, 'conductivity', '58 MS/m'],
    [1e-30, 'length', '1e-21 nm'],
  ] as const)('%d %s is %s', (number, dimension, text) => {
    expect(formatQuantity(number, dimension)).toBe(text);
  });

  it('reads back as the same double, whatever the double', () => {
    const dimension = fc.constantFrom<UnitDimension>('frequency', 'length', 'resistance', 'decibel', 'conductivity');
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), dimension, (number, kind) => {
        const back = value(formatQuantity(number, kind), kind);
        expect(back === number).toBe(true);
      }),
      { numRuns: 2000 },
    );
  });

  it('reads back as the same double over what briefs hold', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1, noNaN: true }), (number) => {
        const text = formatQuantity(number, 'length');
        expect(text).not.toContain('e');
        expect(value(text, 'length')).toBe(number);
      }),
      { numRuns: 2000 },
    );
  });
});

describe('formatting for reading', () => {
  it('writes millimetres and frequencies', () => {
    expect(formatLengthMm(0.028834, 2)).toBe('28.83 mm');
    expect(formatFrequency(2.4418e9)).toBe('2.442 GHz');
    expect(formatFrequency(54.3e6, 2)).toBe('54 MHz');
    expect(formatFrequency(4.34e6, 2)).toBe('4.3 MHz');
    expect(formatFrequency(868.3e6)).toBe('868.3 MHz');
    expect(formatFrequency(0)).toBe('0.000 Hz');
  });
});
