// The build id and what hangs on it.

import { describe, expect, it } from 'vitest';
import { buildIdOf, canonicalJson, guidOf } from '../../geometry/exports/build-id.ts';
import { platform } from './board.ts';

describe('canonicalJson', () => {
  it('writes one text for one value, whatever the order of its keys', () => {
    expect(canonicalJson({ b: 1, a: { d: [1, 'x', null, true], c: 0.1 } })).toBe(
      '{"a":{"c":0.1,"d":[1,"x",null,true]},"b":1}',
    );
    expect(canonicalJson({ a: 1, b: undefined })).toBe('{"a":1}');
  });

  it('sorts by code unit, not by a locale', () => {
    expect(canonicalJson({ ä: 1, z: 2, Z: 3, _: 4 })).toBe('{"Z":3,"_":4,"z":2,"ä":1}');
  });

  it('refuses what JSON would silently turn into null', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, undefined, () => 1]) {
      expect(() => canonicalJson({ value: [value] })).toThrow(TypeError);
    }
  });
});

describe('buildIdOf', () => {
  it('is a prefix and ten hexadecimal digits of the SHA-256 over version and text', () => {
    // printf '0.1.0\n{}' | sha256sum
    expect(buildIdOf('{}', '0.1.0', platform)).toBe('EW36B01A4AAF');
  });

  it('changes with the text and with the version', () => {
    const id = buildIdOf('{"a":1}', '0.1.0', platform);
    expect(buildIdOf('{"a":2}', '0.1.0', platform)).not.toBe(id);
    expect(buildIdOf('{"a":1}', '0.1.1', platform)).not.toBe(id);
  });
});

describe('guidOf', () => {
  it('has the shape of RFC 4122 version 4, and is the same for the same build and purpose only', () => {
    const seen = new Set<string>();
    for (let index = 0; index < 64; index++) {
      const guid = guidOf(`EW${index}`, 'project', platform);
      expect(guid).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
      seen.add(guid);
    }
    expect(seen.size).toBe(64);
    expect(guidOf('EW1', 'project', platform)).toBe(guidOf('EW1', 'project', platform));
    expect(guidOf('EW1', 'coordinates', platform)).not.toBe(guidOf('EW1', 'project', platform));
  });
});
