// The public contract of the command line: exit codes, streams, JSON, and nothing written where nothing should be.

import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import JSZip from 'jszip';
import { beforeAll, describe, expect, it } from 'vitest';
import { filesIn, fixture, folderWith, launch, root } from './process.ts';

const brief = JSON.parse(fixture('glass-epoxy-2450'));
const change = (part: object): string => JSON.stringify({ ...brief, ...part });

// The first start may have to build.
beforeAll(async () => expect((await launch(['--version'], '', root, 'main/launch.mjs')).code).toBe(0), 120_000);

describe.concurrent('help and version', () => {
  it('prints the version of package.json', async () => {
    const { version } = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8'));
    expect(await launch(['--version'])).toEqual({ code: 0, out: `${version}\n`, err: '' });
  });

  it('lists every verb, with the cautions', async () => {
    const { code, out, err } = await launch(['--help']);
    expect(code).toBe(0);
    expect(err).toBe('');
    for (const verb of ['size', 'predict', 'check', 'package', 'catalogue', 'schema'])
      expect(out).toMatch(new RegExp(`^  ${verb}`, 'm'));
    for (const verb of ['solve', 'tolerance', 'correct'])
      expect(out).toMatch(new RegExp(`^  ${verb}.*not in this version`, 'm'));
    expect(out).toContain('exposure');
    expect(out).toContain('licence');
  });

  it('helps with a verb: its options, the fields of a brief with unit and range, the cautions', async () => {
    const { code, out } = await launch(['package', '--help']);
    expect(code).toBe(0);
    expect(out).toContain('--accept-violations');
    expect(out).toMatch(/laminate\.thickness +.*allowed is 20 um to 20 mm/);
    expect(out).toContain('exposure');
    expect((await launch(['tolerance', '--help'])).out).toContain('not in this version');
  });

  it.each([[[]], [['sise']], [['solve', 'x.json']], [['size']]])(
    'usage %j is exit 2 with nothing on standard output',
    async (words) => {
      const { code, out, err } = await launch(words);
      expect(code).toBe(2);
      expect(out).toBe('');
      expect(err).toMatch(words.length === 0 ? /^etchwave VERB/ : /^etchwave: .+; .+/);
    },
  );
});

describe.concurrent('predict', () => {
  const patch = ['predict', '--length', '29 mm', '--width=37 mm', '--thickness', '1.53 mm', '--permittivity', '4.3'];

  it('prints the resonance with its interval, its cause and its kind, never alone', async () => {
    const { code, out } = await launch(patch);
    expect(code).toBe(0);
    expect(out).toMatch(/resonance +\d\.\d{3} GHz ± \d+ MHz \(model error\), bare/);
  });

  it('prints SI under keys that name the unit', async () => {
    const { code, out, err } = await launch([...patch, '--json']);
    const result = JSON.parse(out);
    expect(code).toBe(0);
    expect(err).toBe('');
    expect(result.format).toBe('etchwave-design/1');
    expect(result.radiator).toEqual({ family: 'rectangular', lengthM: 0.029, widthM: 0.037 });
    expect(result.prediction.resonanceKind).toBe('bare');
    expect(result.prediction.resonanceLowHz).toBeLessThan(result.prediction.resonanceHz);
    expect(result).not.toHaveProperty('feed');
  });

  it('names every fault of the options together', async () => {
    const { code, out } = await launch([
      'predict',
      '--length',
      '29',
      '--width',
      '-3 mm',
      '--thickness',
      '1.53 mm',
      '--method',
      'full-wave',
      '--json',
    ]);
    const { format, errors } = JSON.parse(out);
    expect(code).toBe(2);
    expect(format).toBe('etchwave-error/1');
    expect(errors.map((fault: { path: string }) => fault.path)).toEqual(['--length', '--permittivity', '--method']);
    expect(errors[0]).toMatchObject({ code: 'usage', file: '', value: '29' });
    expect(errors[0].allowed).toContain('mil');
  });

  it('names ranges by option', async () => {
    const { code, err } = await launch([...patch.slice(0, -1), '0.5']);
    expect(code).toBe(2);
    expect(err).toBe('etchwave: --permittivity: 0.5 is out of range; allowed is 1 to 30\n');
  });
});

