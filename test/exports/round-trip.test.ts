// Random shapes and titles, written and read back by readers that are not ours. fast-check prints the seed of a failure.

import DxfParser, { type ILwpolylineEntity } from 'dxf-parser';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exportDxf } from '../../geometry/exports/dxf.ts';
import { exportGerber } from '../../geometry/exports/gerber.ts';
import { encodeXml } from '../../geometry/exports/svg.ts';
import type { Contour, Edge, PointNm } from '../../geometry/shape/shape.ts';
import { artworkOf, inputOf, soilSensor } from './board.ts';
import { netArea, readGerber, realWarnings } from './gerber-reader.ts';

/** A piece of a star about a centre: its angle, its radius, and whether it ends in an arc or in a chord. */
const star = fc.array(
  fc.record({
    angle: fc.double({ min: 0.15, max: 1, noNaN: true }),
    radiusNm: fc.integer({ min: 2_000_000, max: 30_000_000 }),
    arc: fc.boolean(),
  }),
  { minLength: 3, maxLength: 12 },
);

const CENTRE: PointNm = { xNm: 40_000_000, yNm: 35_000_000 };

/** The star as a contour with its area [mm²] from sectors and triangles, which knows nothing of the contour. Each piece
 *  runs at its radius, along a chord or an arc; radial lines join the pieces. */
function build(pieces: readonly { angle: number; radiusNm: number; arc: boolean }[]): {
  contour: Contour;
  area: number;
} {
  const whole = pieces.reduce((sum, { angle }) => sum + angle, 0);
  const at = (angle: number, radiusNm: number): PointNm => ({
    xNm: Math.round(CENTRE.xNm + radiusNm * Math.cos(angle)),
    yNm: Math.round(CENTRE.yNm + radiusNm * Math.sin(angle)),
  });
  const edges: Edge[] = [];
  const start = at(0, pieces[0]!.radiusNm);
  let angle = 0;
  let area = 0;
  for (const { angle: part, radiusNm, arc } of pieces) {
    const turn = (part / whole) * 2 * Math.PI;
    edges.push({ kind: 'line', to: at(angle, radiusNm) });
    angle += turn;
    const to = at(angle, radiusNm);
    edges.push(arc ? { kind: 'arc', to, centre: CENTRE, clockwise: false } : { kind: 'line', to });
    area += (radiusNm / 1e6) ** 2 * (arc ? turn : Math.sin(turn)) * 0.5;
  }
  edges.push({ kind: 'line', to: start });
  return { contour: { start, edges }, area };
}

/** Stars whose chords do not run through the centre. */
const stars = star
  .filter((pieces) => {
    const whole = pieces.reduce((sum, { angle }) => sum + angle, 0);
    return pieces.every(({ angle }) => angle / whole < 0.45);
  })
  .map(build);

describe('areas survive', () => {
  it('a Gerber file, to a part in a million (corners are rounded to 1 nm)', async () => {
    await fc.assert(
      fc.asyncProperty(stars, async ({ contour, area }) => {
        const artwork = { ...artworkOf(soilSensor), copperTop: [{ outer: contour, holes: [] }] };
        const reading = await readGerber(exportGerber(inputOf(soilSensor, artwork))[0]!.bytes);
        expect(realWarnings(reading)).toEqual([]);
        expect(Math.abs(netArea(reading) / area - 1)).toBeLessThan(1e-6);
      }),
      { numRuns: 60 },
    );
  });

  it('a DXF file, to the same', async () => {
    await fc.assert(
      fc.asyncProperty(stars, async ({ contour, area }) => {
        const artwork = { ...artworkOf(soilSensor), copperTop: [{ outer: contour, holes: [] }] };
        const [file] = await exportDxf(inputOf(soilSensor, artwork));
        const drawing = new DxfParser().parseSync(Buffer.from(file!.bytes).toString('utf8'))!;
        const copper = drawing.entities.find(({ layer }) => layer === 'COPPER_TOP') as ILwpolylineEntity;
        const read = copper.vertices.reduce((sum, from, index) => {
          const to = copper.vertices[(index + 1) % copper.vertices.length]!;
          const angle = 4 * Math.atan(from.bulge ?? 0);
          const radius = angle === 0 ? 0 : Math.hypot(to.x - from.x, to.y - from.y) / (2 * Math.sin(angle / 2));
          return sum + (from.x * to.y - to.x * from.y) / 2 + (radius ** 2 * (angle - Math.sin(angle))) / 2;
        }, 0);
        expect(Math.abs(read / area - 1)).toBeLessThan(1e-6);
      }),
      { numRuns: 60 },
    );
  });
});

describe('any title at all', () => {
  const title = fc.string({ unit: 'binary', maxLength: 120 });
  const plainGerber = lines(exportGerber(inputOf(soilSensor))[0]!.bytes);

  function lines(bytes: Uint8Array): readonly string[] {
    return Buffer.from(bytes).toString('latin1').split('\n');
  }

  it('changes one line of a Gerber file and its checksum, nothing else', () => {
    fc.assert(
      fc.property(title, (text) => {
        const changed = lines(exportGerber(inputOf({ ...soilSensor, title: text }))[0]!.bytes);
        expect(changed).toHaveLength(plainGerber.length);
        const differing = changed.flatMap((line, index) => (line === plainGerber[index] ? [] : [line.slice(0, 14)]));
        for (const line of differing) expect(['%TF.ProjectId,', '%TF.MD5,']).toContain(line.replace(/(MD5,).*/, '$1'));
      }),
    );
  });

  it('changes one line of a DXF file', async () => {
    const plain = lines((await exportDxf(inputOf(soilSensor)))[0]!.bytes);
    await fc.assert(
      fc.asyncProperty(title, async (text) => {
        const changed = lines((await exportDxf(inputOf({ ...soilSensor, title: text })))[0]!.bytes);
        expect(changed).toHaveLength(plain.length);
        expect(changed.filter((line, index) => line !== plain[index]).length).toBeLessThanOrEqual(1);
      }),
      { numRuns: 40 },
    );
  });

  it('leaves no mark-up in XML', () => {
    fc.assert(
      fc.property(title, (text) => {
        expect(encodeXml(text)).toMatch(/^(?:[^<>&"'\u0000-\u001f\ufffe\uffff]|&(?:amp|lt|gt|quot|#39);)*$/);
      }),
    );
  });
});
