import { groupSigns } from "../../figures/plates/searched-groups.ts";
import type { Action } from "../state/actions.ts";
import type { PageContents } from "../state/page-context.ts";
import type { RangesPlace } from "./ranges-place.ts";

/** Changes how the range chart is looked at; what is not named stays. */
export const changedRanges = (
  { go, state }: Pick<PageContents, "go" | "state">,
  change: Partial<RangesPlace>,
): void => go({ ranges: { ...state.place.ranges, ...change } });

/** The groups found in the section in focus. */
export function groupsInFocus({ open }: Pick<PageContents, "open">): readonly string[] {
  if (open === undefined) return [];
  const { analysis, focus } = open;
  const here = analysis.taxa.filter(({ section }) => section === focus.section?.name);
  const found = new Set(here.map(({ group }) => group));
  return [...groupSigns(analysis).keys()].filter((group) => found.has(group));
}

/** What can be done with the range chart, from anywhere on its station. */
export function rangesActions(page: PageContents): Action[] {
  const { open, state } = page;
  const place = state.place.ranges;
  const isHere = open?.focus.station === "ranges" && open.focus.section !== undefined;
  const turn = (change: Partial<RangesPlace>) => changedRanges(page, change);
  const isFolded = place.folded.length > 0;
  const ranges = { group: "Ranges", isAvailable: isHere };
  return [
    {
      ...ranges,
      id: "compare-methods",
      label: place.isCompared ? "Range chart" : "Compare methods",
      shortcut: "c",
      act: () => turn({ isCompared: !place.isCompared, page: 1 }),
    },
    {
      ...ranges,
      id: "fold-groups",
      label: isFolded ? "Unfold all groups" : "Fold all groups",
      shortcut: "f",
      act: () => turn({ folded: isFolded ? [] : groupsInFocus(page), page: 1 }),
    },
  ];
}
