// Briefs: what is taken, what is filled in, and every way to be told no.

import { describe, expect, it } from 'vitest';
import { example, faults, read } from './reading.ts';

describe('parseBrief', () => {
  it('reads the example into SI', () => {
    const brief = read(example);
    expect(brief.band).toEqual({ lowHz: 2.4e9, highHz: 2.4835e9 });
    expect(brief.match).toEqual({ returnLossDb: 10, referenceOhm: 50 });
    expect(brief.laminate).toEqual({
      name: 'glass-epoxy, 1.6 mm',
      permittivity: 4.3,
      permittivityTolerance: 0.2,
      lossTangent: 0.018,
      thicknessM: 0.00153,
      thicknessToleranceM: 0.00013,
      copperThicknessM: 35e-6,
      copperBaseM: 35e-6,
      conductivitySPerM: 5.8e7,
      roughnessM: 1.8e-6,
    });
    expect(brief.radiator).toEqual({ family: 'rectangular', pinned: {} });
    expect(brief.feed).toEqual({ kind: 'inset', pinned: {} });
    expect(brief.board).toEqual({ marginM: 'auto', cornerRadiusM: 0 });
    expect(brief.fabricator.name).toBe('shop-standard');
    expect(brief.defaults).toEqual([
      { path: 'laminate.copperBase', value: '35 um' },
      { path: 'laminate.conductivity', value: '58 MS/m' },
      { path: 'board.cornerRadius', value: '0 mm' },
    ]);
  });

  it('fills in everything but band, permittivity, loss tangent and thickness, and says so', () => {
    const brief = read({
      band: { centre: '2.45 GHz', width: '60 MHz' },
      laminate: { permittivity: 3.66, lossTangent: 0.0037, thickness: '1.524 mm' },
    });
    expect(brief.band).toEqual({ lowHz: 2.42e9, highHz: 2.48e9 });
    expect(brief.laminate.permittivityTolerance).toBe(0.183);
    expect(brief.laminate.thicknessToleranceM).toBe(0.0001524);
    expect(brief.laminate.copperThicknessM).toBe(35e-6);
    expect(brief.defaults.map(({ path }) => path).sort()).toEqual(
      [
        'board.cornerRadius',
        'board.margin',
        'fabricator',
        'feed.kind',
        'format',
        'laminate.conductivity',
        'laminate.copperBase',
        'laminate.copperThickness',
        'laminate.name',
        'laminate.permittivityTolerance',
        'laminate.roughness',
        'laminate.thicknessTolerance',
        'match.reference',
        'match.returnLoss',
        'polarization',
        'radiator.family',
        'title',
      ].sort(),
    );
  });

  it('keeps what is pinned', () => {
    const brief = read({
      ...example,
      radiator: { family: 'rectangular', pinned: { length: '28.9 mm', width: '37 mm' } },
      feed: { kind: 'inset', pinned: { insetDepth: '8.1 mm', notchGap: '40 mil', lineWidthInNotch: '2 mm' } },
      board: { width: '62 mm', pinned: { length: '58 mm' }, cornerRadius: '2 mm' },
    });
    expect(brief.radiator.pinned).toEqual({ lengthM: 0.0289, widthM: 0.037 });
    expect(brief.feed.pinned).toEqual({ insetDepthM: 0.0081, notchGapM: 0.001016, lineWidthInNotchM: 0.002 });
    expect(brief.board).toEqual({ marginM: 'auto', widthM: 0.062, lengthM: 0.058, cornerRadiusM: 0.002 });
  });

  it('takes a board whose margin goes with one of width and length', () => {
    expect(read({ ...example, board: { width: '62 mm', margin: '9 mm' } }).board).toEqual({
      marginM: 0.009,
      widthM: 0.062,
      cornerRadiusM: 0,
    });
  });

  it('takes an air-spaced patch, whose permittivity has no spread by default', () => {
    const brief = read({ ...example, laminate: { permittivity: 1, lossTangent: 0, thickness: '5 mm' } });
    expect(brief.laminate.permittivityTolerance).toBe(0);
  });

  it('takes text as text: letters of any script, and what would be syntax elsewhere', () => {
    const title = '*%<b>ε Антенна ../CON, %%d "&\u{1f4e1}';
    expect(read({ ...example, title }).title).toBe(title);
    expect(read({ ...example, title: '\u{1f4e1}'.repeat(120) }).title).toHaveLength(240);
  });

  it.each([
    ['34.3 um', 35e-6],
    ['33 um', 35e-6],
    ['31 um', 18e-6],
    ['48 um', 35e-6],
    ['70 um', 70e-6],
    ['17 um', 18e-6],
    ['3 um', 3e-6],
  ])('takes finished copper of %s for base copper of %d m', (copperThickness, base) => {
    const brief = read({ ...example, laminate: { ...example.laminate, copperThickness } });
    expect(brief.laminate.copperBaseM).toBe(base);
  });

  it('finds laminates and fabricators by name', () => {
    const brief = read({ ...example, laminate: 'ptfe-microfibre-2.20-0.787mm', fabricator: 'microwave-shop' });
    expect(brief.laminate.permittivity).toBe(2.2);
    expect(brief.fabricator.name).toBe('microwave-shop');
  });

  it('accepts a byte-order mark', () => {
    expect(read(`\ufeff${JSON.stringify(example)}`).title).toBe(example.title);
  });
});

