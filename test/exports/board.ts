// Boards built by hand for the exporters' tests; every number is invented, and none comes from the engine's own sizing.

import { createHash } from 'node:crypto';
import type { Artwork, Dimension } from '../../geometry/artwork/artwork.ts';
import type { Brief } from '../../geometry/brief/brief.ts';
import type { ExportInput, Platform } from '../../geometry/exports/exporter.ts';
import type { Fabricator } from '../../geometry/fabricator/fabricator.ts';
import type { PatchDesign } from '../../geometry/patch/design.ts';
import type { RuleReport } from '../../geometry/rules/violation.ts';
import { type Contour, type Edge, type PointNm, point, type Region } from '../../geometry/shape/shape.ts';

export const platform: Platform = {
  sha256Hex: (bytes) => createHash('sha256').update(bytes).digest('hex'),
  md5Hex: (bytes) => createHash('md5').update(bytes).digest('hex'),
};

/** Everything about one board, in millimetres. */
export interface BoardSketch {
  readonly title: string;
  readonly slug: string;
  readonly board: readonly [number, number];
  readonly cornerMm: number;
  readonly patch: readonly [number, number];
  readonly frontMm: number;
  readonly insetMm: number;
  readonly gapMm: number;
  readonly lineMm: number;
  readonly resonanceHz: number;
}

/** Titles that try to be syntax: Gerber, DXF, XML, a path, and letters beyond ASCII. */
export const HOSTILE_TITLE = '*%<b>ε Антенна ../CON, %%d \\U+0041 ^J "&\u{1f4e1}';

export const soilSensor: BoardSketch = {
  title: 'Orchard soil sensor, 2.4 GHz',
  slug: 'orchard-soil-sensor-2-4-ghz',
  board: [60, 55],
  cornerMm: 2,
  patch: [36.9, 28.831],
  frontMm: 14.5,
  insetMm: 8.5,
  gapMm: 1,
  lineMm: 2.9,
  resonanceHz: 2.4418e9,
};

const mm = (value: number): number => Math.round(value * 1e6);
const at = (x: number, y: number): PointNm => point(mm(x), mm(y));

export function polygon(points: readonly PointNm[]): Contour {
  const [start, ...rest] = points;
  return { start: start!, edges: [...rest, start!].map((to): Edge => ({ kind: 'line', to })) };
}

/** A rectangle with quarter circles at its corners, counter-clockwise. */
export function rounded(x: number, y: number, width: number, length: number, radius: number): Contour {
  if (radius === 0) return polygon([at(x, y), at(x + width, y), at(x + width, y + length), at(x, y + length)]);
  const [r, t] = [x + width, y + length];
  const arc = (toX: number, toY: number, centreX: number, centreY: number): Edge => ({
    kind: 'arc',
    to: at(toX, toY),
    centre: at(centreX, centreY),
    clockwise: false,
  });
  return {
    start: at(x + radius, y),
    edges: [
      { kind: 'line', to: at(r - radius, y) },
      arc(r, y + radius, r - radius, y + radius),
      { kind: 'line', to: at(r, t - radius) },
      arc(r - radius, t, r - radius, t - radius),
      { kind: 'line', to: at(x + radius, t) },
      arc(x, t - radius, x + radius, t - radius),
      { kind: 'line', to: at(x, y + radius) },
      arc(x + radius, y, x + radius, y + radius),
    ],
  };
}

/** A full circle in one arc. */
export function circle(x: number, y: number, radius: number, clockwise: boolean): Contour {
  return { start: at(x + radius, y), edges: [{ kind: 'arc', to: at(x + radius, y), centre: at(x, y), clockwise }] };
}

