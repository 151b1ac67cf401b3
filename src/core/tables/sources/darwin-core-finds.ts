import { parseName } from "../../study/open-nomenclature.ts";
import type { ProblemList } from "../../study/problem-list.ts";
import type { DarwinRow } from "./darwin-core-rows.ts";

export interface FindTelling {
  readonly file: string;
  readonly problems: ProblemList;
}

const individuals = /^(?:individuals?|specimens?|count)$/i;

/** An occurrence row in the terms that the table of finds knows: one name, and a count that says whether it was found. */
export function plainFind(row: DarwinRow, telling: FindTelling): DarwinRow {
  const values = new Map(row.values);
  settleName(values);
  settleQuantity(values);
  settleStatus(values, row.row, telling);
  return { ...row, values };
}

type Values = Map<string, string>;

const take = (values: Values, term: string): string => (values.get(term) ?? "").trim();

/** The name without its author; as it was written in the rock's own list where that is the same name with its signs. */
function settleName(values: Values): void {
  const author = take(values, "scientificNameAuthorship");
  const [whole, written] = [take(values, "scientificName"), take(values, "verbatimIdentification")];
  const isAuthored = author !== "" && whole.endsWith(author) && whole.length > author.length;
  const name = isAuthored ? whole.slice(0, -author.length).trim() : whole;
  const isSame = written !== "" && (name === "" || parseName(written).name === parseName(name).name);
  if (isAuthored || whole === "") values.delete("scientificNameAuthorship");
  if (isSame || name === "") values.delete("verbatimIdentification");
  if (values.has("scientificName") || written !== "") values.set("scientificName", isSame ? written : name);
}

/** A quantity of individuals is a count; one of another kind is an abundance. */
function settleQuantity(values: Values): void {
  const [quantity, count] = [take(values, "organismQuantity"), take(values, "individualCount")];
  if (!individuals.test(take(values, "organismQuantityType")) || !/^\d+$/.test(quantity) || count !== "")
    return;
  values.set("individualCount", quantity);
  values.delete("organismQuantity");
  values.delete("organismQuantityType");
}

/** An absence is a count of 0: looked for and not found. */
function settleStatus(values: Values, row: number, { file, problems }: FindTelling): void {
  const [status, count] = [take(values, "occurrenceStatus").toLowerCase(), take(values, "individualCount")];
  const column = "occurrenceStatus";
  if (status === "absent" && /^[1-9]/.test(count))
    problems.add("status-contradicted", { file, row, column, found: `absent, individualCount ${count}` });
  else if (status === "absent") values.set("individualCount", "0");
  else if (status !== "" && status !== "present")
    problems.addOnce(status, "status-unknown", { file, row, column, found: status });
  values.delete(column);
}
