// The command line as others meet it: a process with arguments, streams and an exit code.

import { spawn } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll } from 'vitest';

export const root = fileURLToPath(new URL('../../', import.meta.url));

const folders: string[] = [];
afterAll(() => {
  for (const folder of folders) rmSync(folder, { recursive: true, force: true });
});

export interface Outcome {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

/** @param entry  the launcher, or the build itself where the launcher has already been through */
export function launch(words: readonly string[], input = '', cwd = root, entry = 'dist/cli.js'): Promise<Outcome> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [join(root, entry), ...words], { cwd });
    const [out, err]: [Buffer[], Buffer[]] = [[], []];
    child.stdout.on('data', (chunk: Buffer) => out.push(chunk));
    child.stderr.on('data', (chunk: Buffer) => err.push(chunk));
    child.on('error', reject);
    child.on('close', (code) =>
      resolve({ code, out: Buffer.concat(out).toString('utf8'), err: Buffer.concat(err).toString('utf8') }),
    );
    // A program that does not read its input may have closed it by now.
    child.stdin.on('error', () => {});
    child.stdin.end(input);
  });
}

/** A fresh folder with files in it, gone after the tests of its file. */
export function folderWith(files: Readonly<Record<string, string>>): string {
  const folder = mkdtempSync(join(tmpdir(), 'etchwave-test-'));
  folders.push(folder);
  for (const [name, content] of Object.entries(files)) writeFileSync(join(folder, name), content);
  return folder;
}

export function filesIn(folder: string): readonly string[] {
  return readdirSync(folder).sort();
}

export function fixture(name: string): string {
  return readFileSync(join(root, 'fixtures/briefs', `${name}.brief.json`), 'utf8');
}
