// The fabrication drawing: scale, sheet, nothing cut off, nothing on top of anything else, text never syntax.

import { describe, expect, it } from 'vitest';
import { layOutDimensions } from '../../geometry/exports/dimension-layout.ts';
import type { DisplayList, PathItem, PointMm, TextItem } from '../../geometry/exports/display-list.ts';
import { drawBoard, exportDrawing } from '../../geometry/exports/drawing.ts';
import { encodeXml, writeSvg } from '../../geometry/exports/svg.ts';
import { textWidthMm } from '../../geometry/exports/text-width.ts';
import { artworkOf, type BoardSketch, circle, HOSTILE_TITLE, inputOf, soilSensor } from './board.ts';

const SKETCHES: Readonly<Record<string, BoardSketch>> = {
  'a 2.4 GHz board': soilSensor,
  'a small 5.8 GHz board': {
    ...soilSensor,
    board: [36, 34],
    cornerMm: 1,
    patch: [20.4, 16.97],
    frontMm: 9,
    insetMm: 5.2,
    gapMm: 0.4,
    lineMm: 2.43,
  },
  'a large 868 MHz board with the longest title': {
    ...soilSensor,
    title: 'W'.repeat(60) + ' and on'.repeat(8),
    board: [150, 130],
    patch: [115, 85.2],
    frontMm: 25,
    insetMm: 27,
    gapMm: 1.2,
  },
  'a 28 GHz board': {
    ...soilSensor,
    board: [7, 6.5],
    cornerMm: 0,
    patch: [3.2, 2.6],
    frontMm: 2,
    insetMm: 0.8,
    gapMm: 0.15,
    lineMm: 0.4,
  },
  'a board of nearly a metre': {
    ...soilSensor,
    board: [900, 980],
    patch: [500, 480],
    frontMm: 250,
    insetMm: 140,
    gapMm: 5,
    lineMm: 30,
  },
};

interface Box {
  readonly left: number;
  readonly right: number;
  readonly bottom: number;
  readonly top: number;
}

/** What a text takes up, by the same estimate the layout uses, from its base line to its capitals. */
function boxOf(item: TextItem): Box {
  const width = textWidthMm(item.text, item.sizeMm);
  const before = { start: 0, middle: width / 2, end: width }[item.anchor];
  const { xMm: x, yMm: y } = item.at;
  const rise = 0.72 * item.sizeMm;
  return item.upwards === true
    ? { left: x - rise, right: x, bottom: y - before, top: y - before + width }
    : { left: x - before, right: x - before + width, bottom: y, top: y + rise };
}

function textsOf(list: DisplayList): readonly TextItem[] {
  return list.items.filter((item) => item.kind === 'text');
}

function pointsOf(item: PathItem): readonly PointMm[] {
  return item.paths.flatMap((path) => [path.start, ...path.steps.map((step) => step.to)]);
}

describe.each(Object.entries(SKETCHES))('the drawing of %s', (_, sketch) => {
  const input = inputOf(sketch);
  const list = drawBoard(input);

  it('keeps everything inside the sheet, and every text inside the frame', () => {
    const inside = ({ left, right, bottom, top }: Box, margin: number): boolean =>
      left >= margin && bottom >= margin && right <= list.widthMm - margin && top <= list.heightMm - margin;
    for (const item of list.items) {
      if (item.kind === 'text') expect(inside(boxOf(item), 9.3), item.text).toBe(true);
      else
        for (const { xMm, yMm } of pointsOf(item)) {
          expect(inside({ left: xMm, right: xMm, bottom: yMm, top: yMm }, 8)).toBe(true);
        }
    }
  });

  it('sets no text on another', () => {
    const texts = textsOf(list);
    texts.forEach((a, index) => {
      for (const b of texts.slice(index + 1)) {
        const [p, q] = [boxOf(a), boxOf(b)];
        const apart = p.right <= q.left || q.right <= p.left || p.top <= q.bottom || q.top <= p.bottom;
        expect(apart, `"${a.text}" on "${b.text}"`).toBe(true);
      }
    });
  });

  it('writes every dimension once, with its label, and boxes the critical ones', () => {
    const words = textsOf(list).map(({ text }) => text);
    for (const { label } of input.artwork.dimensions) {
      expect(words.filter((word) => word === label)).toHaveLength(1);
    }
    const framed = list.items.filter(
      (item) => item.kind === 'path' && item.fill?.kind === 'solid' && item.pen?.widthMm === 0.25,
    );
    expect(framed).toHaveLength(input.artwork.dimensions.filter(({ critical }) => critical).length);
  });

  it('says its scale and keeps to it', () => {
    const scaleText = textsOf(list).find(({ text }) => /^\d+ : \d+$/.test(text))!.text;
    const [paper, real] = scaleText.split(' : ').map(Number) as [number, number];
    const outline = list.items.find((item) => item.kind === 'path' && item.pen?.widthMm === 0.5) as PathItem;
    const xs = pointsOf(outline).map(({ xMm }) => xMm);
    expect(Math.max(...xs) - Math.min(...xs)).toBeCloseTo((sketch.board[0] * paper) / real, 6);
  });
});

