// brief.json: the brief with everything resolved, so that it makes the same board where no catalogue is at hand.

import { formatBrief } from '../brief/format.ts';
import { encodeJson } from './design-json.ts';
import type { ExportInput, NamedFile } from './exporter.ts';

/** Writes `brief.json` with laminate and fabricator in full. */
export function exportBrief({ brief }: ExportInput): readonly NamedFile[] {
  return [
    { name: 'brief.json', bytes: encodeJson(formatBrief(brief)), purpose: 'the brief this board answers, complete' },
  ];
}
