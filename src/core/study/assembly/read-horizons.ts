import { oneSigma } from "../errors.ts";
import type { GivenHorizon } from "../model.ts";
import { horizons } from "../tables/horizons.ts";
import { type Assembly, type BySection, gather, present, type Row } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import { heightOf, lengthOf } from "./position.ts";
import { rowsOf } from "./rows.ts";

type HorizonRow = Row<typeof horizons>;

/** The horizons placed by a person, by section, from below upward. */
export function readHorizons(frames: Frames, assembly: Assembly): BySection<GivenHorizon> {
  const read = assembly.sheets.get("horizons");
  const lists = new Map<string, GivenHorizon[]>();
  if (!read) return lists;
  for (const row of rowsOf(horizons, assembly)) {
    const { cells, origin } = row;
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const heightM = frame && heightOf(cells.position, frame, { origin, column: "position", assembly });
    if (!frame || heightM === undefined || !isSound(row, assembly)) continue;
    if (lists.get(frame.name)?.some(({ name }) => name === cells.horizon)) {
      const detail = `horizon ${cells.horizon} in ${frame.name}`;
      assembly.problems.add("redefined", { ...origin, column: "horizon", found: cells.horizon, detail });
      continue;
    }
    const widths = { belowM: lengthOf(cells.below, frame) ?? 0, aboveM: lengthOf(cells.above, frame) ?? 0 };
    gather(lists, frame.name, { ...horizonOf(row), heightM, ...widths });
  }
  for (const list of lists.values()) list.sort((a, b) => a.heightM - b.heightM);
  return lists;
}

function isSound({ cells, origin }: HorizonRow, assembly: Assembly): boolean {
  if (cells.age_error_ma !== undefined && cells.age_error_kind === undefined) {
    assembly.problems.add("error-kind-missing", {
      ...origin,
      column: "age_error_kind",
      found: "",
      detail: "age_error_kind",
    });
    return false;
  }
  if (cells.age_ma !== undefined && cells.age_ma < 0) {
    assembly.problems.add("negative-age", { ...origin, column: "age_ma", found: String(cells.age_ma) });
    return false;
  }
  return true;
}

function horizonOf({ cells, origin }: HorizonRow): Omit<GivenHorizon, "heightM" | "belowM" | "aboveM"> {
  const { age_ma: ageMa, age_error_ma: error, age_error_kind: kind, laboratory, zone } = cells;
  const ageSigmaMa =
    error === undefined || kind === undefined ? undefined : oneSigma(error, kind, ageMa ?? 0);
  return {
    name: cells.horizon,
    kind: cells.kind,
    shape: cells.shape ?? "normal",
    ...present({ ageMa, ageSigmaMa, datingMethod: cells.dating_method, laboratory, zone }),
    notes: cells.notes ?? "",
    origin,
  };
}
