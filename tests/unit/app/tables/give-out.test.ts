import { describe, expect, it } from "vitest";
import type { Edit } from "../../../../src/app/tables/edits.ts";
import { filesGivenOut } from "../../../../src/app/tables/give-out.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

const bytes = (text: string) => new TextEncoder().encode(text);
const text = (given: Uint8Array | undefined) => new TextDecoder().decode(given);
const occurrences =
  'section,taxon,height (m),notes\nOrsk,Velorites a,1.5,"as, found"\nOrsk,Velorites b,-2,\n';
const files = new Map([
  ["occurrences.csv", bytes(occurrences)],
  ["settings.json", bytes("{}\n")],
]);
const noted = (now: string): Edit => ({
  kind: "cell",
  file: "occurrences.csv",
  row: 3,
  column: 3,
  was: "",
  now,
});
const giveOut = (given: ReadonlyMap<string, Uint8Array>, edits: readonly Edit[]) => {
  const forms = readStudy(given).sheets;
  return filesGivenOut(given, edits, { name: "Orsk", forms });
};

describe("a study that is given out", () => {
  it("holds the edits, leaves out what was set aside, and changes nothing else", () => {
    const aside: Edit = { kind: "row-set-aside", file: "occurrences.csv", row: 2, reason: "float" };
    const out = giveOut(files, [noted("seen twice"), aside]);
    expect([...out.keys()]).toEqual([
      "occurrences.csv",
      "settings.json",
      "README.set-aside.csv",
      "datapackage.json",
    ]);
    expect(text(out.get("README.set-aside.csv"))).toBe(
      'file,row,reason,cells\noccurrences.csv,2,float,"Orsk\tVelorites a\t1.5\tas, found"\n',
    );
    expect(readStudy(out).problems.filter(({ file }) => file.startsWith("README"))).toEqual([]);
    expect(text(out.get("occurrences.csv"))).toBe(
      "section,taxon,height (m),notes\nOrsk,Velorites b,-2,seen twice\n",
    );
    expect(out.get("settings.json")).toBe(files.get("settings.json"));
    expect(text(giveOut(files, []).get("occurrences.csv"))).toBe(occurrences);
  });

  it("guards texts that start a formula, and reads back as it was, twice over", () => {
    const once = giveOut(files, [noted("=1+1")]);
    expect(text(once.get("occurrences.csv"))).toContain("Orsk,Velorites b,-2,'=1+1\n");
    const read = readStudy(once);
    expect(read.sheets[0]?.rows.at(1)).toEqual(["Orsk", "Velorites b", "-2", "=1+1"]);
    const twice = giveOut(once, [noted("@home")]);
    expect(readStudy(twice).sheets[0]?.rows.at(1)?.[3]).toBe("@home");
    expect(readStudy(giveOut(once, [])).sheets[0]?.rows).toEqual(read.sheets[0]?.rows);
    expect(text(giveOut(once, []).get("occurrences.csv"))).toBe(text(once.get("occurrences.csv")));
  });

  it("keeps what its data package said", () => {
    const described = JSON.parse(text(giveOut(files, []).get("datapackage.json")));
    const own = { ...described, title: "Field book 3", licenses: [{ name: "CC0-1.0" }] };
    const out = giveOut(new Map([...files, ["datapackage.json", bytes(JSON.stringify(own))]]), [noted("-x")]);
    const after = JSON.parse(text(out.get("datapackage.json")));
    expect(after).toMatchObject({ title: "Field book 3", licenses: [{ name: "CC0-1.0" }] });
    expect(after.resources[0]["lastbed:apostrophes"]).toEqual(["notes"]);
  });
});
