/** "Did you mean": the known word nearest to what was typed, by edit distance (Levenshtein 1966, with swaps). */

/** Number of single-letter changes, insertions, deletions and swaps of neighbours that lead from a to b. */
export function editDistance(a: string, b: string): number {
  let beforePrevious: number[] = [];
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = previous[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      let best = Math.min(change, previous[j]! + 1, row[j - 1]! + 1);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        best = Math.min(best, beforePrevious[j - 2]! + 1);
      }
      row.push(best);
    }
    beforePrevious = previous;
    previous = row;
  }
  return previous[b.length]!;
}

/** Words longer than this are not compared: the cost grows with the square. */
const LONGEST_WORD = 64;
/** Candidates beyond this many are not looked at. */
const MOST_CANDIDATES = 3000;

/** The nearest candidate, or undefined when none is near: at most a third of the letters (one of three) may differ, case apart. */
export function nearest(word: string, candidates: Iterable<string>): string | undefined {
  if (word.length > LONGEST_WORD) return undefined;
  const typed = word.toLowerCase();
  let best: string | undefined;
  let bestDistance = Math.floor(word.length / 3) + 1;
  let seen = 0;
  for (const candidate of candidates) {
    if (++seen > MOST_CANDIDATES) break;
    if (Math.abs(candidate.length - word.length) >= bestDistance) continue;
    const distance = editDistance(typed, candidate.toLowerCase());
    if (distance < bestDistance) {
      best = candidate;
      bestDistance = distance;
    }
  }
  return best;
}

/** ` (did you mean "x"?)` or nothing. */
export function didYouMean(word: string, candidates: Iterable<string>): string {
  const found = nearest(word, candidates);
  return found === undefined ? '' : ` (did you mean "${found}"?)`;
}
