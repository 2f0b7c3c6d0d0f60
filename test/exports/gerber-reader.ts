// Reads a Gerber file with an independent reader and measures what it shows.

import gerberParser from 'gerber-parser';
import gerberPlotter from 'gerber-plotter';

export interface Arc {
  readonly type: 'arc';
  readonly start: readonly number[];
  readonly end: readonly number[];
  readonly center: readonly number[];
  readonly sweep: number;
  readonly radius: number;
  readonly dir: 'cw' | 'ccw';
}

export type Segment =
  | { readonly type: 'line'; readonly start: readonly number[]; readonly end: readonly number[] }
  | Arc;

export type Plotted =
  | { readonly type: 'fill'; readonly path: readonly Segment[] }
  | { readonly type: 'stroke'; readonly path: readonly Segment[]; readonly width: number }
  | { readonly type: 'polarity'; readonly polarity: 'dark' | 'clear' }
  | { readonly type: 'size'; readonly box: readonly number[]; readonly units: string }
  | { readonly type: 'shape' | 'pad' | 'repeat' };

export interface Reading {
  readonly objects: readonly Plotted[];
  readonly warnings: readonly string[];
}

/** Everything the reader plots and all that it complains about. Rejects when it cannot read the file. */
export function readGerber(bytes: Uint8Array): Promise<Reading> {
  return new Promise((resolve, reject) => {
    const objects: Plotted[] = [];
    const warnings: string[] = [];
    const parser = gerberParser({});
    const plotter = gerberPlotter({});
    for (const stage of [parser, plotter]) {
      stage.on('warning', (warning: { message: string }) => warnings.push(warning.message));
      stage.on('error', reject);
    }
    plotter.on('data', (object: Plotted) => objects.push(object));
    plotter.on('end', () => resolve({ objects, warnings }));
    parser.pipe(plotter);
    parser.write(Buffer.from(bytes).toString('latin1'));
    parser.end();
  });
}

/** Warnings that are about something else than the X2 attributes, which this reader does not know. */
export function realWarnings({ warnings }: Reading): readonly string[] {
  return warnings.filter((message) => !/^block "%T[FAD][^%*]*" was not recognized and was ignored$/.test(message));
}

/** Green's theorem over one closed path: ½∮(x dy − y dx) [mm²], for arcs in closed form. */
export function signedArea(path: readonly Segment[]): number {
  return path.reduce((sum, segment) => {
    const [x0, y0] = segment.start as [number, number];
    const [x1, y1] = segment.end as [number, number];
    if (segment.type === 'line') return sum + (x0 * y1 - x1 * y0) / 2;
    const [cx, cy] = segment.center as [number, number];
    const sweep = segment.dir === 'ccw' ? segment.sweep : -segment.sweep;
    return sum + (segment.radius ** 2 * sweep + cx * (y1 - y0) - cy * (x1 - x0)) / 2;
  }, 0);
}

/** Net area of the fills [mm²]: dark ones count, clear ones take away. Right for clear contours within dark ones; that
 *  they also come in the right order is what `isDark` can see. */
export function netArea({ objects }: Reading): number {
  let sign = 1;
  let area = 0;
  for (const object of objects) {
    if (object.type === 'polarity') sign = object.polarity === 'dark' ? 1 : -1;
    if (object.type === 'fill') area += sign * Math.abs(signedArea(object.path));
  }
  return area;
}

/** Whether the image is dark at a point [mm]: as a plotter paints, the last fill that covers it decides. */
export function isDark({ objects }: Reading, x: number, y: number): boolean {
  let dark = true;
  let result = false;
  for (const object of objects) {
    if (object.type === 'polarity') dark = object.polarity === 'dark';
    if (object.type === 'fill' && covers(object.path, x, y)) result = dark;
  }
  return result;
}

/** Even-odd test against the path with each arc cut into short chords. */
function covers(path: readonly Segment[], x: number, y: number): boolean {
  let inside = false;
  for (const [[x0, y0], [x1, y1]] of path.flatMap(chords)) {
    if (y0 > y !== y1 > y && x < x0 + ((y - y0) / (y1 - y0)) * (x1 - x0)) inside = !inside;
  }
  return inside;
}

type Point = readonly [number, number];

function chords(segment: Segment): readonly (readonly [Point, Point])[] {
  const start: Point = [segment.start[0]!, segment.start[1]!];
  const end: Point = [segment.end[0]!, segment.end[1]!];
  if (segment.type === 'line') return [[start, end]];
  const count = 64;
  const sweep = segment.dir === 'ccw' ? segment.sweep : -segment.sweep;
  const [cx, cy] = segment.center as [number, number];
  const first = Math.atan2(start[1] - cy, start[0] - cx);
  const points = Array.from({ length: count + 1 }, (_, index): Point => {
    if (index === 0) return start;
    if (index === count) return end;
    const angle = first + (sweep * index) / count;
    return [cx + segment.radius * Math.cos(angle), cy + segment.radius * Math.sin(angle)];
  });
  return points.slice(1).map((point, index) => [points[index]!, point] as const);
}
