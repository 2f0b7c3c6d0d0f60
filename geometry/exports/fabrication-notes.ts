// FABRICATION.txt: everything the fabricator and the buyer must know, shortfalls first, cautions last.

import type { Artwork } from '../artwork/artwork.ts';
import type { RuleReport } from '../rules/violation.ts';
import type { ExportInput, NamedFile } from './exporter.ts';
import { cautions } from './fabrication-cautions.ts';
import { boardThicknessM, shortfalls, standingNotes } from './fabrication-statements.ts';
import { dimensionTable, predictionTable, requirementTable, ruleTable, textTable } from './fabrication-tables.ts';
import { plainText, wrapColumns } from './plain-text.ts';
import { micrometresOf, millimetres, millimetresAtLeast, millimetresOf } from './wording.ts';

/** Width of the text [characters]. */
const COLUMNS = 96;

/** Writes `FABRICATION.txt` over the files that are there so far. */
export function writeFabricationNotes(input: ExportInput, files: readonly NamedFile[]): NamedFile {
  const { artwork } = input;
  const lines = [
    ...paragraph(artwork.title),
    `Build ${artwork.buildId}, Etchwave ${input.version}. Lengths in mm where no unit stands beside them.`,
    ...heldAtHead(input),
    ...section('Files', fileList(files)),
    ...section('For the order form', orderForm(input)),
    ...section('Stack-up and material', stackUp(input)),
    ...section('Notes to the fabricator', numbered(standingNotes(input))),
    ...section('Dimensions of the finished board', dimensionTable(input)),
    ...section(`Rules of ${input.report.fabricator}, and what this board has`, ruleTable(input.report)),
    ...section('What is predicted', predictionTable(input.design)),
    ...section('What was asked for', requirementTable(input.design, COLUMNS)),
    ...section('Remarks', remarks(input)),
    ...section('Cautions', numbered(cautions(input))),
  ];
  const text = `${lines.map((line) => plainText(line).trimEnd()).join('\n')}\n`;
  return { name: 'FABRICATION.txt', bytes: new TextEncoder().encode(text), purpose: 'this text' };
}

function section(heading: string, body: readonly string[]): readonly string[] {
  return body.length === 0 ? [] : ['', heading.toUpperCase(), '-'.repeat(COLUMNS), ...body];
}

function paragraph(text: string, lead = ''): readonly string[] {
  return wrapColumns(plainText(text), COLUMNS, lead);
}

function numbered(sentences: readonly string[]): readonly string[] {
  return sentences.flatMap((sentence, index) => paragraph(sentence, `${String(index + 1).padStart(2)}. `));
}

function bullets(sentences: readonly string[]): readonly string[] {
  return sentences.flatMap((sentence) => paragraph(sentence, '  - '));
}

/** What does not hold, where nobody can miss it. */
function heldAtHead(input: ExportInput): readonly string[] {
  const missed = shortfalls(input);
  const { violations } = input.report;
  return [
    ...section('Not met: what the brief asks for and this board is not predicted to do', bullets(missed)),
    ...section(
      'Violated: rules of the fabricator that this board breaks, accepted by whoever built the package',
      bullets(violations.map(({ message, rule, layer }) => `${message} (${rule}, ${layer})`)),
    ),
  ];
}

function fileList(files: readonly NamedFile[]): readonly string[] {
  const rows = [
    ...files.map(({ name, purpose }) => [name, purpose ?? '']),
    ['FABRICATION.txt', 'this text'],
    ['manifest.json', 'size and SHA-256 of every other file'],
  ];
  return [
    ...textTable(rows),
    '',
    ...paragraph(
      'Gerber files are X2, format 4.6, millimetres; their .FileFunction attribute says which layer each is, and ' +
        '.ProjectId names the build, which has to be the same in all. ' +
        (hasDrillFile(files)
          ? 'Drill files are XNC in millimetres with decimal points; diameters are finished ones.'
          : 'There is no drill file, for there are no holes.'),
    ),
  ];
}