export function artworkOf(sketch: BoardSketch): Artwork {
  const [boardW, boardL] = sketch.board;
  const [patchW, patchL] = sketch.patch;
  const { frontMm: front, insetMm, gapMm, lineMm } = sketch;
  const middle = boardW / 2;
  const [left, right, back] = [middle - patchW / 2, middle + patchW / 2, front + patchL];
  const [lineL, lineR] = [middle - lineMm / 2, middle + lineMm / 2];
  const notch = front + insetMm;
  const copper = polygon([
    at(lineL, 0),
    at(lineR, 0),
    at(lineR, notch),
    at(lineR + gapMm, notch),
    at(lineR + gapMm, front),
    at(right, front),
    at(right, back),
    at(left, back),
    at(left, front),
    at(lineL - gapMm, front),
    at(lineL - gapMm, notch),
    at(lineL, notch),
  ]);
  const mask = polygon([
    at(lineL - 0.2, 0),
    at(lineR + 0.2, 0),
    at(lineR + 0.2, front - 0.2),
    at(right + 0.2, front - 0.2),
    at(right + 0.2, back + 0.2),
    at(left - 0.2, back + 0.2),
    at(left - 0.2, front - 0.2),
    at(lineL - 0.2, front - 0.2),
  ]);
  const size = (
    name: string,
    label: string,
    axis: 'x' | 'y',
    from: PointNm,
    to: PointNm,
    critical: boolean,
  ): Dimension => ({
    name,
    label,
    axis,
    from,
    to,
    critical,
    valueNm: Math.abs(axis === 'x' ? to.xNm - from.xNm : to.yNm - from.yNm),
  });
  return {
    kind: 'artwork',
    title: sketch.title,
    slug: sketch.slug,
    buildId: 'EW0123456789',
    board: {
      outline: rounded(0, 0, boardW, boardL, sketch.cornerMm),
      widthNm: mm(boardW),
      lengthNm: mm(boardL),
    },
    copperTop: [{ outer: copper, holes: [] }],
    copperBottom: [{ outer: rounded(0.3, 0.3, boardW - 0.6, boardL - 0.6, sketch.cornerMm), holes: [] }],
    maskTop: [{ outer: mask, holes: [] }],
    maskBottom: [{ outer: rounded(0, 0, boardW, boardL, sketch.cornerMm), holes: [] }],
    hasSolderMask: true,
    legendTop: [
      { points: [at(2, 2), at(2, 3), at(2.6, 3)], widthNm: 150_000 },
      { points: [at(2, 2.5), at(2.4, 2.5)], widthNm: 150_000 },
    ],
    holes: [],
    pads: [],
    remarks: [],
    launches: [{ name: 'J1', from: at(lineL, 0), to: at(lineR, 0) }],
    dimensions: [
      size('width', 'patch width W', 'x', at(left, back), at(right, back), true),
      size('length', 'patch length L', 'y', at(left, front), at(left, back), true),
      size('insetDepth', 'inset depth', 'y', at(lineR + gapMm, front), at(lineR + gapMm, notch), true),
      size('notchGap', 'notch gap', 'x', at(lineR, front), at(lineR + gapMm, front), true),
      size('lineWidth', 'line width', 'x', at(lineL, 0), at(lineR, 0), true),
      size('lineLength', 'line length', 'y', at(right, 0), at(right, front), false),
      size('boardWidth', 'board width', 'x', at(0, boardL), at(boardW, boardL), false),
      size('boardLength', 'board length', 'y', at(boardW, 0), at(boardW, boardL), false),
    ],
  };
}

/** A ground with a window, and in the window an island that has a hole of its own: polarity in four depths. The regions
 *  stand in the wrong order by intent. */
export const islands: readonly Region[] = [
  { outer: circle(20, 20, 3, false), holes: [circle(20, 20, 1, true)] },
  {
    outer: rounded(1, 1, 48, 38, 3),
    holes: [polygon([at(10, 10), at(10, 30), at(30, 30), at(30, 10)])],
  },
];

export const fabricator: Fabricator = {
  name: 'test-shop',
  copperRows: [{ baseM: 35e-6, traceM: 0.2e-3, spaceM: 0.2e-3, ringM: 0.2e-3 }],
  edgeToleranceM: 20e-6,
  etchCompensation: 'fabricator',
  copperToEdgeM: 0.25e-3,
  boardMaxWidthM: 0.4,
  boardMaxLengthM: 0.3,
  outlineToleranceM: 0.2e-3,
  registrationM: 0.1e-3,
  minimumInnerRadiusM: 0.5e-3,
  mask: { expansionM: 0.075e-3, webM: 0.1e-3 },
  legend: { lineM: 0.15e-3, heightM: 1e-3 },
  plated: { minimumHoleM: 0.25e-3, largestHoleM: 6.3e-3, aspectRatio: 8 },
  minimumUnplatedHoleM: 0.35e-3,
  unplatedHoleToCopperM: 0.25e-3,
  unplatedRingM: 0.3e-3,
  holeToleranceM: 0.075e-3,
  drillStepM: 50e-6,
  finishes: ['lead-free solder', 'immersion silver', 'nickel and gold'],
};

