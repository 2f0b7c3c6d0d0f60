// Where each feed's law was verified, how wrong it may be, and what a practitioner should hear of the feed.

import type { Brief } from '../brief/brief.ts';
import type { Notice } from '../errors.ts';
import { SPEED_OF_LIGHT_M_PER_S } from '../units.ts';
import type { PatchOnSlab } from './bare-resonance.ts';
import { type BoardSize, type Feed, frontEdgeM, type InsetFeed, type ProbeFeed } from './design.ts';
import type { FeedLine } from './inset-feed.ts';
import { clearanceInNotchM } from './inset-network.ts';
import type { QualitySplit } from './quality.ts';

interface Range {
  readonly minimum: number;
  readonly maximum: number;
}

/** The box of the full-wave cases that the law was fitted to: 20 boards, 0.87 to 5.8 GHz. */
export const INSET_BOX = {
  depthOverLength: { minimum: 0, maximum: 0.4 },
  gapOverHeight: { minimum: 0.19, maximum: 1.32 },
  lineOverWidth: { minimum: 0.028, maximum: 0.13 },
  permittivity: { minimum: 2.2, maximum: 10.2 },
  heightOverWavelength: { minimum: 0.009, maximum: 0.05 },
  aspect: { minimum: 0.8, maximum: 1.6 },
} as const satisfies Record<string, Range>;

/** A value this little outside still counts as inside: the law is smooth, and its box no wall. */
const BORDER = 0.03;
/** Half width of the feed law's error at three sigma, relative: its residuals over the box are 0.05 % mean and 0.24 %
 *  worst. */
const FEED_ERROR_IN_BOX = 0.003;
/** A plain edge or a shallow inset fits less well. */
const FEED_ERROR_SHALLOW = 0.004;
const SHALLOW_SHARE = 0.15;
/** Growth outside, per unit of ln(distance); no source, chosen wide. */
const FEED_ERROR_GROWTH = 0.006;

/** How far the feed lies outside the verified range, with the error that goes with it. */
export function feedRange(
  patch: PatchOnSlab,
  feed: InsetFeed,
  bareHz: number,
): { readonly modelError: number; readonly notices: readonly Notice[] } {
  const depth = feed.insetDepthM / patch.lengthM;
  const values: { readonly [K in keyof typeof INSET_BOX]: number } = {
    depthOverLength: depth,
    gapOverHeight: clearanceInNotchM(feed) / patch.heightM,
    lineOverWidth: feed.lineWidthInNotchM / patch.widthM,
    permittivity: patch.permittivity,
    heightOverWavelength: (patch.heightM * Math.sqrt(patch.permittivity) * bareHz) / SPEED_OF_LIGHT_M_PER_S,
    aspect: patch.widthM / patch.lengthM,
  };
  const words: { readonly [K in keyof typeof INSET_BOX]: string } = {
    depthOverLength: 'inset over length',
    gapOverHeight: 'notch gap over height',
    lineOverWidth: 'line over patch width',
    permittivity: 'permittivity',
    heightOverWavelength: 'h/λd',
    aspect: 'W/L',
  };
  let distance = 0;
  const said: string[] = [];
  for (const key of Object.keys(INSET_BOX) as (keyof typeof INSET_BOX)[]) {
    const range: Range = INSET_BOX[key];
    const value = values[key];
    if (value >= range.minimum / (1 + BORDER) && value <= range.maximum * (1 + BORDER)) continue;
    const edge = value < range.minimum ? range.minimum : range.maximum;
    distance += Math.abs(Math.log(value / edge));
    said.push(`${words[key]} ${value.toPrecision(3)} (${range.minimum} to ${range.maximum})`);
  }
  const inside = depth < SHALLOW_SHARE ? FEED_ERROR_SHALLOW : FEED_ERROR_IN_BOX;
  return {
    modelError: inside + FEED_ERROR_GROWTH * distance,
    notices:
      said.length === 0
        ? []
        : [
            {
              code: 'feed.range',
              message: `The law for line and notch was fitted on another range: ${said.join(', ')}. Its error is taken as larger here, and best match and resistance are unverified.`,
            },
          ],
  };
}

/** A plain edge feed was held against full-wave cases with lines of 50 and 70 ohm: best match within 0.4 %, the
 *  resistance at resonance within 7 %. A thinner transformer extrapolates the law. */
const EDGE_ERROR = 0.004;
const EDGE_ERROR_THIN = 0.008;

export function edgeRange(
  patch: PatchOnSlab,
  transformerWidthM: number,
): { readonly modelError: number; readonly notices: readonly Notice[] } {
  const share = transformerWidthM / patch.widthM;
  const range = INSET_BOX.lineOverWidth;
  const isIn = share >= range.minimum / (1 + BORDER) && share <= range.maximum * (1 + BORDER);
  return {
    modelError: isIn ? EDGE_ERROR : EDGE_ERROR_THIN,
    notices: isIn
      ? []
      : [
          {
            code: 'feed.range',
            message: `The transformer is ${share.toPrecision(2)} of the patch width, outside ${range.minimum} to ${range.maximum}, where a line at the edge was verified: best match and resistance are unverified.`,
          },
        ],
  };
}

/** Three full-wave probe feeds hold the resistance; none holds the best match, which rests on the pin's reactance. */
const PROBE_ERROR = 0.004;
/** Height over the free-space wavelength above which the pin's reactance spoils the match. */
const PROBE_THICK = 0.03;

