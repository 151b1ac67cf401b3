import type { Problem } from "./problem.ts";
import { type ProblemCode, problem } from "./problem-wordings.ts";
import type { ProblemPlace } from "./wording.ts";

/** Gathers problems in the order met; what repeats down a file is told once, with the number of rows. */
export interface ProblemList {
  add(code: ProblemCode, place: ProblemPlace): void;
  /** Tells the first of all problems of one subject, and how many more rows share it. */
  addOnce(subject: string, code: ProblemCode, place: ProblemPlace): void;
  /** True where a further problem of the kind is counted and no more told. */
  isFull(code: ProblemCode, file: string): boolean;
  problems(): readonly Problem[];
}

/** Problems of one kind that are told of one file one by one; nobody mends more than these by hand. */
export const MOST_ALIKE = 10_000;

interface Entry {
  readonly problem: Problem;
  more: number;
}

export function problemList(mostAlike = MOST_ALIKE): ProblemList {
  const entries: Entry[] = [];
  const subjects = new Map<string, Entry>();
  const alike = new Map<string, { count: number; last?: Entry }>();
  /** Tells a problem, or counts it with the last of its kind where too many were told. */
  const tell = (code: ProblemCode, place: ProblemPlace): Entry | undefined => {
    const kind = `${code} ${place.file}`;
    const told = alike.get(kind) ?? { count: 0 };
    alike.set(kind, told);
    told.count += 1;
    if (told.last !== undefined && told.count > mostAlike) {
      told.last.more += 1;
      return undefined;
    }
    told.last = { problem: problem(code, place), more: 0 };
    entries.push(told.last);
    return told.last;
  };
  return {
    add: (code, place) => {
      tell(code, place);
    },
    addOnce: (subject, code, place) => {
      const key = JSON.stringify([code, place.file, subject]);
      const known = subjects.get(key);
      if (known) {
        known.more += 1;
        return;
      }
      const entry = tell(code, place);
      if (entry !== undefined) subjects.set(key, entry);
    },
    isFull: (code, file) => (alike.get(`${code} ${file}`)?.count ?? 0) >= mostAlike,
    problems: () =>
      entries.map(({ problem, more }) =>
        more === 0
          ? problem
          : { ...problem, found: `${problem.found} (and ${more} more ${more === 1 ? "row" : "rows"})` },
      ),
  };
}
