// A plain edge feed through a quarter-wave transformer: patch length and transformer width together.

import type { Brief, PinnedQuarterWave } from '../brief/brief.ts';
import { type Notice, refuse } from '../errors.ts';
import { copperRow } from '../fabricator/fabricator.ts';
import { lineWidthM } from '../line/synthesis.ts';
import { complex } from '../numeric/complex.ts';
import { findMinimum } from '../numeric/search.ts';
import { SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import type { QuarterWaveFeed } from './design.ts';
import { bandCentreHz, bareModeOf, defaultLineWidthM, defaultWidthM, frontEdgeFor, patchOn, rounded } from './frame.ts';
import { feedLine } from './inset-feed.ts';
import { frontEdgeImpedance, type InsetCrossSection, insetCrossSection } from './inset-network.ts';
import { bestMatch, type ImpedanceOf, reflection, throughLine } from './match.ts';
import { qualitySplit } from './quality.ts';
import { lengthForBestMatch, solveMatch } from './solve-match.ts';

/** Narrowest and widest transformer that is searched, over the board's height and the patch's width. */
const NARROWEST_OVER_HEIGHT = 0.02;
const WIDEST_OVER_PATCH = 0.4;

/** Impedances of a patch behind its transformer.
 *  edge: at the patch's front edge, with the transformer's width as the line that meets it; behind: at the
 *  transformer's other end; connector: at the board's edge. The step from line to transformer is taken as ideal: its parasitics are some ten micrometres of line. */
export function quarterWaveImpedances(
  brief: Brief,
  lengthM: number,
  widthM: number,
  feed: QuarterWaveFeed,
  section: InsetCrossSection,
): {
  readonly edge: ImpedanceOf;
  readonly behind: ImpedanceOf;
  readonly connector: ImpedanceOf;
  readonly lineLossNp: number;
} {
  const patch = patchOn(brief, lengthM, widthM);
  const edge = frontEdgeImpedance(
    patch,
    bareModeOf(brief, patch),
    { lineWidthM: feed.transformerWidthM, lineWidthInNotchM: feed.transformerWidthM, notchGapM: 0, insetDepthM: 0 },
    section,
  );
  const centreHz = bandCentreHz(brief);
  const stretch = (lineWidth: number, lineLengthM: number) => {
    const line = feedLine(brief.laminate, lineWidth, centreHz);
    return {
      impedanceOhm: line.impedanceOhm,
      delayS: (lineLengthM * Math.sqrt(line.effectivePermittivity)) / SPEED_OF_LIGHT_M_PER_S,
      lossNp: line.lossNpPerM * lineLengthM,
    };
  };
  const transformer = stretch(feed.transformerWidthM, feed.transformerLengthM);
  const line = stretch(feed.lineWidthM, feed.lineLengthM);
  const behind: ImpedanceOf = (f) => throughLine(edge(f), transformer, f);
  return {
    edge,
    behind,
    connector: (f) => throughLine(behind(f), line, f),
    lineLossNp: transformer.lossNp + line.lossNp,
  };
}

/** A quarter of the guided wavelength on a line [m]. */
export function quarterWaveM(brief: Brief, lineWidth: number): number {
  const { effectivePermittivity } = feedLine(brief.laminate, lineWidth, bandCentreHz(brief));
  return SPEED_OF_LIGHT_M_PER_S / (4 * bandCentreHz(brief) * Math.sqrt(effectivePermittivity));
}

function millimetres(lengthM: number): string {
  return `${(lengthM * 1e3).toFixed(3)} mm`;
}

/** Sizes patch length and transformer around what is pinned.
 *  Throws: EngineError "feed.width", "match.reference". */
export function sizeQuarterWave(brief: Brief, pinned: PinnedQuarterWave, notices: Notice[]) {
  const centreHz = bandCentreHz(brief);
  const { laminate, match, fabricator } = brief;
  const widthM = brief.radiator.pinned.widthM ?? defaultWidthM(brief, centreHz);
  const line = pinned.lineWidthM ?? defaultLineWidthM(brief, centreHz, notices);
  const section = insetCrossSection(patchOn(brief, widthM, widthM), null);
  const feedWith = (lengthM: number, transformerWidthM: number): QuarterWaveFeed => {
    const transformerLengthM = pinned.transformerLengthM ?? rounded(quarterWaveM(brief, transformerWidthM));
    const front = frontEdgeFor(brief, lengthM, undefined);
    return {
      kind: 'quarter-wave',
      lineWidthM: line,
      // The margin is what the line has left of it; a short stretch of line stays in any case.
      lineLengthM: pinned.lineLengthM ?? rounded(Math.max(front - transformerLengthM, 3 * laminate.thicknessM)),
      transformerWidthM,
      transformerLengthM,
    };
  };
  const impedances = (lengthM: number, transformer: number) =>
    quarterWaveImpedances(brief, lengthM, widthM, feedWith(lengthM, transformer), section);
  const bestOf = (lengthM: number, transformer: number) =>
    bestMatch(
      impedances(lengthM, transformer).connector,
      match.referenceOhm,
      bareModeOf(brief, patchOn(brief, lengthM, widthM)).resonanceHz,
    );
  const narrowest = NARROWEST_OVER_HEIGHT * laminate.thicknessM;
  const widest = WIDEST_OVER_PATCH * widthM;
  const halfWave = (0.47 * SPEED_OF_LIGHT_M_PER_S) / (centreHz * Math.sqrt(laminate.permittivity));
  const guessLength = brief.radiator.pinned.lengthM ?? halfWave;
  const edge = qualitySplit(patchOn(brief, guessLength, widthM), laminate.lossTangent, laminate, centreHz);
  const guessOhm = Math.sqrt(match.referenceOhm * edge.edgeResistanceOhm);
  const slab = {
    heightM: laminate.thicknessM,
    permittivity: laminate.permittivity,
    thicknessM: laminate.copperThicknessM,
  };
  const guessWidth = Math.min(widest, Math.max(narrowest, lineWidthM(guessOhm, slab, centreHz) ?? narrowest));
  const pinnedWidth = pinned.transformerWidthM;
  let lengthM = brief.radiator.pinned.lengthM;
  let transformer = pinnedWidth ?? guessWidth;
  const lengthAt = (width: number, from: number): number =>
    lengthForBestMatch((l) => bestOf(l, width).bestMatchHz, centreHz, from);
  if (lengthM === undefined) {
    const start = lengthAt(transformer, halfWave);
    const solved =
      pinnedWidth === undefined
        ? solveMatch(
            (l, w) => reflection(impedances(l, w).connector(complex(centreHz)), match.referenceOhm),
            { first: start, second: transformer },
            // The transformer's length follows its width in whole micrometres: slopes need a longer step.
            start * 1e-3,
            { first: 0.02 * start, second: 0.3 * transformer },
            ({ first, second }) => second > narrowest && second < widest && Math.abs(first / start - 1) < 0.2,
          )
        : null;
    if (solved !== null) transformer = rounded(solved.second);
    lengthM = rounded(lengthAt(transformer, start));
  } else if (pinnedWidth === undefined) {
    const fixed = lengthM;
    const logWidth = findMinimum(
      (x) => bestOf(fixed, Math.exp(x)).bestReflection,
      Math.log(narrowest),
      Math.log(widest),
      1e-5,
    );
    transformer = rounded(Math.exp(logWidth));
  }
  if (Math.max(line, transformer) >= widthM) {
    refuse({
      code: 'feed.width',
      path: 'feed.pinned.transformerWidth',
      value: millimetres(Math.max(line, transformer)),
      problem: `the line is ${millimetres(Math.max(line, transformer))} wide, the patch ${millimetres(widthM)}`,
      allowed: 'the line must be narrower than the patch',
    });
  }
  const limit = copperRow(fabricator, laminate.copperBaseM)?.traceM ?? 0;
  if (transformer < limit) {
    notices.push({
      code: 'feed.thinTransformer',
      message: `The transformer would be ${millimetres(transformer)} wide; ${fabricator.name} etches no trace below ${millimetres(limit)} in this copper. An inset feed, a thicker board, a wider patch or lighter copper would do.`,
    });
  }
  return { lengthM, widthM, feed: feedWith(lengthM, transformer), section };
}
