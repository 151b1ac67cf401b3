/** Edit distance of Levenshtein: the least number of single-letter insertions, deletions and replacements. */
export function editDistance(a: string, b: string): number {
  let above = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const replace = above[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1);
      row.push(Math.min(replace, above[j] + 1, row[j - 1] + 1));
    }
    above = row;
  }
  return above[b.length];
}

const longestCompared = 100;

/** The known name nearest to a written one, or undefined where none is near enough to be meant. */
export function suggestName(written: string, known: Iterable<string>): string | undefined {
  if (written.length > longestCompared) return undefined;
  const lower = written.toLowerCase();
  let best: string | undefined;
  let least = Math.max(2, Math.floor(written.length / 3)) + 1;
  for (const name of known) {
    if (Math.abs(name.length - written.length) >= least) continue;
    const distance = editDistance(lower, name.toLowerCase());
    if (distance < least) {
      least = distance;
      best = name;
    }
  }
  return best;
}
