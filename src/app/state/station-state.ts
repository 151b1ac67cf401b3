import type { Analysis } from "../../core/analysis-result.ts";
import type { Study } from "../../core/study/model.ts";
import type { Finding, Station } from "../../report/findings/finding.ts";
import type { Focus } from "./focus.ts";
import { lackOf } from "./lack.ts";

export type StationState = "done" | "look" | "waiting";

export const STATE_WORDS: Readonly<Record<StationState, string>> = {
  done: "done",
  look: "needs a look",
  waiting: "not yet",
};

/** How far a station is for the focus: it lacks input, something weakens its finding, or nothing does. */
export function stationState(
  station: Station,
  { analysis, focus, all }: { analysis: Analysis; focus: Focus; all: readonly Finding[] },
): StationState {
  if (lackOf(station, focus, analysis) !== undefined) return "waiting";
  if (station === "tables") return readState(analysis.study);
  const finding = findingOf(all, { ...focus, station });
  return finding?.weaknesses.some(({ severity }) => severity === "warning") ? "look" : "done";
}

/** How far the tables are, once they are read. */
export const readState = ({ problems }: Pick<Study, "problems">): StationState =>
  problems.some(({ severity }) => severity === "error") ? "look" : "done";

/** The finding that the margin shows for a focus. */
export function findingOf(all: readonly Finding[], focus: Focus): Finding | undefined {
  return all.find(
    (finding) =>
      finding.station === focus.station &&
      (finding.section === undefined || finding.section === focus.section?.name) &&
      (finding.set === undefined || finding.set === focus.set?.set),
  );
}
