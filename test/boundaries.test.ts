// Every import of the program against the table of who may import whom.

import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { checkFile, findCycle, importedFiles } from './boundaries.ts';

const root = fileURLToPath(new URL('../', import.meta.url));

function sources(): readonly (readonly [file: string, text: string])[] {
  return ['geometry', 'main', 'renderer'].flatMap((folder) =>
    readdirSync(root + folder, { recursive: true, encoding: 'utf8' })
      .map((name) => `${folder}/${name.replaceAll('\\', '/')}`)
      .filter((file) => /\.(ts|tsx|mts|mjs)$/.test(file))
      .sort()
      .map((file) => [file, readFileSync(root + file, 'utf8')] as const),
  );
}

describe('boundaries', () => {
  it('hold in every file', () => {
    const files = sources();
    expect(files.length).toBeGreaterThan(50);
    const lines = files
      .flatMap(([file, text]) => checkFile(file, text))
      .map(({ file, line, problem, allowed }) => `${file}:${line} ${problem}; ${allowed}`);
    expect(lines).toEqual([]);
  });

  it('leave no circle of imports', () => {
    expect(findCycle(new Map(sources().map(([file, text]) => [file, importedFiles(file, text)])))).toBeUndefined();
  });
});

describe('the checker catches planted faults', () => {
  it.each([
    ['geometry/line/x.ts', "import { a } from '../patch/a.ts';", 'imports ../patch/a.ts', 'line may import laminate'],
    [
      'geometry/line/x.ts',
      "\n\nimport type { A } from '../brief/brief.ts';",
      'imports ../brief/brief.ts',
      'line may import',
    ],
    ['geometry/line/x.ts', "export * from '../exports/dxf.ts';", 'imports ../exports/dxf.ts', 'line may import'],
    ['geometry/line/x.ts', "export { a } from '../exports/dxf.ts';", 'imports ../exports/dxf.ts', 'line may import'],
    ['geometry/line/x.ts', "type A = import('../exports/dxf.ts').A;", 'imports ../exports/dxf.ts', 'line may import'],
    [
      'geometry/line/x.ts',
      "const a = await import('../exports/dxf.ts');",
      'imports ../exports/dxf.ts',
      'line may import',
    ],
    [
      'geometry/fabricator/x.ts',
      "import '../laminate/laminate.ts';",
      'imports ../laminate/laminate.ts',
      'fabricator may import numeric',
    ],
    [
      'geometry/units.ts',
      "import '../geometry/brief/parse.ts';",
      'imports ../geometry/brief/parse.ts',
      'allowed are numeric',
    ],
    ['geometry/brief/x.ts', "import '../pipeline.ts';", 'imports ../pipeline.ts', 'brief may import'],
    ['geometry/new/x.ts', "import '../line/loss.ts';", 'imports ../line/loss.ts', 'no row for new in the table'],
    ['geometry/line/x.ts', "import '../../main/files.ts';", 'imports ../../main/files.ts', 'nothing but itself'],
    ['geometry/line/x.ts', "import { readFileSync } from 'node:fs';", 'imports node:fs', 'no Node'],
    ['geometry/line/x.ts', "import * as z from 'zod';", 'imports zod', 'allowed in geometry/brief/'],
    ['geometry/exports/x.ts', "import J from 'jszip';", 'imports jszip', 'allowed in geometry/exports/package.ts'],
    [
      'geometry/exports/x.ts',
      "import H from 'dxf-writer/src/Handle.js';",
      'imports dxf-writer/src/Handle.js',
      'allowed in geometry/exports/dxf.ts',
    ],
    [
      'geometry/shape/x.ts',
      "import { union } from 'clipper2-ts';",
      'imports clipper2-ts',
      'allowed in geometry/shape/boolean.ts',
    ],
    ['geometry/shape/x.ts', "import x from 'left-pad';", 'imports left-pad', 'no place here'],
    ['geometry/line/x.ts', 'const name = f(); await import(name);', 'imports what is worked out', 'plain text'],
    ['geometry/line/x.ts', 'const a = process.env;', 'uses the name process', 'neither Node nor the page'],
    ['geometry/line/x.ts', 'const a = { window };', 'uses the name window', 'neither'],
    ['geometry/line/x.ts', 'type D = typeof document;', 'uses the name document', 'neither'],
    ['geometry/line/x.ts', 'const b: Buffer = a;', 'uses the name Buffer', 'neither'],
    ['geometry/line/x.ts', "const b = a['x'][fetch];", 'uses the name fetch', 'neither'],
    ['geometry/line/x.ts', "const fs = require('fs');", 'uses the name require', 'neither'],
    ['geometry/line/x.ts', "globalThis['process'];", 'uses the name globalThis', 'neither'],
    [
      'main/verbs/x.ts',
      "import { sizePatch } from '../../geometry/patch/size.ts';",
      'imports ../../geometry/patch/size.ts',
      'geometry/index.ts',
    ],
    ['main/cli.ts', "import { app } from 'electron';", 'imports electron', 'allowed in main/desktop.ts'],
    ['main/x.ts', "import '../renderer/app.tsx';", 'imports ../renderer/app.tsx', 'main may import'],
    [
      'renderer/x.tsx',
      "import { sizePatch } from '../geometry/index.ts';",
      'imports ../geometry/index.ts',
      'values from geometry/units.ts',
    ],
    ['renderer/x.tsx', "import fs from 'node:fs';", 'imports node:fs', 'allowed are react'],
  ])('%s: %s', (file, text, problem, allowed) => {
    const findings = checkFile(file, text);
    expect(findings).toHaveLength(1);
    expect(findings[0]).toMatchObject({ file, problem });
    expect(findings[0]!.allowed).toContain(allowed);
    expect(findings[0]!.line).toBe(text.startsWith('\n\n') ? 3 : 1);
  });

  it.each([
    ['geometry/patch/x.ts', "import { copperRow } from '../fabricator/fabricator.ts';"],
    ['geometry/line/x.ts', "import { a } from '../units.ts'; import './loss.ts'; import '../numeric/complex.ts';"],
    ['geometry/exports/x.ts', "import '../rules/check.ts'; import '../fabricator/fabricator.ts';"],
    ['geometry/pipeline.ts', "import './exports/package.ts'; import './errors.ts';"],
    ['geometry/brief/x.ts', "import * as z from 'zod';"],
    [
      'geometry/line/x.ts',
      "// process.env\nconst a = 'window'; b.document; const c = { fetch: 1 }; type T = { process: 1 };",
    ],
    ['main/verbs/x.ts', "import { a } from '../../geometry/index.ts'; import fs from 'node:fs'; process.exit();"],
    [
      'renderer/x.tsx',
      "import type { Brief } from '../geometry/index.ts'; import { formatQuantity } from '../geometry/units.ts'; document.title;",
    ],
    [
      'renderer/x.tsx',
      "import { type Brief, type Fault } from '../geometry/index.ts'; import { useState } from 'react';",
    ],
  ])('%s: %s is in order', (file, text) => {
    expect(checkFile(file, text)).toEqual([]);
  });

  it('finds a circle, and names it', () => {
    const graph = new Map([
      ['a.ts', ['b.ts']],
      ['b.ts', ['c.ts', 'd.ts']],
      ['c.ts', []],
      ['d.ts', ['b.ts']],
    ]);
    expect(findCycle(graph)).toEqual(['b.ts', 'd.ts', 'b.ts']);
    expect(findCycle(new Map([...graph, ['d.ts', ['c.ts']]]))).toBeUndefined();
  });
});
