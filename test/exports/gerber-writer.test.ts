// What the Gerber writer refuses, and its encoder.

import { describe, expect, it } from 'vitest';
import { encodeGerberField, type GerberImage, writeGerber } from '../../geometry/exports/gerber-writer.ts';
import { type Contour, point } from '../../geometry/shape/shape.ts';
import { platform, polygon } from './board.ts';

const identity = { title: 't', projectGuid: 'g', coordinatesGuid: 'c', buildId: 'EW1', version: '0' };

function write(image: GerberImage): string {
  const layer = {
    comment: 'test',
    fileFunction: 'Copper,L1,Top',
    polarity: 'Positive',
    apertureFunction: 'Conductor',
    image,
  } as const;
  return Buffer.from(writeGerber(layer, identity, platform)).toString('latin1');
}

const region = (outer: Contour): GerberImage => ({ kind: 'regions', shape: [{ outer, holes: [] }] });

describe('writeGerber', () => {
  it('leaves out edges without length', () => {
    const text = write(region(polygon([point(0, 0), point(5, 0), point(5, 0), point(5, 5), point(0, 0)])));
    expect(text.match(/D01\*/g)).toHaveLength(3);
  });

  it('refuses a contour that touches itself', () => {
    const bow = polygon([point(0, 0), point(4, 0), point(2, 2), point(4, 4), point(0, 4), point(2, 2)]);
    expect(() => write(region(bow))).toThrow('touches itself at X2Y2');
  });

  it('refuses a contour that does not close', () => {
    const open: Contour = { start: point(0, 0), edges: [{ kind: 'line', to: point(1, 0) }] };
    expect(() => write({ kind: 'outline', contour: open })).toThrow('ends where it starts');
  });

  it('refuses coordinates that are no whole nanometres or beyond four digits of millimetres', () => {
    expect(() => write(region(polygon([point(0, 0), point(0.5, 0), point(0, 1)])))).toThrow('0.5');
    expect(() => write(region(polygon([point(0, 0), point(1e10, 0), point(0, 1)])))).toThrow('10000000000');
  });

  it('draws a stroke of one point as a dot, and each width with its own pen', () => {
    const text = write({
      kind: 'strokes',
      strokes: [
        { points: [point(7, 7)], widthNm: 200_000 },
        { points: [point(0, 0), point(9, 0)], widthNm: 150_000 },
        { points: [], widthNm: 150_000 },
      ],
    });
    expect(text).toContain(
      '%ADD10C,0.150000*%\n%ADD11C,0.200000*%\nD10*\nX0Y0D02*\nX9Y0D01*\nD11*\nX7Y7D02*\nX7Y7D01*\n',
    );
  });

  it('ends in dark polarity and without attributes in force', () => {
    const outer = polygon([point(0, 0), point(9, 0), point(9, 9), point(0, 9)]);
    const hole = polygon([point(1, 1), point(1, 2), point(2, 2)]);
    const text = write({ kind: 'regions', shape: [{ outer, holes: [hole] }] });
    expect(text).toMatch(/%LPC\*%\nG36\*\n[^%]*G37\*\n%LPD\*%\n%TD\*%\n%TF\.MD5/);
  });
});

describe('encodeGerberField', () => {
  it('escapes what ends a command, a field or an escape, and all beyond ASCII', () => {
    expect(encodeGerberField('a*b%c,d\\e')).toBe('a\\u002Ab\\u0025c\\u002Cd\\u005Ce');
    expect(encodeGerberField('ε \u{1f4e1}\n')).toBe('\\u03B5 \\uD83D\\uDCE1\\u000A');
    expect(encodeGerberField('Rev. 2 (2.45 GHz)')).toBe('Rev. 2 (2.45 GHz)');
  });
});
