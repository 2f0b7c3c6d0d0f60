// The artwork of one board: everything that is exported, checked and drawn, in integer nanometres.
// Origin: lower left corner of the board's outline; x right, y up, seen from the top on every layer.

import type { Contour, PointNm, Shape, Stroke } from '../shape/shape.ts';

/** A drilled hole; the diameter is the finished one. */
export interface Hole {
  readonly centre: PointNm;
  readonly finishedDiameterNm: number;
  readonly plated: boolean;
  /** pin: of a feed; mounting: of a connector's flange. */
  readonly use: 'pin' | 'mounting';
  /** What a drawing calls it, e.g. "pin of J1". */
  readonly label: string;
}

/** Copper that something is soldered to: flashed in the files, with its function. It is part of its layer's copper too. */
export interface Pad {
  readonly layer: 'copper-top' | 'copper-bottom';
  readonly centre: PointNm;
  readonly diameterNm: number;
  readonly label: string;
}

/** A stretch of the board's edge where copper reaches the edge by intent. */
export interface LaunchEdge {
  readonly name: string;
  readonly from: PointNm;
  readonly to: PointNm;
}

/** A dimension for drawings: the distance from `from` to `to` measured along `axis`. */
export interface Dimension {
  /** The result's key without its unit: length, width, insetDepth, notchGap, lineWidth, … */
  readonly name: string;
  /** What a drawing writes in words, e.g. "patch length L". */
  readonly label: string;
  readonly from: PointNm;
  readonly to: PointNm;
  readonly axis: 'x' | 'y';
  readonly valueNm: number;
  /** Critical dimensions are boxed on the drawing. */
  readonly critical: boolean;
}

export interface Artwork {
  readonly kind: 'artwork';
  readonly title: string;
  /** File-name stem: a–z, 0–9, '-'. */
  readonly slug: string;
  readonly buildId: string;
  readonly board: { readonly outline: Contour; readonly widthNm: number; readonly lengthNm: number };
  /** Radiator and feed line, united: one region where they are one net. */
  readonly copperTop: Shape;
  /** Ground. */
  readonly copperBottom: Shape;
  /** Openings in the solder mask (where there is none). A board without mask has one opening over all of it. */
  readonly maskTop: Shape;
  readonly maskBottom: Shape;
  readonly hasSolderMask: boolean;
  /** Legend on the top side; empty where the fabricator prints none. */
  readonly legendTop: readonly Stroke[];
  readonly holes: readonly Hole[];
  readonly pads: readonly Pad[];
  readonly launches: readonly LaunchEdge[];
  readonly dimensions: readonly Dimension[];
  /** What could not be drawn as wished, as whole sentences. */
  readonly remarks: readonly string[];
}
