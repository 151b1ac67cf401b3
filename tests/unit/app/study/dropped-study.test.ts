import { describe, expect, it } from "vitest";
import { chosenStudy } from "../../../../src/app/study/dropped-study.ts";
import { NotAStudy } from "../../../../src/app/study/given-study.ts";

/** A file that says how large it is, and must not be read. */
function fileOf(name: string, size: number): File {
  const file = new File(["section,taxon\n"], name);
  Object.defineProperty(file, "size", { value: size });
  Object.defineProperty(file, "webkitRelativePath", { value: "" });
  file.arrayBuffer = () => Promise.reject(new Error(`${name} was read`));
  return file;
}

describe("files given to the page", () => {
  it("are refused by their size before a byte is read", async () => {
    const choosing = chosenStudy([fileOf("sections.csv", 20), fileOf("occurrences.csv", 2 ** 30)]);
    await expect(choosing).rejects.toThrow(NotAStudy);
    await expect(choosing).rejects.toThrow(
      "occurrences.csv is too large to read here: it has 1024 MiB, and a file may have at most 256 MiB.",
    );
  });

  it("are read where they are not too large", async () => {
    await expect(chosenStudy([fileOf("occurrences.csv", 2 ** 28)])).rejects.toThrow(
      "occurrences.csv was read",
    );
  });
});