export function probeRange(
  patch: PatchOnSlab,
  feed: ProbeFeed,
  centreHz: number,
): { readonly modelError: number; readonly notices: readonly Notice[] } {
  const notices: Notice[] = [];
  const height = (patch.heightM * centreHz) / SPEED_OF_LIGHT_M_PER_S;
  if (height > PROBE_THICK) {
    notices.push({
      code: 'feed.thickProbe',
      message: `The board is ${height.toFixed(3)} wavelengths thick, over ${PROBE_THICK}: the pin's inductance shifts and narrows the match. A thinner board, a thicker pin or an inset feed would mend it.`,
    });
  }
  const share = feed.offsetM / patch.lengthM;
  notices.push({
    code: 'feed.probe',
    message: `The resistance at the pin was held against full-wave figures of three lossless patches: within 6 % up to 0.3 of the length from the centre, 11 % low at the edge; this pin stands at ${share.toFixed(2)}. The best match, with the pin's reactance, is unverified.`,
  });
  return { modelError: PROBE_ERROR, notices };
}

/** Notch narrower than this over the height pulls the line's impedance far down. */
const NARROW_NOTCH = 0.3;
const WIDE_LINE_OVER_GUIDED_WAVELENGTH = 1 / 8;
const WIDE_LINE_OVER_PATCH = 1 / 4;
const NARROW_MARGIN_OVER_HEIGHT = 6;

/** What the lossless figure would do to each feed. */
const TOO_FAR: Readonly<Record<Feed['kind'], string>> = {
  inset: 'cut the inset too deep',
  'quarter-wave': 'make the transformer too thin',
  probe: "set the pin too near the patch's centre",
};

export interface FeedFacts {
  readonly brief: Brief;
  readonly patch: PatchOnSlab;
  readonly feed: Feed;
  readonly board: BoardSize;
  /** Null for a feed without a line. */
  readonly line: FeedLine | null;
  readonly split: QualitySplit;
  readonly bandwidthHz: number | null;
  readonly centreHz: number;
}

function mm(lengthM: number): string {
  return `${(lengthM * 1e3).toFixed(2)} mm`;
}

/** Remarks on feed, line and board. */
export function feedNotices(facts: FeedFacts): readonly Notice[] {
  const { brief, patch, feed, board, line, split, bandwidthHz } = facts;
  const notices: Notice[] = [];
  const say = (code: string, message: string): void => {
    notices.push({ code, message });
  };
  const reference = brief.match.referenceOhm;
  if (feed.kind === 'inset' && feed.insetDepthM > 0 && feed.notchGapM < NARROW_NOTCH * patch.heightM) {
    say(
      'feed.narrowNotch',
      `The notch gap of ${mm(feed.notchGapM)} is under 0.3 of the board's height: the flanks pull the line's impedance far below ${reference} ohm. ${mm(0.6 * patch.heightM)} or more disturbs it little.`,
    );
  }
  if (line !== null && feed.kind !== 'probe') sayLine(say, facts, line, feed.lineWidthM);
  if (bandwidthHz !== null && bandwidthHz < brief.band.highHz - brief.band.lowHz) {
    say(
      'band.wide',
      `The band is ${((brief.band.highHz - brief.band.lowHz) / 1e6).toFixed(1)} MHz wide, the match at VSWR 2 only ${(bandwidthHz / 1e6).toFixed(1)} MHz: a thicker board or a lower permittivity widens it.`,
    );
  }
  if (split.losslessEdgeResistanceOhm > 1.25 * split.edgeResistanceOhm) {
    say(
      'feed.edgeResistance',
      `The edge resistance is ${split.edgeResistanceOhm.toFixed(0)} ohm with this laminate's loss; a formula without loss says ${split.losslessEdgeResistanceOhm.toFixed(0)} ohm and would ${TOO_FAR[feed.kind]}.`,
    );
  }
  const margin = Math.min(
    (board.widthM - patch.widthM) / 2,
    board.lengthM - frontEdgeM(feed) - patch.lengthM,
    frontEdgeM(feed),
  );
  // A nanometre of slack: margins are differences of rounded sizes.
  if (margin < NARROW_MARGIN_OVER_HEIGHT * patch.heightM - 1e-9) {
    say(
      'board.margin',
      `The ground reaches only ${mm(margin)} beyond the patch, under six board heights (${mm(6 * patch.heightM)}): resonance and pattern shift by an amount that is not modelled here.`,
    );
  }
  return notices;
}

/** Remarks on the line from the connector. */
function sayLine(
  say: (code: string, message: string) => void,
  { brief, patch, centreHz }: FeedFacts,
  line: FeedLine,
  lineWidthM: number,
): void {
  const reference = brief.match.referenceOhm;
  const guidedM = SPEED_OF_LIGHT_M_PER_S / (centreHz * Math.sqrt(line.effectivePermittivity));
  if (lineWidthM > WIDE_LINE_OVER_GUIDED_WAVELENGTH * guidedM || lineWidthM > WIDE_LINE_OVER_PATCH * patch.widthM) {
    say(
      'feed.wideLine',
      `The feed line is ${mm(lineWidthM)} wide, wide for the patch or the wavelength: it radiates and couples. A thinner board or a higher impedance with a transformer would mend it.`,
    );
  }
  if (Math.abs(line.impedanceOhm / reference - 1) > 0.1) {
    say(
      'feed.lineImpedance',
      `The feed line has ${line.impedanceOhm.toFixed(1)} ohm, not ${reference} ohm: its length to the board's edge now shapes the match.`,
    );
  }
}
