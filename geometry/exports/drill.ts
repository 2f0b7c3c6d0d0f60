// Drill files in XNC, one for plated holes and one for unplated ones; none for a board without.
// Source: XNC Format Specification, rev. 2021.11, from memory; held in tests against a reader that is not ours.

import type { Hole } from '../artwork/artwork.ts';
import { invariant } from '../errors.ts';
import { guidOf } from './build-id.ts';
import type { ExportInput, NamedFile } from './exporter.ts';
import { encodeGerberField } from './gerber-writer.ts';
import { plainText } from './plain-text.ts';

/** The format knows two-digit tool numbers. */
const MOST_TOOLS = 99;

/** Writes `-plated.drl` and `-unplated.drl`, each where there are such holes; diameters are finished ones. */
export function exportDrill(input: ExportInput): readonly NamedFile[] {
  const { artwork } = input;
  return [true, false].flatMap((plated) => {
    const holes = artwork.holes.filter((hole) => hole.plated === plated);
    if (holes.length === 0) return [];
    return [
      {
        name: `${artwork.slug}-${plated ? 'plated' : 'unplated'}.drl`,
        bytes: new TextEncoder().encode(drillText(input, holes, plated)),
        purpose: plated ? 'plated holes, finished diameters' : 'unplated holes, finished diameters',
      },
    ];
  });
}

function drillText({ artwork, platform, version }: ExportInput, holes: readonly Hole[], plated: boolean): string {
  const diameters = [...new Set(holes.map(({ finishedDiameterNm }) => finishedDiameterNm))].sort((a, b) => a - b);
  invariant(diameters.length <= MOST_TOOLS, 'a drill file has at most 99 tools');
  const project = guidOf(artwork.buildId, 'project', platform);
  const coordinates = guidOf(artwork.buildId, 'coordinates', platform);
  const lines = [
    'M48',
    `; #@! TF.GenerationSoftware,Etchwave,Etchwave,${encodeGerberField(version)}`,
    `; #@! TF.ProjectId,${encodeGerberField(plainText(artwork.title))},${project},${artwork.buildId}`,
    '; #@! TF.Part,Single',
    `; #@! TF.SameCoordinates,${coordinates}`,
    `; #@! TF.FileFunction,${plated ? 'Plated,1,2,PTH' : 'NonPlated,1,2,NPTH'}`,
    '; #@! TF.FilePolarity,Positive',
    // Decimal points in every number: nothing is left to a reader's idea of suppressed zeros.
    'METRIC',
    ...diameters.map((diameter, i) => `T${i + 1}C${decimal(diameter)}`),
    '%',
    'G05',
    ...diameters.flatMap((diameter, i) => [
      `T${i + 1}`,
      ...holes
        .filter(({ finishedDiameterNm }) => finishedDiameterNm === diameter)
        .map(({ centre }) => `X${decimal(centre.xNm)}Y${decimal(centre.yNm)}`),
    ]),
    'M30',
  ];
  return `${lines.join('\n')}\n`;
}

/** Nanometres as millimetres with a decimal point and no more digits than there are. */
function decimal(nm: number): string {
  invariant(Number.isInteger(nm), `${nm} is no whole nanometre`);
  const text = (nm / 1e6).toFixed(6);
  return text.replace(/(\.\d*?[1-9])0+$/, '$1').replace(/\.0+$/, '.0');
}
