// Reads a finished package back and holds it against the artwork, before anybody else does.

import type { Artwork } from '../../artwork/artwork.ts';
import type { Contour, Shape } from '../../shape/shape.ts';
import type { NamedFile, Platform } from '../exporter.ts';
import { cornersDrawn, cornersRead, DEVIATION_NM, sameContour, unmatched } from './contours.ts';
import { readDrill } from './drill-reader.ts';
import { type ReadEntity, readDxf } from './dxf-reader.ts';
import { type ReadGerber, type ReadObject, readGerber } from './gerber-reader.ts';

/** Every disagreement between a package and its artwork, as sentences; empty for a sound package.
 *  Compares each Gerber contour, stroke, pad and outline, each drilled hole, each DXF contour (all to 1 µm), the layer
 *  that each file says it is, one build in all files, and size and hash of every file in the manifest. */
export function readBack(
  files: readonly NamedFile[],
  artwork: Artwork,
  platform: Pick<Platform, 'sha256Hex'>,
): readonly string[] {
  const faults: string[] = [];
  const text = (name: string): string | null => {
    const file = files.find((candidate) => candidate.name === name);
    if (file === undefined) faults.push(`${name} is missing`);
    return file === undefined ? null : new TextDecoder().decode(file.bytes);
  };
  for (const { suffix, fileFunction, compare } of GERBER_LAYERS) {
    const name = `${artwork.slug}-${suffix}.gbr`;
    const content = text(name);
    if (content === null) continue;
    const read = readGerber(content);
    const say = (what: string): void => {
      faults.push(`${name}: ${what}`);
    };
    for (const fault of read.faults) say(fault);
    if (read.attributes.get('FileFunction') !== fileFunction) say(`it does not say that it is ${fileFunction}`);
    if (!(read.attributes.get('ProjectId') ?? '').endsWith(`,${artwork.buildId}`)) say('it is of another build');
    compare(read, artwork, say);
  }
  faults.push(...drillFaults(files, artwork));
  const dxf = text(`${artwork.slug}-board.dxf`);
  if (dxf !== null) faults.push(...dxfFaults(dxf, artwork).map((fault) => `${artwork.slug}-board.dxf: ${fault}`));
  const manifest = text('manifest.json');
  if (manifest !== null) faults.push(...manifestFaults(manifest, files, platform));
  return faults;
}

interface LayerCheck {
  readonly suffix: string;
  readonly fileFunction: string;
  readonly compare: (read: ReadGerber, artwork: Artwork, say: (what: string) => void) => void;
}

const GERBER_LAYERS: readonly LayerCheck[] = [
  {
    suffix: 'copper-top',
    fileFunction: 'Copper,L1,Top',
    compare: (read, artwork, say) => {
      compareRegions(read.objects, artwork.copperTop, say);
      comparePads(read.objects, artwork, 'copper-top', say);
    },
  },
  {
    suffix: 'copper-bottom',
    fileFunction: 'Copper,L2,Bot',
    compare: (read, artwork, say) => {
      compareRegions(read.objects, artwork.copperBottom, say);
      comparePads(read.objects, artwork, 'copper-bottom', say);
    },
  },
  {
    suffix: 'mask-top',
    fileFunction: 'Soldermask,Top',
    compare: (read, artwork, say) => compareRegions(read.objects, artwork.maskTop, say),
  },
  {
    suffix: 'mask-bottom',
    fileFunction: 'Soldermask,Bot',
    compare: (read, artwork, say) => compareRegions(read.objects, artwork.maskBottom, say),
  },
  { suffix: 'legend-top', fileFunction: 'Legend,Top', compare: compareLegend },
  { suffix: 'profile', fileFunction: 'Profile,NP', compare: compareProfile },
];

function countFaults(
  what: string,
  { missing, extra }: { missing: number; extra: number },
  say: (what: string) => void,
): void {
  if (missing > 0) say(`${missing} ${what} of the artwork are not in it`);
  if (extra > 0) say(`${extra} ${what} in it are not of the artwork`);
}

function compareRegions(objects: readonly ReadObject[], shape: Shape, say: (what: string) => void): void {
  const wanted = shape.flatMap((region) => [
    { dark: true, contour: region.outer },
    ...region.holes.map((contour) => ({ dark: false, contour })),
  ]);
  const regions = objects.filter((object) => object.kind === 'region');
  countFaults(
    'contours',
    unmatched(
      wanted,
      regions,
      (a, b) => a.dark === b.dark && sameContour(cornersDrawn(a.contour), cornersRead(b.path)),
    ),
    say,
  );
  if (objects.some((object) => object.kind === 'draw')) say('it draws copper or openings with a pen');
}

