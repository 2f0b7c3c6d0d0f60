// What the build in dist/ was made from, as one digest of names, sizes and times of change.

import { createHash } from 'node:crypto';
import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';

const FOLDERS = ['geometry', 'main', 'test/speed', 'test/published'];
const FILES = ['package.json', 'package-lock.json', 'vite.config.ts'];
/** Within dist/, written last. */
const STAMP = 'sources.txt';

function* filesUnder(folder) {
  for (const entry of readdirSync(folder, { withFileTypes: true })) {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) yield* filesUnder(path);
    else yield path;
  }
}

/** The digest of the sources as they are now. */
export function digestOfSources(root) {
  const hash = createHash('sha256');
  const add = (path) => {
    const { size, mtimeMs } = statSync(path);
    hash.update(`${path}\n${size} ${mtimeMs}\n`);
  };
  for (const folder of FOLDERS) for (const path of [...filesUnder(join(root, folder))].sort()) add(path);
  for (const file of FILES) add(join(root, file));
  return hash.digest('hex');
}

/** Where the digest of the build's sources is kept. */
export function stampFile(root) {
  return join(root, 'dist', STAMP);
}

/** Whether dist/ was built from the sources as they are now; a tree without sources has nothing to be stale against. */
export function isFresh(root) {
  try {
    return readFileSync(stampFile(root), 'utf8') === digestOfSources(root);
  } catch {
    return false;
  }
}
