import type { Problem } from "../core/study/problem.ts";
import { tame, textTable } from "./text-table.ts";

/** Problems as a table for a terminal, errors first; at most `most` of them. */
export function problemLines(problems: readonly Problem[], most = Number.POSITIVE_INFINITY): string {
  if (problems.length === 0) return "  no problems";
  const errorsFirst = problems.toSorted((a, b) => rank(a) - rank(b));
  const shown = errorsFirst.slice(0, most);
  const rows = shown.flatMap((problem) => [
    [
      problem.severity,
      problem.file,
      problem.row === undefined ? "" : `row ${problem.row}`,
      problem.column ?? "",
      tame(problem.found, 60),
    ],
  ]);
  const table = textTable([["kind", "file", "row", "column", "stands there"], ...rows]).split("\n");
  const lines = [table[0]];
  for (const [i, problem] of shown.entries()) {
    lines.push(table[i + 1], `      expected ${tame(problem.expected, 200)}. ${tame(problem.mend, 300)}`);
  }
  if (shown.length < problems.length)
    lines.push(`  ${problems.length - shown.length} more: lastbed check lists them all`);
  return lines.join("\n");
}

const rank = (problem: Problem) => (problem.severity === "error" ? 0 : 1);

export function problemCount(problems: readonly Problem[]): string {
  const errors = problems.filter((problem) => problem.severity === "error").length;
  const cautions = problems.length - errors;
  return `${errors} ${errors === 1 ? "error" : "errors"}, ${cautions} ${cautions === 1 ? "caution" : "cautions"}`;
}

export const hasErrors = (problems: readonly Problem[]) =>
  problems.some((problem) => problem.severity === "error");
