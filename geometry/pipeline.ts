// From a brief to a package, one arrow a line:
// Brief → PatchDesign → Artwork → RuleReport → NamedFile[] → package (.zip).

import type { Artwork } from './artwork/artwork.ts';
import { composeArtwork } from './artwork/compose.ts';
import type { Brief } from './brief/brief.ts';
import { formatBrief } from './brief/format.ts';
import { buildIdOf, canonicalJson } from './exports/build-id.ts';
import type { ExportInput, Platform } from './exports/exporter.ts';
import { buildPackage } from './exports/package.ts';
import type { PatchDesign } from './patch/design.ts';
import { checkRules } from './rules/check.ts';
import type { RuleReport } from './rules/violation.ts';

export { parseBrief } from './brief/parse.ts';
export { predictBare } from './patch/rectangular.ts';
export { sizePatch } from './patch/size.ts';

/** The copper, mask, legend and outline of a design. The build id names brief and version: the same board has the
 *  same name everywhere. */
export function makeArtwork(brief: Brief, design: PatchDesign, platform: Platform, version: string): Artwork {
  const buildId = buildIdOf(canonicalJson(formatBrief(brief)), version, platform);
  return composeArtwork({ brief, design, buildId });
}

/** Every rule of the brief's fabricator against the artwork. */
export function checkArtwork(brief: Brief, artwork: Artwork): RuleReport {
  const { copperBaseM, copperThicknessM, thicknessM } = brief.laminate;
  const boardThicknessM = thicknessM + 2 * copperThicknessM;
  return checkRules({ artwork, fabricator: brief.fabricator, copperBaseM, boardThicknessM });
}

/** The fabrication package as the bytes of a zip. */
export function makePackage(input: ExportInput): Promise<Uint8Array> {
  return buildPackage(input);
}
