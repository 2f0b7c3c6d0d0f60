// What the engine asks of its platform, given by Node.

import { createHash } from 'node:crypto';
import type { Platform } from '../geometry/index.ts';

function hex(algorithm: string): (bytes: Uint8Array) => string {
  return (bytes) => createHash(algorithm).update(bytes).digest('hex');
}

export const platform: Platform = { sha256Hex: hex('sha256'), md5Hex: hex('md5') };
