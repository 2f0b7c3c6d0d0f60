// The package read back by means that are not jszip's: the ZIP structures of APPNOTE 6.3 (sections 4.3.7, 4.3.12, 4.3.16,
// 4.4.6; offsets from memory) walked by hand, contents inflated and summed by Node's zlib, digests by Node's crypto.

import { createHash } from 'node:crypto';
import { crc32, inflateRawSync } from 'node:zlib';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import { buildPackage } from '../../geometry/exports/package.ts';
import { HOSTILE_TITLE, inputOf, soilSensor } from '../exports/board.ts';

interface Entry {
  readonly name: string;
  readonly flags: number;
  readonly time: number;
  readonly date: number;
  readonly madeBy: number;
  readonly content: Buffer;
  readonly crc: number;
}

function readZip(bytes: Uint8Array): readonly Entry[] {
  const zip = Buffer.from(bytes);
  const end = zip.length - 22;
  expect(zip.readUInt32LE(end), 'end of central directory, without a comment').toBe(0x06054b50);
  const count = zip.readUInt16LE(end + 10);
  const entries: Entry[] = [];
  let at = zip.readUInt32LE(end + 16);
  for (let index = 0; index < count; index++) {
    expect(zip.readUInt32LE(at)).toBe(0x02014b50);
    const [nameLength, extraLength, commentLength] = [28, 30, 32].map((offset) => zip.readUInt16LE(at + offset));
    const local = zip.readUInt32LE(at + 42);
    expect(zip.readUInt32LE(local)).toBe(0x04034b50);
    const start = local + 30 + zip.readUInt16LE(local + 26) + zip.readUInt16LE(local + 28);
    const packed = zip.subarray(start, start + zip.readUInt32LE(at + 20));
    const method = zip.readUInt16LE(at + 10);
    const content = method === 8 ? inflateRawSync(packed) : packed;
    expect(content.length).toBe(zip.readUInt32LE(at + 24));
    entries.push({
      name: zip.toString('utf8', at + 46, at + 46 + nameLength!),
      madeBy: zip.readUInt16LE(at + 4) >> 8,
      flags: zip.readUInt16LE(at + 8),
      time: zip.readUInt16LE(at + 12),
      date: zip.readUInt16LE(at + 14),
      crc: zip.readUInt32LE(at + 16),
      content,
    });
    at += 46 + nameLength! + extraLength! + commentLength!;
  }
  return entries;
}

describe('a package', () => {
  let bytes: Uint8Array;
  let entries: readonly Entry[];
  beforeAll(async () => {
    bytes = await buildPackage(inputOf(soilSensor));
    entries = readZip(bytes);
  });

  it('holds the promised files in the order of their names, and no folders', () => {
    const { slug } = soilSensor;
    const promised = [
      'FABRICATION.txt',
      'brief.json',
      'design.json',
      'manifest.json',
      `${slug}-board.dxf`,
      `${slug}-copper-bottom.gbr`,
      `${slug}-copper-top.gbr`,
      `${slug}-drawing.svg`,
      `${slug}-legend-top.gbr`,
      `${slug}-mask-bottom.gbr`,
      `${slug}-mask-top.gbr`,
      `${slug}-prediction.s1p`,
      `${slug}-profile.gbr`,
      `${slug}.gbrjob`,
    ];
    expect(entries.map(({ name }) => name)).toEqual(promised);
  });

  it('is sound: every checksum holds, every file has content', () => {
    for (const { name, crc, content } of entries) {
      expect(content.length, name).toBeGreaterThan(0);
      expect(crc32(content), name).toBe(crc);
    }
  });

  it('knows no clock and no platform: 1980-01-01 00:00 everywhere', () => {
    for (const { time, date, madeBy } of entries) expect([time, date, madeBy]).toEqual([0, (1 << 5) | 1, 0]);
  });

  it('has a manifest that vouches for every other file', () => {
    const manifest = JSON.parse(entries.find(({ name }) => name === 'manifest.json')!.content.toString('utf8'));
    const others = entries.filter(({ name }) => name !== 'manifest.json');
    expect(manifest.files.map(({ name }: { name: string }) => name)).toEqual(others.map(({ name }) => name));
    others.forEach(({ content }, index) => {
      expect(manifest.files[index].sizeBytes).toBe(content.length);
      expect(manifest.files[index].sha256).toBe(createHash('sha256').update(content).digest('hex'));
      expect(manifest.files[index].purpose).not.toBe('');
    });
  });

  it('is the same bytes again, and in another year', async () => {
    expect(Buffer.compare(Buffer.from(await buildPackage(inputOf(soilSensor))), Buffer.from(bytes))).toBe(0);
    vi.useFakeTimers({ toFake: ['Date'], now: new Date(Date.UTC(2041, 6, 2, 3, 4, 6)) });
    try {
      expect(Buffer.compare(Buffer.from(await buildPackage(inputOf(soilSensor))), Buffer.from(bytes))).toBe(0);
    } finally {
      vi.useRealTimers();
    }
  });

  it('takes a hostile title through every file', async () => {
    const hostile = readZip(await buildPackage(inputOf({ ...soilSensor, title: HOSTILE_TITLE })));
    expect(hostile.map(({ name }) => name)).toEqual(entries.map(({ name }) => name));
    const textOf = (end: string): string => hostile.find(({ name }) => name.endsWith(end))!.content.toString('utf8');
    expect(textOf('FABRICATION.txt').split('\n')[0]).toBe(HOSTILE_TITLE);
    expect(JSON.parse(textOf('design.json')).title).toBe(HOSTILE_TITLE);
    expect(JSON.parse(textOf('manifest.json')).title).toBe(HOSTILE_TITLE);
    expect(JSON.parse(textOf('brief.json')).title).toBe(HOSTILE_TITLE);
  });
});
