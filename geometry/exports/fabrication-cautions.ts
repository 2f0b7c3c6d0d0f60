// The cautions at the end of FABRICATION.txt. They name hazards and send the reader to whoever may judge them.

import type { ExportInput } from './exporter.ts';
import { frequency } from './wording.ts';

/** Loss tangent below which a laminate may hold a fluoropolymer (common practice, no source). */
const FLUOROPOLYMER_LOSS_TANGENT = 0.004;

export function cautions({ brief, design }: ExportInput): readonly string[] {
  const { directivityDbi } = design.prediction;
  const upperEirp = (10 ** (directivityDbi / 10)).toFixed(1);
  const { laminate } = brief;
  const mayHoldPtfe = laminate.lossTangent < FLUOROPOLYMER_LOSS_TANGENT || /ptfe|fluoro/i.test(laminate.name);
  return [
    'A prediction is no warranty. Have few boards made, measure them in their housing, and only then order more.',
    'Radio-frequency exposure: nobody should stay in front of or touch an antenna that transmits with more than small ' +
      `power. One watt at the feed can mean up to ${upperEirp} W e.i.r.p. (from the directivity, an upper bound). Work ` +
      'out the distance from the exposure limits that apply where you are; this text is not an assessment.',
    `Law: transmitting between ${frequency(brief.band.lowHz)} and ${frequency(brief.band.highHz)} may need a licence, ` +
      'a power limit or an approval of the equipment together with its antenna. Look up your national table of ' +
      'allocations, and ask the authority or a licensed engineer before you transmit.',
    'Etching at home: goggles, gloves, moving air. Never mix etchants with one another or with other chemicals: ' +
      'some mixtures give off chlorine. Spent etchant and copper salts are hazardous waste: take them to a collection, ' +
      'never to the drain. Keep to the safety data sheets.',
    'Sawing, drilling, milling and sanding laminate makes dust of glass and resin that harms lungs, skin and eyes: ' +
      'extract it at the tool or work wet, and wear a respirator for fine dust, goggles and gloves. Clamp the work ' +
      'when drilling.',
    'Soldering: extract the fumes, wash your hands, keep solder that holds lead away from food.',
    ...(mayHoldPtfe
      ? [
          'This laminate may hold a fluoropolymer such as PTFE. Above 260 °C it gives off toxic fumes: keep irons and ' +
            'hot air below that, never burn offcuts, keep tobacco away from its dust.',
        ]
      : []),
    'Local codes, safety data sheets and the judgement of licensed practitioners stand above everything in this package.',
  ];
}
