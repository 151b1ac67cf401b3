/** The study's tables by name; each has one declaration. */
export const tableNames = [
  "sections",
  "legs",
  "intervals",
  "beds",
  "samples",
  "searches",
  "occurrences",
  "published-ranges",
  "measurements",
  "planes",
  "horizons",
  "taxa",
  "recovery",
  "claims",
  "choices",
] as const;

export type TableName = (typeof tableNames)[number];
