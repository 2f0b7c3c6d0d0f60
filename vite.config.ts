// Builds the command line, the bench and the report, into dist/: everything bundled, split so that a verb loads only what it needs.

import { readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig, type Plugin } from 'vite';
import { digestOfSources, stampFile } from './main/sources.mjs';

const root = fileURLToPath(new URL('.', import.meta.url));

/** How long chunks of earlier builds stay: a program that was started from them may still load one. Their names carry a
 *  hash of what they hold, so they are in nobody's way. */
const KEPT_MS = 600_000;

/** Notes what was built, so that the launcher can tell a stale build. The digest is taken before the first file is
 *  read: a change during the build makes it stale. */
function stampBuild(): Plugin {
  let digest = '';
  return {
    name: 'stamp-build',
    apply: 'build',
    buildStart() {
      digest = digestOfSources(root);
    },
    writeBundle(_, bundle) {
      const folder = join(root, 'dist', 'chunks');
      for (const name of readdirSync(folder)) {
        const path = join(folder, name);
        if (!(`chunks/${name}` in bundle) && Date.now() - statSync(path).mtimeMs > KEPT_MS)
          rmSync(path, { force: true });
      }
      writeFileSync(stampFile(root), digest);
    },
  };
}

export default defineConfig({
  build: {
    ssr: true,
    outDir: 'dist',
    emptyOutDir: false,
    target: 'node20',
    sourcemap: false,
    // Everything bundled keeps its notice: Apache-2.0, BSL-1.0 and MIT ask for it.
    license: { fileName: 'licences.md' },
    minify: false,
    rolldownOptions: {
      input: { cli: 'main/cli.ts', bench: 'test/speed/bench.ts', report: 'test/published/report.ts' },
      output: { entryFileNames: '[name].js', chunkFileNames: 'chunks/[name]-[hash].js' },
      // Modules of the engine only declare: what a verb does not use is left out of what it loads.
      treeshake: { moduleSideEffects: (id) => !id.startsWith(`${root}geometry/`) },
    },
  },
  ssr: { noExternal: true },
  plugins: [stampBuild()],
});
