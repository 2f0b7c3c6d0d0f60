// Output files: whole or not at all.

import { mkdirSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readText, referenceReader, writeWhole } from '../../main/files.ts';
import { filesIn, folderWith } from './process.ts';

const bytes = new TextEncoder().encode('new');

describe('writeWhole', () => {
  it('makes a file, replaces a file, and leaves nothing beside it', () => {
    const folder = folderWith({ 'old.zip': 'old and longer' });
    writeWhole(join(folder, 'old.zip'), bytes);
    writeWhole(join(folder, 'new.zip'), bytes);
    expect(filesIn(folder)).toEqual(['new.zip', 'old.zip']);
    expect(readFileSync(join(folder, 'old.zip'), 'utf8')).toBe('new');
  });

  it('refuses a folder, a device, and a path through a file', () => {
    const folder = folderWith({ file: '' });
    mkdirSync(join(folder, 'a.zip'));
    for (const out of [
      join(folder, 'a.zip'),
      '/dev/null',
      join(folder, 'file/a.zip'),
      join(folder, 'none/a.zip'),
      `${folder}/${'x'.repeat(300)}`,
    ]) {
      expect(() => writeWhole(out, bytes)).toThrow(/--out: cannot be written: .+; nothing was written/);
    }
    expect(filesIn(folder)).toEqual(['a.zip', 'file']);
  });
});

describe('reading', () => {
  it('refuses what is not UTF-8, too large, endless or not there', async () => {
    const folder = folderWith({ large: ' '.repeat(1_000_001), fits: ' '.repeat(1_000_000) });
    writeFileSync(join(folder, 'latin'), Buffer.from([0x7b, 0xe4, 0x7d]));
    await expect(readText(join(folder, 'latin'))).rejects.toThrow('is not UTF-8 text');
    await expect(readText(join(folder, 'large'))).rejects.toThrow('is larger than 1 MB');
    await expect(readText('/dev/zero')).rejects.toThrow('is larger than 1 MB');
    await expect(readText(join(folder, 'none'))).rejects.toThrow('there is no such file');
    await expect(readText(join(folder, 'fits'))).resolves.toHaveLength(1_000_000);
  });

  it('keeps references under the folder of the brief, links included', () => {
    const outside = folderWith({ 'x.json': '1' });
    const folder = folderWith({ 'in.json': '2' });
    symlinkSync(outside, join(folder, 'way-out'));
    symlinkSync('in.json', join(folder, 'inner.json'));
    const read = referenceReader(join(folder, 'b.brief.json'));
    expect(read('in.json')).toBe('2');
    expect(read('inner.json')).toBe('2');
    expect(() => read('way-out/x.json')).toThrow('leads out of the folder of the brief');
    expect(() => read('none.json')).toThrow('none.json: cannot be read: there is no such file');
  });
});
