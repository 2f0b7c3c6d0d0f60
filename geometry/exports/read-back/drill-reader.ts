// Reads the drill files of a package back: the dialect that is written here and nothing else.

import type { PointNm } from '../../shape/shape.ts';

export interface ReadHole {
  readonly centre: PointNm;
  readonly diameterNm: number;
}

export interface ReadDrill {
  readonly plated: boolean | null;
  readonly holes: readonly ReadHole[];
  readonly faults: readonly string[];
}

function nanometres(text: string): number {
  return Math.round(Number(text) * 1e6);
}

export function readDrill(text: string): ReadDrill {
  const tools = new Map<string, number>();
  const holes: ReadHole[] = [];
  const faults: string[] = [];
  let plated: boolean | null = null;
  let metric = false;
  let tool: number | null = null;
  let ended = false;
  text.split('\n').forEach((line, index) => {
    if (line === '') return;
    if (ended) faults.push(`line ${index + 1} stands after the end`);
    const definition = /^T(\d+)C(\d+\.\d+)$/.exec(line);
    const select = /^T(\d+)$/.exec(line);
    const hit = /^X(-?\d+\.\d+)Y(-?\d+\.\d+)$/.exec(line);
    if (definition !== null) tools.set(definition[1]!, nanometres(definition[2]!));
    else if (select !== null) {
      tool = tools.get(select[1]!) ?? null;
      if (tool === null) faults.push(`line ${index + 1} selects a tool that is not defined`);
    } else if (hit !== null) {
      if (tool === null || !metric) faults.push(`line ${index + 1} drills without a tool or a unit`);
      else holes.push({ centre: { xNm: nanometres(hit[1]!), yNm: nanometres(hit[2]!) }, diameterNm: tool });
    } else if (line === 'METRIC') metric = true;
    else if (line === 'M30') ended = true;
    else if (line.startsWith('; #@! TF.FileFunction,')) plated = line.includes(',Plated,');
    else if (!/^(M48|%|G05|; #@! TF\..*)$/.test(line)) faults.push(`line ${index + 1} is not of the dialect`);
  });
  if (plated === null) faults.push('the file does not say whether its holes are plated');
  if (!ended) faults.push('the end is missing');
  return { plated, holes, faults };
}
