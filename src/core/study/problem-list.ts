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

export function problemList(): ProblemList {
  const entries: { problem: Problem; more: number }[] = [];
  const subjects = new Map<string, { problem: Problem; more: number }>();
  return {
    add: (code, place) => {
      entries.push({ problem: problem(code, place), more: 0 });
    },
    addOnce: (subject, code, place) => {
      const key = JSON.stringify([code, place.file, subject]);
      const known = subjects.get(key);
      if (known) {
        known.more += 1;
        return;
      }
      const entry = { problem: problem(code, place), more: 0 };
      subjects.set(key, entry);
      entries.push(entry);
    },
    problems: () =>
      entries.map(({ problem, more }) =>
        more === 0
          ? problem
          : { ...problem, found: `${problem.found} (and ${more} more ${more === 1 ? "row" : "rows"})` },
      ),
  };
}
