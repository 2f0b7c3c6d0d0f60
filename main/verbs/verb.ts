// A verb of the command line, as data: its help, its options, and where its work is done.

import type { Arguments, OptionSpec } from '../arguments.ts';

/** Does the work and returns the exit code. */
export type RunVerb = (args: Arguments) => number | Promise<number>;

export interface Verb {
  readonly name: string;
  readonly summary: string;
  /** What stands for each operand in help. */
  readonly operands: readonly string[];
  /** Beside --json and --help, which every verb has. */
  readonly options: readonly OptionSpec[];
  /** Further lines of help. */
  readonly notes: readonly string[];
  /** Whether the help lists the fields of a brief. */
  readonly takesBrief: boolean;
  /** Loads what the verb needs and no more; absent for a verb that this version does not have. */
  readonly load?: () => Promise<RunVerb>;
}
