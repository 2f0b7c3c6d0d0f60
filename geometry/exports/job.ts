// The job file: what the fabricator's tools can read of the order, as JSON.
// Source: Gerber Job Format Specification, rev. 2020.08; its text was not at hand, the keys are those of real files.

import { guidOf } from './build-id.ts';
import { encodeJson } from './design-json.ts';
import type { ClosingExporter, NamedFile } from './exporter.ts';
import { plainText } from './plain-text.ts';

const FUNCTIONS: readonly (readonly [suffix: string, fileFunction: string, polarity: string])[] = [
  ['-copper-top.gbr', 'Copper,L1,Top', 'Positive'],
  ['-copper-bottom.gbr', 'Copper,L2,Bot', 'Positive'],
  ['-mask-top.gbr', 'SolderMask,Top', 'Negative'],
  ['-mask-bottom.gbr', 'SolderMask,Bot', 'Negative'],
  ['-legend-top.gbr', 'Legend,Top', 'Positive'],
  ['-profile.gbr', 'Profile', 'Positive'],
  ['-plated.drl', 'Plated,1,2,PTH', 'Positive'],
  ['-unplated.drl', 'NonPlated,1,2,NPTH', 'Positive'],
];

const millimetres = (metres: number): number => Math.round(metres * 1e6) / 1e3;

/** Writes `.gbrjob`: general data, design rules, files, stack-up. No creation date: it is left out for the same reason
 *  as in the Gerber files. */
export const writeJob: ClosingExporter = (input, files): NamedFile => {
  const { artwork, brief, platform, report, version } = input;
  const { laminate } = brief;
  const smallest = (rule: string): number | undefined => {
    const found = report.rules.find((candidate) => candidate.rule === rule)?.smallestNm;
    return found === null || found === undefined ? undefined : found / 1e6;
  };
  const copper = (name: string) => ({
    Type: 'Copper',
    Name: name,
    Thickness: millimetres(laminate.copperThicknessM),
  });
  const mask = (name: string) => (artwork.hasSolderMask ? [{ Type: 'SolderMask', Name: name }] : []);
  const record = {
    Header: { GenerationSoftware: { Vendor: 'Etchwave', Application: 'Etchwave', Version: version } },
    GeneralSpecs: {
      ProjectId: {
        Name: plainText(artwork.title),
        GUID: guidOf(artwork.buildId, 'project', platform),
        Revision: artwork.buildId,
      },
      Size: { X: artwork.board.widthNm / 1e6, Y: artwork.board.lengthNm / 1e6 },
      LayerNumber: 2,
      BoardThickness: millimetres(laminate.thicknessM + 2 * laminate.copperThicknessM),
    },
    DesignRules: [{ Layers: 'Outer', TrackToTrack: smallest('gap'), MinLineWidth: smallest('width') }],
    FilesAttributes: files.flatMap(({ name }) => {
      const known = FUNCTIONS.find(([suffix]) => name.endsWith(suffix));
      return known === undefined ? [] : [{ Path: name, FileFunction: known[1], FilePolarity: known[2] }];
    }),
    MaterialStackup: [
      ...mask('Top solder mask'),
      copper('Top copper'),
      {
        Type: 'Dielectric',
        Name: 'Laminate',
        Material: plainText(laminate.name),
        Thickness: millimetres(laminate.thicknessM),
        Notes: 'No substitution',
      },
      copper('Bottom copper'),
      ...mask('Bottom solder mask'),
    ],
  };
  return { name: `${artwork.slug}.gbrjob`, bytes: encodeJson(record), purpose: 'job file: layers, rules and stack-up' };
};
