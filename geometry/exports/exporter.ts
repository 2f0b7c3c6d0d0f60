// The one signature of every exporter, and what it is given.

import type { Artwork } from '../artwork/artwork.ts';
import type { Brief } from '../brief/brief.ts';
import type { PatchDesign } from '../patch/design.ts';
import type { RuleReport } from '../rules/violation.ts';

/** A file of the package: a portable name (a–z, 0–9, '-', '.') and its bytes. */
export interface NamedFile {
  readonly name: string;
  readonly bytes: Uint8Array;
  /** What the file is, in a few words, for the list that the fabricator reads. */
  readonly purpose?: string;
}

/** What only a platform can give, handed in as one record. */
export interface Platform {
  /** Lower-case hexadecimal digests. */
  readonly sha256Hex: (bytes: Uint8Array) => string;
  readonly md5Hex: (bytes: Uint8Array) => string;
}

export interface ExportInput {
  readonly brief: Brief;
  readonly design: PatchDesign;
  readonly artwork: Artwork;
  readonly report: RuleReport;
  readonly platform: Platform;
  /** The program's version. */
  readonly version: string;
}

/** Writes one format. Deterministic: the same input gives the same bytes. */
export type Exporter = (input: ExportInput) => readonly NamedFile[] | Promise<readonly NamedFile[]>;

/** Writes a file that speaks of the others: it gets them finished, in their order in the package. */
export type ClosingExporter = (input: ExportInput, files: readonly NamedFile[]) => NamedFile;
