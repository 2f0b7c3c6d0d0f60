// Prints every published row beside what the engine predicts: `npm run report`.

import {
  campaignRows,
  type FedComparison,
  fedRows,
  isInset,
  measuredRows,
  pinRows,
  qualityRows,
  resonanceRows,
  summarise,
} from './tables.ts';

function percent(error: number, digits = 2): string {
  return `${error >= 0 ? '+' : ''}${(100 * error).toFixed(digits)} %`.padStart(10);
}

function print(line: string): void {
  process.stdout.write(`${line}\n`);
}

function table(title: string, rows: readonly { name: string; ours: number; reference: number; error: number }[]): void {
  print(`\n${title}`);
  for (const row of rows)
    print(
      `  ${row.name.padEnd(34)} ${row.ours.toFixed(4).padStart(10)} ${row.reference.toFixed(4).padStart(10)} ${percent(row.error)}`,
    );
  const { mean, worst } = summarise(rows);
  print(`  mean ${percent(mean)}   worst ${percent(worst)}`);
}

table('Natural resonance [GHz], ours and reference (computed, resonance_reference.csv)', resonanceRows());
table('Lossless Q, ours and reference (computed, resonance_reference.csv)', qualityRows());
table(
  'Measured natural resonance [GHz], ours and measured (values from memory; nothing is fitted to them)',
  measuredRows(),
);

function fedTable(title: string, rows: readonly FedComparison[]): void {
  print(`\n${title}`);
  print(
    '  case                best match   textbook      pole  loaded Q    peak R  R at match   return loss (ours / reference)',
  );
  for (const row of rows) {
    const [ours, reference] = row.returnLossDb;
    print(
      `  ${`${row.name}${row.inRange ? '' : ' *'}`.padEnd(18)}${percent(row.bestMatch.error)}${percent(row.textbookError)}${percent(row.pole.error)}${percent(row.loadedQuality.error, 1)}${percent(row.peakResistance.error, 1)}${percent(row.matchResistance.error, 1)}     ${ours.toFixed(1)} / ${reference.toFixed(1)} dB`,
    );
  }
  const insets = rows.filter((row) => isInset(row) && row.inRange);
  const match = summarise(insets.map(({ bestMatch }) => bestMatch));
  const resistance = summarise(insets.map(({ peakResistance }) => peakResistance));
  print(
    `  insets of 0.15–0.4 L within the law’s range (others *): best match mean ${percent(match.mean)}, worst ${percent(match.worst)}; resistance mean ${percent(resistance.mean, 1)}, worst ${percent(resistance.worst, 1)}`,
  );
}

fedTable('Fed patches (computed, fed_reference.json): errors against the reference', fedRows());
fedTable('Fed patches (our own field solution, fed_campaign.json)', campaignRows());

print('\nResistance at a pin [ohm], ours and reference (computed, input_resistance.csv), and the usual law');
for (const row of pinRows())
  print(
    `  ${row.name.padEnd(20)} ${row.ours.toFixed(1).padStart(7)} ${row.reference.toFixed(1).padStart(7)} ${percent(row.error, 1)}   usual law ${percent(row.usualError, 1)}`,
  );
