// The JSON Schema of a brief, for editors that complete and check JSON while it is written.

import * as z from 'zod';
import { briefSchema } from './schema.ts';

/** JSON Schema (draft 2020-12) of what may be written in a brief file. It knows names and types; units and ranges of
 *  quantities are checked by `parseBrief` alone. */
export function briefJsonSchema(): unknown {
  return { ...z.toJSONSchema(briefSchema, { io: 'input' }), title: 'Etchwave brief' };
}
