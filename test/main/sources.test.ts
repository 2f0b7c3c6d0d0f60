// When the launcher takes a build for stale.

import { mkdirSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { digestOfSources, isFresh, stampFile } from '../../main/sources.mjs';
import { folderWith } from './process.ts';

function tree(): string {
  const root = folderWith({ 'package.json': '{}', 'package-lock.json': '{}', 'vite.config.ts': '' });
  for (const folder of ['geometry/line', 'main', 'test/speed', 'test/published', 'dist'])
    mkdirSync(join(root, folder), { recursive: true });
  for (const file of ['geometry/line/a.ts', 'main/cli.ts', 'test/speed/bench.ts']) writeFileSync(join(root, file), 'x');
  writeFileSync(stampFile(root), digestOfSources(root));
  return root;
}

describe('isFresh', () => {
  it('is so right after a build, and not without one', () => {
    expect(isFresh(tree())).toBe(true);
    const unbuilt = tree();
    writeFileSync(stampFile(unbuilt), '');
    expect(isFresh(unbuilt)).toBe(false);
    expect(isFresh(folderWith({}))).toBe(false);
  });

  it.each(['geometry/line/a.ts', 'main/cli.ts', 'package.json', 'package-lock.json', 'vite.config.ts'])(
    'ends with another size or time of %s',
    (file) => {
      const longer = tree();
      writeFileSync(join(longer, file), 'longer than before');
      expect(isFresh(longer)).toBe(false);
      const touched = tree();
      utimesSync(join(touched, file), 1, 1);
      expect(isFresh(touched)).toBe(false);
    },
  );

  it('ends with a new file', () => {
    const root = tree();
    writeFileSync(join(root, 'geometry/new.ts'), '');
    expect(isFresh(root)).toBe(false);
  });
});
