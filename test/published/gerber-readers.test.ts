// The Gerber files against a reader that is not ours: gerber-parser 4.2.7 with gerber-plotter 4.2.8 (both MIT, npm).
// Rules come from The Gerber Layer Format Specification, rev. 2024.05; section numbers stand beside each check.

import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { NamedFile } from '../../geometry/exports/exporter.ts';
import { exportGerber } from '../../geometry/exports/gerber.ts';
import type { Contour, Shape } from '../../geometry/shape/shape.ts';
import { artworkOf, circle, HOSTILE_TITLE, inputOf, islands, rounded, soilSensor } from '../exports/board.ts';
import { isDark, netArea, type Plotted, readGerber, realWarnings, signedArea } from '../exports/gerber-reader.ts';

const text = (file: NamedFile): string => Buffer.from(file.bytes).toString('latin1');
const named = (files: readonly NamedFile[], end: string): NamedFile => files.find(({ name }) => name.endsWith(end))!;

/** Areas by hand, from the sketch's own numbers [mm²]. */
const { board, cornerMm, patch, frontMm, insetMm, gapMm, lineMm } = soilSensor;
const lost = (4 - Math.PI) * cornerMm ** 2;
const EXPECTED: Readonly<Record<string, number>> = {
  'copper-top.gbr': patch[0] * patch[1] - 2 * gapMm * insetMm + lineMm * frontMm,
  'copper-bottom.gbr': (board[0] - 0.6) * (board[1] - 0.6) - lost,
  'mask-top.gbr': (patch[0] + 0.4) * (patch[1] + 0.4) + (lineMm + 0.4) * (frontMm - 0.2),
  'mask-bottom.gbr': board[0] * board[1] - lost,
};

describe('a board as an independent reader sees it', () => {
  const files = exportGerber(inputOf(soilSensor));

  it('reads all six files without an error, and warns of nothing but attributes', async () => {
    expect(files).toHaveLength(6);
    for (const file of files) expect(realWarnings(await readGerber(file.bytes)), file.name).toEqual([]);
  });

  it.each(Object.keys(EXPECTED))('%s covers the area of the artwork to 1e-9', async (end) => {
    const area = netArea(await readGerber(named(files, end).bytes));
    expect(Math.abs(area / EXPECTED[end]! - 1)).toBeLessThan(1e-9);
  });

  it('the profile is one closed line whose centre encloses the board (6.5)', async () => {
    const { objects } = await readGerber(named(files, 'profile.gbr').bytes);
    const strokes = objects.filter((object) => object.type === 'stroke');
    expect(strokes).toHaveLength(1);
    const path = (strokes[0] as Extract<Plotted, { type: 'stroke' }>).path;
    path.forEach((segment, index) => {
      const next = path[(index + 1) % path.length]!;
      expect(segment.end.slice(0, 2)).toEqual(next.start.slice(0, 2));
    });
    expect(path.filter((segment) => segment.type === 'arc')).toHaveLength(4);
    expect(signedArea(path)).toBeCloseTo(EXPECTED['mask-bottom.gbr']!, 8);
  });

  it('the legend is drawn with a pen as wide as the artwork says', async () => {
    const { objects } = await readGerber(named(files, 'legend-top.gbr').bytes);
    const strokes = objects.filter((object) => object.type === 'stroke');
    expect(strokes.map((stroke) => stroke.width)).toEqual([0.15]);
    expect(strokes.flatMap((stroke) => stroke.path)).toHaveLength(3);
  });

  it('an empty layer is a valid file with an aperture and no image', async () => {
    const empty = exportGerber(inputOf(soilSensor, { ...artworkOf(soilSensor), legendTop: [], maskTop: [] }));
    for (const end of ['legend-top.gbr', 'mask-top.gbr']) {
      const reading = await readGerber(named(empty, end).bytes);
      expect(realWarnings(reading)).toEqual([]);
      expect(reading.objects.filter((object) => object.type === 'fill' || object.type === 'stroke')).toEqual([]);
      expect(text(named(empty, end))).toMatch(/^%ADD10C,/m);
    }
  });
});

describe('holes and islands (4.10.4.6)', () => {
  const shapes: readonly { name: string; shape: Shape; area: number; probes: readonly [number, number, boolean][] }[] =
    [
      {
        name: 'a window with an island that has a hole, given in the wrong order',
        shape: islands,
        area: 48 * 38 - (4 - Math.PI) * 9 - 400 + Math.PI * (9 - 1),
        probes: [
          [5, 5, true],
          [12, 12, false],
          [22, 20, true],
          [20, 20, false],
          [1.2, 1.2, false],
          [0.5, 20, false],
        ],
      },
      {
        name: 'full circles in one arc, clockwise for the hole',
        shape: [{ outer: circle(10, 10, 5, false), holes: [circle(11, 10, 2, true)] }],
        area: Math.PI * (25 - 4),
        probes: [
          [6, 10, true],
          [11, 10, false],
          [15.5, 10, false],
        ],
      },
    ];

  it.each(shapes)('$name', async ({ shape, area, probes }) => {
    const files = exportGerber(inputOf(soilSensor, { ...artworkOf(soilSensor), copperBottom: shape }));
    const reading = await readGerber(named(files, 'copper-bottom.gbr').bytes);
    expect(realWarnings(reading)).toEqual([]);
    expect(Math.abs(netArea(reading) / area - 1)).toBeLessThan(1e-9);
    for (const [x, y, dark] of probes) expect(isDark(reading, x, y), `(${x}, ${y})`).toBe(dark);
  });

  it('an arc of more than half a circle keeps its way round', async () => {
    const outer: Contour = {
      start: { xNm: 10_000_000, yNm: 5_000_000 },
      edges: [
        {
          kind: 'arc',
          to: { xNm: 5_000_000, yNm: 10_000_000 },
          centre: { xNm: 5_000_000, yNm: 5_000_000 },
          clockwise: true,
        },
        { kind: 'line', to: { xNm: 10_000_000, yNm: 5_000_000 } },
      ],
    };
    const files = exportGerber(inputOf(soilSensor, { ...artworkOf(soilSensor), copperTop: [{ outer, holes: [] }] }));
    const area = netArea(await readGerber(named(files, 'copper-top.gbr').bytes));
    expect(area).toBeCloseTo((3 / 4) * Math.PI * 25 + 12.5, 8);
  });
});

