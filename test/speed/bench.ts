// Prints how long the main job takes here: `npm run bench`. Nothing is asserted; the figures are for the reader.

import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { checkArtwork, makeArtwork, makePackage, type Platform, parseBrief, sizePatch } from '../../geometry/index.ts';

const digest = (algorithm: string) => (bytes: Uint8Array) => createHash(algorithm).update(bytes).digest('hex');
const platform: Platform = { sha256Hex: digest('sha256'), md5Hex: digest('md5') };
const version = 'bench';
const briefs = ['glass-epoxy-2450', 'ptfe-5800', 'hydrocarbon-2450', 'glass-epoxy-868'];
const root = process.cwd();

function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;
}

async function time(rounds: number, work: () => unknown): Promise<number> {
  await work();
  const spent: number[] = [];
  for (let i = 0; i < rounds; i++) {
    const start = performance.now();
    await work();
    spent.push(performance.now() - start);
  }
  return median(spent);
}

function row(name: string, milliseconds: number, aim: string): void {
  process.stdout.write(`  ${name.padEnd(48)} ${milliseconds.toFixed(1).padStart(8)} ms   ${aim}\n`);
}

for (const name of briefs) {
  const file = `${root}/fixtures/briefs/${name}.brief.json`;
  const text = readFileSync(file, 'utf8');
  const read = () =>
    parseBrief(text, {
      file,
      resolve: (reference) => {
        throw new Error(`the bench reads no ${reference}`);
      },
    });
  process.stdout.write(`${name}\n`);
  row(
    'brief → sized → artwork → checked',
    await time(15, () => {
      const brief = read();
      checkArtwork(brief, makeArtwork(brief, sizePatch(brief), platform, version));
    }),
    '(aim 20)',
  );
  row('brief → sized', await time(15, () => sizePatch(read())), '');
  row(
    'package, in process',
    await time(7, () => {
      const brief = read();
      const design = sizePatch(brief);
      const artwork = makeArtwork(brief, design, platform, version);
      return makePackage({ brief, design, artwork, report: checkArtwork(brief, artwork), platform, version });
    }),
    '(aim 400)',
  );
  row(
    'size, as a process',
    await time(5, () => spawnSync(process.execPath, [`${root}/main/launch.mjs`, 'size', file, '--json'])),
    '(aim 400)',
  );
}
