// The known word that a mistyped one is nearest to.

/** Levenshtein distance, two rows at a time. */
function distance(a: string, b: string): number {
  let previous = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const swap = previous[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      row.push(Math.min(swap, previous[j]! + 1, row[j - 1]! + 1));
    }
    previous = row;
  }
  return previous[b.length]!;
}

/** The nearest of the known words, the first one where several are as near; undefined where there are none.
 *  Case does not count as a difference worth a full letter's. */
export function nearest(word: string, known: readonly string[]): string | undefined {
  // A word far longer than any known one is near to none in particular; its tail would only cost time.
  const head = word.slice(0, 64);
  let best: string | undefined;
  let least = Number.POSITIVE_INFINITY;
  for (const candidate of known) {
    const far = distance(head.toLowerCase(), candidate.toLowerCase()) + (head === candidate ? 0 : 0.5);
    if (far < least) {
      least = far;
      best = candidate;
    }
  }
  return best;
}