describe.concurrent('size', () => {
  it('prints a sheet, and exits 1 where a requirement is not met', async () => {
    const { code, out, err } = await launch(['size', 'fixtures/briefs/glass-epoxy-2450.brief.json']);
    expect(code).toBe(1);
    expect(err).toBe('');
    expect(out).toMatch(/resonance +2\.44\d GHz ± \d+ MHz \(permittivity\), best match/);
    expect(out).toMatch(/NOT MET +return loss over the band: wanted .+; predicted .+/);
    expect(out).toContain('laminate.copperBase: 35 um');
    expect(out).toContain('exposure');
  });

  it('exits 0 where all are met, and reports defaults in JSON', async () => {
    const { code, out } = await launch(['size', 'fixtures/briefs/ptfe-5800.brief.json', '--json']);
    const result = JSON.parse(out);
    expect(code).toBe(0);
    expect(result.format).toBe('etchwave-design/1');
    expect(result.requirement.every(({ holds }: { holds: boolean }) => holds)).toBe(true);
    expect(result.defaults).toContainEqual({ path: 'polarization', value: 'linear' });
    expect(Object.keys(result.feed)).toContain('insetDepthM');
  });

  it('reads standard input', async () => {
    const { code, out } = await launch(['size', '-', '--json'], fixture('ptfe-5800'));
    expect(code).toBe(0);
    expect(JSON.parse(out)).toEqual(
      JSON.parse((await launch(['size', 'fixtures/briefs/ptfe-5800.brief.json', '--json'])).out),
    );
  });
});

describe.concurrent('bad input', () => {
  const large = `${' '.repeat(1_100_000)}{}`;
  it.each([
    ['unknown key', change({ titel: 'x' }), 'in.brief.json: titel: is not a known key; did you mean "title"?'],
    [
      'missing unit',
      change({ band: { low: 2.4, high: '2.5 GHz' } }),
      'in.brief.json: band.low: 2.4 has no unit; takes a number with Hz',
    ],
    [
      'negative thickness',
      change({ laminate: { ...brief.laminate, thickness: '-1 mm' } }),
      'in.brief.json: laminate.thickness: "-1 mm" is out of range; allowed is 20 um to 20 mm',
    ],
    [
      'band upside down',
      change({ band: { low: '2.5 GHz', high: '2.4 GHz' } }),
      'in.brief.json: band: the lower edge is not below the upper edge; low must be less than high',
    ],
    ['board too small', change({ board: { width: '20 mm', length: '20 mm' } }), 'in.brief.json: board.width: '],
    [
      'permittivity below 1',
      change({ laminate: { ...brief.laminate, permittivity: 0.9, permittivityTolerance: 0 } }),
      'in.brief.json: laminate.permittivity: 0.9 is out of range; allowed is 1 to 30',
    ],
    ['not JSON', 'title: x', 'in.brief.json: a value is expected at line 1, column 1; JSON is taken here'],
    ['over 1 MB', large, 'in.brief.json: is larger than 1 MB; allowed is up to 1 MB'],
    ['not UTF-8', Buffer.from([0x7b, 0xff, 0x7d]).toString('latin1'), 'in.brief.json: '],
    [
      'a missing reference',
      change({ laminate: 'none.json' }),
      'none.json: cannot be read: there is no such file or folder',
    ],
  ])('%s: one message, exit 2, nothing written', async (_, content, line) => {
    const folder = folderWith({ 'in.brief.json': content });
    const { code, out, err } = await launch(['package', 'in.brief.json', '--out', 'out.zip'], '', folder);
    expect(code).toBe(2);
    expect(out).toBe('');
    expect(err.trimEnd().split('\n')).toHaveLength(1);
    expect(err).toContain(`etchwave: ${line}`);
    expect(filesIn(folder)).toEqual(['in.brief.json']);
  });

  it('a brief that is not there, or is a folder', async () => {
    const folder = folderWith({});
    expect((await launch(['size', 'none.json'], '', folder)).err).toBe(
      'etchwave: none.json: cannot be read: there is no such file or folder\n',
    );
    expect((await launch(['size', '.'], '', folder)).err).toBe('etchwave: .: is a folder\n');
  });

  it('names faults of the options and of the brief together', async () => {
    const folder = folderWith({ 'in.brief.json': change({ titel: 1 }) });
    const { code, out } = await launch(['package', 'in.brief.json', '--json'], '', folder);
    expect(code).toBe(2);
    expect(JSON.parse(out).errors.map(({ path }: { path: string }) => path)).toEqual(['--out', 'titel']);
  });

  it('shows what a terminal would obey as escapes', async () => {
    const { err } = await launch(['si\u001b[2Jze']);
    expect(err).not.toContain('\u001b');
    expect(err).toContain('\\u001b');
  });

  it('refuses a link out of the folder of the brief, and never shows what it leads to', async () => {
    const outside = folderWith({ 'secret.json': '{"hunter2": 1}' });
    const folder = folderWith({ 'in.brief.json': change({ laminate: 'link.json' }) });
    symlinkSync(join(outside, 'secret.json'), join(folder, 'link.json'));
    const { code, err } = await launch(['size', join(folder, 'in.brief.json')]);
    expect(code).toBe(2);
    expect(err).toContain('link.json: leads out of the folder of the brief');
    expect(err).not.toContain('hunter2');
  });

  it('follows a reference beside the brief, wherever the program runs', async () => {
    const folder = folderWith({
      'in.brief.json': change({ laminate: 'own.json' }),
      'own.json': readFileSync(new URL('../../fixtures/laminates/barn-find.json', import.meta.url), 'utf8'),
    });
    const { code, out } = await launch(['size', join(folder, 'in.brief.json'), '--json']);
    expect(code).toBe(1);
    expect(JSON.parse(out).defaults).toContainEqual({ path: 'laminate.conductivity', value: '58 MS/m' });
  });
});