function comparePads(
  objects: readonly ReadObject[],
  artwork: Artwork,
  layer: 'copper-top' | 'copper-bottom',
  say: (what: string) => void,
): void {
  const flashes = objects.filter((object) => object.kind === 'flash');
  const pads = artwork.pads.filter((pad) => pad.layer === layer);
  countFaults(
    'pads',
    unmatched(
      pads,
      flashes,
      (pad, flash) =>
        Math.hypot(pad.centre.xNm - flash.at.xNm, pad.centre.yNm - flash.at.yNm) <= DEVIATION_NM &&
        Math.abs(pad.diameterNm - flash.diameterNm) <= DEVIATION_NM,
    ),
    say,
  );
}

function compareLegend(read: ReadGerber, artwork: Artwork, say: (what: string) => void): void {
  const draws = read.objects.filter((object) => object.kind === 'draw');
  countFaults(
    'strokes',
    unmatched(artwork.legendTop, draws, (stroke, draw) => {
      const points = [draw.path.start, ...draw.path.edges.map(({ to }) => to)];
      // A dot is written as a draw without length.
      const wanted = stroke.points.length === 1 ? [stroke.points[0]!, stroke.points[0]!] : stroke.points;
      return (
        Math.abs(stroke.widthNm - draw.diameterNm) <= DEVIATION_NM &&
        points.length === wanted.length &&
        points.every((p, i) => Math.hypot(p.xNm - wanted[i]!.xNm, p.yNm - wanted[i]!.yNm) <= DEVIATION_NM)
      );
    }),
    say,
  );
  if (draws.length !== read.objects.length) say('it holds more than strokes');
}

function compareProfile(read: ReadGerber, artwork: Artwork, say: (what: string) => void): void {
  const draws = read.objects.filter((object) => object.kind === 'draw');
  countFaults(
    'outlines',
    unmatched([artwork.board.outline], draws, (outline, draw) =>
      sameContour(cornersDrawn(outline), cornersRead(draw.path)),
    ),
    say,
  );
  for (const { path } of draws) {
    const end = path.edges[path.edges.length - 1]?.to ?? path.start;
    if (end.xNm !== path.start.xNm || end.yNm !== path.start.yNm) say('its outline is not closed');
  }
  if (draws.length !== read.objects.length) say('it holds more than an outline');
}

function drillFaults(files: readonly NamedFile[], artwork: Artwork): readonly string[] {
  const faults: string[] = [];
  for (const plated of [true, false]) {
    const name = `${artwork.slug}-${plated ? 'plated' : 'unplated'}.drl`;
    const file = files.find((candidate) => candidate.name === name);
    const wanted = artwork.holes.filter((hole) => hole.plated === plated);
    if (file === undefined) {
      if (wanted.length > 0) faults.push(`${name} is missing`);
      continue;
    }
    const read = readDrill(new TextDecoder().decode(file.bytes));
    for (const fault of read.faults) faults.push(`${name}: ${fault}`);
    if (read.plated !== plated) faults.push(`${name}: it says the wrong kind of hole`);
    const left = unmatched(
      wanted,
      read.holes,
      (hole, found) =>
        Math.hypot(hole.centre.xNm - found.centre.xNm, hole.centre.yNm - found.centre.yNm) <= DEVIATION_NM &&
        Math.abs(hole.finishedDiameterNm - found.diameterNm) <= DEVIATION_NM,
    );
    countFaults('holes', left, (what) => {
      faults.push(`${name}: ${what}`);
    });
  }
  return faults;
}

const MM = 1e6;

