// Reads the Gerber files of a package back. It shares no code with the writer, knows only the dialect that is written
// here, and takes anything else for a fault.

import type { PointNm } from '../../shape/shape.ts';

/** An edge as read: where it ends, and round which point if it is an arc. */
export interface ReadEdge {
  readonly to: PointNm;
  readonly centre: PointNm | null;
  readonly clockwise: boolean;
}

export interface ReadPath {
  readonly start: PointNm;
  readonly edges: readonly ReadEdge[];
}

export type ReadObject =
  | { readonly kind: 'region'; readonly dark: boolean; readonly path: ReadPath }
  | { readonly kind: 'draw'; readonly diameterNm: number; readonly path: ReadPath }
  | { readonly kind: 'flash'; readonly diameterNm: number; readonly at: PointNm };

export interface ReadGerber {
  readonly attributes: ReadonlyMap<string, string>;
  readonly objects: readonly ReadObject[];
  /** What is not of the dialect, with its line. */
  readonly faults: readonly string[];
}

const OPERATION = /^X(-?\d{1,10})Y(-?\d{1,10})(?:I(-?\d{1,10})J(-?\d{1,10}))?D0([123])$/;

interface Pen {
  at: PointNm | null;
  path: { start: PointNm; edges: ReadEdge[] } | null;
}

/** The objects that a file draws, in order; coordinates are its own digits, which are nanometres. */
export function readGerber(text: string): ReadGerber {
  const attributes = new Map<string, string>();
  const apertures = new Map<string, number>();
  const objects: ReadObject[] = [];
  const faults: string[] = [];
  const seen = new Set<string>();
  const pen: Pen = { at: null, path: null };
  let dark = true;
  let inRegion = false;
  let mode = 'G01';
  let aperture: number | null = null;
  let ended = false;

  const close = (): void => {
    const { path } = pen;
    pen.path = null;
    if (path === null || path.edges.length === 0) return;
    if (inRegion) {
      const last = path.edges[path.edges.length - 1]!.to;
      if (last.xNm !== path.start.xNm || last.yNm !== path.start.yNm) faults.push('a region is not closed');
      objects.push({ kind: 'region', dark, path });
    } else objects.push({ kind: 'draw', diameterNm: aperture ?? 0, path });
  };

  const operate = (command: string, number: number): void => {
    const match = OPERATION.exec(command);
    if (match === null) {
      faults.push(`line ${number} is not understood`);
      return;
    }
    const to: PointNm = { xNm: Number(match[1]), yNm: Number(match[2]) };
    const from = pen.at;
    pen.at = to;
    if (match[5] === '3') {
      close();
      if (aperture === null || inRegion) faults.push(`line ${number} flashes nothing`);
      else objects.push({ kind: 'flash', diameterNm: aperture, at: to });
    } else if (match[5] === '2') {
      close();
      pen.path = { start: to, edges: [] };
    } else {
      if (from === null || pen.path === null) faults.push(`line ${number} draws from nowhere`);
      if (!inRegion && aperture === null) faults.push(`line ${number} draws without an aperture`);
      const isArc = mode !== 'G01';
      if (isArc !== (match[3] !== undefined)) faults.push(`line ${number} mixes arcs and lines`);
      const centre =
        isArc && from !== null && match[3] !== undefined
          ? { xNm: from.xNm + Number(match[3]), yNm: from.yNm + Number(match[4]) }
          : null;
      pen.path?.edges.push({ to, centre, clockwise: mode === 'G02' });
    }
  };

  const extended = (command: string, number: number): void => {
    const definition = /^ADD(\d+)C,(\d+\.\d{6})$/.exec(command);
    const attribute = /^TF\.([A-Za-z0-9]+),(.*)$/.exec(command);
    if (definition !== null) apertures.set(definition[1]!, Math.round(Number(definition[2]) * 1e6));
    else if (attribute !== null) attributes.set(attribute[1]!, attribute[2]!);
    else if (command === 'LPD' || command === 'LPC') {
      close();
      dark = command === 'LPD';
    } else if (command === 'FSLAX46Y46' || command === 'MOMM') seen.add(command);
    else if (!/^T[AD]/.test(command)) faults.push(`line ${number} is not of the dialect`);
  };

  text.split('\n').forEach((line, index) => {
    const number = index + 1;
    if (line === '') return;
    if (ended) faults.push(`line ${number} stands after the end`);
    const block = /^%(.*)\*%$/.exec(line);
    if (block !== null) {
      extended(block[1]!, number);
      return;
    }
    if (!line.endsWith('*')) {
      faults.push(`line ${number} is not ended`);
      return;
    }
    const command = line.slice(0, -1);
    const select = /^D(\d{2,})$/.exec(command);
    if (select !== null) {
      close();
      aperture = apertures.get(select[1]!) ?? null;
      if (aperture === null) faults.push(`line ${number} selects an aperture that is not defined`);
    } else if (command === 'G36') {
      close();
      inRegion = true;
    } else if (command === 'G37') {
      close();
      inRegion = false;
    } else if (command === 'G01' || command === 'G02' || command === 'G03') mode = command;
    else if (command === 'G75') seen.add(command);
    else if (command === 'M02') {
      close();
      ended = true;
    } else if (!command.startsWith('G04 ')) operate(command, number);
  });
  for (const needed of ['FSLAX46Y46', 'MOMM', 'G75']) if (!seen.has(needed)) faults.push(`${needed} is missing`);
  if (!ended) faults.push('the end is missing');
  return { attributes, objects, faults };
}
