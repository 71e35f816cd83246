/** Text without what people overlook: case, blanks, punctuation and compatibility forms such as the two micro signs. */
function plain(text: string): string {
  return text
    .normalize("NFKC")
    .toLowerCase()
    .replace(/[\s_\-./()[\]]/gu, "");
}

/** Edit distance with transpositions of neighbours (optimal string alignment). */
function distance(a: string, b: string): number {
  let [before, previous] = [[] as number[], Array.from({ length: b.length + 1 }, (_, j) => j)];
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = a[i - 1] === b[j - 1] ? 0 : 1;
      let best = Math.min((previous[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (previous[j - 1] ?? 0) + change);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        best = Math.min(best, (before[j - 2] ?? 0) + 1);
      row.push(best);
    }
    [before, previous] = [previous, row];
  }
  return previous[b.length] ?? 0;
}

/**
 * The known name that a misspelt one most likely stands for, or undefined where none is close: at most one edit in three
 * characters. Of equally close names the first by code units is taken.
 */
export function nearMiss(name: string, known: readonly string[]): string | undefined {
  const wanted = plain(name.slice(0, 100));
  let best: { name: string; edits: number } | undefined;
  for (const candidate of [...known].sort()) {
    const target = plain(candidate.slice(0, 100));
    const edits = distance(wanted, target);
    if (edits <= Math.max(wanted.length, target.length) / 3 && (best === undefined || edits < best.edits)) {
      best = { name: candidate, edits };
    }
  }
  return best?.name;
}

/** ` (did you mean "solubility"?)`, or nothing where no known name is close. */
export function didYouMean(name: string, known: readonly string[]): string {
  const near = nearMiss(name, known);
  return near === undefined ? "" : ` (did you mean "${near}"?)`;
}
