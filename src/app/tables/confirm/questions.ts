import type { Sheet, Study } from "../../../core/study/model.ts";
import type { Recognition } from "../../../core/study/recognised.ts";

/** What only a person can answer before a file is read rightly. */
export type Question =
  | { readonly kind: "unit"; readonly sheet: Sheet; readonly column: Recognition }
  | { readonly kind: "content"; readonly sheet: Sheet; readonly column: Recognition }
  | { readonly kind: "code"; readonly sheet: Sheet; readonly code: string; readonly cells: number }
  | { readonly kind: "blank"; readonly sheet: Sheet }
  | { readonly kind: "section"; readonly sheet: Sheet; readonly name: string };

/** Every question that the files leave open, those that keep rows out first. */
export function questionsOf({ sheets, problems }: Pick<Study, "sheets" | "problems">): readonly Question[] {
  const all = sheets.flatMap((sheet): Question[] => {
    const { recognised, wide, section, file } = sheet;
    const asksBlank = problems.some(({ code, file: where }) => code === "blank-samples" && where === file);
    return [
      ...unitColumns(recognised).map((column): Question => ({ kind: "unit", sheet, column })),
      ...(wide?.codes ?? []).flatMap(({ code, cells, means }): Question[] =>
        means === undefined ? [{ kind: "code", sheet, code, cells }] : [],
      ),
      ...recognised.flatMap((column): Question[] =>
        column.by === "content" ? [{ kind: "content", sheet, column }] : [],
      ),
      ...(asksBlank ? [{ kind: "blank" as const, sheet }] : []),
      ...(section?.by === "name" ? [{ kind: "section" as const, sheet, name: section.name }] : []),
    ];
  });
  return all.toSorted((a, b) => order.indexOf(a.kind) - order.indexOf(b.kind));
}

const order: readonly Question["kind"][] = ["unit", "code", "blank", "content", "section"];

/** One position answers for the axis and unit of its section; values and efforts each for their own. */
function unitColumns(recognised: readonly Recognition[]): readonly Recognition[] {
  const asking = recognised.filter(({ asks }) => asks !== undefined);
  const ofSection = asking.filter(({ is }) => !ownUnits.has(is));
  const [first] = ofSection.toSorted((a, b) => rank(b) - rank(a));
  return [...(first === undefined ? [] : [first]), ...asking.filter(({ is }) => ownUnits.has(is))];
}

/** A column that is half answered stays the one that is asked about. */
const rank = ({ asks, axis }: Recognition): number => (axis !== undefined ? 2 : asks === "unit" ? 0 : 1);

/** Columns whose unit is their own and not the section's. */
export const ownUnits: ReadonlySet<string> = new Set(["value", "effort", "amount"]);
