// The published rows as records, and what the engine makes of them: shared by the tests and by `npm run report`.

import { readFileSync } from 'node:fs';
import { bareResonance, textbookResonanceHz } from '../../geometry/patch/bare-resonance.ts';
import type { InsetFeed } from '../../geometry/patch/design.ts';
import {
  crossSectionOf,
  type FedPatch,
  feedLine,
  impedanceAtFrontEdge,
  impedanceAtInsetEnd,
} from '../../geometry/patch/inset-feed.ts';
import { insetCrossSection } from '../../geometry/patch/inset-network.ts';
import { feedRange } from '../../geometry/patch/inset-range.ts';
import { bestMatch, loadedPole, peakResistance, returnLossDb } from '../../geometry/patch/match.ts';
import { effectiveSize, qualitySplit } from '../../geometry/patch/quality.ts';
import { pinResistanceOhm } from '../../geometry/patch/size-probe.ts';

function fixture(name: string): string {
  // Tests and the built report both run from the repository's root.
  return readFileSync(`${process.cwd()}/fixtures/published/${name}`, 'utf8');
}

/** Rows of a CSV file as records of text; quoted fields may hold commas. */
export function readCsv(name: string): readonly Record<string, string>[] {
  const lines = fixture(name).trim().split(/\r?\n/).map(splitCsvLine);
  const head = lines[0]!;
  return lines.slice(1).map((cells) => Object.fromEntries(head.map((key, i) => [key, cells[i] ?? ''])));
}

function splitCsvLine(line: string): string[] {
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  for (const c of line) {
    if (c === '"') quoted = !quoted;
    else if (c === ',' && !quoted) {
      cells.push(cell);
      cell = '';
    } else cell += c;
  }
  cells.push(cell);
  return cells;
}

export function readJson<T>(name: string): T {
  return JSON.parse(fixture(name)) as T;
}

export interface WorkedExample {
  readonly id: string;
  readonly inputs: Record<string, never>;
  readonly outputs: Record<string, never>;
  readonly source: string;
}

/** The inputs and outputs of one worked example, as numbers or lists of numbers. */
export function workedExample(id: string): {
  readonly inputs: Record<string, number>;
  readonly outputs: Record<string, number>;
} {
  const row = readJson<readonly WorkedExample[]>('worked_examples.json').find((example) => example.id === id);
  if (row === undefined) throw new Error(`no worked example ${id}`);
  return row;
}

export interface Comparison {
  readonly name: string;
  readonly reference: number;
  readonly ours: number;
  /** ours/reference − 1. */
  readonly error: number;
}

export function compare(name: string, ours: number, reference: number): Comparison {
  return { name, ours, reference, error: ours / reference - 1 };
}

export interface Summary {
  readonly mean: number;
  readonly worst: number;
}

export function summarise(rows: readonly { readonly error: number }[]): Summary {
  const sizes = rows.map(({ error }) => Math.abs(error));
  return { mean: sizes.reduce((a, b) => a + b, 0) / sizes.length, worst: Math.max(...sizes) };
}

/** resonance_reference.csv: natural resonance [GHz]. */
export function resonanceRows(): readonly Comparison[] {
  return readCsv('resonance_reference.csv').map((row) => {
    const patch = {
      permittivity: Number(row.eps_r),
      widthM: Number(row.W_mm) / 1e3,
      lengthM: Number(row.L_mm) / 1e3,
      heightM: Number(row.h_mm) / 1e3,
    };
    const name = `er ${row.eps_r} W/L ${row.W_over_L_nominal} h/λd ${row.h_over_lambda_d_nominal}`;
    return compare(name, bareResonance(patch).resonanceHz / 1e9, Number(row.f_pole_GHz));
  });
}

/** resonance_reference.csv: lossless Q. */
export function qualityRows(): readonly Comparison[] {
  return readCsv('resonance_reference.csv').map((row) => {
    const patch = {
      permittivity: Number(row.eps_r),
      widthM: Number(row.W_mm) / 1e3,
      lengthM: Number(row.L_mm) / 1e3,
      heightM: Number(row.h_mm) / 1e3,
    };
    const split = qualitySplit(patch, 0, { conductivitySPerM: null, roughnessM: 0 }, bareResonance(patch).resonanceHz);
    const name = `er ${row.eps_r} W/L ${row.W_over_L_nominal} h/λd ${row.h_over_lambda_d_nominal}`;
    return compare(name, split.total, Number(row.Q_total_lossless));
  });
}

/** patches_measured.csv: the rows that count as checks of the natural resonance [GHz]. */
export function measuredRows(): readonly Comparison[] {
  return readCsv('patches_measured.csv')
    .filter((row) => row.use === 'natural-resonance check')
    .map((row) => {
      const patch = {
        widthM: Number(row.W_mm) / 1e3,
        lengthM: Number(row.L_mm) / 1e3,
        heightM: Number(row.h_mm) / 1e3,
        permittivity: Number(row.eps_r),
      };
      return compare(`${row.id} ${row.group}`, bareResonance(patch).resonanceHz / 1e9, Number(row.f_meas_GHz));
    });
}

interface BareRow {
  readonly f: number;
  readonly Q: number;
  readonly W: number;
  readonly L: number;
  readonly h: number;
  readonly er: number;
  readonly tand: number;
}

interface FedRow {
  readonly name: string;
  readonly board: string;
  readonly insetDepth: number;
  readonly notchGap: number;
  readonly lineWidth: number;
  readonly lineWidthInNotch: number;
  readonly lineLength: number;
  readonly bestMatchHz: number;
  readonly bestMatchDb: number;
  readonly loadedPoleHz: number;
  readonly loadedQ: number;
  readonly peakResistanceAtInsetEndOhm: number;
  readonly impedanceAtInsetEndAtMatch: readonly [number, number];
}

