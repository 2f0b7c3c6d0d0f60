// design.json: what was sized and predicted, the rules it was held against, as plain data with units in the keys.

import { invariant } from '../errors.ts';
import type { PatchDesign } from '../patch/design.ts';
import type { PointNm } from '../shape/shape.ts';
import type { ExportInput, NamedFile } from './exporter.ts';

/** The results of a design under the public keys, in their public order. */
export function designRecord(design: PatchDesign): Readonly<Record<string, unknown>> {
  return {
    format: 'etchwave-design/1',
    radiator: design.radiator,
    feed: design.feed,
    board: design.board,
    prediction: design.prediction,
    requirement: design.requirement,
    notices: design.notices,
  };
}

/** Writes `design.json`: the results, and with them the build they belong to, every rule with the smallest value found,
 *  and every violation. */
export function exportDesign(input: ExportInput): readonly NamedFile[] {
  const { artwork, report } = input;
  const { format, ...results } = designRecord(input.design);
  const record = {
    format,
    title: artwork.title,
    buildId: artwork.buildId,
    version: input.version,
    shortfalls: input.design.requirement.filter((requirement) => !requirement.holds).map(({ name }) => name),
    ...results,
    fabricator: report.fabricator,
    rules: report.rules.map(({ rule, layer, limitNm, smallestNm, marginNm, holds }) => ({
      rule,
      layer,
      limitNm,
      smallestNm,
      marginNm,
      holds,
    })),
    violations: report.violations.map((violation) => ({
      rule: violation.rule,
      layer: violation.layer,
      measuredNm: violation.measuredNm,
      limitNm: violation.limitNm,
      from: plainPoint(violation.from),
      to: plainPoint(violation.to),
      message: violation.message,
    })),
    remarks: [...artwork.remarks, ...report.remarks],
  };
  return [{ name: 'design.json', bytes: encodeJson(record), purpose: 'dimensions, prediction and rules as data' }];
}

/** JSON text with a line for each value. JSON has no NaN and no infinity: they would silently turn into null. */
export function encodeJson(value: unknown): Uint8Array {
  const text = JSON.stringify(
    value,
    (key, item: unknown) => {
      invariant(typeof item !== 'number' || Number.isFinite(item), `${key} is not a finite number`);
      return item;
    },
    2,
  );
  return new TextEncoder().encode(`${text}\n`);
}

function plainPoint(point: PointNm): PointNm {
  return { xNm: point.xNm, yNm: point.yNm };
}
