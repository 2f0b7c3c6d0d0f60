// The DXF file against a reader that is not ours: dxf-parser 1.1.2 (MIT, npm).

import DxfParser, { type ICircleEntity, type ILwpolylineEntity, type ITextEntity } from 'dxf-parser';
import { beforeAll, describe, expect, it } from 'vitest';
import { encodeDxfText, exportDxf } from '../../geometry/exports/dxf.ts';
import type { ExportInput } from '../../geometry/exports/exporter.ts';
import { artworkOf, HOSTILE_TITLE, inputOf, islands, soilSensor } from '../exports/board.ts';

async function dxfText(input: ExportInput): Promise<string> {
  const files = await exportDxf(input);
  expect(files.map(({ name }) => name)).toEqual([`${input.artwork.slug}-board.dxf`]);
  return new TextDecoder('utf-8', { fatal: true }).decode(files[0]!.bytes);
}

async function read(input: ExportInput) {
  const drawing = new DxfParser().parseSync(await dxfText(input));
  expect(drawing).not.toBeNull();
  const { entities, header, tables } = drawing!;
  return {
    entities,
    header,
    layers: Object.keys(tables.layer.layers),
    polylines: entities.filter((entity) => entity.type === 'LWPOLYLINE') as ILwpolylineEntity[],
    circles: entities.filter((entity) => entity.type === 'CIRCLE') as ICircleEntity[],
    texts: entities.filter((entity) => entity.type === 'TEXT') as ITextEntity[],
  };
}

/** Area by Green's theorem [mm²]; a bulge b over a chord c adds the circular segment of angle 4·atan b. */
function area({ vertices }: ILwpolylineEntity): number {
  return vertices.reduce((sum, from, index) => {
    const to = vertices[(index + 1) % vertices.length]!;
    const angle = 4 * Math.atan(from.bulge ?? 0);
    const chord = Math.hypot(to.x - from.x, to.y - from.y);
    const radius = angle === 0 ? 0 : chord / (2 * Math.sin(Math.abs(angle) / 2));
    const segment = (radius ** 2 * (Math.abs(angle) - Math.sin(Math.abs(angle)))) / 2;
    return sum + (from.x * to.y - to.x * from.y) / 2 + Math.sign(angle) * segment;
  }, 0);
}

describe('a board as an independent reader sees it', () => {
  let drawing: Awaited<ReturnType<typeof read>>;
  beforeAll(async () => {
    drawing = await read(inputOf(soilSensor));
  });

  it('is in millimetres, metric, AutoCAD 2007', () => {
    expect(drawing.header.$INSUNITS).toBe(4);
    expect(drawing.header.$MEASUREMENT).toBe(1);
    expect(drawing.header.$ACADVER).toBe('AC1021');
  });

  it('has the public layers, all of them', () => {
    for (const layer of [
      'OUTLINE',
      'COPPER_TOP',
      'COPPER_BOT',
      'MASK_TOP',
      'MASK_BOT',
      'HOLES_PTH',
      'HOLES_NPTH',
      'NOTES',
    ]) {
      expect(drawing.layers).toContain(layer);
    }
  });

  it('has one closed entity for each contour, no end repeated, and nothing else but notes', () => {
    expect(drawing.polylines.map(({ layer }) => layer)).toEqual([
      'OUTLINE',
      'COPPER_TOP',
      'COPPER_BOT',
      'MASK_TOP',
      'MASK_BOT',
    ]);
    for (const { shape, vertices } of drawing.polylines) {
      expect(shape).toBe(true);
      const corners = vertices.map(({ x, y }) => `${x} ${y}`);
      expect(new Set(corners).size).toBe(corners.length);
    }
    expect(drawing.entities.length).toBe(drawing.polylines.length + drawing.texts.length);
  });

  it('keeps arcs as arcs: a quarter circle has the bulge tan(π/8)', () => {
    const bulges = drawing.polylines[0]!.vertices.map(({ bulge }) => bulge ?? 0).filter((bulge) => bulge !== 0);
    expect(bulges).toHaveLength(4);
    for (const bulge of bulges) expect(bulge).toBeCloseTo(Math.tan(Math.PI / 8), 8);
  });

  it('has the areas of the artwork', () => {
    const { board, cornerMm, patch, frontMm, insetMm, gapMm, lineMm } = soilSensor;
    expect(area(drawing.polylines[0]!)).toBeCloseTo(board[0] * board[1] - (4 - Math.PI) * cornerMm ** 2, 6);
    expect(area(drawing.polylines[1]!)).toBeCloseTo(patch[0] * patch[1] - 2 * gapMm * insetMm + lineMm * frontMm, 6);
  });

  it('starts at the lower left corner of the outline', () => {
    const { vertices } = drawing.polylines[0]!;
    expect(Math.min(...vertices.map(({ x }) => x))).toBe(0);
    expect(Math.min(...vertices.map(({ y }) => y))).toBe(0);
    expect(Math.max(...vertices.map(({ x }) => x))).toBe(soilSensor.board[0]);
    expect(Math.max(...vertices.map(({ y }) => y))).toBe(soilSensor.board[1]);
  });
});

