import { beds } from "./beds.ts";
import { choices } from "./choices.ts";
import { claims } from "./claims.ts";
import { horizons } from "./horizons.ts";
import { intervals } from "./intervals.ts";
import { legs } from "./legs.ts";
import { measurements } from "./measurements.ts";
import { occurrences } from "./occurrences.ts";
import { planes } from "./planes.ts";
import { publishedRanges } from "./published-ranges.ts";
import { recovery } from "./recovery.ts";
import { samples } from "./samples.ts";
import { searches } from "./searches.ts";
import { sections } from "./sections.ts";
import { taxa } from "./taxa.ts";

/** Every table of a study, in the order a person fills them in. */
export const tables = [
  sections,
  legs,
  intervals,
  beds,
  samples,
  searches,
  occurrences,
  publishedRanges,
  measurements,
  planes,
  horizons,
  taxa,
  recovery,
  claims,
  choices,
] as const;

export type TableName = (typeof tables)[number]["name"];
export type { ColumnDeclaration, TableDeclaration } from "./declare.ts";
