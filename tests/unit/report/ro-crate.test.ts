import { describe, expect, it } from "vitest";
import { filesOfCrate, roCrate } from "../../../src/report/ro-crate.ts";
import { sectionWith, studyOf } from "../core/study/sections.ts";

const study = { ...studyOf(sectionWith({})), files: [{ name: "samples.csv", bytes: new Uint8Array() }] };

describe("the folder's description", () => {
  it("names every file of the run, and reads back", () => {
    const text = roCrate(study, ["timing.csv", "figures/fence.svg"]);
    expect(filesOfCrate(text)).toEqual(["timing.csv", "figures/fence.svg", "study/samples.csv"]);
  });

  it("has the two entities that RO-Crate 1.2 requires (https://w3id.org/ro/crate/1.2)", () => {
    const { "@context": context, "@graph": graph } = JSON.parse(roCrate(study, []));
    expect(context).toBe("https://w3id.org/ro/crate/1.2/context");
    expect(graph).toContainEqual({
      "@id": "ro-crate-metadata.json",
      "@type": "CreativeWork",
      conformsTo: { "@id": "https://w3id.org/ro/crate/1.2" },
      about: { "@id": "./" },
    });
    expect(graph).toContainEqual(expect.objectContaining({ "@id": "./", "@type": "Dataset" }));
  });

  it("anything else lists no files", () => {
    for (const text of [
      "",
      "null",
      "[]",
      '{"@graph":3}',
      '{"@graph":[{"@id":"./","hasPart":[null,{"@id":3}]}]}',
      '{"@graph":[{"@id":"./","hasPart":[{"@id":"field.txt"}]},{"@id":"#other","name":"Other"}]}',
    ])
      expect(filesOfCrate(text)).toEqual([]);
  });
});
