// catalogue: what a brief can name.

import {
  type FabricatorEntry,
  formatFabricator,
  formatLaminate,
  formatLengthMm,
  type LaminateEntry,
  listFabricators,
  listLaminates,
} from '../../geometry/index.ts';
import type { Arguments } from '../arguments.ts';
import { EXIT, printJson, printResult } from '../output.ts';

function laminateLine({ laminate }: LaminateEntry): string {
  const { name, permittivity, permittivityTolerance, lossTangent, thicknessM, thicknessToleranceM } = laminate;
  const thickness = `${formatLengthMm(thicknessM, 3)} ± ${formatLengthMm(thicknessToleranceM, 3)}`;
  return `  ${name.padEnd(36)}${`${permittivity} ± ${permittivityTolerance}`.padEnd(14)}loss tangent ${String(lossTangent).padEnd(8)}${thickness}`;
}

function fabricatorLine({ fabricator, description }: FabricatorEntry): string {
  const { name, boardMaxWidthM, boardMaxLengthM } = fabricator;
  return `  ${name.padEnd(16)}${description}; boards up to ${formatLengthMm(boardMaxWidthM, 0)} × ${formatLengthMm(boardMaxLengthM, 0)}`;
}

export function catalogue(args: Arguments): number {
  const laminates = listLaminates();
  const fabricators = listFabricators();
  if (args.switches.has('json')) {
    printJson({
      format: 'etchwave-catalogue/1',
      laminates: laminates.map(({ laminate, ...rest }) => ({ ...rest, record: formatLaminate(laminate) })),
      fabricators: fabricators.map(({ fabricator, ...rest }) => ({ ...rest, record: formatFabricator(fabricator) })),
    });
  } else {
    printResult(
      [
        'Laminates (generic classes; the name ends in the dielectric between the coppers)',
        ...laminates.map(laminateLine),
        '',
        'Fabricators (kinds of shop; starting points, to be held against the sheet of yours)',
        ...fabricators.map(fabricatorLine),
      ].join('\n'),
    );
  }
  return EXIT.done;
}
