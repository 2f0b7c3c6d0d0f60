// manifest.json: every other file with its size and SHA-256, and the numbers an order form asks for.

import { encodeJson } from './design-json.ts';
import type { ExportInput, NamedFile } from './exporter.ts';

/** Writes the manifest over files that are otherwise complete. */
export function writeManifest(input: ExportInput, files: readonly NamedFile[]): NamedFile {
  const { artwork, report, platform } = input;
  const record = {
    format: 'etchwave-manifest/1',
    title: artwork.title,
    buildId: artwork.buildId,
    version: input.version,
    fabricator: report.fabricator,
    board: {
      widthNm: artwork.board.widthNm,
      lengthNm: artwork.board.lengthNm,
      copperLayers: 2,
      solderMask: artwork.hasSolderMask,
      legend: artwork.legendTop.length > 0,
      platedHoles: artwork.holes.filter((hole) => hole.plated).length,
      unplatedHoles: artwork.holes.filter((hole) => !hole.plated).length,
    },
    rules: report.rules.map(({ rule, layer, limitNm, smallestNm, holds }) => ({
      rule,
      layer,
      limitNm,
      smallestNm,
      holds,
    })),
    violations: report.violations.length,
    files: files.map((file) => ({
      name: file.name,
      purpose: file.purpose ?? '',
      sizeBytes: file.bytes.length,
      sha256: platform.sha256Hex(file.bytes),
    })),
  };
  return { name: 'manifest.json', bytes: encodeJson(record) };
}
