import { existsSync, readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { recogniseColumns } from "../../../../src/core/study/columns.ts";
import { tableDocumentation } from "../../../../src/core/study/documentation.ts";
import { tableSchema } from "../../../../src/core/study/table-schema.ts";
import { tables } from "../../../../src/core/study/tables/index.ts";
import { occurrences } from "../../../../src/core/study/tables/occurrences.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";
import { studyTemplate } from "../../../../src/core/tables/templates.ts";

const datasets = new URL("../../../../datasets/", import.meta.url);

describe("table declarations", () => {
  it("know every column by its own name, Darwin Core term and synonyms, each by one column", () => {
    for (const table of tables) {
      for (const [name, column] of Object.entries(table.columns)) {
        const names = [name, column.dwc, ...(column.synonyms ?? [])].filter((known) => known !== undefined);
        const taken = recogniseColumns(names, table).map(({ column }) => column);
        expect([table.name, name, taken[0]]).toEqual([table.name, name, name]);
        for (const other of names.slice(1)) {
          expect([table.name, other, recogniseColumns([other], table)[0].column]).toEqual([
            table.name,
            other,
            name,
          ]);
        }
      }
    }
  });

  it("give a schema with required columns, limits, lists, terms and keys", () => {
    const { fields, primaryKey, foreignKeys } = tableSchema(
      tables.find(({ name }) => name === "samples") ?? occurrences,
    );
    expect(primaryKey).toEqual(["section", "sample"]);
    expect(foreignKeys).toEqual([
      { fields: ["section"], reference: { resource: "sections", fields: ["section"] } },
    ]);
    expect(fields.find(({ name }) => name === "thickness")).toMatchObject({
      type: "number",
      constraints: { minimum: 0 },
    });
    expect(tableSchema(occurrences).fields.find(({ name }) => name === "taxon")).toMatchObject({
      type: "string",
      rdfType: "http://rs.tdwg.org/dwc/terms/scientificName",
      constraints: { required: true },
    });
  });

  it("make templates whose worked rows read without a remark", () => {
    const encoder = new TextEncoder();
    const files = studyTemplate("veyra");
    const study = readStudy(new Map([...files].map(([name, text]) => [name, encoder.encode(text)])));
    expect(study.problems).toEqual([]);
    expect(study.sections[0]).toMatchObject({
      name: "Orskel Ledge",
      samples: [{ name: "OL-031" }, { name: "OL-032" }],
      legs: [{ name: "A", readings: [0, 20], heightsM: [0, expect.closeTo(10, 12)] }],
      horizons: [{ name: "Veyra impact" }],
    });
  });

  it("stand as written in datasets/README.md and datasets/schemas (node datasets/make-schemas.mjs)", () => {
    const documentation = tableDocumentation();
    for (const [name, text] of documentation) {
      const file = new URL(name, datasets);
      expect([name, existsSync(file) ? readFileSync(file, "utf8") : "no such file"]).toEqual([name, text]);
    }
    const schemas = [...documentation.keys()].filter((name) => name.startsWith("schemas/"));
    expect(
      readdirSync(new URL("schemas/", datasets))
        .map((name) => `schemas/${name}`)
        .toSorted(),
    ).toEqual(schemas.toSorted());
  });
});