function briefOf(sketch: BoardSketch): Brief {
  return {
    kind: 'brief',
    title: sketch.title,
    band: { lowHz: sketch.resonanceHz * 0.983, highHz: sketch.resonanceHz * 1.017 },
    match: { returnLossDb: 10, referenceOhm: 50 },
    polarization: 'linear',
    laminate: {
      name: 'glass-epoxy, 1.6 mm',
      permittivity: 4.3,
      permittivityTolerance: 0.2,
      lossTangent: 0.018,
      thicknessM: 1.53e-3,
      thicknessToleranceM: 0.13e-3,
      copperThicknessM: 35e-6,
      copperBaseM: 18e-6,
      conductivitySPerM: 5.8e7,
      roughnessM: 1.8e-6,
    },
    radiator: { family: 'rectangular', pinned: {} },
    feed: { kind: 'inset', pinned: {} },
    board: { marginM: 'auto', cornerRadiusM: sketch.cornerMm / 1000 },
    fabricator,
    defaults: [],
  };
}

function designOf(sketch: BoardSketch): PatchDesign {
  const f = sketch.resonanceHz;
  return {
    kind: 'patch-design',
    radiator: { family: 'rectangular', lengthM: sketch.patch[1] / 1000, widthM: sketch.patch[0] / 1000 },
    feed: {
      kind: 'inset',
      lineWidthM: sketch.lineMm / 1000,
      lineWidthInNotchM: sketch.lineMm / 1000,
      insetDepthM: sketch.insetMm / 1000,
      notchGapM: sketch.gapMm / 1000,
      lineLengthM: sketch.frontMm / 1000,
    },
    board: { widthM: sketch.board[0] / 1000, lengthM: sketch.board[1] / 1000, cornerRadiusM: sketch.cornerMm / 1000 },
    prediction: {
      method: 'closed-form',
      resonanceHz: f,
      resonanceKind: 'loadedPole',
      resonanceLowHz: 0.976 * f,
      resonanceHighHz: 1.024 * f,
      contributions: [
        { cause: 'permittivity', halfWidthHz: 0.022 * f },
        { cause: 'method', halfWidthHz: 0.01 * f },
      ],
      bareResonanceHz: 1.004 * f,
      bandwidthHz: 0.026 * f,
      bandwidthVswr: 2,
      bandwidthCriticalHz: 0.025 * f,
      edgeResistanceOhm: 130.4,
      inputResistanceOhm: 49.2,
      returnLossAtCentreDb: 24.1,
      returnLossWorstInBandDb: 7.2,
      qualityTotal: 28,
      qualityRadiation: 74,
      qualityDielectric: 55,
      qualityConductor: 310,
      qualitySurfaceWave: 800,
      qualityLoaded: 14,
      radiationEfficiency: 0.38,
      directivityDbi: 6.1,
      gainDbi: 1.9,
      gainRealizedDbi: 1.8,
    },
    requirement: [
      { name: 'return loss over the band', wanted: '10 dB', predicted: '7.2 dB', holds: false },
      { name: 'polarisation', wanted: 'linear', predicted: 'linear', holds: true },
    ],
    notices: [{ code: 'ground.small', message: 'The ground ends 11.5 mm past the patch, which moves the resonance.' }],
  };
}

const report: RuleReport = {
  kind: 'rule-report',
  fabricator: 'test-shop',
  rules: [
    {
      rule: 'width',
      layer: 'copper-top',
      limitNm: 200_000,
      smallestNm: 2_900_000,
      from: null,
      to: null,
      marginNm: 2_700_000,
      holds: true,
    },
    {
      rule: 'gap',
      layer: 'copper-top',
      limitNm: 200_000,
      smallestNm: 1_000_000,
      from: null,
      to: null,
      marginNm: 800_000,
      holds: true,
    },
  ],
  violations: [],
  remarks: ['Copper reaches the edge of the board at J1 by intent; the rule for copper near the edge does not apply.'],
};

export function inputOf(sketch: BoardSketch, artwork: Artwork = artworkOf(sketch)): ExportInput {
  return { brief: briefOf(sketch), design: designOf(sketch), artwork, report, platform, version: '0.1.0' };
}
