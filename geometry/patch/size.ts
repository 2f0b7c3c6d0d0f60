// From a brief to a sized antenna: the best match with its feed sits at band centre.

import type { Brief } from '../brief/brief.ts';
import { invariant, type Notice } from '../errors.ts';
import { demandRoom } from './board-room.ts';
import { type BoardSize, type Feed, frontEdgeM, type PatchDesign, type RectangularRadiator } from './design.ts';
import { bandCentreHz, marginOf, rounded } from './frame.ts';
import type { InsetCrossSection } from './inset-network.ts';
import { predictFed } from './predict-fed.ts';
import { sizeInset } from './size-inset.ts';
import { sizeProbe } from './size-probe.ts';
import { sizeQuarterWave } from './size-quarter-wave.ts';

interface Sized {
  readonly lengthM: number;
  readonly widthM: number;
  readonly feed: Feed;
  readonly section?: InsetCrossSection;
}

function sizeFeed(brief: Brief, notices: Notice[]): Sized {
  const { feed } = brief;
  switch (feed.kind) {
    case 'inset':
      return sizeInset(brief, feed.pinned, notices);
    case 'quarter-wave':
      return sizeQuarterWave(brief, feed.pinned, notices);
    case 'probe':
      return sizeProbe(brief, feed.pinned, feed.plated, notices);
  }
}

function sizeBoard(brief: Brief, radiator: RectangularRadiator, feed: Feed): BoardSize {
  const wish = brief.board;
  const margin = marginOf(brief, bandCentreHz(brief));
  return {
    widthM: wish.widthM ?? rounded(radiator.widthM + 2 * margin),
    lengthM: wish.lengthM ?? rounded(frontEdgeM(feed) + radiator.lengthM + margin),
    cornerRadiusM: wish.cornerRadiusM,
  };
}

/** Sizes the antenna around what the brief pins, and predicts what the rounded copper does.
 *  Throws: EngineError naming the field where the wishes exclude one another. */
export function sizePatch(brief: Brief): PatchDesign {
  const notices: Notice[] = [];
  const { lengthM, widthM, feed, section } = sizeFeed(brief, notices);
  invariant(lengthM > 0 && widthM > 0, 'sizePatch: a length and a width');
  const radiator: RectangularRadiator = { family: 'rectangular', lengthM, widthM };
  const board = sizeBoard(brief, radiator, feed);
  demandRoom(radiator, frontEdgeM(feed), board, brief.fabricator.copperToEdgeM);
  const predicted = predictFed(brief, radiator, feed, board, section ?? null);
  return {
    kind: 'patch-design',
    radiator,
    feed,
    board,
    prediction: predicted.prediction,
    requirement: predicted.requirement,
    notices: [...notices, ...predicted.notices],
  };
}
