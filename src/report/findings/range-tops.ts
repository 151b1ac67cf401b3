import type { Analysis } from "../../core/analysis-result.ts";
import type { RangeEnd, RangeMethod } from "../../core/ranges/result.ts";
import { type EndStanding, standingOf } from "./end-words.ts";

/** The tops of the candidates of a section, by method: the leading one first. */
export interface CandidateTops {
  readonly methods: readonly RangeMethod[];
  /** Rows of each candidate, the leading method's first. */
  readonly byTaxon: ReadonlyMap<string, readonly RangeEnd[]>;
}

type RowsByTaxon = ReadonlyMap<string, readonly RangeEnd[]>;

const indexes = new WeakMap<readonly RangeEnd[], ReadonlyMap<string, RowsByTaxon>>();

/** The rows of each taxon's top, or base, in a section: the leading method's first. */
export function rowsOfEnd({ ranges, study }: Analysis, section: string, end: "top" | "base"): RowsByTaxon {
  const { identification } = study.settings.taxa;
  const index = indexes.get(ranges.ends) ?? indexOf(ranges.ends);
  indexes.set(ranges.ends, index);
  return index.get(keyOf({ section, end, identification })) ?? new Map();
}

const keyOf = ({ section, end, identification }: Pick<RangeEnd, "section" | "end" | "identification">) =>
  `${end} ${identification} ${section}`;

function indexOf(ends: readonly RangeEnd[]): ReadonlyMap<string, RowsByTaxon> {
  const index = new Map<string, Map<string, RangeEnd[]>>();
  for (const row of ends) {
    const own = index.get(keyOf(row)) ?? new Map<string, RangeEnd[]>();
    index.set(keyOf(row), own);
    const list = own.get(row.taxon);
    if (list === undefined) own.set(row.taxon, [row]);
    else list.push(row);
  }
  return index;
}

export function candidateTops(analysis: Analysis, section: string): CandidateTops {
  const asked = new Set(
    analysis.candidates
      .filter((candidate) => candidate.section === section && candidate.role === "candidate")
      .map(({ taxon }) => taxon),
  );
  const byTaxon = new Map([...rowsOfEnd(analysis, section, "top")].filter(([taxon]) => asked.has(taxon)));
  const methods = new Set([...byTaxon.values()].flatMap((rows) => rows.map(({ method }) => method)));
  return { methods: [...methods], byTaxon };
}

export type Standings = Readonly<Record<EndStanding, number>>;

/** How many candidates' intervals by a method reach a level, have no bound, or end below it. */
export function standings({ byTaxon }: CandidateTops, method: RangeMethod, mainM: number): Standings {
  const count = { reaches: 0, open: 0, short: 0, untold: 0 };
  for (const rows of byTaxon.values()) {
    const row = rows.find((each) => each.method === method);
    count[row === undefined ? "untold" : standingOf(row, mainM)]++;
  }
  return count;
}
