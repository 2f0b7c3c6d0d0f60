// size: the dimensions of the antenna, and what they will do.

import { designRecord } from '../../geometry/index.ts';
import type { Arguments } from '../arguments.ts';
import { EXIT, printJson, printResult } from '../output.ts';
import { designSheet } from '../sheet.ts';
import { readBrief, sizeBrief } from './brief.ts';

export async function size(args: Arguments): Promise<number> {
  const brief = await readBrief(args);
  const design = sizeBrief(args, brief);
  if (args.switches.has('json')) printJson({ ...designRecord(design), title: brief.title, defaults: brief.defaults });
  else printResult(designSheet(brief, design));
  return design.requirement.every(({ holds }) => holds) ? EXIT.done : EXIT.shortfall;
}