describe.concurrent('package', () => {
  it('writes one zip whole, the same bytes each time, and says what is in it', async () => {
    const folder = folderWith({ 'in.brief.json': fixture('ptfe-5800') });
    const first = await launch(['package', 'in.brief.json', '--out', 'a.zip', '--json'], '', folder);
    expect(first.err.includes('fault of the program')).toBe(false);
    expect(first.code).toBe(0);
    writeFileSync(join(folder, 'b.zip'), 'to be replaced');
    expect((await launch(['package', 'in.brief.json', '--out', 'b.zip'], '', folder)).code).toBe(0);
    expect(filesIn(folder)).toEqual(['a.zip', 'b.zip', 'in.brief.json']);
    const bytes = readFileSync(join(folder, 'a.zip'));
    expect(bytes.equals(readFileSync(join(folder, 'b.zip')))).toBe(true);
    expect(JSON.parse(first.out)).toMatchObject({
      format: 'etchwave-package/1',
      file: 'a.zip',
      bytes: bytes.length,
      violations: [],
    });
  });

  it('takes back the brief that it packed, and makes the same board of it', async () => {
    const folder = folderWith({ 'in.brief.json': fixture('ptfe-5800') });
    await launch(['package', 'in.brief.json', '--out', 'a.zip'], '', folder);
    const zip = await JSZip.loadAsync(readFileSync(join(folder, 'a.zip')));
    const packed = await zip.file('brief.json')!.async('string');
    writeFileSync(join(folder, 'again.brief.json'), packed);
    expect((await launch(['package', 'again.brief.json', '--out', 'b.zip'], '', folder)).code).toBe(0);
    expect(readFileSync(join(folder, 'a.zip')).equals(readFileSync(join(folder, 'b.zip')))).toBe(true);
  });

  it('writes a shortfall with exit 0, and nothing with --strict', async () => {
    const folder = folderWith({ 'in.brief.json': fixture('glass-epoxy-2450') });
    const lenient = await launch(['package', 'in.brief.json', '--out', 'a.zip'], '', folder);
    expect(lenient.code).toBe(0);
    expect(lenient.err).toContain('NOT MET');
    const strict = await launch(['package', 'in.brief.json', '--out', 'b.zip', '--strict'], '', folder);
    expect(strict.code).toBe(1);
    expect(strict.err).toContain('Nothing was written: a requirement is not met');
    expect(filesIn(folder)).toEqual(['a.zip', 'in.brief.json']);
  });

  it('writes nothing where a rule is violated, unless it is accepted', async () => {
    const violated = change({ feed: { kind: 'inset', pinned: { notchGap: '0.1 mm' } } });
    const folder = folderWith({ 'in.brief.json': violated });
    expect((await launch(['check', 'in.brief.json'], '', folder)).code).toBe(1);
    const refused = await launch(['package', 'in.brief.json', '--out', 'a.zip'], '', folder);
    expect(refused.code).toBe(1);
    expect(refused.err).toContain('Nothing was written: rules are violated');
    expect(filesIn(folder)).toEqual(['in.brief.json']);
    expect((await launch(['package', 'in.brief.json', '--out', 'a.zip', '--accept-violations'], '', folder)).code).toBe(
      0,
    );
    expect(filesIn(folder)).toEqual(['a.zip', 'in.brief.json']);
  });

  it.each(['none/a.zip', 'in.brief.json/a.zip', '/dev/null'])(
    'unwritable output %s: exit 2, nothing left behind',
    async (out) => {
      const folder = folderWith({ 'in.brief.json': fixture('ptfe-5800') });
      const { code, err } = await launch(['package', 'in.brief.json', '--out', out], '', folder);
      expect(code).toBe(2);
      expect(err).toMatch(/^etchwave: .*--out: (cannot be written|is not a file name)/);
      expect(filesIn(folder)).toEqual(['in.brief.json']);
    },
  );

  it('leaves an existing folder of that name alone', async () => {
    const folder = folderWith({ 'in.brief.json': fixture('ptfe-5800') });
    mkdirSync(join(folder, 'a.zip'));
    expect((await launch(['package', 'in.brief.json', '--out', 'a.zip'], '', folder)).code).toBe(2);
    expect(filesIn(folder)).toEqual(['a.zip', 'in.brief.json']);
  });
});

