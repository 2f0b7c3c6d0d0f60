// The fabrication package: every exporter once, the documents that speak of the others, one zip.

import { invariant } from '../errors.ts';
import { exportBrief } from './brief-json.ts';
import { exportDesign } from './design-json.ts';
import { exportDrawing } from './drawing.ts';
import { exportDrill } from './drill.ts';
import { exportDxf } from './dxf.ts';
import type { ClosingExporter, Exporter, ExportInput, NamedFile } from './exporter.ts';
import { writeFabricationNotes } from './fabrication-notes.ts';
import { exportGerber } from './gerber.ts';
import { writeJob } from './job.ts';
import { writeManifest } from './manifest.ts';
import { readBack } from './read-back/read-back.ts';
import { exportTouchstone } from './touchstone.ts';

/** Every file format of the package. A new one is a line here. */
const EXPORTERS: readonly Exporter[] = [
  exportGerber,
  exportDrill,
  exportDxf,
  exportDrawing,
  exportTouchstone,
  exportDesign,
  exportBrief,
];

/** What lists the files before it; the manifest is last, for it vouches for all others. */
const CLOSING: readonly ClosingExporter[] = [writeJob, writeFabricationNotes, writeManifest];

/** Names that unpack on every system as they are. */
const PORTABLE_NAME = /^[A-Za-z0-9][A-Za-z0-9.-]*$/;

/** Every file of the package, by name in the order of code units; the manifest vouches for all the others.
 *  Throws (a fault of the program) when two files share a name, a name is not portable, or what was written does not
 *  read back as the artwork. */
export async function packageFiles(input: ExportInput): Promise<readonly NamedFile[]> {
  const files: NamedFile[] = [];
  for (const write of EXPORTERS) files.push(...(await write(input)));
  for (const write of CLOSING) files.push(write(input, [...files].sort(byName)));
  const names = new Set(files.map((file) => file.name.toLowerCase()));
  invariant(names.size === files.length, 'every file of the package has its own name');
  for (const { name, bytes } of files) {
    invariant(PORTABLE_NAME.test(name), `${name} is no portable file name`);
    invariant(bytes.length > 0, `${name} is not empty`);
  }
  const faults = readBack(files, input.artwork, input.platform);
  invariant(faults.length === 0, `the package does not read back as the artwork: ${faults.join('; ')}`);
  return files.sort(byName);
}

/** The package as the bytes of a zip: the same for the same input, on every machine and at every time. */
export async function buildPackage(input: ExportInput): Promise<Uint8Array> {
  const files = await packageFiles(input);
  // Loaded here, so that what builds no package does not pay for it.
  const { default: Zip } = await import('jszip');
  const zip = new Zip();
  // The format's own epoch instead of a clock, no folder entries (they would carry one), one platform for all.
  const date = new Date(Date.UTC(1980, 0, 1));
  for (const { name, bytes } of files) zip.file(name, bytes, { date, createFolders: false, binary: true });
  const bytes = await zip.generateAsync({
    type: 'uint8array',
    compression: 'DEFLATE',
    compressionOptions: { level: 9 },
    platform: 'DOS',
  });
  return new Uint8Array(bytes);
}

function byName(a: NamedFile, b: NamedFile): number {
  return a.name < b.name ? -1 : 1;
}
