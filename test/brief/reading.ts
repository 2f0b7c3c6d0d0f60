// Reading briefs in tests: the example of the documentation, and its faults as text.

import type { Brief } from '../../geometry/brief/brief.ts';
import { type ParseContext, parseBrief } from '../../geometry/brief/parse.ts';
import { EngineError, formatFault } from '../../geometry/errors.ts';

export const example = {
  format: 'etchwave-brief/1',
  title: 'Orchard soil sensor, 2.4 GHz',
  band: { low: '2.400 GHz', high: '2.4835 GHz' },
  match: { returnLoss: '10 dB', reference: '50 ohm' },
  polarization: 'linear',
  laminate: {
    name: 'glass-epoxy, 1.6 mm',
    permittivity: 4.3,
    permittivityTolerance: 0.2,
    lossTangent: 0.018,
    thickness: '1.53 mm',
    thicknessTolerance: '0.13 mm',
    copperThickness: '35 um',
    roughness: '1.8 um',
  },
  radiator: { family: 'rectangular' },
  feed: { kind: 'inset' },
  board: { margin: 'auto' },
  fabricator: 'shop-standard',
};

export const noFiles: ParseContext = {
  file: 'field.brief.json',
  resolve: (reference) => {
    throw new EngineError([
      { code: 'file.missing', file: reference, path: '', value: '', problem: 'cannot be read', allowed: '' },
    ]);
  },
};

export function read(brief: unknown, context: ParseContext = noFiles): Brief {
  return parseBrief(typeof brief === 'string' ? brief : JSON.stringify(brief), context);
}

/** The faults of a brief, each as its line. */
export function faults(brief: unknown, context: ParseContext = noFiles): readonly string[] {
  try {
    read(brief, context);
  } catch (error) {
    if (error instanceof EngineError) return error.faults.map(formatFault);
    throw error;
  }
  return [];
}
