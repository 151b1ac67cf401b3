import type { Choice, Claim } from "../model.ts";
import { choices } from "../tables/choices.ts";
import { claims } from "../tables/claims.ts";
import { type Assembly, present } from "./context.ts";
import type { Frames } from "./frame-for.ts";
import { reservedSection } from "./frames.ts";
import { rowsOf } from "./rows.ts";

/** What publications say; one on a section that the study does not hold is told and kept. */
export const readClaims = (frames: Frames, assembly: Assembly): readonly Claim[] =>
  rowsOf(claims, assembly).map(({ cells, origin }) => {
    const { source, question, value, ...others } = cells;
    const { section } = others;
    if (section !== undefined && !isKnown(section, frames)) {
      const meant = frames.meant(section);
      assembly.problems.add("claim-elsewhere", { ...origin, column: "section", found: section, ...meant });
    }
    return { question, value, ...present(others), source: source ?? "" };
  });

const isKnown = (section: string, { usable, leftOut }: Frames): boolean =>
  section === reservedSection || usable.has(section) || leftOut.has(section);

/** Every choice made by hand, in the order made. */
export const readChoices = (assembly: Assembly): readonly Choice[] =>
  rowsOf(choices, assembly)
    .map(({ cells }) => ({
      order: cells.order,
      choice: cells.choice,
      old: cells.old ?? "",
      new: cells.new ?? "",
      reason: cells.reason ?? "",
      by: cells.by ?? "",
      afterResults: cells.after_results ?? false,
    }))
    .toSorted((a, b) => a.order - b.order);
