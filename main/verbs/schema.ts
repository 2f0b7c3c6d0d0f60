// schema: the JSON Schema of a brief.

import { briefJsonSchema } from '../../geometry/index.ts';
import { EXIT, printJson } from '../output.ts';

export function schema(): number {
  printJson(briefJsonSchema());
  return EXIT.done;
}
