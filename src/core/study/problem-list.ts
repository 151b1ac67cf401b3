import type { Problem } from "./problem.ts";
import { type ProblemCode, problem } from "./problem-wordings.ts";
import type { ProblemPlace } from "./wording.ts";

/** Gathers problems in the order met; what repeats down a file is told once, with the number of rows. */
export interface ProblemList {
  add(code: ProblemCode, place: ProblemPlace): void;
  /** Tells the first of all problems of one subject, and how many more rows share it. */
  addOnce(subject: string, code: ProblemCode, place: ProblemPlace): void;
  problems(): readonly Problem[];
}

/** Problems of one kind that are told of one file one by one; nobody mends more than these by hand. */
const MOST_ALIKE = 10_000;

interface Entry {
  readonly problem: Problem;
  more: number;
}

export function problemList(mostAlike = MOST_ALIKE): ProblemList {
  const entries: Entry[] = [];
  const subjects = new Map<string, Entry>();
  const alike = new Map<string, { count: number; last?: Entry }>();
  const tell = (code: ProblemCode, place: ProblemPlace): Entry => {
    const entry = { problem: problem(code, place), more: 0 };
    entries.push(entry);
    return entry;
  };
  return {
    add: (code, place) => {
      const kind = `${code} ${place.file}`;
      const told = alike.get(kind) ?? { count: 0 };
      alike.set(kind, told);
      if (told.last !== undefined && told.count >= mostAlike) told.last.more += 1;
      else told.last = tell(code, place);
      told.count += 1;
    },
    addOnce: (subject, code, place) => {
      const key = JSON.stringify([code, place.file, subject]);
      const known = subjects.get(key);
      if (known) known.more += 1;
      else subjects.set(key, tell(code, place));
    },
    problems: () =>
      entries.map(({ problem, more }) =>
        more === 0
          ? problem
          : { ...problem, found: `${problem.found} (and ${more} more ${more === 1 ? "row" : "rows"})` },
      ),
  };
}
