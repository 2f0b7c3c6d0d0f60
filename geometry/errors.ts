// What can go wrong, as data: faults of the input that a user can mend, notices in results, and bugs.

/** One fault of the input. `path` names the field (`laminate.thickness`), `value` what was given, `allowed` what is taken. */
export interface Fault {
  readonly code: string;
  /** The file that holds the fault, as the user named it; empty where there is none. */
  readonly file: string;
  readonly path: string;
  /** What was given, shortened for display; empty where nothing was given or where it must not be shown. */
  readonly value: string;
  readonly problem: string;
  readonly allowed: string;
}

/** All faults of one input, reported together. Serialisable through `faults`. */
export class EngineError extends Error {
  readonly faults: readonly Fault[];

  constructor(faults: readonly Fault[]) {
    super(faults.map(formatFault).join('\n'));
    this.name = 'EngineError';
    this.faults = faults;
  }
}

/** `file: path.to.field: what is wrong; what is allowed`, the parts that are known. */
export function formatFault(fault: Fault): string {
  const where = [fault.file, fault.path].filter((part) => part !== '').join(': ');
  const what = fault.allowed === '' ? fault.problem : `${fault.problem}; ${fault.allowed}`;
  return where === '' ? what : `${where}: ${what}`;
}

/** Throws one fault. */
export function refuse(fault: Partial<Fault> & Pick<Fault, 'code' | 'problem'>): never {
  throw new EngineError([{ file: '', path: '', value: '', allowed: '', ...fault }]);
}

/** A remark that travels with a result: a formula beyond its range, a simplification, a shortfall. */
export interface Notice {
  readonly code: string;
  readonly message: string;
}

/** States what must be true whatever the user does; its failure is a fault of the program. */
export function invariant(condition: boolean, message: string): asserts condition {
  if (!condition) throw new Error(`invariant: ${message}`);
}