function hasDrillFile(files: readonly NamedFile[]): boolean {
  return files.some(({ name }) => name.endsWith('.drl'));
}

function holesInWords({ holes }: Artwork): string {
  if (holes.length === 0) return 'none, plated or unplated; no slots, no edge plating';
  const count = (plated: boolean): number => holes.filter((hole) => hole.plated === plated).length;
  return `${count(true)} plated, ${count(false)} unplated, as in the drill files; no slots, no edge plating`;
}

function orderForm(input: ExportInput): readonly string[] {
  const { artwork, brief, report } = input;
  const { laminate, fabricator } = brief;
  const { widthNm, lengthNm } = artwork.board;
  const finish =
    fabricator.finishes.length === 0
      ? 'as agreed with the fabricator'
      : `one of: ${fabricator.finishes.join(', ')}. Nickel under gold conducts worse and costs gain, more so above 6 GHz.`;
  const rows = [
    ['Board size', `${millimetres(widthNm)} x ${millimetres(lengthNm)}, single board, no panel`],
    ['Layers', '2 (top: antenna; bottom: ground)'],
    ['Laminate', laminate.name],
    ['Thickness over copper', millimetresOf(boardThicknessM(input))],
    [
      'Copper, both sides',
      `${micrometresOf(laminate.copperThicknessM)} µm finished (${micrometresOf(laminate.copperBaseM)} µm base)`,
    ],
    ['Solder mask', artwork.hasSolderMask ? 'both sides, open as in the mask files; any colour' : 'none, either side'],
    ['Legend', artwork.legendTop.length > 0 ? 'top side' : 'none'],
    ['Finish', finish],
    ['Smallest conductor', smallest(report, 'width')],
    ['Smallest space', smallest(report, 'gap')],
    ['Holes', holesInWords(artwork)],
    ['Impedance control', 'none: line widths are part of the antenna and stay as drawn'],
    ['Electrical test', 'two nets, radiator and ground, without connection'],
  ];
  return textTable(rows, COLUMNS);
}

/** The smallest value that a rule found on any copper. */
function smallest(report: RuleReport, rule: string): string {
  const found = report.rules.flatMap((result) =>
    result.rule === rule && result.layer.startsWith('copper') && result.smallestNm !== null ? [result.smallestNm] : [],
  );
  return found.length === 0 ? 'none' : millimetresAtLeast(Math.min(...found));
}

function stackUp({ brief }: ExportInput): readonly string[] {
  const { laminate } = brief;
  const copper = `${micrometresOf(laminate.copperThicknessM)} µm finished`;
  const plusMinus = (value: string | number, isZero: boolean): string =>
    isZero ? ', no tolerance given' : ` ± ${value}`;
  const thickness = plusMinus(millimetresOf(laminate.thicknessToleranceM), laminate.thicknessToleranceM === 0);
  const permittivity = plusMinus(laminate.permittivityTolerance, laminate.permittivityTolerance === 0);
  return [
    ...textTable([
      ['Top copper', `${copper}: radiator and feed line`],
      ['Dielectric', `${millimetresOf(laminate.thicknessM)}${thickness}, finished, between the coppers`],
      ['', `${laminate.name}`],
      ['', `relative permittivity ${laminate.permittivity}${permittivity}, loss tangent ${laminate.lossTangent}`],
      ['Bottom copper', `${copper}: ground`],
    ]),
    '',
    ...paragraph(
      'No substitution, no "or equivalent", without the written consent of the buyer. Please state maker, grade and ' +
        'lot of the laminate with the delivery.',
    ),
  ];
}

function remarks({ artwork, design, report }: ExportInput): readonly string[] {
  return bullets([...artwork.remarks, ...report.remarks, ...design.notices.map(({ message }) => message)]);
}
