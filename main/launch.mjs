#!/usr/bin/env node
// Starts the command line; where its sources are newer than the build, builds first.

import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { isFresh } from './sources.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
const vite = join(root, 'node_modules', 'vite', 'bin', 'vite.js');
const lock = join(root, 'node_modules', '.etchwave-building');
/** A lock older than this was left behind by a build that was killed. */
const STALE_LOCK_MS = 120_000;

function fail(message) {
  process.stderr.write(`etchwave: ${message}\n`);
  process.exit(3);
}

/** Two starts at once build once: the second waits, and then finds the build fresh. */
function takeLock() {
  try {
    mkdirSync(lock);
    return true;
  } catch (error) {
    if (error.code !== 'EEXIST') return fail(`cannot build itself: ${error.message}`);
  }
  const since = statSync(lock, { throwIfNoEntry: false })?.mtimeMs;
  if (since !== undefined && Date.now() - since > STALE_LOCK_MS) rmSync(lock, { recursive: true, force: true });
  else Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 50);
  return false;
}

function buildWhereStale() {
  while (!isFresh(root)) {
    if (!takeLock()) continue;
    try {
      if (isFresh(root)) return;
      const run = spawnSync(process.execPath, [vite, 'build', '--logLevel', 'warn'], {
        cwd: root,
        stdio: ['ignore', process.stderr, process.stderr],
        env: process.stderr.isTTY ? process.env : { ...process.env, NO_COLOR: '1' },
      });
      if (run.signal !== null) process.exitCode = 130;
      else if (run.status !== 0) process.exitCode = 3;
      // Sources that change while they are built leave a stale stamp: the next start builds again.
      return;
    } finally {
      rmSync(lock, { recursive: true, force: true });
    }
  }
}

if (existsSync(vite)) buildWhereStale();
if (process.exitCode === 3) fail('cannot build itself');
if (process.exitCode === undefined) {
  const entry = { '--bench': 'bench.js', '--report': 'report.js' }[process.argv[2]] ?? 'cli.js';
  const file = join(root, 'dist', entry);
  if (!existsSync(file)) fail('there is no build in dist/, and nothing to build it with: run "npm ci"');
  await import(pathToFileURL(file).href);
}
