import { describe, expect, it } from "vitest";
import { applyEdits, type Edit, editsByFile } from "../../../../src/app/tables/edits.ts";
import { givenTable, leavingSheets, leftOut, unreadFiles } from "../../../../src/app/tables/given-table.ts";
import { renamedStep, typedStep } from "../../../../src/app/tables/grid-steps.ts";
import { readTables, studyTables } from "../../../../src/app/tables/shown-table.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

const bytes = (text: string) => new TextEncoder().encode(text);
const files = (text: string, name = "occurrences.csv") => new Map([[name, bytes(text)]]);

/** The tables of files as the page shows them before any edit. */
function opened(given: ReadonlyMap<string, Uint8Array>, edits: readonly Edit[] = []) {
  const { sheets, problems, sections } = readStudy(given);
  const left = leftOut(given, leavingSheets(sheets, problems), unreadFiles(sheets, problems));
  const tables = [
    ...sheets.map((sheet) => givenTable(sheet, [...sheet.rows], left.rows.get(sheet.file))),
    ...left.tables,
  ];
  const shown = studyTables(
    readTables(tables, { sheets, problems, sections, edits: new Map() }),
    editsByFile(edits),
  );
  return { tables, shown };
}

function afterEdits(given: ReadonlyMap<string, Uint8Array>, edits: readonly Edit[]) {
  return readStudy(applyEdits(given, edits, { forms: opened(given).tables, keepsRowNumbers: true }));
}

const TOO_MANY = "section,taxon,height (m)\nOrsk,Velorites a,1\nOrsk,Velorites b,1,5\nOrsk,Velorites c,2\n";

describe("rows that could not be read", () => {
  it("with too many cells are shown at their place, their further cells too", () => {
    const [table] = opened(files(TOO_MANY)).shown;
    expect(table?.rowNumbers).toEqual([2, 3, 4]);
    expect(table?.rows[1]).toEqual(["Orsk", "Velorites b", "1", "5"]);
    expect(table?.columns.map(({ isBeyond }) => isBeyond === true)).toEqual([false, false, false, true]);
    expect([...(table?.unread.keys() ?? [])]).toEqual([3]);
  });

  it("are used once they are mended, and nothing else changes", () => {
    const given = files(TOO_MANY);
    const [table] = opened(given).shown;
    if (table === undefined) throw new Error("no table");
    const edits = [
      ...typedStep(table, { place: 1, column: 2 }, "1.5").edits,
      ...typedStep(table, { place: 1, column: 3 }, "").edits,
    ];
    const { sheets, problems } = afterEdits(given, edits);
    expect(sheets[0]?.rows.at(1)).toEqual(["Orsk", "Velorites b", "1.5"]);
    expect(problems.filter(({ code }) => code === "too-many-cells")).toEqual([]);
  });

  it("with quotes gone wrong are mended by taking the cell as it stands", () => {
    const given = files('section,taxon,height (m)\nOrsk,"Velorites" a,1\nOrsk,Velorites b,2\n');
    const [table] = opened(given).shown;
    if (table === undefined) throw new Error("no table");
    expect(table.rows[0]).toEqual(["Orsk", '"Velorites" a', "1"]);
    const { edits } = typedStep(table, { place: 0, column: 1 }, '"Velorites" a');
    const { sheets, problems } = afterEdits(given, edits);
    expect(sheets[0]?.rows.at(0)?.[1]).toBe('"Velorites" a');
    expect(problems.filter(({ code }) => code === "malformed-quote")).toEqual([]);
  });
});

describe("a table that could not be read", () => {
  it("for a column under an unknown name is shown, and read once the column is renamed", () => {
    const given = files("section,creature,height (m)\nOrsk,Velorites a,1\n");
    const [table] = opened(given).shown;
    if (table === undefined) throw new Error("no table");
    expect(table.rows).toEqual([["Orsk", "Velorites a", "1"]]);
    expect(table.columns.map(({ header }) => header)).toEqual(["section", "creature", "height (m)"]);
    const { sheets } = afterEdits(given, renamedStep(table, 1, "taxon").edits);
    expect(sheets[0]?.headers).toEqual(["section", "taxon", "height (m)"]);
    expect(sheets[0]?.rows.at(0)).toEqual(["Orsk", "Velorites a", "1"]);
  });

  it("for a quote that nothing closes is shown row by row, and read once the cell is written", () => {
    const given = files('section,taxon,height (m)\nOrsk,"Velorites a,1\nOrsk,Velorites b,2\n');
    const [table] = opened(given).shown;
    if (table === undefined) throw new Error("no table");
    expect(table.rows).toEqual([
      ["Orsk", '"Velorites a', "1"],
      ["Orsk", "Velorites b", "2"],
    ]);
    const { sheets } = afterEdits(given, typedStep(table, { place: 0, column: 1 }, "Velorites a").edits);
    expect([...(sheets[0]?.rows ?? [])]).toEqual([
      ["Orsk", "Velorites a", "1"],
      ["Orsk", "Velorites b", "2"],
    ]);
  });
});

describe("a column that is renamed", () => {
  it("changes its cell of the header and no other byte", () => {
    const given = files('section,"taxon" ,height (m)\r\nOrsk, Velorites a ,1.50\r\n');
    const [table] = opened(given).shown;
    if (table === undefined) throw new Error("no table");
    const { edits } = renamedStep(table, 2, "height (cm)");
    const after = applyEdits(given, edits, { forms: opened(given).tables, keepsRowNumbers: false });
    expect(new TextDecoder().decode(after.get("occurrences.csv"))).toBe(
      'section,"taxon" ,height (cm)\r\nOrsk, Velorites a ,1.50\r\n',
    );
    expect(opened(given, edits).shown[0]?.columns[2]?.header).toBe("height (cm)");
  });

  it("under a header of two rows makes it one that reads the same", () => {
    const given = files("section,taxon,height\n,,(m)\nOrsk,Velorites a,1\nOrsk,Velorites b,2\n");
    const [table] = opened(given).shown;
    if (table === undefined) throw new Error("no table");
    expect(table.headerRows).toEqual([1, 2]);
    const { sheets } = afterEdits(given, renamedStep(table, 1, "species").edits);
    expect(sheets[0]?.headers).toEqual(["section", "species", "height (m)"]);
    expect([...(sheets[0]?.rowNumbers ?? [])]).toEqual([3, 4]);
  });

  it("keeps the apostrophes that its package records", () => {
    const described = {
      resources: [
        {
          name: "occurrences",
          path: "occurrences.csv",
          "lastbed:apostrophes": ["notes"],
          schema: { fields: [{ name: "notes", type: "string" }] },
        },
      ],
    };
    const given = new Map([
      ...files("section,taxon,height (m),notes\nOrsk,Velorites a,1,'=1+1\n"),
      ["datapackage.json", bytes(JSON.stringify(described))] as const,
    ]);
    const [table] = opened(given).shown;
    if (table === undefined) throw new Error("no table");
    const edits = [
      ...renamedStep(table, 3, "remarks").edits,
      ...typedStep(table, { place: 0, column: 0 }, "Orsk 2").edits,
    ];
    expect(afterEdits(given, edits).sheets[0]?.rows.at(0)).toEqual(["Orsk 2", "Velorites a", "1", "=1+1"]);
    const quoted = typedStep(table, { place: 0, column: 3 }, "'=2").edits;
    expect(afterEdits(given, quoted).sheets[0]?.rows.at(0)?.[3]).toBe("'=2");
  });
});
