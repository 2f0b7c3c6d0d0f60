// Writes one Gerber X2 file: header and attributes, dark and clear regions, pen strokes, checksum.
// Source: The Gerber Layer Format Specification, rev. 2024.05; section numbers stand beside each rule.

import { invariant } from '../errors.ts';
import { contourAreaNm2 } from '../shape/measure.ts';
import type { Contour, Edge, PointNm, Shape, Stroke } from '../shape/shape.ts';
import type { Platform } from './exporter.ts';

/** What the layer shows: filled regions, pen strokes, or a closed line round the board. */
export type GerberImage =
  | { readonly kind: 'regions'; readonly shape: Shape }
  | { readonly kind: 'strokes'; readonly strokes: readonly Stroke[] }
  | { readonly kind: 'outline'; readonly contour: Contour };

export interface GerberLayer {
  /** What the layer is, in words of our own: it goes into a comment. */
  readonly comment: string;
  /** Value of .FileFunction, e.g. Copper,L1,Top (5.6.3). */
  readonly fileFunction: string;
  /** Negative: what is drawn is where material is absent, as in solder mask (5.6.4). */
  readonly polarity: 'Positive' | 'Negative';
  /** Value of .AperFunction for everything drawn (5.6.10). */
  readonly apertureFunction: string;
  readonly image: GerberImage;
  /** Round pads, flashed over the image: every pad is a flash and every flash a pad (6.4). */
  readonly pads?: readonly GerberPad[];
}

export interface GerberPad {
  readonly centre: PointNm;
  readonly diameterNm: number;
  /** Value of .AperFunction, e.g. ComponentPad. */
  readonly apertureFunction: string;
}

/** What all files of one board have in common. */
export interface GerberIdentity {
  readonly title: string;
  readonly projectGuid: string;
  readonly coordinatesGuid: string;
  readonly buildId: string;
  readonly version: string;
}

/** Width of the pen that draws the profile; only its centre line counts (6.5). */
const PROFILE_PEN_NM = 100_000;

/** Text as one field of an attribute. Everything but a few harmless ASCII characters is written as \uXXXX, one escape
 *  for each UTF-16 unit: percent and asterisk end commands, commas end fields, a backslash begins an escape (3.4.3),
 *  and readers older than the UTF-8 revisions take ASCII only. */
export function encodeGerberField(text: string): string {
  return text.replace(
    /[^A-Za-z0-9 _.+\-/:()=]/g,
    (unit) => `\\u${unit.charCodeAt(0).toString(16).toUpperCase().padStart(4, '0')}`,
  );
}

/** The bytes of one layer's file. Coordinates are the artwork's nanometres, digit for digit: format 4.6 in millimetres
 *  has a unit of 1 nm (4.2.2), so nothing is rounded. No .CreationDate is written: it is optional (6.2), a true one
 *  would make two packages of one brief differ, and an invented one would be false; .ProjectId names the build. */
export function writeGerber(layer: GerberLayer, identity: GerberIdentity, platform: Platform): Uint8Array {
  const field = encodeGerberField;
  const lines = [
    `%TF.GenerationSoftware,Etchwave,Etchwave,${field(identity.version)}*%`,
    `%TF.ProjectId,${field(identity.title)},${identity.projectGuid},${field(identity.buildId)}*%`,
    '%TF.Part,Single*%',
    `%TF.SameCoordinates,${identity.coordinatesGuid}*%`,
    `%TF.FileFunction,${layer.fileFunction}*%`,
    `%TF.FilePolarity,${layer.polarity}*%`,
    `G04 ${layer.comment}*`,
    '%FSLAX46Y46*%',
    '%MOMM*%',
    '%LPD*%',
    'G75*',
    'G01*',
    ...padApertures(layer.pads ?? []),
    // One attribute in force from the first aperture to the last object: regions take it from the dictionary (5.3.1).
    `%TA.AperFunction,${layer.apertureFunction}*%`,
    ...imageLines(layer.image),
    ...padFlashes(layer.pads ?? []),
    '%TD*%',
  ];
  const body = `${lines.join('\n')}\n`;
  // 5.6.9: over every byte before this command, line ends left out.
  const digest = platform.md5Hex(new TextEncoder().encode(body.replaceAll('\n', '')));
  return new TextEncoder().encode(`${body}%TF.MD5,${digest}*%\nM02*\n`);
}

/** Apertures of pads count from here, above those of the image. */
const FIRST_PAD_APERTURE = 100;

/** Pads that share diameter and function share an aperture. */
function padGroups(pads: readonly GerberPad[]): readonly (readonly GerberPad[])[] {
  const groups = new Map<string, GerberPad[]>();
  for (const pad of pads) {
    const key = `${pad.diameterNm} ${pad.apertureFunction}`;
    groups.set(key, [...(groups.get(key) ?? []), pad]);
  }
  return [...groups.values()];
}

function padApertures(pads: readonly GerberPad[]): readonly string[] {
  return padGroups(pads).flatMap((group, i) => [
    `%TA.AperFunction,${group[0]!.apertureFunction}*%`,
    defineAperture(FIRST_PAD_APERTURE + i, group[0]!.diameterNm),
  ]);
}

