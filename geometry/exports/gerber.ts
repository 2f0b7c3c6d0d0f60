// The six Gerber X2 files of a two-layer board: copper, solder mask, legend, profile.

import type { Pad } from '../artwork/artwork.ts';
import { guidOf } from './build-id.ts';
import type { ExportInput, NamedFile } from './exporter.ts';
import { type GerberLayer, type GerberPad, writeGerber } from './gerber-writer.ts';
import { plainText } from './plain-text.ts';

/** One Gerber file for each layer. All positive but the solder mask, whose openings are drawn; same origin, seen from
 *  the top, never mirrored (6.3). Patch and feed are one net and one region, so the copper is a Conductor (5.6.10). */
export function exportGerber(input: ExportInput): readonly NamedFile[] {
  const { artwork, platform } = input;
  const identity = {
    title: plainText(artwork.title),
    projectGuid: guidOf(artwork.buildId, 'project', platform),
    coordinatesGuid: guidOf(artwork.buildId, 'coordinates', platform),
    buildId: artwork.buildId,
    version: input.version,
  };
  return layersOf(input).map(({ suffix, purpose, layer }) => ({
    name: `${artwork.slug}-${suffix}.gbr`,
    bytes: writeGerber(layer, identity, platform),
    purpose,
  }));
}

interface LayerFile {
  readonly suffix: string;
  readonly purpose: string;
  readonly layer: GerberLayer;
}

function layersOf({ artwork }: ExportInput): readonly LayerFile[] {
  const mask = artwork.hasSolderMask ? 'openings in the solder mask' : 'no solder mask: one opening over the board';
  // A drilled coaxial pad is a component's pad (5.6.10).
  const padsOn = (layer: Pad['layer']): readonly GerberPad[] =>
    artwork.pads
      .filter((pad) => pad.layer === layer)
      .map(({ centre, diameterNm }) => ({ centre, diameterNm, apertureFunction: 'ComponentPad' }));
  return [
    {
      suffix: 'copper-top',
      purpose: 'top copper: radiator and feed line, one piece',
      layer: {
        comment: 'Top copper: radiator and feed line',
        fileFunction: 'Copper,L1,Top',
        polarity: 'Positive',
        apertureFunction: 'Conductor',
        image: { kind: 'regions', shape: artwork.copperTop },
        pads: padsOn('copper-top'),
      },
    },
    {
      suffix: 'copper-bottom',
      purpose: 'bottom copper: ground, drawn positive',
      layer: {
        comment: 'Bottom copper: ground',
        fileFunction: 'Copper,L2,Bot',
        polarity: 'Positive',
        apertureFunction: 'Conductor',
        image: { kind: 'regions', shape: artwork.copperBottom },
        pads: padsOn('copper-bottom'),
      },
    },
    {
      suffix: 'mask-top',
      purpose: `top side, ${mask}`,
      layer: {
        comment: 'Top solder mask, drawn where there is none',
        fileFunction: 'Soldermask,Top',
        polarity: 'Negative',
        apertureFunction: 'Material',
        image: { kind: 'regions', shape: artwork.maskTop },
      },
    },
    {
      suffix: 'mask-bottom',
      purpose: `bottom side, ${mask}`,
      layer: {
        comment: 'Bottom solder mask, drawn where there is none',
        fileFunction: 'Soldermask,Bot',
        polarity: 'Negative',
        apertureFunction: 'Material',
        image: { kind: 'regions', shape: artwork.maskBottom },
      },
    },
    {
      suffix: 'legend-top',
      purpose: artwork.legendTop.length === 0 ? 'top legend: empty by intent' : 'top legend: title and build id',
      layer: {
        comment: 'Top legend',
        fileFunction: 'Legend,Top',
        polarity: 'Positive',
        apertureFunction: 'Material',
        image: { kind: 'strokes', strokes: artwork.legendTop },
      },
    },
    {
      suffix: 'profile',
      purpose: 'outline of the board, one closed line; its centre counts',
      layer: {
        comment: 'Profile: the centre of the line is the edge of the board',
        fileFunction: 'Profile,NP',
        polarity: 'Positive',
        apertureFunction: 'Profile',
        image: { kind: 'outline', contour: artwork.board.outline },
      },
    },
  ];
}
