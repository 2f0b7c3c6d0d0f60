// Every verb of the command line. A new one is an entry here and a file beside it.

import type { Verb } from './verb.ts';

const BRIEF = ['BRIEF'];
const NOT_YET = 'This verb is not in this version.';

export const VERBS: readonly Verb[] = [
  {
    name: 'size',
    summary: 'sizes the antenna and predicts what it does',
    operands: BRIEF,
    options: [],
    notes: ['BRIEF is a file, or "-" for standard input. Exit code 1: a requirement of the brief is not met.'],
    takesBrief: true,
    load: async () => (await import('./size.ts')).size,
  },
  {
    name: 'predict',
    summary: 'what a bare rectangular patch does',
    operands: [],
    options: [
      { name: 'length', value: 'L', help: 'the resonant dimension, as in "29 mm"' },
      { name: 'width', value: 'W', help: 'the other dimension' },
      { name: 'thickness', value: 'H', help: 'dielectric between the coppers' },
      { name: 'permittivity', value: 'E', help: 'relative permittivity, a plain number' },
      {
        name: 'loss-tangent',
        value: 'D',
        help: 'of the dielectric, a plain number; without it the dielectric has no loss',
      },
      {
        name: 'copper',
        value: 'T',
        help: 'finished copper; without it the conductor has neither thickness nor resistance',
      },
      { name: 'conductivity', value: 'S', help: 'of the copper, as in "58 MS/m" (taken where left out)' },
      { name: 'method', value: 'METHOD', help: 'closed-form; full-wave is not in this version' },
    ],
    notes: ['The resonance is the real part of the complex pole: that of the patch without its feed.'],
    takesBrief: false,
    load: async () => (await import('./predict.ts')).predict,
  },
  {
    name: 'check',
    summary: "holds the artwork against the rules of the brief's fabricator",
    operands: BRIEF,
    options: [],
    notes: ['Exit code 1: a rule is violated.'],
    takesBrief: true,
    load: async () => (await import('./check.ts')).check,
  },
  {
    name: 'package',
    summary: 'writes the fabrication package',
    operands: BRIEF,
    options: [
      { name: 'out', value: 'FILE.zip', help: 'where to; an existing file is replaced as a whole' },
      { name: 'accept-violations', help: 'write although rules are violated, and list them inside' },
      { name: 'strict', help: 'write nothing where a requirement of the brief is not met' },
    ],
    notes: [
      'Exit code 1: a rule is violated (or, with --strict, a requirement is not met) and nothing was written.',
      'A requirement that is not met does not stop a package otherwise; it stands at the head of FABRICATION.txt.',
    ],
    takesBrief: true,
    load: async () => (await import('./package.ts')).writePackage,
  },
  {
    name: 'catalogue',
    summary: 'lists the laminates and fabricators that a brief can name',
    operands: [],
    options: [],
    notes: ['Generic classes and kinds of shop, each with the source of its numbers (--json shows all of them).'],
    takesBrief: false,
    load: async () => (await import('./catalogue.ts')).catalogue,
  },
  {
    name: 'schema',
    summary: 'prints the JSON Schema of a brief, for editors',
    operands: [],
    options: [],
    notes: [],
    takesBrief: true,
    load: async () => (await import('./schema.ts')).schema,
  },
  ...[
    ['solve', 'full-wave sweep of the artwork'],
    ['tolerance', 'sensitivities and yield'],
    ['correct', 're-spin from a measured board'],
  ].map(
    ([name, summary]): Verb => ({
      name: name!,
      summary: `${summary!} (not in this version)`,
      operands: BRIEF,
      options: [],
      notes: [NOT_YET],
      takesBrief: false,
    }),
  ),
];
