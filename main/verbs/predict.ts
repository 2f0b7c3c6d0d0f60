// predict: a bare rectangular patch, straight from the command line.

import {
  type BarePatchInput,
  EngineError,
  type Fault,
  formatLengthMm,
  parseNumber,
  parseQuantity,
  predictBare,
  type UnitDimension,
} from '../../geometry/index.ts';
import { type Arguments, usageFault } from '../arguments.ts';
import { EXIT, printJson, printResult } from '../output.ts';
import { closingSections, predictionLines } from '../sheet.ts';

/** Which option becomes which input, and what it measures; null is a plain number. */
const OPTIONS: readonly (readonly [option: string, key: keyof BarePatchInput, dimension: UnitDimension | null])[] = [
  ['length', 'lengthM', 'length'],
  ['width', 'widthM', 'length'],
  ['thickness', 'thicknessM', 'length'],
  ['permittivity', 'permittivity', null],
  ['loss-tangent', 'lossTangent', null],
  ['copper', 'copperThicknessM', 'length'],
  ['conductivity', 'conductivitySPerM', 'conductivity'],
];
const REQUIRED = new Set<keyof BarePatchInput>(['lengthM', 'widthM', 'thicknessM', 'permittivity']);
const METHODS = ['closed-form'];

function readInput(args: Arguments): BarePatchInput {
  const faults: Fault[] = [];
  const input: Partial<Record<keyof BarePatchInput, number>> = {};
  for (const [option, key, dimension] of OPTIONS) {
    const text = args.values[option];
    if (text === undefined) {
      if (REQUIRED.has(key)) faults.push(usageFault(`--${option}`, '', 'is missing', 'see predict --help'));
      continue;
    }
    const parsed = dimension === null ? parseNumber(text) : parseQuantity(text, dimension);
    if (parsed.kind === 'value') input[key] = parsed.value;
    else faults.push(usageFault(`--${option}`, text, parsed.problem, parsed.allowed));
  }
  const method = args.values.method ?? METHODS[0]!;
  if (method === 'full-wave')
    faults.push(usageFault('--method', method, 'full-wave is not in this version', 'allowed is closed-form'));
  else if (!METHODS.includes(method))
    faults.push(usageFault('--method', method, 'is not known', 'allowed is closed-form'));
  if (faults.length > 0) throw new EngineError(faults);
  return input as BarePatchInput;
}

/** The engine names its inputs; the user knows them as options. */
function predictOptions(input: BarePatchInput): ReturnType<typeof predictBare> {
  try {
    return predictBare(input);
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    throw new EngineError(error.faults.map((fault) => ({ ...fault, path: `--${fault.path}` })));
  }
}

export function predict(args: Arguments): number {
  const { radiator, prediction, notices } = predictOptions(readInput(args));
  if (args.switches.has('json')) {
    printJson({ format: 'etchwave-design/1', radiator, prediction, requirement: [], notices });
  } else {
    const size = `length ${formatLengthMm(radiator.lengthM, 3)} (resonant), width ${formatLengthMm(radiator.widthM, 3)}`;
    printResult([`Bare patch, ${size}`, ...predictionLines(prediction), ...closingSections(notices)].join('\n'));
  }
  return EXIT.done;
}
