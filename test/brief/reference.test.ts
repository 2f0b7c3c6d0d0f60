// Laminates and fabricators in files of their own.

import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { ParseContext } from '../../geometry/brief/parse.ts';
import { example, faults, read } from './reading.ts';

const fixture = (path: string): string => readFileSync(new URL(`../../fixtures/${path}`, import.meta.url), 'utf8');

function files(content: Readonly<Record<string, string>>): ParseContext {
  return { file: 'field.brief.json', resolve: (reference) => content[reference]! };
}

describe('file references', () => {
  it('reads a laminate and a fabricator from files, noting what they leave out', () => {
    const context = files({
      'stock/barn-find.json': fixture('laminates/barn-find.json'),
      'corner-shop.json': fixture('fabricators/corner-shop.json'),
    });
    const brief = read({ ...example, laminate: 'stock/barn-find.json', fabricator: 'corner-shop.json' }, context);
    expect(brief.laminate.thicknessM).toBe(1.51e-3);
    expect(brief.laminate.copperBaseM).toBe(35e-6);
    expect(brief.fabricator.copperRows[1]).toEqual({
      baseM: 35e-6,
      traceM: 0.2032e-3,
      spaceM: 0.2032e-3,
      ringM: 0.2e-3,
    });
    expect(brief.fabricator.plated).toBeNull();
    expect(brief.fabricator.mask).toEqual({ expansionM: 0.1e-3, webM: 0.15e-3 });
    expect(brief.defaults.map(({ path }) => path)).toContain('fabricator.mask');
  });

  it.each([
    '../up.json',
    'a/../../up.json',
    '/etc/shadow.json',
    'C:\\x.json',
    'a\\b.json',
    '~/x.json',
    'http://x/y.json',
  ])('refuses %s without asking for it', (reference) => {
    const asked: string[] = [];
    const context: ParseContext = {
      file: 'b.json',
      resolve: (name) => {
        asked.push(name);
        return '{}';
      },
    };
    expect(faults({ ...example, laminate: reference }, context)[0]).toContain('leaves the folder of the brief');
    expect(asked).toEqual([]);
  });

  it.each([
    'hunter2 : not json at all',
    '{"hunter2": "hunter2"}',
    '{"permittivity": "hunter2", "lossTangent": 0.02, "thickness": "hunter2 mm"}',
    '{"permittivity": 4, "lossTangent": 0.02, "thickness": "hunter2"}',
    '{"permittivity": 4, "lossTangent": 0.02, "thickness": "1 mm", "name": "hunter2\\n"}',
    '{"permittivity": 4, "lossTangent": 0.02, "thickness": "1 mm", "hunter2": {"hunter2": 1}}',
    '["hunter2"]',
    '"hunter2"',
  ])('never shows the content of a referenced file: %s', (content) => {
    const found = faults({ ...example, laminate: 'x.json' }, files({ 'x.json': content }));
    expect(found.length).toBeGreaterThan(0);
    for (const line of found) {
      expect(line).not.toContain('hunter2');
      expect(line.startsWith('x.json: ')).toBe(true);
    }
  });

  it('limits a referenced file to 1 MB too, and names a missing one', () => {
    const large = files({ 'x.json': ' '.repeat(1_000_001) });
    expect(faults({ ...example, laminate: 'x.json' }, large)).toEqual([
      'x.json: is larger than 1 MB; allowed is up to 1 MB',
    ]);
    expect(faults({ ...example, laminate: 'x.json' })).toEqual(['x.json: cannot be read']);
  });
});
