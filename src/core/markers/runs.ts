export interface Run {
  readonly first: number;
  readonly last: number;
}

export interface RunSample {
  readonly flagged: boolean;
  readonly p: number;
  readonly censored: "none" | "left" | "right" | "interval";
  /** Value, or limit where censored. */
  readonly value: number;
}

/** A single sample between two flagged ones belongs to their run where it is itself above background at this p. */
const bridgingP = 0.05;

/**
 * Runs of adjacent flagged samples (indices from below upward): each is one anomaly. A single unflagged sample does
 * not break a run where it is above background at p <= 0.05 by itself, or below a detection limit that lies above
 * `ceiling` (it cannot tell).
 */
export function flaggedRuns(samples: readonly RunSample[], ceiling: number): readonly Run[] {
  const runs: Run[] = [];
  samples.forEach((sample, i) => {
    if (!sample.flagged) return;
    const last = runs[runs.length - 1];
    const isNext = last !== undefined && last.last === i - 1;
    const isBridged = last !== undefined && last.last === i - 2 && bridges(samples[i - 1], ceiling);
    if (isNext || isBridged) runs[runs.length - 1] = { first: last.first, last: i };
    else runs.push({ first: i, last: i });
  });
  return runs;
}

function bridges(sample: RunSample, ceiling: number): boolean {
  return sample.censored === "left" ? sample.value > ceiling : sample.p <= bridgingP;
}
