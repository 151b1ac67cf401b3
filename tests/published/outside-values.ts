import { readFileSync } from "node:fs";
import { expect } from "vitest";

/** A value from outside the product, with its source beside it in the file. */
export interface OutsideCase<Inputs> {
  readonly case: string;
  readonly quantity: string;
  readonly inputs: Inputs;
  readonly expected: unknown;
  readonly tolerance: number;
}

export function readCases<Inputs>(file: URL): readonly OutsideCase<Inputs>[] {
  return JSON.parse(readFileSync(file, "utf8"));
}

/** Every number asked for is met within tolerance x max(1, |expected|); null is met by null or undefined alone. */
export function expectClose(got: unknown, expected: unknown, tolerance: number): void {
  if (expected === null) expect(got ?? null).toBeNull();
  else if (typeof expected === "number") {
    expect(got).toBeTypeOf("number");
    expect(Math.abs(Number(got) - expected)).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(expected)));
  } else
    for (const [key, value] of Object.entries(Object(expected)))
      expectClose(new Map(Object.entries(Object(got))).get(key), value, tolerance);
}

/** Heights of finds by taxon, for each synthetic section. */
export function readSections(file: URL): ReadonlyMap<string, ReadonlyMap<string, readonly number[]>> {
  const sections = new Map<string, Map<string, number[]>>();
  for (const line of readFileSync(file, "utf8").trim().split(/\r?\n/).slice(1)) {
    const [set, taxon, , height] = line.split(",");
    const taxa = sections.get(set) ?? new Map<string, number[]>();
    sections.set(
      set,
      taxa.set(
        taxon,
        [...(taxa.get(taxon) ?? []), Number(height)].toSorted((a, b) => a - b),
      ),
    );
  }
  return sections;
}
