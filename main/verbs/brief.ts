// Reading the brief that a verb is given, and naming its file in every fault that it causes later.

import {
  type Brief,
  EngineError,
  type Fault,
  type PatchDesign,
  parseBrief,
  shownText,
  sizePatch,
} from '../../geometry/index.ts';
import type { Arguments } from '../arguments.ts';
import { readText, referenceReader } from '../files.ts';

export async function readBrief(args: Arguments): Promise<Brief> {
  const path = args.operands[0]!;
  return parseBrief(await readText(path), { file: shownText(path), resolve: referenceReader(path) });
}

/** Does work on a brief whose faults the engine tells by field alone. */
export function forBrief<Result>(args: Arguments, work: () => Result): Result {
  try {
    return work();
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    const file = shownText(args.operands[0]!);
    throw new EngineError(error.faults.map((fault) => (fault.file === '' ? { ...fault, file } : fault)));
  }
}

export function sizeBrief(args: Arguments, brief: Brief): PatchDesign {
  return forBrief(args, () => sizePatch(brief));
}

/** Does both, and throws the faults of both together. */
export async function both<A, B>(first: () => A | Promise<A>, second: () => B | Promise<B>): Promise<[A, B]> {
  const faults: Fault[] = [];
  const attempt = async <T>(work: () => T | Promise<T>): Promise<T | undefined> => {
    try {
      return await work();
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      faults.push(...error.faults);
      return undefined;
    }
  };
  const a = await attempt(first);
  const b = await attempt(second);
  if (faults.length > 0) throw new EngineError(faults);
  return [a as A, b as B];
}