/** A contour of the artwork against an entity: corners and bulges, or a circle. */
function sameEntity(contour: Contour, entity: ReadEntity): boolean {
  const corners = cornersDrawn(contour);
  if (entity.kind === 'circle') {
    const centre = corners[0]?.centre ?? null;
    const [at] = entity.vertices;
    if (centre === null || at === undefined || corners.some((corner) => corner.centre === null)) return false;
    const radius = Math.hypot(corners[0]!.at.xNm - centre.xNm, corners[0]!.at.yNm - centre.yNm);
    const away = Math.hypot(at.xMm * MM - centre.xNm, at.yMm * MM - centre.yNm);
    return away <= DEVIATION_NM && Math.abs(radius - entity.radiusMm * MM) <= DEVIATION_NM;
  }
  const { vertices } = entity;
  if (!entity.closed || vertices.length !== corners.length) return false;
  return corners.some((_, shift) =>
    corners.every((corner, i) => {
      const vertex = vertices[(i + shift) % vertices.length]!;
      const next = corners[(i + 1) % corners.length]!;
      const chord = Math.hypot(next.at.xNm - corner.at.xNm, next.at.yNm - corner.at.yNm);
      const away = Math.hypot(vertex.xMm * MM - corner.at.xNm, vertex.yMm * MM - corner.at.yNm);
      // Half the chord times the bulge is the arc's height over its chord.
      return away <= DEVIATION_NM && (Math.abs(vertex.bulge - bulgeOf(corner, next.at)) * chord) / 2 <= DEVIATION_NM;
    }),
  );
}

/** Tangent of a quarter of the arc that leaves a corner, positive counter-clockwise. */
function bulgeOf(
  { at, centre, clockwise }: ReturnType<typeof cornersDrawn>[number],
  to: { readonly xNm: number; readonly yNm: number },
): number {
  if (centre === null) return 0;
  const from = Math.atan2(at.yNm - centre.yNm, at.xNm - centre.xNm);
  const end = Math.atan2(to.yNm - centre.yNm, to.xNm - centre.xNm);
  const turn = (((clockwise ? from - end : end - from) % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
  return (clockwise ? -1 : 1) * Math.tan(turn / 4);
}

function dxfFaults(content: string, artwork: Artwork): readonly string[] {
  const faults: string[] = [];
  const { units, entities } = readDxf(content);
  // Code 4 of $INSUNITS is millimetres.
  if (units !== '4') faults.push('its unit is not the millimetre');
  const shapes: readonly (readonly [layer: string, contours: readonly Contour[]])[] = [
    ['OUTLINE', [artwork.board.outline]],
    ['COPPER_TOP', artwork.copperTop.flatMap(({ outer, holes }) => [outer, ...holes])],
    ['COPPER_BOT', artwork.copperBottom.flatMap(({ outer, holes }) => [outer, ...holes])],
    ['MASK_TOP', artwork.maskTop.flatMap(({ outer, holes }) => [outer, ...holes])],
    ['MASK_BOT', artwork.maskBottom.flatMap(({ outer, holes }) => [outer, ...holes])],
  ];
  for (const [layer, contours] of shapes) {
    const found = entities.filter((entity) => entity.layer === layer);
    countFaults(`contours on ${layer}`, unmatched(contours, found, sameEntity), (what) => faults.push(what));
  }
  for (const [layer, plated] of [
    ['HOLES_PTH', true],
    ['HOLES_NPTH', false],
  ] as const) {
    const holes = artwork.holes.filter((hole) => hole.plated === plated);
    const found = entities.filter((entity) => entity.layer === layer);
    const left = unmatched(holes, found, (hole, { kind, vertices, radiusMm }) => {
      const [at] = vertices;
      if (kind !== 'circle' || at === undefined) return false;
      const away = Math.hypot(at.xMm * MM - hole.centre.xNm, at.yMm * MM - hole.centre.yNm);
      return away <= DEVIATION_NM && Math.abs(2 * radiusMm * MM - hole.finishedDiameterNm) <= DEVIATION_NM;
    });
    countFaults(`holes on ${layer}`, left, (what) => faults.push(what));
  }
  return faults;
}

interface ManifestFile {
  readonly name?: unknown;
  readonly sha256?: unknown;
}

function manifestFaults(
  content: string,
  files: readonly NamedFile[],
  platform: Pick<Platform, 'sha256Hex'>,
): readonly string[] {
  const listed = (JSON.parse(content) as { files?: readonly ManifestFile[] }).files ?? [];
  const others = files.filter(({ name }) => name !== 'manifest.json');
  const faults = others.flatMap(({ name, bytes }) => {
    const entry = listed.find((candidate) => candidate.name === name);
    if (entry === undefined) return [`manifest.json: ${name} is not in it`];
    return entry.sha256 === platform.sha256Hex(bytes)
      ? []
      : [`manifest.json: ${name} is another file than the one listed`];
  });
  return listed.length === others.length ? faults : [...faults, 'manifest.json: it lists files that are not there'];
}