describe('faults of a brief', () => {
  const change = (path: string, value: unknown): unknown => {
    const copy = structuredClone(example) as Record<string, unknown>;
    const keys = path.split('.');
    let here = copy;
    for (const key of keys.slice(0, -1)) {
      here[key] ??= {};
      here = here[key] as Record<string, unknown>;
    }
    here[keys.at(-1)!] = value;
    return copy;
  };

  it.each([
    ['titel', 'x', 'field.brief.json: titel: is not a known key; did you mean "title"?'],
    [
      'laminate.permitivity',
      4,
      'field.brief.json: laminate.permitivity: is not a known key; did you mean "permittivity"?',
    ],
    ['radiator.pinned.lenght', '3 mm', 'radiator.pinned.lenght: is not a known key; did you mean "length"?'],
    ['band.low', 2.4, 'band.low: 2.4 has no unit; takes a number with Hz, kHz, MHz or GHz, as in "2.45 GHz"'],
    ['band.low', '2.4', 'band.low: "2.4" has no unit; takes a number with Hz, kHz, MHz or GHz'],
    ['band.low', '2.6 GHz', 'band: the lower edge is not below the upper edge; low must be less than high'],
    ['band.low', '2.4835 GHz', 'band: the lower edge is not below the upper edge'],
    ['band.low', '29 MHz', 'band.low: "29 MHz" is out of range; allowed is 30 MHz to 110 GHz'],
    ['band.high', '111 GHz', 'band.high: "111 GHz" is out of range; allowed is 30 MHz to 110 GHz'],
    ['band', { low: '2.4 GHz' }, 'band: does not name a band; { "low", "high" } or { "centre", "width" } is taken'],
    ['band', { low: '2.4 GHz', high: '2.5 GHz', width: '1 MHz' }, 'band: names the band twice'],
    ['band', { centre: '2.4 GHz', width: '0 MHz' }, 'band.width: "0 MHz" is out of range; allowed is more than 0 GHz'],
    ['band', { centre: '40 MHz', width: '30 MHz' }, 'band: an edge of the band is out of range'],
    ['band', '2.4 GHz', 'band: is a text; takes a record with low, high, centre, width'],
    ['match.returnLoss', '0 dB', 'match.returnLoss: "0 dB" is out of range; allowed is more than 0 dB, up to 60 dB'],
    ['match.returnLoss', '61 dB', 'match.returnLoss: "61 dB" is out of range'],
    ['match.reference', '0 ohm', 'match.reference: "0 ohm" is out of range; allowed is 1 ohm to 1000 ohm'],
    ['polarization', 'circular', 'polarization: "circular" is not known here; allowed is "linear"'],
    ['radiator.family', 'disc', 'radiator.family: "disc" is not known here; allowed is "rectangular"'],
    ['feed.kind', 'slot', 'feed.kind: "slot" is not known here; allowed is "inset" or "quarter-wave" or "probe"'],
    ['format', 'etchwave-brief/9', 'format: "etchwave-brief/9" is not known here; allowed is "etchwave-brief/1"'],
    ['laminate.permittivity', 0.9, 'laminate.permittivity: 0.9 is out of range; allowed is 1 to 30'],
    ['laminate.permittivity', 31, 'laminate.permittivity: 31 is out of range; allowed is 1 to 30'],
    [
      'laminate.permittivity',
      '4.3',
      'laminate.permittivity: is a text; takes a number without a unit; allowed is 1 to 30',
    ],
    ['laminate.permittivityTolerance', 3.4, 'laminate.permittivityTolerance: reaches below a permittivity of 1'],
    ['laminate.lossTangent', 0.21, 'laminate.lossTangent: 0.21 is out of range; allowed is 0 to 0.2'],
    ['laminate.lossTangent', undefined, 'laminate.lossTangent: is missing; takes a number without a unit'],
    ['laminate.thickness', '-1.6 mm', 'laminate.thickness: "-1.6 mm" is out of range; allowed is 20 um to 20 mm'],
    ['laminate.thickness', '21 mm', 'laminate.thickness: "21 mm" is out of range'],
    ['laminate.thickness', '19 um', 'laminate.thickness: "19 um" is out of range'],
    ['laminate.thickness', '1,575.42 um', 'laminate.thickness: "1,575.42 um" could mean 1575.42 or 1.57542'],
    ['laminate.thicknessTolerance', '0.8 mm', 'laminate.thicknessTolerance: is more than half of the thickness'],
    ['laminate.copperBase', '70 um', 'laminate.copperBase: is heavier than the finished copper'],
    ['laminate', 'glass-epoxy', 'laminate: "glass-epoxy" is not in the catalogue; did you mean "'],
    ['laminate', 12, 'laminate: is a bare number; takes a catalogue name, a .json file or a record'],
    ['laminate', undefined, 'laminate: is missing; takes a catalogue name, a .json file or a record'],
    [
      'fabricator',
      'shop-standart',
      'fabricator: "shop-standart" is not in the catalogue; did you mean "shop-standard"?',
    ],
    ['fabricator', null, 'fabricator: is null; takes a catalogue name, a .json file or a record'],
    ['fabricator', { copperToEdge: '1 mm' }, 'fabricator.copperRows: is missing; takes a list'],
    ['board.width', '1.1 m', 'board.width: "1.1 m" is out of range; allowed is 1 mm to 1000 mm'],
    ['board', { width: '5 cm', length: '5 cm', margin: '1 mm' }, 'board.margin: a margin beside both width and length'],
    ['board', { width: '5 cm', pinned: { width: '5 cm' } }, "board.width: the board's width is given twice"],
    ['board', { width: '5 cm', cornerRadius: '26 mm' }, 'board.cornerRadius: the corners do not fit on the board'],
    ['radiator.pinned', { length: '0 mm' }, 'radiator.pinned.length: "0 mm" is out of range'],
    ['title', 'a\nb', 'title: holds control characters; printable text on one line is taken'],
    ['title', 'a\u001bb', 'title: holds control characters'],
    ['title', 'a\u202eb', 'title: holds control characters'],
    ['title', 'a\ud800b', 'title: holds control characters'],
    ['title', 'x'.repeat(121), 'title: has 121 characters; allowed are at most 120 characters'],
    ['title', 5, 'title: is a bare number; takes a text in double quotes'],
    ['laminate.name', 'a\u0000b', 'laminate.name: holds control characters'],
    ['band.low', '2.4\u001b[31m GHz', 'band.low: holds control characters'],
  ])('%s = %j', (path, value, line) => {
    const found = faults(change(path, value));
    expect(found).toHaveLength(1);
    expect(found[0]).toContain(line);
  });

  it('names all of them together', () => {
    const found = faults({
      ...example,
      titel: 'x',
      band: { low: '2.5 GHz', high: '2.4 GHz' },
      laminate: { ...example.laminate, thickness: '-1 mm', lossTangent: 1 },
      fabricator: 'nobody',
      board: { width: 50 },
    });
    expect(found.map((line) => line.split(': ')[1])).toEqual([
      'titel',
      'band',
      'board.width',
      'laminate.lossTangent',
      'laminate.thickness',
      'fabricator',
    ]);
  });

  it.each(['__proto__', 'constructor', 'toString', 'hasOwnProperty'])('takes %s for an unknown key', (key) => {
    const text = JSON.stringify(example);
    expect(faults(text.replace('{', `{"${key}": {"title": "x"},`))[0]).toContain(`${key}: is not a known key`);
    expect(faults(text.replace('"laminate":{', `"laminate":{"${key}": {"x": 1},`))[0]).toContain(
      `laminate.${key}: is not a known key`,
    );
    expect(({} as Record<string, unknown>).x).toBeUndefined();
  });

  it('never takes a value from a prototype', () => {
    const bare = { ...example, laminate: { __proto__: null, permittivity: 4, thickness: '1 mm' } };
    expect(faults(bare)[0]).toContain('laminate.lossTangent: is missing');
  });

  it.each([
    ['[]', 'is a list; takes a record with format'],
    ['3', 'is a bare number; takes a record'],
    ['null', 'is null; takes a record'],
    ['', 'the text ends where a value is expected at line 1, column 1'],
    ['{"title": "x"\n  "band": 1}', '"," or "}" is expected at line 2, column 3'],
    ['{"title": \'x\'}', 'a value is expected at line 1, column 11'],
    ['{"a": 1,}', 'a key in double quotes is expected at line 1, column 9'],
    ['{"a": 01}', '"," or "}" is expected at line 1, column 8'],
    ['{"a": "\u0001"}', 'a value is expected at line 1, column 7'],
    ['{"a": 1} x', 'the end of the text is expected at line 1, column 10'],
    ['{"title": "a", "title": "b"}', 'a key stands for the second time at line 1, column 16'],
    ['{"title": "a", "titl\\u0065": "b"}', 'a key stands for the second time at line 1, column 16'],
    [`${'['.repeat(50_000)}`, 'nested deeper than 32'],
  ])('%# refuses what is no record', (text, line) => {
    expect(faults(text)).toHaveLength(1);
    expect(faults(text)[0]).toContain(line);
    expect(faults(text)[0]!.startsWith('field.brief.json: ')).toBe(true);
  });

  it('measures the limit of 1 MB in bytes, before reading', () => {
    const pad = (bytes: number) => `${' '.repeat(bytes - JSON.stringify(example).length)}${JSON.stringify(example)}`;
    expect(faults(pad(1_000_000))).toEqual([]);
    expect(faults(pad(1_000_001))).toEqual(['field.brief.json: is larger than 1 MB; allowed is up to 1 MB']);
    expect(faults(`"${'ε'.repeat(600_000)}"`)[0]).toContain('is larger than 1 MB');
  });
});
