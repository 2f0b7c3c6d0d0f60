// Command-line words → options and operands, or every fault of them at once.

import { EngineError, type Fault, nearest, shownText } from '../geometry/index.ts';

export interface OptionSpec {
  /** Without the dashes. */
  readonly name: string;
  /** What stands for the value in help; absent for a switch. */
  readonly value?: string;
  readonly help: string;
}

export interface Arguments {
  readonly operands: readonly string[];
  readonly values: Readonly<Record<string, string | undefined>>;
  readonly switches: ReadonlySet<string>;
}

export function usageFault(path: string, value: string, problem: string, allowed: string): Fault {
  return { code: 'usage', file: '', path, value: shownText(value), problem, allowed };
}

function namesOf(options: readonly OptionSpec[]): string {
  return options.map(({ name }) => `--${name}`).join(', ');
}

/** Reads the words after the verb. "--name value", "--name=value" and switches; "--" ends the options, "-" is an operand.
 *  @param operandNames  what stands for each operand in help; all of them must be given
 *  Throws: EngineError "usage" */
export function readArguments(
  words: readonly string[],
  options: readonly OptionSpec[],
  operandNames: readonly string[],
): Arguments {
  const faults: Fault[] = [];
  const operands: string[] = [];
  const values: Record<string, string> = Object.create(null);
  const switches = new Set<string>();
  const complain = (path: string, value: string, problem: string, allowed: string): void => {
    faults.push(usageFault(path, value, problem, allowed));
  };
  let literal = false;
  for (let i = 0; i < words.length; i++) {
    const word = words[i]!;
    if (literal || word === '-' || !word.startsWith('-')) {
      operands.push(word);
      continue;
    }
    if (word === '--') {
      literal = true;
      continue;
    }
    const [head, ...tail] = word.split('=');
    const name = head!.replace(/^--?/, '');
    const path = shownText(head!);
    const option = options.find((known) => head === `--${known.name}`);
    if (option === undefined) {
      const close = nearest(
        name,
        options.map((known) => known.name),
      );
      complain(path, '', 'is not a known option', `did you mean "--${close}"? known are ${namesOf(options)}`);
    } else if (switches.has(name) || name in values) {
      complain(path, '', 'is given twice', 'once is enough');
    } else if (option.value === undefined) {
      if (tail.length > 0) complain(path, tail.join('='), 'takes no value', 'it stands alone');
      switches.add(name);
    } else if (tail.length > 0) {
      values[name] = tail.join('=');
    } else if (i + 1 < words.length && !words[i + 1]!.startsWith('--')) {
      values[name] = words[++i]!;
    } else {
      complain(path, '', 'has no value', `takes ${option.value}: ${option.help}`);
    }
  }
  const missing = operandNames.slice(operands.length);
  if (!switches.has('help')) for (const name of missing) complain(name, '', 'is missing', 'see --help');
  for (const extra of operands.slice(operandNames.length)) {
    const allowed = operandNames.length === 0 ? 'this verb takes none' : `this verb takes ${operandNames.join(' ')}`;
    complain(shownText(extra), '', 'is one operand too many', allowed);
  }
  if (faults.length > 0) throw new EngineError(faults);
  return { operands, values, switches };
}
