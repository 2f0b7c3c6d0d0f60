// Reading and writing files: inputs with a limit, references that stay in their folder, outputs whole or not at all.

import {
  closeSync,
  fstatSync,
  fsyncSync,
  openSync,
  readSync,
  realpathSync,
  renameSync,
  rmSync,
  statSync,
  writeSync,
} from 'node:fs';
import { basename, dirname, join, resolve, sep } from 'node:path';
import { LARGEST_INPUT_BYTES, refuse, shownText } from '../geometry/index.ts';

/** Stands for standard input. */
export const STANDARD_INPUT = '-';

const REASONS: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file or folder',
  EACCES: 'permission is denied',
  EPERM: 'permission is denied',
  EISDIR: 'it is a folder',
  ENOTDIR: 'a part of the path is no folder',
  EROFS: 'the file system is read-only',
  ENOSPC: 'the disk is full',
  ELOOP: 'its links go round in a circle',
  ENAMETOOLONG: 'the name is too long',
};

function reasonOf(error: unknown): string {
  const code = (error as NodeJS.ErrnoException).code ?? '';
  return REASONS[code] ?? (code === '' ? String(error) : code);
}

function refuseLarge(file: string): never {
  refuse({ code: 'file.large', file, problem: 'is larger than 1 MB', allowed: 'allowed is up to 1 MB' });
}

function decode(bytes: Uint8Array, file: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    refuse({ code: 'file.encoding', file, problem: 'is not UTF-8 text', allowed: 'save it as UTF-8' });
  }
}

/** Up to the limit and one byte more, which shows that there is more; a device never ends, so the size is not asked for. */
function readLimited(path: string, file: string): Uint8Array {
  const buffer = Buffer.alloc(LARGEST_INPUT_BYTES + 1);
  let length = 0;
  const descriptor = openSync(path, 'r');
  try {
    if (fstatSync(descriptor).isDirectory()) refuse({ code: 'file.unreadable', file, problem: 'is a folder' });
    while (length < buffer.length) {
      const count = readSync(descriptor, buffer, length, buffer.length - length, null);
      if (count === 0) break;
      length += count;
    }
  } finally {
    closeSync(descriptor);
  }
  if (length > LARGEST_INPUT_BYTES) refuseLarge(file);
  return buffer.subarray(0, length);
}

async function readStandardInput(): Promise<Uint8Array> {
  const chunks: Buffer[] = [];
  let length = 0;
  for await (const chunk of process.stdin) {
    chunks.push(chunk as Buffer);
    length += (chunk as Buffer).length;
    if (length > LARGEST_INPUT_BYTES) refuseLarge(STANDARD_INPUT);
  }
  return Buffer.concat(chunks);
}

/** The text of an input file, or of standard input for "-".
 *  Throws: EngineError "file.unreadable", "file.large", "file.encoding" */
export async function readText(path: string): Promise<string> {
  const file = shownText(path);
  if (path === STANDARD_INPUT) return decode(await readStandardInput(), file);
  return decode(readOrRefuse(path, file), file);
}

function readOrRefuse(path: string, file: string): Uint8Array {
  try {
    return readLimited(path, file);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === undefined) throw error;
    refuse({ code: 'file.unreadable', file, problem: `cannot be read: ${reasonOf(error)}` });
  }
}

/** Reads the files that a brief refers to. Whatever links say, they lie under the brief's own folder (for standard
 *  input: under the current one). */
export function referenceReader(briefPath: string): (reference: string) => string {
  return (reference) => {
    const file = shownText(reference);
    let path: string;
    let folder: string;
    try {
      folder = realpathSync(briefPath === STANDARD_INPUT ? '.' : dirname(resolve(briefPath)));
      path = realpathSync(join(folder, reference));
    } catch (error) {
      refuse({ code: 'file.unreadable', file, problem: `cannot be read: ${reasonOf(error)}` });
    }
    const inside = folder.endsWith(sep) ? folder : folder + sep;
    if (!path.startsWith(inside)) {
      const allowed = 'a file reference stays under the folder of the brief';
      refuse({ code: 'reference.outside', file, problem: 'leads out of the folder of the brief', allowed });
    }
    if (!statSync(path).isFile()) refuse({ code: 'file.unreadable', file, problem: 'is not a file' });
    return decode(readOrRefuse(path, file), file);
  };
}

/** Files begun and not yet renamed. */
const begun = new Set<string>();

/** Removes whatever is half written; for the moment before the program is ended from outside. */
export function abandonWrites(): void {
  for (const path of begun) rmSync(path, { force: true });
  begun.clear();
}

function refuseOutput(path: string, reason: string): never {
  const file = shownText(path);
  refuse({
    code: 'file.unwritable',
    file,
    path: '--out',
    problem: `cannot be written: ${reason}`,
    allowed: 'nothing was written',
  });
}

/** Writes a file whole or not at all: into a new file beside it, then renamed over it.
 *  Throws: EngineError "file.unwritable" */
export function writeWhole(path: string, bytes: Uint8Array): void {
  const scratch = join(dirname(path), `.${basename(path).slice(0, 100)}.${process.pid}.part`);
  try {
    // Renaming over a device, as root, would replace the device.
    const present = statSync(path, { throwIfNoEntry: false });
    if (present !== undefined && !present.isFile()) refuseOutput(path, 'it is there and is not a file');
    const descriptor = openSync(scratch, 'wx');
    begun.add(scratch);
    try {
      for (let at = 0; at < bytes.length; ) at += writeSync(descriptor, bytes, at);
      fsyncSync(descriptor);
    } finally {
      closeSync(descriptor);
    }
    renameSync(scratch, path);
  } catch (error) {
    if (begun.has(scratch)) rmSync(scratch, { force: true });
    if ((error as NodeJS.ErrnoException).code === undefined) throw error;
    refuseOutput(path, reasonOf(error));
  } finally {
    begun.delete(scratch);
  }
}
