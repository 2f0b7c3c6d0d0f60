// What goes out: results on standard output, messages on standard error, faults in one form.

import { EngineError, type Fault, formatFault } from '../geometry/index.ts';

export const EXIT = { done: 0, shortfall: 1, badInput: 2, fault: 3, cancelled: 130 } as const;

/** Everything but line ends that a terminal would obey instead of print. */
const OBEYED = /[\u0000-\u0009\u000b-\u001f\u007f-\u009f]/g;

function printable(text: string): string {
  return text.replace(OBEYED, (character) => `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`);
}

export function printResult(text: string): void {
  process.stdout.write(`${printable(text)}\n`);
}

export function printMessage(text: string): void {
  process.stderr.write(`${printable(text)}\n`);
}

/** One JSON object. JSON has no NaN and no infinity: rather a fault of the program than a silent null. */
export function printJson(value: unknown): void {
  const text = JSON.stringify(
    value,
    (key, item: unknown) => {
      if (typeof item === 'number' && !Number.isFinite(item)) throw new Error(`${key} is not a finite number`);
      return item;
    },
    2,
  );
  process.stdout.write(`${text}\n`);
}

function printFaults(faults: readonly Fault[], asJson: boolean): void {
  if (asJson) printJson({ format: 'etchwave-error/1', errors: faults });
  else for (const fault of faults) printMessage(`etchwave: ${formatFault(fault)}`);
}

/** Tells what went wrong, and returns the exit code that says it. */
export function reportError(error: unknown, asJson: boolean): number {
  if (error instanceof EngineError) {
    printFaults(error.faults, asJson);
    return EXIT.badInput;
  }
  const problem = error instanceof Error ? error.message : String(error);
  const fault: Fault = {
    code: 'program',
    file: '',
    path: '',
    value: '',
    problem: `a fault of the program: ${problem}`,
    allowed: '',
  };
  printFaults([fault], asJson);
  if (error instanceof Error && error.stack !== undefined) printMessage(error.stack);
  return EXIT.fault;
}
