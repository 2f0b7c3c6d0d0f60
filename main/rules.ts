// A rule report for reading in a terminal.

import type { RuleReport } from '../geometry/index.ts';

const mm = (lengthNm: number): string => `${(lengthNm / 1e6).toFixed(3)} mm`;

export function ruleLines(report: RuleReport): readonly string[] {
  const width = Math.max(0, ...report.rules.map(({ rule, layer }) => rule.length + layer.length));
  return report.rules.map(({ rule, layer, limitNm, smallestNm, marginNm, holds }) => {
    const name = `${rule}, ${layer}`.padEnd(width + 2);
    const found =
      smallestNm === null
        ? 'nothing to check'
        : `${mm(smallestNm)} (limit ${mm(limitNm)}, margin ${mm(marginNm ?? 0)})`;
    return `  ${holds ? 'holds    ' : 'VIOLATED '} ${name}  ${found}`;
  });
}

export function violationLines(report: RuleReport): readonly string[] {
  return report.violations.map(
    ({ message, layer, from }) => `  ${message} [${layer}, at x ${mm(from.xNm)}, y ${mm(from.yNm)}]`,
  );
}

/** The report under its public keys. */
export function ruleRecord(report: RuleReport): Readonly<Record<string, unknown>> {
  return {
    format: 'etchwave-check/1',
    fabricator: report.fabricator,
    violations: report.violations,
    rules: report.rules,
    remarks: report.remarks,
  };
}
