import type { RangeMethod } from "../../core/ranges/result.ts";
import { defaultSettings } from "../../core/study/settings.ts";
import type { RangeOrder } from "../../figures/plates/range-view.ts";

/** How the range chart is looked at: part of the page's address, so that it survives a reload. */
export interface RangesPlace {
  readonly isCompared: boolean;
  /** Absent for the method that leads. */
  readonly method?: RangeMethod;
  readonly order: RangeOrder;
  /** Groups folded into a strip of last finds. */
  readonly folded: readonly string[];
  /** Counted from 1. */
  readonly page: number;
  /** The taxon in focus. */
  readonly taxon?: string;
  readonly isLeaningShown: boolean;
}

export const ORDERS: readonly { readonly id: RangeOrder; readonly title: string }[] = [
  { id: "group", title: "Group" },
  { id: "last", title: "Last find" },
  { id: "name", title: "Name" },
];

export const METHODS: readonly RangeMethod[] = defaultSettings.ranges.methods;

/** What an address says of it; what it does not name, or names wrongly, is the default. */
export function rangesPlaceOf(words: URLSearchParams): RangesPlace {
  const page = Number(words.get("page"));
  const method = METHODS.find((name) => name === words.get("method"));
  const taxon = words.get("taxon");
  return {
    isCompared: words.get("compare") === "methods",
    ...(method === undefined ? {} : { method }),
    order: ORDERS.find(({ id }) => id === words.get("order"))?.id ?? "group",
    folded: words.getAll("fold"),
    page: Number.isInteger(page) && page > 0 ? page : 1,
    ...(taxon ? { taxon } : {}),
    isLeaningShown: words.get("leaning") !== "no",
  };
}

/** Writes into an address what is not the default. */
export function writeRangesPlace(words: URLSearchParams, place: RangesPlace): void {
  if (place.isCompared) words.set("compare", "methods");
  if (place.method !== undefined) words.set("method", place.method);
  if (place.order !== "group") words.set("order", place.order);
  for (const group of place.folded) words.append("fold", group);
  if (place.page > 1) words.set("page", String(place.page));
  if (place.taxon !== undefined) words.set("taxon", place.taxon);
  if (!place.isLeaningShown) words.set("leaning", "no");
}
