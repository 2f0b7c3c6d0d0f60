// The predicted reflection as a Touchstone file, version 1: what the bench is to be compared with.
// Source: Touchstone File Format Specification, version 1.1, EIA/IBIS (rules from a stored transcript).

import { complex } from '../numeric/complex.ts';
import { modelFeed } from '../patch/feed-model.ts';
import { reflection } from '../patch/match.ts';
import type { ExportInput, NamedFile } from './exporter.ts';
import { plainText } from './plain-text.ts';
import { frequency, RESONANCE_IN_WORDS } from './wording.ts';

const POINTS = 401;
/** Span over the band's width, and over its centre at least: both sides of the dip must show. */
const SPAN_OVER_BAND = 4;
const SPAN_OVER_CENTRE = 0.12;

/** Comment text in ASCII: anything else as \uXXXX, one escape for each UTF-16 unit. */
export function encodeTouchstoneComment(text: string): string {
  return plainText(text).replace(
    /[^\x20-\x7e]/g,
    (unit) => `\\u${unit.charCodeAt(0).toString(16).toUpperCase().padStart(4, '0')}`,
  );
}

/** Writes `<slug>-prediction.s1p`: reflection at the connector in the brief's reference, whole hertz, real and
 *  imaginary part. */
export function exportTouchstone(input: ExportInput): readonly NamedFile[] {
  const { artwork, brief, design } = input;
  const { lowHz, highHz } = brief.band;
  const reference = brief.match.referenceOhm;
  const { connector } = modelFeed(brief, design.radiator, design.feed, null);
  const centre = (lowHz + highHz) / 2;
  const half = Math.max(SPAN_OVER_BAND * (highHz - lowHz), SPAN_OVER_CENTRE * centre) / 2;
  const { prediction } = design;
  const from = Math.max(1, Math.round(centre - Math.min(half, centre / 2)));
  const to = Math.round(centre + half);
  const lines = [
    `! ${encodeTouchstoneComment(artwork.title)}`,
    `! Build ${artwork.buildId}, Etchwave ${encodeTouchstoneComment(input.version)}`,
    '! Predicted by closed-form equations, nominal dimensions: not measured',
    `! ${RESONANCE_IN_WORDS[prediction.resonanceKind]}: ${frequency(prediction.resonanceHz)}, between ${frequency(prediction.resonanceLowHz)} and ${frequency(prediction.resonanceHighHz)} at three sigma`,
    '! Reference plane: the connector, where the feed leaves the board',
    `# Hz S RI R ${reference}`,
  ];
  for (let i = 0; i < POINTS; i++) {
    const f = Math.round(from + ((to - from) * i) / (POINTS - 1));
    const { re, im } = reflection(connector(complex(f)), reference);
    lines.push(`${f} ${re.toFixed(9)} ${im.toFixed(9)}`);
  }
  return [
    {
      name: `${artwork.slug}-prediction.s1p`,
      bytes: new TextEncoder().encode(`${lines.join('\n')}\n`),
      purpose: 'predicted reflection at the connector, for the bench',
    },
  ];
}