describe.concurrent('Ctrl-C', () => {
  it('ends with 130', async () => {
    const child = spawn(process.execPath, [join(root, 'dist/cli.js'), 'size', '-']);
    // Standard input stays open: the program waits for it, and is interrupted there.
    child.stdin.write('{');
    const patience = setTimeout(() => child.kill('SIGINT'), 1500);
    const [code, signal] = await once(child, 'exit');
    clearTimeout(patience);
    expect([code, signal]).toEqual([130, null]);
  });
});

describe.concurrent('check, catalogue, schema', () => {
  it('shows the margin of every rule', async () => {
    const { code, out } = await launch(['check', 'fixtures/briefs/ptfe-5800.brief.json', '--json']);
    const result = JSON.parse(out);
    expect(code).toBe(0);
    expect(result.violations).toEqual([]);
    expect(result.rules.length).toBeGreaterThan(0);
    for (const rule of result.rules) expect(rule).toHaveProperty('smallestNm');
  });

  it('lists what a brief can name', async () => {
    const { out } = await launch(['catalogue', '--json']);
    const { laminates, fabricators } = JSON.parse(out);
    expect(fabricators).toHaveLength(7);
    expect(laminates.map(({ record }: { record: { name: string } }) => record.name)).toContain(
      'woven-glass-epoxy-1.53mm',
    );
    expect((await launch(['catalogue'])).out).toContain('shop-standard');
  });

  it('prints the schema for editors', async () => {
    expect(JSON.parse((await launch(['schema'])).out).required).toEqual(['band', 'laminate']);
  });
});
