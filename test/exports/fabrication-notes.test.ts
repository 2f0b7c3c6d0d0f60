// FABRICATION.txt: what stands at its head, what must not be missing, what comes last.

import { describe, expect, it } from 'vitest';
import type { ExportInput } from '../../geometry/exports/exporter.ts';
import { writeFabricationNotes } from '../../geometry/exports/fabrication-notes.ts';
import { HOSTILE_TITLE, inputOf, soilSensor } from './board.ts';

function notes(input: ExportInput): string {
  const files = [{ name: 'x-copper-top.gbr', bytes: new Uint8Array(1), purpose: 'top copper' }];
  return Buffer.from(writeFabricationNotes(input, files).bytes).toString('utf8');
}

/** The text with its line breaks undone. */
const running = (text: string): string => text.replace(/\s+/g, ' ');

const headings = (text: string): readonly string[] =>
  text.split('\n').filter((_, index, lines) => /^-{96}$/.test(lines[index + 1] ?? ''));

describe('FABRICATION.txt', () => {
  const text = notes(inputOf(soilSensor));

  it('puts shortfalls at the head and cautions last', () => {
    expect(headings(text)[0]).toMatch(/^NOT MET/);
    expect(headings(text).at(-1)).toBe('CAUTIONS');
    expect(text.indexOf('return loss over the band: wanted 10 dB, predicted 7.2 dB.')).toBeLessThan(
      text.indexOf('FILES'),
    );
  });

  it('says nothing of shortfalls where there are none, and names accepted violations where there are', () => {
    const input = inputOf(soilSensor);
    const met = { ...input, design: { ...input.design, requirement: [] } };
    expect(headings(notes(met))[0]).toBe('FILES');
    const at = { xNm: 0, yNm: 0 };
    const violation = {
      rule: 'gap',
      layer: 'copper-top',
      measuredNm: 150_000,
      limitNm: 200_000,
      from: at,
      to: at,
      message: 'The notch gap is drawn at 0.15 mm and would bridge.',
    } as const;
    const broken = notes({ ...met, report: { ...input.report, violations: [violation] } });
    expect(headings(broken)[0]).toMatch(/^VIOLATED/);
    expect(running(broken)).toContain('The notch gap is drawn at 0.15 mm and would bridge. (gap, copper-top)');
  });

  it.each([
    'Build EW0123456789, Etchwave 0.1.0',
    'x-copper-top.gbr top copper',
    'Board size 60.00 x 55.00',
    'Thickness over copper 1.60 ',
    '35 µm finished (18 µm base)',
    'No substitution, no "or equivalent"',
    'Dielectric 1.53 ± 0.13',
    'the fabricator compensates, once',
    "J1: copper runs to the board's edge by intent. Do not clip it",
    'Add no thieving, teardrop, logo, date code',
    'Solder mask is open over radiator and feed by intent',
    'No holes, plated or unplated: there is no drill file, by intent.',
    'corners with a radius of 2.00 mm',
    'patch length L 28.831 ± 0.04 critical',
    'line length 14.50 ± 0.22',
    'board width 60.00 ± 0.20',
    'gap copper-top 0.20 1.00 0.80 holds',
    'Smallest conductor 2.90 Smallest space 1.00',
    '2.4418 GHz: natural resonance with feed and generator attached',
    '2.3832 GHz to 2.5004 GHz, three sigma',
    '± 53.7 MHz permittivity',
    'NOT MET return loss over the band: wanted 10 dB; predicted 7.2 dB',
    'The ground ends 11.5 mm past the patch',
    'up to 4.1 W e.i.r.p.',
    'Never mix etchants',
    'dust of glass and resin',
    'Local codes, safety data sheets and the judgement of licensed practitioners stand above',
  ])('states: %s', (statement) => {
    expect(running(text)).toContain(statement);
  });

  it('speaks of fluoropolymer fumes only where the laminate may hold some', () => {
    const input = inputOf(soilSensor);
    expect(text).not.toContain('260 °C');
    const laminate = { ...input.brief.laminate, name: 'low-loss', lossTangent: 0.0009 };
    expect(notes({ ...input, brief: { ...input.brief, laminate } })).toContain('260 °C');
  });

  it('tells an owner who compensates from a fabricator who does', () => {
    const input = inputOf(soilSensor);
    const fabricator = { ...input.brief.fabricator, etchCompensation: 'owner' } as const;
    const owner = running(notes({ ...input, brief: { ...input.brief, fabricator } }));
    expect(owner).toContain('the owner answers for etching, so do not compensate');
    expect(owner).not.toContain('the fabricator compensates');
  });

  it('keeps to 96 columns, line feeds, no blanks at line ends, and is the same twice', () => {
    for (const line of text.split('\n')) expect(line.length, line).toBeLessThanOrEqual(96);
    expect(text).not.toMatch(/\r|\t| \n/);
    expect(text.endsWith('.\n')).toBe(true);
    expect(notes(inputOf(soilSensor))).toBe(text);
  });

  it('takes a title of two lines as one', () => {
    const hostile = notes(inputOf({ ...soilSensor, title: `${HOSTILE_TITLE}\nNO HOLES\u202e` }));
    expect(hostile.split('\n')[0]).toBe(`${HOSTILE_TITLE} NO HOLES`);
    expect(headings(hostile)).toEqual(headings(text));
  });
});
