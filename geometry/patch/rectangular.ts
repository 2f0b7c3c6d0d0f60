// The bare rectangular patch: what it does without a feed.

import { EngineError, type Fault, type Notice } from '../errors.ts';
import { bareResonance, type PatchOnSlab } from './bare-resonance.ts';
import type { Prediction } from './design.ts';
import { resonanceInterval } from './interval.ts';
import { type QualitySplit, qualitySplit } from './quality.ts';

/** Standing-wave ratio at which bandwidths are stated. */
export const BANDWIDTH_VSWR = 2;

/** Bandwidth of a critically coupled resonator, (S−1)/(Q√S)·f [Hz]. Source: C. A. Balanis, Antenna Theory, 4th ed.,
 *  eq. (14-88a). */
export function criticalBandwidthHz(frequencyHz: number, quality: number, vswr: number): number {
  return (frequencyHz * (vswr - 1)) / (quality * Math.sqrt(vswr));
}

/** The parts of a prediction that the mode alone decides. */
export function modePrediction(split: QualitySplit, bareHz: number) {
  return {
    method: 'closed-form',
    bareResonanceHz: bareHz,
    bandwidthVswr: BANDWIDTH_VSWR,
    bandwidthCriticalHz: criticalBandwidthHz(bareHz, split.total, BANDWIDTH_VSWR),
    edgeResistanceOhm: split.edgeResistanceOhm,
    qualityTotal: split.total,
    qualityRadiation: split.radiation,
    qualityDielectric: split.dielectric,
    qualityConductor: split.conductor,
    qualitySurfaceWave: split.surfaceWave,
    radiationEfficiency: split.efficiency,
    directivityDbi: split.directivityDbi,
    gainDbi: split.directivityDbi + 10 * Math.log10(split.efficiency),
  } as const satisfies Partial<Prediction>;
}

/** Height over the free-space wavelength above which closed forms of this kind are no longer to be trusted alone. */
const THICK_BOARD = 0.05;
const LOW_EFFICIENCY = 0.5;
const POOR_EFFICIENCY = 0.3;

/** Remarks on the mode itself. */
export function modeNotices(patch: PatchOnSlab, frequencyHz: number, split: QualitySplit): readonly Notice[] {
  const notices: Notice[] = [];
  const heightOverWavelength = (patch.heightM * frequencyHz) / 299_792_458;
  if (heightOverWavelength > THICK_BOARD) {
    notices.push({
      code: 'patch.thick',
      message: `The board is ${heightOverWavelength.toFixed(3)} free-space wavelengths thick, over ${THICK_BOARD}: the feed sets much of the resonance there, and the figures are unverified.`,
    });
  }
  if (split.efficiency < LOW_EFFICIENCY) {
    const percent = (100 * split.efficiency).toFixed(0);
    const grave =
      split.efficiency < POOR_EFFICIENCY
        ? ' That is little for any use: a thicker board or a laminate of lower loss would mend it.'
        : '';
    notices.push({
      code: 'patch.efficiency',
      message: `Only ${percent} % of the accepted power is radiated; the rest heats laminate and copper or runs off in the surface wave.${grave}`,
    });
  }
  return notices;
}

export interface BarePatchInput {
  readonly lengthM: number;
  readonly widthM: number;
  readonly thicknessM: number;
  readonly permittivity: number;
  /** Default 0: no loss. */
  readonly lossTangent?: number;
  /** Default: neither thickness nor resistance. */
  readonly copperThicknessM?: number;
  /** [S/m]; default annealed copper, 5.8e7, where a copper thickness is given. */
  readonly conductivitySPerM?: number;
}

export const COPPER_CONDUCTIVITY_S_PER_M = 5.8e7;

export interface BarePatchResult {
  readonly kind: 'bare-patch';
  readonly radiator: { readonly family: 'rectangular'; readonly lengthM: number; readonly widthM: number };
  readonly prediction: Prediction;
  readonly notices: readonly Notice[];
}

function checkInput(input: BarePatchInput): void {
  const faults: Fault[] = [];
  const demand = (path: string, value: number | undefined, least: number, most: number, allowed: string): void => {
    if (value === undefined || (value >= least && value <= most)) return;
    faults.push({
      code: 'value.range',
      file: '',
      path,
      value: String(value),
      problem: `${value} is out of range`,
      allowed,
    });
  };
  demand('length', input.lengthM, 1e-5, 10, 'allowed is 10 um to 10 m');
  demand('width', input.widthM, 1e-5, 10, 'allowed is 10 um to 10 m');
  demand('thickness', input.thicknessM, 20e-6, 20e-3, 'allowed is 20 um to 20 mm');
  demand('permittivity', input.permittivity, 1, 30, 'allowed is 1 to 30');
  demand('loss-tangent', input.lossTangent, 0, 0.2, 'allowed is 0 to 0.2');
  demand('copper', input.copperThicknessM, 0, 1e-3, 'allowed is 0 um to 1 mm');
  demand('conductivity', input.conductivitySPerM, 1e3, 1e9, 'allowed is 1e3 S/m to 1e9 S/m');
  if (faults.length > 0) throw new EngineError(faults);
}

/** What a bare rectangular patch does. The length is the resonant dimension.
 *  Throws: EngineError "value.range" naming every input out of range. */
export function predictBare(input: BarePatchInput): BarePatchResult {
  checkInput(input);
  const patch: PatchOnSlab = {
    lengthM: input.lengthM,
    widthM: input.widthM,
    heightM: input.thicknessM,
    permittivity: input.permittivity,
  };
  const resonance = bareResonance(patch);
  const hasCopper = input.copperThicknessM !== undefined && input.copperThicknessM > 0;
  const split = qualitySplit(
    patch,
    input.lossTangent ?? 0,
    {
      conductivitySPerM: hasCopper ? (input.conductivitySPerM ?? COPPER_CONDUCTIVITY_S_PER_M) : null,
      roughnessM: 0,
    },
    resonance.resonanceHz,
  );
  const interval = resonanceInterval(resonance.resonanceHz, [], resonance.modelError);
  return {
    kind: 'bare-patch',
    radiator: { family: 'rectangular', lengthM: input.lengthM, widthM: input.widthM },
    prediction: {
      ...modePrediction(split, resonance.resonanceHz),
      resonanceHz: resonance.resonanceHz,
      resonanceKind: 'bare',
      resonanceLowHz: interval.lowHz,
      resonanceHighHz: interval.highHz,
      contributions: interval.contributions,
      bandwidthHz: null,
      inputResistanceOhm: null,
      returnLossAtCentreDb: null,
      returnLossWorstInBandDb: null,
      qualityLoaded: null,
      gainRealizedDbi: null,
    },
    notices: [...resonance.notices, ...modeNotices(patch, resonance.resonanceHz, split)],
  };
}
