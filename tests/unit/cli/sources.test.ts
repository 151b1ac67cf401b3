import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { workbook, zip } from "../core/tables/awkward/packed.ts";
import { freshFolder, lastbed } from "./call.ts";

const header = ["section", "taxon", "height (m)"];
const rows = ["Orvella tenuis", "Palmidium arx", "Selvites lautus"].flatMap((taxon, k) =>
  [1, 3, 5, 7].map((height) => ["Orskel Ledge", taxon, height + k / 10]),
);
const text = [header, ...rows].map((cells) => `${cells.join(",")}\n`).join("");
const horizons =
  "section,horizon,kind,position,below,above,shape\nOrskel Ledge,impact-layer,impact,9,0.1,0.1,normal\n";

/** A path to a study: files in a fresh folder, or one of them. */
function given(files: Readonly<Record<string, string | Uint8Array>>, only = ""): string {
  const folder = freshFolder();
  for (const [name, content] of Object.entries(files)) {
    mkdirSync(join(folder, name, ".."), { recursive: true });
    writeFileSync(join(folder, name), content);
  }
  return join(folder, only);
}

function checked(path: string) {
  const { stdout } = lastbed("check", path, "--json");
  const { summary, problems } = JSON.parse(stdout);
  const codes: readonly string[] = problems.map(({ code }: { code: string }) => code);
  return { study: summary.study, occurrences: summary.sections[0]?.occurrences, codes };
}

const meta =
  '<archive><core rowType="http://rs.tdwg.org/dwc/terms/Occurrence" fieldsTerminatedBy="," ignoreHeaderLines="1"><files><location>occurrence.txt</location></files><id index="3"/><field index="0" term="locality"/><field index="1" term="scientificName"/><field index="2" term="verbatimElevation"/></core></archive>';

const bound = await workbook({ occurrences: [header, ...rows] });

describe("check takes", () => {
  it.each([
    ["a zip", given({ "finds.zip": zip({ "a/occurrences.csv": text }) }, "finds.zip"), "finds"],
    ["a workbook", given({ "finds.xlsx": bound }, "finds.xlsx"), "finds"],
    ["a folder of one workbook", given({ "x.xlsx": bound }), undefined],
    [
      "a single table under any name",
      given({ "my finds.tsv": text.replaceAll(",", "\t") }, "my finds.tsv"),
      "my finds",
    ],
    [
      "a data package with its tables in a folder of their own",
      given({
        "datapackage.json": JSON.stringify({ resources: [{ name: "occurrences", path: "data/finds.csv" }] }),
        "data/finds.csv": text,
      }),
      undefined,
    ],
    [
      "a Darwin Core archive unpacked",
      given({ "meta.xml": meta, "occurrence.txt": text.replace(/,([\d.]+)\n/g, ",$1 m,id\n") }),
      undefined,
    ],
  ])("%s", (_, path, name) => {
    const { study, occurrences, codes } = checked(path);
    expect(occurrences).toBe(12);
    if (name !== undefined) expect(study).toBe(name);
    expect(codes.filter((code) => code !== "ungrouped" && code !== "taken-as")).toEqual([]);
  });

  it("no file of another kind, and says what it takes", () => {
    const { status, stderr } = lastbed("check", given({ "finds.pdf": "x" }, "finds.pdf"));
    expect(status).toBe(2);
    expect(stderr).toContain(".xlsx or .zip");
  });
});

describe("a run of a zip", () => {
  it("keeps the zip as it was given, repeats from it, and gives the same on two threads", () => {
    const bytes = zip({
      "occurrences.csv": text,
      "horizons.csv": horizons,
      "settings.json": '{"replicates":500}',
    });
    const path = given({ "finds.zip": bytes }, "finds.zip");
    const [out, again] = [freshFolder(), freshFolder()];
    expect(lastbed("run", path, "--out", out, "--quiet").status).toBe(0);
    expect(new Uint8Array(readFileSync(join(out, "study", "finds.zip")))).toEqual(bytes);
    const repeated = lastbed("repeat", join(out, "repeat.json"));
    expect(repeated.stdout).toContain("0 differences");
    expect(lastbed("run", path, "--out", again, "--quiet", "--threads", "2").status).toBe(0);
    for (const table of ["timing.csv", "range-ends.csv"])
      expect(readFileSync(join(again, table), "utf8")).toBe(readFileSync(join(out, table), "utf8"));
  });
});
