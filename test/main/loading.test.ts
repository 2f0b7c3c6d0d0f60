// What each verb loads: the build keeps heavy libraries out of the verbs that do not need them.

import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { launch, root } from './process.ts';

beforeAll(async () => expect((await launch(['--version'], '', root, 'main/launch.mjs')).code).toBe(0), 120_000);

/** The text of a built file and of all that it imports at once. */
function loadedWith(path: string, seen = new Set<string>()): string {
  if (seen.has(path)) return '';
  seen.add(path);
  const text = readFileSync(path, 'utf8');
  const imports = [...text.matchAll(/^(?:import|export)\b[^;]*?from ["'](\.[^"']+)["']/gm)];
  return text + imports.map(([, source]) => loadedWith(join(path, '..', source!), seen)).join('');
}

function verbFile(verb: string): string {
  const found = new RegExp(`import\\(["']\\./(chunks/${verb}-[^"']+)["']\\)`).exec(
    readFileSync(join(root, 'dist/cli.js'), 'utf8'),
  );
  return join(root, 'dist', found![1]!);
}

const MARKS = { zod: 'ZodError', makerjs: 'makerjs', clipper: 'ClipperOffset', jszip: 'JSZip' } as const;

describe('the build', () => {
  it.each([
    ['help', undefined, []],
    ['predict', 'predict', []],
    ['catalogue', 'catalogue', []],
    ['size', 'size', ['zod']],
  ] as const)('%s loads of the heavy libraries no more than it needs', (_, verb, expected) => {
    const text = loadedWith(verb === undefined ? join(root, 'dist/cli.js') : verbFile(verb));
    expect(text.length).toBeGreaterThan(1000);
    const loaded = Object.entries(MARKS).flatMap(([name, mark]) => (text.includes(mark) ? [name] : []));
    expect(loaded).toEqual(expected);
  });

  it('has the marks that this looks for', () => {
    const text = loadedWith(verbFile('package'));
    for (const name of ['zod', 'makerjs', 'clipper'] as const) expect(text).toContain(MARKS[name]);
    expect(text).not.toContain(`class ${MARKS.jszip}`);
  });
});