describe('what the format demands of the text', () => {
  const titles = {
    'a plain title': soilSensor.title,
    'a hostile title': HOSTILE_TITLE,
    'a title of two lines': `${HOSTILE_TITLE}\n%TF.FilePolarity,Negative*%\nM02*`,
  };
  const cases = Object.entries(titles).flatMap(([kind, title]) =>
    exportGerber(inputOf({ ...soilSensor, title })).map((file) => ({ kind, name: file.name, file })),
  );

  it.each(cases)('$name with $kind', ({ file }) => {
    const content = text(file);
    // ASCII only; every line one command; M02 once, at the end (4.13).
    expect(content).toMatch(/^[\n -~]*$/);
    for (const line of content.trimEnd().split('\n')) expect(line).toMatch(/^(%[^%*]+\*%|[^%*]+\*)$/);
    expect(content.match(/^M02/gm)).toHaveLength(1);
    expect(content.endsWith('M02*\n')).toBe(true);
    // 4.2.1, 4.2.2, 4.7: once, in the header, before the first coordinate.
    for (const once of ['%FSLAX46Y46*%', '%MOMM*%', 'G75*']) {
      expect(content.split(once)).toHaveLength(2);
      expect(content.indexOf(once)).toBeLessThan(content.search(/^X/m));
    }
    expect(content.search(/^G01\*/m)).toBeLessThan(content.search(/D01\*/));
    // 6.2: mandatory attributes, one of each.
    for (const name of ['FileFunction', 'FilePolarity', 'SameCoordinates', 'Part', 'ProjectId', 'GenerationSoftware']) {
      expect(content.match(new RegExp(`%TF\\.${name},`, 'g')), name).toHaveLength(1);
    }
    expect(content).not.toContain('CreationDate');
    // 5.6.8: name, GUID of RFC 4122 version 1 or 4, revision.
    expect(content).toMatch(
      /%TF\.ProjectId,[^,*%]*,[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12},EW0123456789\*%/,
    );
    // 4.10.1: within a region only D01, D02, G01, G02, G03.
    for (const [, inside] of content.matchAll(/G36\*\n([\s\S]*?)G37\*/g)) {
      expect(inside).toMatch(/^((X-?\d+Y-?\d+(I-?\d+J-?\d+)?D0[12]|G0[123])\*\n)+$/);
    }
    // 5.6.9: MD5 over everything before its own command without line ends, directly before M02.
    const [, before, digest] = /^([\s\S]*)%TF\.MD5,([0-9a-f]{32})\*%\nM02\*\n$/.exec(content)!;
    expect(digest).toBe(
      createHash('md5')
        .update(before!.replace(/[\r\n]/g, ''))
        .digest('hex'),
    );
  });

  it('says which layer each file is, and that only the mask is negative', () => {
    const attributes = exportGerber(inputOf(soilSensor)).map((file) => [
      file.name.slice(soilSensor.slug.length + 1),
      /%TF\.FileFunction,(.*)\*%/.exec(text(file))![1],
      /%TF\.FilePolarity,(.*)\*%/.exec(text(file))![1],
    ]);
    expect(attributes).toEqual([
      ['copper-top.gbr', 'Copper,L1,Top', 'Positive'],
      ['copper-bottom.gbr', 'Copper,L2,Bot', 'Positive'],
      ['mask-top.gbr', 'Soldermask,Top', 'Negative'],
      ['mask-bottom.gbr', 'Soldermask,Bot', 'Negative'],
      ['legend-top.gbr', 'Legend,Top', 'Positive'],
      ['profile.gbr', 'Profile,NP', 'Positive'],
    ]);
  });

  it('a title comes back whole from its escapes (3.4.3)', () => {
    const file = exportGerber(inputOf({ ...soilSensor, title: HOSTILE_TITLE }))[0]!;
    const field = /%TF\.ProjectId,([^,]*),/.exec(text(file))![1]!;
    const decoded = field.replace(/\\u([0-9A-F]{4})/g, (_, hex: string) =>
      String.fromCharCode(Number.parseInt(hex, 16)),
    );
    expect(decoded).toBe(HOSTILE_TITLE);
  });

  it('coordinates are the nanometres of the artwork, digit for digit (4.2.2)', () => {
    const outer = rounded(0.000001, 0.000002, 10.123456, 5.000001, 0);
    const files = exportGerber(inputOf(soilSensor, { ...artworkOf(soilSensor), copperTop: [{ outer, holes: [] }] }));
    expect(text(files[0]!)).toContain('X1Y2D02*\nX10123457Y2D01*\nX10123457Y5000003D01*\nX1Y5000003D01*\nX1Y2D01*\n');
  });
});