describe('holes, circles and clockwise contours', () => {
  it('writes every contour of every region, holes with negative area, full circles as circles', async () => {
    const artwork = {
      ...artworkOf(soilSensor),
      copperBottom: islands,
      holes: [
        {
          centre: { xNm: 5_000_000, yNm: 6_000_000 },
          finishedDiameterNm: 1_000_000,
          plated: true,
          use: 'pin',
          label: 'a',
        } as const,
        {
          centre: { xNm: 9_000_000, yNm: 6_000_000 },
          finishedDiameterNm: 3_200_000,
          plated: false,
          use: 'mounting',
          label: 'b',
        } as const,
      ],
    };
    const { polylines, circles } = await read(inputOf(soilSensor, artwork));
    const ground = polylines.filter(({ layer }) => layer === 'COPPER_BOT').map(area);
    expect(ground).toHaveLength(2);
    expect(ground[1]).toBeCloseTo(-400, 9);
    expect(circles.map(({ layer, center, radius }) => [layer, center.x, center.y, radius])).toEqual([
      ['COPPER_BOT', 20, 20, 3],
      ['COPPER_BOT', 20, 20, 1],
      ['HOLES_PTH', 5, 6, 0.5],
      ['HOLES_NPTH', 9, 6, 1.6],
    ]);
  });

  it('gives a clockwise arc a negative bulge', async () => {
    const outer = {
      start: { xNm: 0, yNm: 0 },
      edges: [
        { kind: 'line', to: { xNm: 8_000_000, yNm: 0 } },
        { kind: 'line', to: { xNm: 8_000_000, yNm: 8_000_000 } },
        { kind: 'arc', to: { xNm: 0, yNm: 0 }, centre: { xNm: 8_000_000, yNm: 0 }, clockwise: true },
      ],
    } as const;
    const artwork = { ...artworkOf(soilSensor), copperTop: [{ outer, holes: [] }] };
    const { polylines } = await read(inputOf(soilSensor, artwork));
    const bite = polylines.find(({ layer }) => layer === 'COPPER_TOP')!;
    expect(bite.vertices[2]!.bulge).toBeCloseTo(-Math.tan((3 * Math.PI) / 8), 8);
  });
});

describe('the text of the file', () => {
  it('is the same twice in one process, although the library counts its objects globally', async () => {
    const first = await dxfText(inputOf(soilSensor));
    await dxfText(inputOf({ ...soilSensor, title: 'something between' }));
    expect(await dxfText(inputOf(soilSensor))).toBe(first);
  });

  it('has no handle above its seed, and none twice', async () => {
    const lines = (await dxfText(inputOf(soilSensor))).split('\n');
    const seed = Number.parseInt(lines[lines.indexOf('$HANDSEED') + 2]!, 16);
    // Pairs of lines: group code, value.
    const handles = lines.filter((_, index) => index % 2 === 1 && lines[index - 1] === '5').slice(1);
    expect(new Set(handles).size).toBe(handles.length);
    for (const handle of handles) expect(Number.parseInt(handle, 16)).toBeLessThan(seed);
  });

  it('writes coordinates with at most six decimals and no exponent', async () => {
    const lines = (await dxfText(inputOf(soilSensor))).split('\n');
    const values = lines.filter((_, index) => index % 2 === 1 && ['10', '20', '42'].includes(lines[index - 1]!));
    expect(values.length).toBeGreaterThan(50);
    for (const value of values) expect(value).toMatch(/^-?\d+(\.\d{1,9})?$/);
  });

  it.each([HOSTILE_TITLE, `${HOSTILE_TITLE}\n  0\nEOF`])('keeps the title %j on one line, as text', async (title) => {
    const { texts, polylines } = await read(inputOf({ ...soilSensor, title }));
    expect(polylines).toHaveLength(5);
    expect(texts).toHaveLength(4);
    expect(texts[0]!.text).toBe(encodeDxfText(title));
    expect(texts[1]!.text).toBe('Build EW0123456789');
  });

  it('encodes what AutoCAD would take for a code', () => {
    expect(encodeDxfText('50 %')).toBe('50 %');
    expect(encodeDxfText('%%d')).toBe('%%%%%%d');
    expect(encodeDxfText('^J')).toBe('^ J');
    expect(encodeDxfText('\\U+0041 a\\b')).toBe('\\U+005CU+0041 a\\b');
    expect(encodeDxfText('a\nb\u2028c')).toBe('a b c');
  });
});
