// check: the artwork against the rules of the brief's fabricator.

import { checkArtwork, makeArtwork } from '../../geometry/index.ts';
import type { Arguments } from '../arguments.ts';
import { EXIT, printJson, printResult } from '../output.ts';
import { platform } from '../platform.ts';
import { ruleLines, ruleRecord, violationLines } from '../rules.ts';
import { version } from '../version.ts';
import { forBrief, readBrief, sizeBrief } from './brief.ts';

export async function check(args: Arguments): Promise<number> {
  const brief = await readBrief(args);
  const design = sizeBrief(args, brief);
  const artwork = forBrief(args, () => makeArtwork(brief, design, platform, version));
  const report = checkArtwork(brief, artwork);
  if (args.switches.has('json')) {
    printJson({ ...ruleRecord(report), buildId: artwork.buildId });
  } else {
    const violated = report.violations.length;
    printResult(
      [
        `${brief.title}, ${artwork.buildId}, against ${report.fabricator}`,
        ...ruleLines(report),
        ...report.remarks.map((remark) => `  ${remark}`),
        '',
        violated === 0 ? 'Every rule holds.' : `${violated} ${violated === 1 ? 'violation' : 'violations'}:`,
        ...violationLines(report),
      ].join('\n'),
    );
  }
  return report.violations.length === 0 ? EXIT.done : EXIT.shortfall;
}
