// Text from a user on its way into documents, and the breaking of lines.

import { describe, expect, it } from 'vitest';
import { breakWords, plainText, wrapColumns } from '../../geometry/exports/plain-text.ts';
import {
  frequency,
  micrometresOf,
  millimetres,
  millimetresAtLeast,
  returnLoss,
} from '../../geometry/exports/wording.ts';

describe('plainText', () => {
  it('keeps letters of every script, and replaces what ends lines, hides or turns text round', () => {
    expect(plainText('ε Антенна 天線 \u{1f4e1}')).toBe('ε Антенна 天線 \u{1f4e1}');
    expect(plainText('a\nb\rc\td\u0000e\u0085f\u2028g\u2029h\u202ei\u2066j\u200fk\ufeffl')).toBe(
      'a b c d e f g h i j k l',
    );
  });

  it('replaces halves of surrogate pairs and non-characters, whole pairs stay', () => {
    expect(plainText('\ud83dx\udce1\uffff')).toBe('\ufffdx\ufffd\ufffd');
  });
});

describe('wrapColumns', () => {
  it('breaks at blanks, indents what follows, and cuts a word that fits on no line', () => {
    expect(wrapColumns('one two three', 9, '- ')).toEqual(['- one two', '  three']);
    expect(wrapColumns('abcdefghij kl', 5)).toEqual(['abcde', 'fghij', 'kl']);
    expect(wrapColumns('', 5)).toEqual([]);
  });

  it('counts characters, not UTF-16 units', () => {
    expect(wrapColumns('\u{1f4e1}\u{1f4e1}\u{1f4e1} a', 3)).toEqual(['\u{1f4e1}\u{1f4e1}\u{1f4e1}', 'a']);
  });

  it('ends even where nothing ever fits', () => {
    expect(breakWords('abc', () => false)).toEqual(['a', 'b', 'c']);
  });
});

describe('quantities', () => {
  it('are exact to the nanometre, with two decimals at least', () => {
    expect([0, 1, 200_000, 28_831_000, 2_900_000, -50_000, 123_456_789].map(millimetres)).toEqual([
      '0.00',
      '0.000001',
      '0.20',
      '28.831',
      '2.90',
      '-0.05',
      '123.456789',
    ]);
    expect([199_999.6, 5_649_998, -1].map(millimetresAtLeast)).toEqual(['0.199', '5.649', '-0.001']);
    expect(micrometresOf(35e-6)).toBe('35');
    expect(micrometresOf(17.5e-6)).toBe('17.5');
  });

  it('claim no return loss that no bench can see', () => {
    expect([67.3, 24.14, null].map(returnLoss)).toEqual(['more than 40 dB', '24.1 dB', 'not predicted']);
  });

  it('choose the unit of a frequency', () => {
    expect(frequency(2.4418e9)).toBe('2.4418 GHz');
    expect(frequency(868e6)).toBe('868.00 MHz');
  });
});
