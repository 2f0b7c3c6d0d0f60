// Writes a display list as one self-contained SVG: nothing is loaded, no script, no style sheet, true to scale in print.

import type { DisplayList, DrawingItem, Face, Fill, Path, Pen, PointMm, TextItem } from './display-list.ts';
import { plainText } from './plain-text.ts';

/** Families that may be at hand; the generic one at the end always is. */
const SERIF = "'Source Serif 4', 'Source Serif Pro', Georgia, 'Times New Roman', serif";
const SANS = "'Source Sans 3', 'Source Sans Pro', 'Helvetica Neue', Arial, sans-serif";

const FACES: Readonly<Record<Face, string>> = {
  sans: `font-family="${SANS}"`,
  'sans-bold': `font-family="${SANS}" font-weight="600"`,
  serif: `font-family="${SERIF}"`,
  'serif-italic': `font-family="${SERIF}" font-style="italic"`,
};

/** Text as the content of an element or the value of an attribute in double quotes. */
export function encodeXml(text: string): string {
  return plainText(text)
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;');
}

/** SVG text of a drawing. Styles stand in presentation attributes, which a strict content security policy allows. */
export function writeSvg(list: DisplayList): string {
  const { widthMm, heightMm } = list;
  const patterns = new Map<string, Pattern>();
  const body = list.items.map((item) => itemMarkup(item, heightMm, patterns));
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<svg xmlns="http://www.w3.org/2000/svg" version="1.1" width="${widthMm}mm" height="${heightMm}mm"` +
      ` viewBox="0 0 ${widthMm} ${heightMm}">`,
    `<title>${encodeXml(list.title)}</title>`,
    '<defs>',
    ...[...patterns.values()].map((pattern) => pattern.markup),
    '</defs>',
    `<rect width="${widthMm}" height="${heightMm}" fill="#fff"/>`,
    ...body,
    '</svg>',
    '',
  ].join('\n');
}

function itemMarkup(item: DrawingItem, heightMm: number, patterns: Map<string, Pattern>): string {
  if (item.kind === 'text') return textMarkup(item, heightMm);
  const data = item.paths.map((path) => pathData(path, heightMm)).join('');
  const fill = item.fill === undefined ? 'none' : paint(item.fill, patterns);
  return `<path d="${data}" fill="${fill}" fill-rule="evenodd"${strokeAttributes(item.pen)}/>`;
}

function pathData(path: Path, heightMm: number): string {
  const place = (point: PointMm): string => `${decimal(point.xMm)} ${decimal(heightMm - point.yMm)}`;
  const steps = path.steps.map((step) => {
    if (step.kind === 'line') return `L${place(step.to)}`;
    const radius = decimal(step.radiusMm);
    const large = Math.abs(step.sweepRad) > Math.PI ? 1 : 0;
    // SVG's y points down, which turns counter-clockwise into its negative direction.
    const sweep = step.sweepRad > 0 ? 0 : 1;
    return `A${radius} ${radius} 0 ${large} ${sweep} ${place(step.to)}`;
  });
  return `M${place(path.start)}${steps.join('')}${path.closed ? 'Z' : ''}`;
}

function strokeAttributes(pen: Pen | undefined): string {
  if (pen === undefined) return '';
  const dash = pen.dashMm === undefined ? '' : ` stroke-dasharray="${pen.dashMm.map(decimal).join(' ')}"`;
  const ends = pen.roundEnds === true ? ' stroke-linecap="round" stroke-linejoin="round"' : '';
  return ` stroke="${pen.colour}" stroke-width="${decimal(pen.widthMm)}"${dash}${ends}`;
}

/** A colour, or a reference to a pattern that is added to `patterns` the first time it is asked for. */
function paint(fill: Fill, patterns: Map<string, Pattern>): string {
  if (fill.kind === 'solid') return fill.colour;
  const key = JSON.stringify(fill);
  const known = patterns.get(key);
  const id = known?.id ?? `${fill.kind}-${patterns.size}`;
  if (known === undefined) patterns.set(key, { id, markup: patternMarkup(id, fill) });
  return `url(#${id})`;
}

interface Pattern {
  readonly id: string;
  readonly markup: string;
}

function patternMarkup(id: string, fill: Exclude<Fill, { readonly kind: 'solid' }>): string {
  const step = decimal(fill.spacingMm);
  const open = `<pattern id="${id}" patternUnits="userSpaceOnUse" width="${step}" height="${step}"`;
  if (fill.kind === 'dots') {
    const middle = decimal(fill.spacingMm / 2);
    const dot = `<circle cx="${middle}" cy="${middle}" r="${decimal(fill.radiusMm)}" fill="${fill.colour}"/>`;
    return `${open}>${dot}</pattern>`;
  }
  const ground = `<rect width="${step}" height="${step}" fill="${fill.ground}"/>`;
  const line = `<rect width="${decimal(fill.lineMm)}" height="${step}" fill="${fill.colour}"/>`;
  return `${open} patternTransform="rotate(45)">${ground}${line}</pattern>`;
}

function textMarkup(item: TextItem, heightMm: number): string {
  const x = decimal(item.at.xMm);
  const y = decimal(heightMm - item.at.yMm);
  const turn = item.upwards === true ? ` transform="rotate(-90 ${x} ${y})"` : '';
  return (
    `<text x="${x}" y="${y}" ${FACES[item.face]} font-size="${decimal(item.sizeMm)}"` +
    ` text-anchor="${item.anchor}" fill="${item.colour}"${turn}>${encodeXml(item.text)}</text>`
  );
}

/** To a micrometre on paper, without idle zeros and without an exponent. */
function decimal(value: number): string {
  return String(Math.round(value * 1000) / 1000 + 0);
}
