// The tables of FABRICATION.txt: dimensions with tolerances, rules with margins, predictions with intervals.

import type { Dimension } from '../artwork/artwork.ts';
import type { PatchDesign } from '../patch/design.ts';
import type { RuleReport } from '../rules/violation.ts';
import { toNm } from '../units.ts';
import type { ExportInput } from './exporter.ts';
import { breakWords, plainText } from './plain-text.ts';
import {
  bandwidth,
  frequency,
  millimetres,
  millimetresAtLeast,
  percent,
  RESONANCE_IN_WORDS,
  returnLoss,
} from './wording.ts';

/** Rows as columns with two blanks between them; the last column is wrapped where `columns` bounds the width. */
export function textTable(rows: readonly (readonly string[])[], columns = Number.POSITIVE_INFINITY): readonly string[] {
  const cells = rows.map((row) => row.map((cell) => plainText(cell)));
  const widths = Array.from({ length: Math.max(0, ...cells.map((row) => row.length)) }, (_, column) =>
    Math.max(...cells.map((row) => [...(row[column] ?? '')].length)),
  );
  return cells.flatMap((row) => {
    const head = row.slice(0, -1).map((cell, column) => pad(cell, widths[column]!));
    const lead = head.map((cell) => `${cell}  `).join('');
    const room = columns - [...lead].length;
    const lines = breakWords(row[row.length - 1] ?? '', (line) => [...line].length <= room);
    const indent = ' '.repeat([...lead].length);
    return lines.length === 0 ? [lead] : lines.map((line, index) => (index === 0 ? lead : indent) + line);
  });
}

function pad(cell: string, width: number): string {
  return cell + ' '.repeat(width - [...cell].length);
}

/** Every dimension of the drawing with what it may be off by. */
export function dimensionTable(input: ExportInput): readonly string[] {
  const { artwork } = input;
  return textTable([
    ['dimension', 'nominal', 'tolerance', ''],
    ...artwork.dimensions.map((dimension) => [
      dimension.label,
      millimetres(dimension.valueNm),
      `± ${millimetres(toleranceNm(dimension, input))}`,
      dimension.critical ? 'critical' : '',
    ]),
  ]);
}

/** An etched edge may lie off by the fabricator's edge tolerance, a routed one by that of the outline. Between two
 *  etched edges both count; between two routed ones the outline's tolerance is already that of the size. */
function toleranceNm(dimension: Dimension, { artwork, brief }: ExportInput): number {
  const { board } = artwork;
  const routed = [dimension.from, dimension.to].filter((end) => {
    const [along, size] = dimension.axis === 'x' ? [end.xNm, board.widthNm] : [end.yNm, board.lengthNm];
    return along === 0 || along === size;
  }).length;
  const edgeNm = toNm(brief.fabricator.edgeToleranceM);
  const outlineNm = toNm(brief.fabricator.outlineToleranceM);
  return routed === 2 ? outlineNm : routed === 1 ? outlineNm + edgeNm : 2 * edgeNm;
}

/** Every rule that was checked, with its limit, the smallest value found and the margin. */
export function ruleTable(report: RuleReport): readonly string[] {
  return textTable([
    ['rule', 'layer', 'limit', 'found', 'margin', ''],
    ...report.rules.map(({ rule, layer, limitNm, smallestNm, marginNm, holds }) => [
      rule,
      layer,
      millimetres(limitNm),
      smallestNm === null ? 'nothing' : millimetresAtLeast(smallestNm),
      marginNm === null ? '' : millimetresAtLeast(marginNm),
      holds ? 'holds' : 'VIOLATED',
    ]),
  ]);
}

/** The prediction in words and numbers, with the causes of its interval. */
/** Where the greatest resistance of each feed is meant. */
const SEEN_AT: Readonly<Record<PatchDesign['feed']['kind'], string>> = {
  inset: 'at the end of the inset',
  'quarter-wave': "at the patch's edge",
  probe: 'at the pin',
};

export function predictionTable({ prediction, feed }: PatchDesign): readonly string[] {
  const unknown = 'never reached with this feed';
  const known = prediction.bandwidthHz === null ? unknown : bandwidth(prediction.bandwidthHz);
  const rows: string[][] = [
    ['Method', 'closed-form equations, not a measurement'],
    ['Resonance', `${frequency(prediction.resonanceHz)}: ${RESONANCE_IN_WORDS[prediction.resonanceKind]}`],
    [
      'Interval',
      `${frequency(prediction.resonanceLowHz)} to ${frequency(prediction.resonanceHighHz)}, three sigma, from:`,
    ],
    ...prediction.contributions.map(({ cause, halfWidthHz }) => ['', `± ${bandwidth(halfWidthHz)} ${cause}`]),
    [`Bandwidth, VSWR ${prediction.bandwidthVswr}`, known],
    ['Return loss', `${returnLoss(prediction.returnLossAtCentreDb)} at band centre`],
    ['', `${returnLoss(prediction.returnLossWorstInBandDb)} at the worst place in the band`],
    ['Edge resistance', `${prediction.edgeResistanceOhm.toFixed(1)} ohm`],
    ['Efficiency', percent(prediction.radiationEfficiency)],
    ['Directivity', `${prediction.directivityDbi.toFixed(1)} dBi`],
    ['Gain', `${prediction.gainDbi.toFixed(1)} dBi`],
  ];
  if (prediction.inputResistanceOhm !== null) {
    rows.push(['Input resistance', `${prediction.inputResistanceOhm.toFixed(1)} ohm ${SEEN_AT[feed.kind]}`]);
  }
  if (prediction.gainRealizedDbi !== null) {
    rows.push(['Gain realised', `${prediction.gainRealizedDbi.toFixed(1)} dBi with mismatch and feed line`]);
  }
  return textTable(rows);
}

/** Each requirement of the brief beside its prediction, within so many columns. */
export function requirementTable({ requirement }: PatchDesign, columns: number): readonly string[] {
  const rows = requirement.map(({ name, wanted, predicted, holds }) => [
    holds ? 'holds' : 'NOT MET',
    `${name}: wanted ${wanted}; predicted ${predicted}`,
  ]);
  return textTable(rows, columns);
}
