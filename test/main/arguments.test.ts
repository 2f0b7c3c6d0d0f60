// Words of a command line → options and operands.

import { describe, expect, it } from 'vitest';
import type { EngineError } from '../../geometry/errors.ts';
import { type OptionSpec, readArguments } from '../../main/arguments.ts';

const options: readonly OptionSpec[] = [
  { name: 'out', value: 'FILE', help: 'where to' },
  { name: 'length', value: 'L', help: 'how long' },
  { name: 'json', help: 'as JSON' },
];

function faults(words: readonly string[], operands: readonly string[] = []): readonly string[] {
  try {
    readArguments(words, options, operands);
  } catch (error) {
    return (error as EngineError).message.split('\n');
  }
  return [];
}

describe('readArguments', () => {
  it('takes values beside and behind "=", switches, operands, and what follows "--" as it is', () => {
    const args = readArguments(['a', '--out=x=y.zip', '--json', '--length', '-3 mm', '-', '--', '--out'], options, [
      'A',
      'B',
      'C',
    ]);
    expect(args.operands).toEqual(['a', '-', '--out']);
    expect({ ...args.values }).toEqual({ out: 'x=y.zip', length: '-3 mm' });
    expect([...args.switches]).toEqual(['json']);
  });

  it.each([
    [['--ouk', 'x'], '--ouk: is not a known option; did you mean "--out"?'],
    [['-json'], '-json: is not a known option; did you mean "--json"?'],
    [['--out'], '--out: has no value; takes FILE: where to'],
    [['--out', '--json'], '--out: has no value'],
    [['--json=yes'], '--json: takes no value'],
    [['--json', '--json'], '--json: is given twice'],
    [['--out', 'a', '--out', 'b'], '--out: is given twice'],
    [['--__proto__', 'x'], '--__proto__: is not a known option'],
    [['x'], 'x: is one operand too many; this verb takes none'],
  ])('%j: %s', (words, line) => {
    expect(faults(words)[0]).toContain(line);
  });

  it('names all faults together', () => {
    expect(faults(['--ouk=1', '--json=1'], ['BRIEF'])).toHaveLength(3);
  });
});
