import { lengthUnit } from "../../study/units.ts";
import { type DarwinRow, isFilled } from "./darwin-core-rows.ts";

const numberWithUnit = /^([+-]?[\d.,]+)\s*([a-z]+\.?|')$/i;

/**
 * Rows whose written positions (`12.4 m`) are parted into number and unit, where every one has the same unit: the term
 * then carries it (`verbatimDepth (m)`). Without a unit, or with several, they stay as written and reading asks.
 */
export function withStatedUnits(rows: readonly DarwinRow[]): readonly DarwinRow[] {
  const inMetres = ["minimumDepthInMeters", "maximumDepthInMeters"].every((term) => isFilled(rows, term));
  return ["verbatimDepth", "verbatimElevation"].reduce((done, term) => {
    if (!isFilled(rows, term)) return done;
    return inMetres ? without(done, term) : withUnit(done, term);
  }, rows);
}

const without = (rows: readonly DarwinRow[], term: string): readonly DarwinRow[] =>
  rows.map((row) => ({ ...row, values: new Map([...row.values].filter(([name]) => name !== term)) }));

function withUnit(rows: readonly DarwinRow[], term: string): readonly DarwinRow[] {
  const parts = rows.map(({ values }) => numberWithUnit.exec((values.get(term) ?? "").trim()));
  const isWhole = rows.every(
    ({ values }, at) => (values.get(term) ?? "").trim() === "" || parts[at] !== null,
  );
  const units = new Set(
    parts.flatMap((part) => (part === null ? [] : [lengthUnit(part[2].replace(/\.$/, ""))])),
  );
  const [unit] = units;
  if (!isWhole || units.size !== 1 || unit === undefined) return rows;
  return rows.map((row, at) => ({
    ...row,
    values: new Map(
      [...row.values].map(([name, value]) =>
        name === term ? [`${term} (${unit})`, parts[at]?.[1] ?? ""] : [name, value],
      ),
    ),
  }));
}
