// package: everything that a fabricator needs, in one zip.

import {
  checkArtwork,
  EngineError,
  makeArtwork,
  makePackage,
  type PatchDesign,
  type RuleReport,
} from '../../geometry/index.ts';
import { type Arguments, usageFault } from '../arguments.ts';
import { STANDARD_INPUT, writeWhole } from '../files.ts';
import { EXIT, printJson, printMessage, printResult } from '../output.ts';
import { platform } from '../platform.ts';
import { violationLines } from '../rules.ts';
import { noticeLines, requirementLines, resonanceText } from '../sheet.ts';
import { version } from '../version.ts';
import { both, forBrief, readBrief, sizeBrief } from './brief.ts';

function outputPath(args: Arguments): string {
  const out = args.values.out;
  const allowed = 'takes the name of a file, as in --out board.zip';
  if (out === undefined) throw new EngineError([usageFault('--out', '', 'is missing', allowed)]);
  if (out === '' || out === STANDARD_INPUT || out.includes('\0')) {
    throw new EngineError([usageFault('--out', out, 'is not a file name', allowed)]);
  }
  return out;
}

/** Why nothing may be written, in words; undefined where something may. */
function objection(args: Arguments, design: PatchDesign, report: RuleReport): string | undefined {
  if (report.violations.length > 0 && !args.switches.has('accept-violations')) {
    return 'Nothing was written: rules are violated. --accept-violations writes the package and lists them inside.';
  }
  if (args.switches.has('strict') && design.requirement.some(({ holds }) => !holds)) {
    return 'Nothing was written: a requirement is not met, and --strict was asked for.';
  }
  return undefined;
}

export async function writePackage(args: Arguments): Promise<number> {
  const [out, brief] = await both(
    () => outputPath(args),
    () => readBrief(args),
  );
  const design = sizeBrief(args, brief);
  const artwork = forBrief(args, () => makeArtwork(brief, design, platform, version));
  const report = checkArtwork(brief, artwork);
  const shortfalls = design.requirement.filter(({ holds }) => !holds);
  const refusal = objection(args, design, report);
  const written = { bytes: 0, sha256: '' };
  if (refusal === undefined) {
    const bytes = await makePackage({ brief, design, artwork, report, platform, version });
    writeWhole(out, bytes);
    written.bytes = bytes.length;
    written.sha256 = platform.sha256Hex(bytes);
  }
  if (args.switches.has('json')) {
    printJson({
      format: 'etchwave-package/1',
      buildId: artwork.buildId,
      file: refusal === undefined ? out : null,
      ...(refusal === undefined ? written : {}),
      violations: report.violations,
      shortfalls,
      notices: design.notices,
    });
  } else if (refusal === undefined) {
    printResult(`${out}: ${artwork.buildId}, ${written.bytes} bytes, SHA-256 ${written.sha256}`);
    printResult(resonanceText(design.prediction));
  }
  for (const line of [...violationLines(report), ...requirementLines(shortfalls), ...noticeLines(design.notices)]) {
    printMessage(line.trimStart());
  }
  if (refusal !== undefined) printMessage(refusal);
  return refusal === undefined ? EXIT.done : EXIT.shortfall;
}
