// The geometric truths of a whole board, run on every artwork that is built or exported.

import { flatten } from '../shape/flatten.ts';
import { locate } from '../shape/measure.ts';
import { type GeometryFault, validateContour, validateShape, validateWithin } from '../shape/validate.ts';
import type { Artwork } from './artwork.ts';

/** Every fault of an artwork: closed, simple, oriented contours, no edge under 1 µm, all within the profile. Empty for
 *  a sound board. */
export function validateArtwork(artwork: Artwork): readonly GeometryFault[] {
  const { outline } = artwork.board;
  const shapes = {
    copperTop: artwork.copperTop,
    copperBottom: artwork.copperBottom,
    maskTop: artwork.maskTop,
    maskBottom: artwork.maskBottom,
  };
  const faults = [...validateContour(outline, true, 'board.outline')];
  for (const [name, shape] of Object.entries(shapes)) {
    const found = validateShape(shape, name);
    faults.push(...found);
    if (found.length === 0) faults.push(...validateWithin(shape, outline, name));
  }
  const border = flatten(outline, 100);
  artwork.legendTop.forEach((stroke, i) => {
    for (const p of stroke.points) {
      if (!Number.isSafeInteger(p.xNm) || !Number.isSafeInteger(p.yNm)) {
        faults.push({ code: 'notWhole', where: `legendTop[${i}]`, at: p });
      } else if (locate(p, border) !== 'inside')
        faults.push({ code: 'outsideProfile', where: `legendTop[${i}]`, at: p });
    }
  });
  return faults;
}