export interface FedComparison {
  readonly name: string;
  readonly depthOverLength: number;
  /** Half width of the interval that the engine states for its own error. */
  readonly statedError: number;
  /** Whether the feed lies in the range that its law was fitted to. */
  readonly inRange: boolean;
  readonly bestMatch: Comparison;
  /** The textbook formula's error for the same row. */
  readonly textbookError: number;
  readonly pole: Comparison;
  readonly loadedQuality: Comparison;
  readonly peakResistance: Comparison;
  /** Resistance at the inset's end at the reference's own frequency of best match. */
  readonly matchResistance: Comparison;
  readonly returnLossDb: readonly [ours: number, reference: number];
}

/** A fed patch of a reference beside what a user's board of its dimensions is predicted to do: nothing of the
 *  reference's bare pole or quality is used. */
function compareFed(row: FedRow, board: BareRow): FedComparison {
  const laminate = {
    name: row.board,
    permittivity: board.er,
    permittivityTolerance: 0,
    lossTangent: board.tand,
    thicknessM: board.h,
    thicknessToleranceM: 0,
    copperThicknessM: 0,
    copperBaseM: 35e-6,
    conductivitySPerM: 5.8e7,
    roughnessM: 0,
  };
  const patch = { lengthM: board.L, widthM: board.W, heightM: board.h, permittivity: board.er };
  const bare = bareResonance(patch);
  const { resonanceHz } = bare;
  const quality = qualitySplit(patch, board.tand, laminate, resonanceHz).total;
  const feed: InsetFeed = {
    kind: 'inset',
    lineWidthM: row.lineWidth,
    lineWidthInNotchM: row.lineWidthInNotch,
    insetDepthM: row.insetDepth,
    notchGapM: row.notchGap,
    lineLengthM: row.lineLength,
  };
  const fed: FedPatch = {
    patch,
    mode: { resonanceHz, quality },
    feed,
    section: row.insetDepth > 0 ? crossSectionOf(laminate, board.W, feed) : insetCrossSection(patch, null),
    line: feedLine(laminate, row.lineWidth, row.bestMatchHz),
  };
  const front = impedanceAtFrontEdge(fed);
  const end = impedanceAtInsetEnd(fed);
  const match = bestMatch(front, 50, resonanceHz);
  const pole = loadedPole(front, 50, match.bestMatchHz, quality / 2);
  return {
    name: row.name,
    depthOverLength: row.insetDepth / board.L,
    inRange: feedRange(patch, feed, resonanceHz).notices.length === 0,
    statedError: Math.hypot(bare.modelError, feedRange(patch, feed, resonanceHz).modelError),
    bestMatch: compare('best match', match.bestMatchHz, row.bestMatchHz),
    textbookError: textbookResonanceHz(patch) / row.bestMatchHz - 1,
    pole: compare('loaded pole', pole?.frequencyHz ?? Number.NaN, row.loadedPoleHz),
    loadedQuality: compare('loaded Q', pole?.quality ?? Number.NaN, row.loadedQ),
    peakResistance: compare('R', peakResistance(end, resonanceHz).resistanceOhm, row.peakResistanceAtInsetEndOhm),
    matchResistance: compare('R', end({ re: row.bestMatchHz, im: 0 }).re, row.impedanceAtInsetEndAtMatch[0]),
    returnLossDb: [returnLossDb(match.bestReflection), -row.bestMatchDb],
  };
}

/** fed_reference.json. */
export function fedRows(): readonly FedComparison[] {
  const data = readJson<{ bare: Record<string, BareRow>; cases: readonly FedRow[] }>('fed_reference.json');
  return data.cases.map((row) => compareFed(row, data.bare[row.board]!));
}

/** fixtures/computed/fed_campaign.json: our own field solution. */
export function campaignRows(): readonly FedComparison[] {
  const rows = readJson<readonly (FedRow & BareRow)[]>('../computed/fed_campaign.json');
  return rows.map((row) => compareFed(row, row));
}

/** input_resistance.csv: resistance along the patch, by the engine's law and by the usual one [Ω]. */
export function pinRows(): readonly (Comparison & {
  readonly offsetOverLength: number;
  readonly usualError: number;
})[] {
  return readCsv('input_resistance.csv').map((row) => {
    const patch = {
      widthM: Number(row.W_mm) / 1e3,
      lengthM: Number(row.L_mm) / 1e3,
      heightM: Number(row.h_mm) / 1e3,
      permittivity: Number(row.eps_r),
    };
    const f = Number(row.f_res_GHz) * 1e9;
    const split = qualitySplit(patch, Number(row.tan_d), { conductivitySPerM: null, roughnessM: 0 }, f);
    const share = Number(row.xp_over_L_from_centre);
    const reference = Number(row.R_fullwave_ohm);
    const ours = pinResistanceOhm(split.edgeResistanceOhm, share * patch.lengthM, effectiveSize(patch, f).lengthM);
    const usual = split.edgeResistanceOhm * Math.sin(Math.PI * share) ** 2;
    return {
      ...compare(`${row.id} x/L ${share}`, ours, reference),
      offsetOverLength: share,
      usualError: usual / reference - 1,
    };
  });
}

/** Insets for which the acceptance of the feed law is stated. */
export function isInset(row: FedComparison): boolean {
  return row.depthOverLength >= 0.15 && row.depthOverLength <= 0.4001;
}
