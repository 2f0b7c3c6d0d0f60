// Help texts, made from the verbs and the fields.

import { listBriefFields } from '../geometry/index.ts';
import type { OptionSpec } from './arguments.ts';
import { CAUTIONS } from './cautions.ts';
import { VERBS } from './verbs/list.ts';
import type { Verb } from './verbs/verb.ts';

export const COMMON_OPTIONS: readonly OptionSpec[] = [
  { name: 'json', help: 'print one JSON object on standard output' },
  { name: 'help', help: 'print this' },
];

function columns(rows: readonly (readonly [string, string])[]): readonly string[] {
  const width = Math.max(...rows.map(([left]) => left.length));
  return rows.map(([left, right]) => `  ${left.padEnd(width)}  ${right}`);
}

function cautions(): readonly string[] {
  return ['', 'Cautions', ...CAUTIONS.map((line) => `  ${line}`)];
}

export function generalHelp(): string {
  return [
    'etchwave VERB … : microstrip patch antennas from a brief to a fabrication package',
    '',
    ...columns(VERBS.map(({ name, operands, summary }) => [[name, ...operands].join(' '), summary])),
    '',
    'Every verb has --help and --json. --version prints the version.',
    'Exit codes: 0 done; 1 done, and something asked for does not hold; 2 bad input; 3 a fault of the program; 130 cancelled.',
    ...cautions(),
  ].join('\n');
}

function optionRow({ name, value, help }: OptionSpec): readonly [string, string] {
  return [value === undefined ? `--${name}` : `--${name} ${value}`, help];
}

function briefFields(): readonly string[] {
  const rows = listBriefFields().map(({ path, help, allowed, fallback }): readonly [string, string] => [
    path,
    `${help} (${allowed}${fallback === '' ? '' : `; "${fallback}" where left out`})`,
  ]);
  return [
    '',
    'A brief is JSON, file.brief.json. Quantities are texts with a unit: "2.45 GHz", "1.6 mm", "63 mil", "35 um", "50 ohm".',
    '"laminate" and "fabricator" are each a name from the catalogue, a .json file beside the brief, or a record.',
    ...columns(rows),
  ];
}

export function verbHelp(verb: Verb): string {
  return [
    `etchwave ${[verb.name, ...verb.operands].join(' ')} : ${verb.summary}`,
    '',
    ...columns([...verb.options, ...COMMON_OPTIONS].map(optionRow)),
    ...(verb.notes.length === 0 ? [] : ['', ...verb.notes]),
    ...(verb.takesBrief ? briefFields() : []),
    ...cautions(),
  ].join('\n');
}
