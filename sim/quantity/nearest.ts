/**
 * The candidate that a misspelt word most likely meant, for "did you mean"; null when none is near.
 * Case does not count. Near: at most a third of the longer word wrong (one letter in short words, never the whole word);
 * failing that, a candidate that contains the word. Ties go to the earlier candidate.
 */
export function nearest(word: string, candidates: Iterable<string>): string | null {
  const lower = word.toLowerCase();
  let best: string | null = null;
  let bestDistance = Number.POSITIVE_INFINITY;
  let containing: string | null = null;
  for (const candidate of candidates) {
    const target = candidate.toLowerCase();
    const distance = editDistance(lower, target);
    if (distance < bestDistance && isNear(distance, lower.length, target.length)) {
      best = candidate;
      bestDistance = distance;
    }
    if (containing === null && lower.length >= 4 && target.includes(lower)) containing = candidate;
  }
  return best ?? containing;
}

function isNear(distance: number, wordLength: number, targetLength: number): boolean {
  const longer = Math.max(wordLength, targetLength);
  return (
    distance === 0 || (distance <= Math.max(1, Math.floor(longer / 3)) && distance < Math.min(wordLength, targetLength))
  );
}

/**
 * Insertions, deletions, substitutions and swaps of neighbours that turn `a` into `b`.
 * Source: Damerau (1964) Commun. ACM 7, 171; Levenshtein (1966); each letter is touched once (optimal string alignment).
 */
export function editDistance(a: string, b: string): number {
  let twoAbove: number[] = [];
  let above = Array.from({ length: b.length + 1 }, (_, column) => column);
  for (let row = 1; row <= a.length; row++) {
    const current = [row];
    for (let column = 1; column <= b.length; column++) {
      const changed = a[row - 1] === b[column - 1] ? 0 : 1;
      let cost = Math.min(above[column]! + 1, current[column - 1]! + 1, above[column - 1]! + changed);
      if (row > 1 && column > 1 && a[row - 1] === b[column - 2] && a[row - 2] === b[column - 1]) {
        cost = Math.min(cost, twoAbove[column - 2]! + 1);
      }
      current.push(cost);
    }
    twoAbove = above;
    above = current;
  }
  return above[b.length]!;
}
