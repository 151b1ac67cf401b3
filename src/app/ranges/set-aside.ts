import type { Analysis } from "../../core/analysis-result.ts";
import type { CountedFind } from "../../core/ranges/asked-ends.ts";
import type { Find } from "../../core/study/finds-result.ts";
import type { AsideFind } from "../../figures/plates/range-view.ts";
import { plural } from "../../report/wordings/words.ts";
import type { Mark } from "../plate/mark.ts";
import { type Edit, editsByFile } from "../tables/edits.ts";
import { type EditStep, type History, heldEdits } from "../tables/history.ts";
import { rowNumbering } from "../tables/row-order.ts";

/** A find that a person set aside, with the row by which edits know it. */
export interface HeldAside extends AsideFind, CountedFind {
  readonly file: string;
  readonly id: number;
  readonly reason: string;
}

/** The finds of a section that were set aside on its chart, in the order of doing so. */
export function heldAside(history: History, section: string | undefined): readonly HeldAside[] {
  const edits = heldEdits(history);
  const byFile = editsByFile(edits);
  const held = new Map<string, HeldAside>();
  for (const edit of edits) {
    if (edit.kind !== "row-set-aside" || edit.find === undefined || edit.find.section !== section) continue;
    const own = byFile.get(edit.file);
    if (own?.setAside.has(edit.row) !== true) continue;
    const { taxon, heightM, sample } = edit.find;
    const shown = rowNumbering(own.added).shown(edit.row);
    held.set(`${edit.file}:${edit.row}`, {
      taxon,
      heightM,
      ...(sample === undefined ? {} : { sample }),
      row: `${edit.file}:${shown}`,
      file: edit.file,
      id: edit.row,
      reason: edit.reason,
    });
  }
  return [...held.values()];
}

interface Place {
  readonly analysis: Analysis;
  readonly section: string;
  /** The edits that the analysis rests on, and those that hold now. */
  readonly workedOn: History;
  readonly history: History;
}

export const ASIDE_REASON = "set aside on the range chart";

/** Sets aside what a mark stands for, a find or all of a taxon's, or takes a find back; undefined where it is neither. */
export function asideStep({ kind, name }: Mark, place: Place): EditStep | undefined {
  if (kind === "taxon")
    return takenOut(
      findsOf(place, (find) => find.accepted === name),
      name,
      place,
    );
  if (kind !== "row") return undefined;
  const held = heldAside(place.history, place.section).find(({ row }) => row === name);
  if (held !== undefined)
    return {
      label: `taking back a find of ${held.taxon}`,
      edits: [{ kind: "row-taken-back", file: held.file, row: held.id }],
    };
  const finds = findsOf(place, ({ origin }) => `${origin.file}:${origin.row}` === name);
  return takenOut(finds, finds[0]?.accepted ?? "", place);
}

function findsOf({ analysis, section }: Place, test: (find: Find) => boolean): readonly Find[] {
  return analysis.finds.filter((find) => find.section === section && test(find));
}

function takenOut(finds: readonly Find[], taxon: string, { section, workedOn }: Place): EditStep | undefined {
  if (finds.length === 0) return undefined;
  const byFile = editsByFile(heldEdits(workedOn));
  const edits = finds.map((find): Edit => {
    const { file, row } = find.origin;
    return {
      kind: "row-set-aside",
      file,
      row: rowNumbering(byFile.get(file)?.added ?? []).known(row),
      reason: ASIDE_REASON,
      find: {
        section,
        taxon: find.accepted,
        heightM: find.heightM,
        ...(find.sample === undefined ? {} : { sample: find.sample }),
      },
    };
  });
  return { label: `setting aside ${plural(finds.length, "find")} of ${taxon}`, edits };
}
