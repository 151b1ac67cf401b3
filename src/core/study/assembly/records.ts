import type { Choice, Claim } from "../model.ts";
import { choices } from "../tables/choices.ts";
import { claims } from "../tables/claims.ts";
import { type Assembly, present } from "./context.ts";
import { rowsOf } from "./rows.ts";

/** What publications say. */
export const readClaims = (assembly: Assembly): readonly Claim[] =>
  rowsOf(claims, assembly).map(({ cells }) => {
    const { source, question, value, ...others } = cells;
    return { question, value, ...present(others), source: source ?? "" };
  });

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