function padFlashes(pads: readonly GerberPad[]): readonly string[] {
  return padGroups(pads).flatMap((group, i) => [
    `D${FIRST_PAD_APERTURE + i}*`,
    ...group.map(({ centre }) => `${coordinates(centre)}D03*`),
  ]);
}

function imageLines(image: GerberImage): readonly string[] {
  switch (image.kind) {
    case 'regions':
      // Regions need no aperture, but readers take a file without any for the withdrawn RS-274D.
      return [defineAperture(10, PROFILE_PEN_NM), ...regionLines(image.shape)];
    case 'strokes':
      return strokeLines(image.strokes);
    case 'outline':
      return [defineAperture(10, PROFILE_PEN_NM), 'D10*', ...contourLines(image.contour)];
  }
}

/** Dark outer contours with clear ones for their holes (4.10.4.6). A clear contour erases what was drawn before it, so
 *  an island within a hole has to follow the hole: the larger region first, for a region encloses only smaller ones. */
function regionLines(shape: Shape): readonly string[] {
  const largestFirst = [...shape].sort((a, b) => Math.abs(contourAreaNm2(b.outer)) - Math.abs(contourAreaNm2(a.outer)));
  const lines: string[] = [];
  let dark = true;
  const fill = (contour: Contour, wantsDark: boolean): void => {
    if (dark !== wantsDark) lines.push(wantsDark ? '%LPD*%' : '%LPC*%');
    dark = wantsDark;
    lines.push('G36*', ...contourLines(contour), 'G37*');
  };
  for (const region of largestFirst) {
    fill(region.outer, true);
    for (const hole of region.holes) fill(hole, false);
  }
  if (!dark) lines.push('%LPD*%');
  return lines;
}

/** Move, then one draw an edge, back to G01 at the end. Edges without length are left out: they say nothing, and are
 *  forbidden in contours (4.10.3). */
function contourLines(contour: Contour): readonly string[] {
  requireSimpleCorners(contour);
  const lines = [`${coordinates(contour.start)}D02*`];
  let from = contour.start;
  let mode = 'G01*';
  for (const edge of contour.edges) {
    if (edge.kind === 'line' && samePoint(from, edge.to)) continue;
    const wanted = edge.kind === 'line' ? 'G01*' : edge.clockwise ? 'G02*' : 'G03*';
    if (wanted !== mode) lines.push(wanted);
    mode = wanted;
    lines.push(`${coordinates(edge.to)}${centreOffset(from, edge)}D01*`);
    from = edge.to;
  }
  invariant(samePoint(from, contour.start), 'a contour ends where it starts');
  if (mode !== 'G01*') lines.push('G01*');
  return lines;
}

/** 4.10.3: at no point of a contour may more than two segments end. */
function requireSimpleCorners(contour: Contour): void {
  const seen = new Set<string>();
  let from = contour.start;
  for (const { kind, to } of contour.edges) {
    if (kind === 'line' && samePoint(from, to)) continue;
    const key = coordinates(to);
    invariant(!seen.has(key), `a contour touches itself at ${key}`);
    seen.add(key);
    from = to;
  }
}

function strokeLines(strokes: readonly Stroke[]): readonly string[] {
  const widths = [...new Set(strokes.map((stroke) => stroke.widthNm))].sort((a, b) => a - b);
  if (widths.length === 0) return [defineAperture(10, PROFILE_PEN_NM)];
  const lines = widths.map((widthNm, index) => defineAperture(10 + index, widthNm));
  widths.forEach((widthNm, index) => {
    lines.push(`D${10 + index}*`);
    for (const stroke of strokes.filter((candidate) => candidate.widthNm === widthNm)) {
      const [first, ...rest] = stroke.points;
      if (first === undefined) continue;
      lines.push(`${coordinates(first)}D02*`);
      // A single point is a dot: a draw without length, which a round pen may make outside regions (4.8).
      for (const point of rest.length === 0 ? [first] : rest) lines.push(`${coordinates(point)}D01*`);
    }
  });
  return lines;
}

function defineAperture(code: number, diameterNm: number): string {
  return `%ADD${code}C,${(diameterNm / 1e6).toFixed(6)}*%`;
}

function coordinates(point: PointNm): string {
  return `X${whole(point.xNm)}Y${whole(point.yNm)}`;
}

function centreOffset(from: PointNm, edge: Edge): string {
  if (edge.kind === 'line') return '';
  return `I${whole(edge.centre.xNm - from.xNm)}J${whole(edge.centre.yNm - from.yNm)}`;
}

/** 4.2.2: at most four digits before the six decimals. */
function whole(valueNm: number): number {
  invariant(Number.isInteger(valueNm) && Math.abs(valueNm) < 1e10, `${valueNm} is no coordinate of format 4.6`);
  return valueNm;
}

function samePoint(a: PointNm, b: PointNm): boolean {
  return a.xNm === b.xNm && a.yNm === b.yNm;
}
