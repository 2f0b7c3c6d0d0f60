// The engine's public surface: what main/ and renderer/ may use.

export type { Artwork } from './artwork/artwork.ts';
export type { Brief } from './brief/brief.ts';
export { listBriefFields } from './brief/field-list.ts';
export { formatBrief, formatFabricator, formatLaminate } from './brief/format.ts';
export { LARGEST_INPUT_BYTES } from './brief/json-text.ts';
export { nearest } from './brief/nearest.ts';
export type { ParseContext } from './brief/parse.ts';
export { briefJsonSchema } from './brief/schema-json.ts';
export { shownText } from './brief/text.ts';
export { EngineError, type Fault, formatFault, type Notice, refuse } from './errors.ts';
export { designRecord } from './exports/design-json.ts';
export type { ExportInput, Platform } from './exports/exporter.ts';
export { type FabricatorEntry, findFabricator, listFabricators } from './fabricator/catalogue.ts';
export type { Fabricator } from './fabricator/fabricator.ts';
export { findLaminate, type LaminateEntry, listLaminates } from './laminate/catalogue.ts';
export type { Laminate } from './laminate/laminate.ts';
export type { Feed, PatchDesign, Prediction, Requirement, ResonanceKind } from './patch/design.ts';
export type { BarePatchInput, BarePatchResult } from './patch/rectangular.ts';
export { checkArtwork, makeArtwork, makePackage, parseBrief, predictBare, sizePatch } from './pipeline.ts';
export type { RuleReport, RuleResult, Violation } from './rules/violation.ts';
export {
  allowedUnits,
  formatFrequency,
  formatLengthMm,
  formatQuantity,
  NM_PER_M,
  parseNumber,
  parseQuantity,
  type UnitDimension,
} from './units.ts';