describe('the choice of sheet', () => {
  it.each([
    ['a 2.4 GHz board', 297, '2 : 1'],
    ['a small 5.8 GHz board', 420, '5 : 1'],
    ['a large 868 MHz board with the longest title', 420, '1 : 1'],
    ['a board of nearly a metre', 420, '1 : 5'],
  ])('%s: a sheet %d mm wide, scale %s', (name, widthMm, scaleText) => {
    const list = drawBoard(inputOf(SKETCHES[name]!));
    expect(list.widthMm).toBe(widthMm);
    expect(textsOf(list).map(({ text }) => text)).toContain(scaleText);
  });
});

describe('the notes', () => {
  it('open with what is not met and end with an interval, never a bare frequency', () => {
    const words = textsOf(drawBoard(inputOf(soilSensor)))
      .map(({ text }) => text)
      .join(' ');
    expect(words).toContain('Not met: return loss over the band: wanted 10 dB, predicted 7.2 dB.');
    expect(words).toContain('2.4418 GHz, between 2.3832 GHz and 2.5004 GHz');
    for (const point of ['no substitution', 'not compensated', 'Do not clip', 'no thieving', 'no drill file']) {
      expect(words).toContain(point);
    }
  });

  it('point to FABRICATION.txt when there are more than the sheet can hold', () => {
    const input = inputOf(soilSensor);
    const requirement = Array.from({ length: 40 }, (_, index) => ({
      name: `requirement ${index} with a name of some length`,
      wanted: 'much',
      predicted: 'little',
      holds: false,
    }));
    const words = textsOf(drawBoard({ ...input, design: { ...input.design, requirement } })).map(({ text }) => text);
    expect(words).toContain('More in FABRICATION.txt.');
  });
});

describe('layOutDimensions', () => {
  it('puts the shorter of two nested dimensions nearer to the board', () => {
    const { placed } = layOutDimensions(artworkOf(soilSensor), 2);
    const distance = (name: string): number => placed.find(({ dimension }) => dimension.name === name)!.distanceMm;
    expect(distance('width')).toBeLessThan(distance('boardWidth'));
    expect(distance('insetDepth')).toBeLessThan(distance('boardLength'));
    // A chain: line length and inset depth meet tip to tip on one line.
    expect(distance('lineLength')).toBe(distance('insetDepth'));
  });
});

/** Walks XML and returns its texts; throws on anything that is not well formed (XML 1.0, without DTD and CDATA). */
function parseXml(xml: string): readonly string[] {
  const open: string[] = [];
  const texts: string[] = [];
  const token =
    /<\?xml [^?]*\?>|<\/([a-z]+)>|<([a-z]+)((?: [a-zA-Z-]+="[^"<&]*(?:&(?:amp|lt|gt|quot|#39);[^"<&]*)*")*)(\/?)>|([^<]+)/gy;
  let at = 0;
  while (at < xml.length) {
    token.lastIndex = at;
    const match = token.exec(xml);
    if (match === null) throw new Error(`not XML at ${xml.slice(at, at + 60)}`);
    at = token.lastIndex;
    const [, closing, opening, , empty, content] = match;
    if (closing !== undefined && open.pop() !== closing) throw new Error(`</${closing}> closes nothing`);
    if (opening !== undefined && empty === '') open.push(opening);
    if (content !== undefined) {
      if (/&(?!(?:amp|lt|gt|quot|#39);)/.test(content)) throw new Error(`bare ampersand in ${content}`);
      texts.push(content);
    }
  }
  if (open.length > 0) throw new Error(`<${open.pop()}> is not closed`);
  return texts;
}

describe('the SVG', () => {
  const titles = [HOSTILE_TITLE, `${HOSTILE_TITLE}\n</text><script>alert(1)</script>`, "]]>'\u0000\u202e\ud800"];

  it.each(titles)('is well formed and self-contained whatever the title: %j', (title) => {
    const svg = Buffer.from(exportDrawing(inputOf({ ...soilSensor, title }))[0]!.bytes).toString('utf8');
    expect(parseXml(svg).join('')).toContain(encodeXml(title).split(' ')[0]!);
    expect(svg).not.toMatch(/<script|<style|<image|<use|<foreignObject| href| style=| on[a-z]+=|@import/);
    expect(svg.match(/url\([^)]*\)/g)!.every((reference) => /^url\(#[a-z]+-\d\)$/.test(reference))).toBe(true);
    expect(svg).not.toMatch(/NaN|undefined|Infinity|\d[eE]-/);
  });

  it('has the size of the sheet in millimetres, so that it prints at its scale', () => {
    const svg = writeSvg(drawBoard(inputOf(soilSensor)));
    expect(svg).toContain('width="297mm" height="210mm" viewBox="0 0 297 210"');
  });

  it('flips y and the direction of arcs, and draws a full circle as two halves', () => {
    const artwork = { ...artworkOf(soilSensor), copperTop: [{ outer: circle(30, 30, 10, false), holes: [] }] };
    const svg = writeSvg(drawBoard(inputOf(soilSensor, artwork)));
    const [, data] = /<path d="(M[^"]*)" fill="url\(#hatch-\d\)"/.exec(svg)!;
    expect(data).toMatch(/^M[\d. ]+A20 20 0 0 0 [\d. ]+A20 20 0 0 0 [\d. ]+Z$/);
  });

  it('is the same text twice', () => {
    expect(writeSvg(drawBoard(inputOf(soilSensor)))).toBe(writeSvg(drawBoard(inputOf(soilSensor))));
  });
});
