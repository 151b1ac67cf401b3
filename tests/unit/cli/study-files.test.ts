import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { readStudyFiles } from "../../../src/cli/study-files.ts";

describe("files of a study on disk", () => {
  let folder = "";
  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), "lastbed-files-"));
    await writeFile(join(folder, "sections.csv"), "section,axis,unit\nOrskel Ledge,height,m\n");
    await writeFile(
      join(folder, "occurrences.csv"),
      `section,taxon,position\n${"Orskel Ledge,Orvella tenuis,1\n".repeat(50)}`,
    );
  });
  afterAll(() => rm(folder, { recursive: true, force: true }));

  it("are refused where one is larger than what is read, in a folder and alone", async () => {
    const words =
      /^lastbed: expected files of at most 1 MiB, got .*occurrences\.csv of 1 MiB; part the table/;
    await expect(readStudyFiles(folder, 1000)).rejects.toThrow(words);
    await expect(readStudyFiles(join(folder, "occurrences.csv"), 1000)).rejects.toThrow(words);
  });

  it("are read up to that size", async () => {
    expect([...(await readStudyFiles(folder, 1600)).files.keys()]).toEqual([
      "occurrences.csv",
      "sections.csv",
    ]);
  });
});
