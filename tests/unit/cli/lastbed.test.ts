import {
  appendFileSync,
  cpSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, it } from "vitest";
import { example, freshFolder, lastbed, start } from "./call.ts";

/** A small study in a folder of its own. */
function smallStudy(
  taxa: readonly string[] = ["Orvella tenuis", "Palmidium arx", "Selvites lautus"],
): string {
  const folder = freshFolder();
  const rows = taxa.flatMap((taxon, k) =>
    [1, 3, 5, 7].map((height) => `Orskel Ledge,"${taxon.replaceAll('"', '""')}",${height + k / 10}`),
  );
  writeFileSync(join(folder, "occurrences.csv"), `section,taxon,height (m)\n${rows.join("\n")}\n`);
  writeFileSync(
    join(folder, "horizons.csv"),
    "section,horizon,kind,position,below,above,shape\nOrskel Ledge,impact-layer,impact,9,0.1,0.1,normal\n",
  );
  return folder;
}

describe("a call that is wrong", () => {
  it.each([
    [["run", "no/such/folder", "--out", "x"], "does not exist"],
    [["run", example], "required option"],
    [["check", example, "--set", "confidenc=0.9"], "did you mean confidence?"],
    [["check", example, "--set", "confidence"], "expected --set path=value"],
    [["run", example, "--out", "x", "--threads", "none"], "expected --threads"],
    [["run", example, "--out", "x", "--figures", "gif"], "expected --figures svg"],
    [["repeat", "package.json"], "expected a repeat.json"],
    [["run", example, "--out", example], "expected an --out folder without study tables"],
    [["run", example, "--out", "package.json"], "which is a file"],
    [["run", example, "--out", "package.json/x"], "a part of the path is a file"],
    [["run", example, "--out", ""], "expected a folder after --out"],
    [["new", "package.json"], "which is a file"],
    [["check", example, "--seed", "one"], "expected a number for seed"],
    [["check", example, "--set", "confidence=2"], "for confidence, got 2"],
    [["open", example, "--port", "99999"], "from 1 to 65535"],
    [["dance"], "unknown command"],
  ])("exits 2 and says what was expected: %j", (words, said) => {
    const { status, stderr } = lastbed(...words);
    expect(status).toBe(2);
    expect(stderr).toContain(said);
    expect(stderr).not.toMatch(/\n\s+at /);
  });

  it.each([
    [["check", "no/such/folder", "--json"], "check", "expected a study folder or table", "does not exist"],
    [["run", example, "--json"], "run", "", "--out"],
    [["--json", "dance"], "", "", "unknown"],
    [["check", example, "--set", "confidenc=0.9", "--json"], "check", "known setting", "confidenc"],
  ])("with --json tells the same in its one document: %j", (words, command, expected, found) => {
    const { status, stdout } = lastbed(...words);
    expect(status).toBe(2);
    const { problems, ...document } = JSON.parse(stdout);
    expect(document).toEqual({ command, version: expect.any(String), summary: null, files: [] });
    expect(problems).toHaveLength(1);
    expect(problems[0]).toMatchObject({ severity: "error", code: "call", file: "command line" });
    expect(`expected ${problems[0].expected}`).toContain(expected);
    expect(problems[0].found).toContain(found);
    expect(problems[0].mend).not.toBe("");
  });

  it("names a main horizon that the study does not hold, and does all it can", () => {
    const { status, stdout } = lastbed(
      "check",
      smallStudy(),
      "--set",
      "boundary.horizon=impact-layr",
      "--json",
    );
    expect(status).toBe(1);
    expect(JSON.parse(stdout).problems).toContainEqual(
      expect.objectContaining({
        severity: "error",
        code: "main-horizon-unknown",
        column: "boundary.horizon",
        found: "impact-layr",
        mend: expect.stringContaining("Did you mean impact-layer?"),
      }),
    );
  });

  it("help is not an error", () => {
    expect(lastbed("--help").status).toBe(0);
    expect(lastbed("run", "--help").stdout).toContain("--threads");
  });
});

describe("an --out folder that holds what a study is read from", () => {
  const table = "section,taxon,height (m)\nOrskel Ledge,Orvella tenuis,1\n";
  it.each(["occurrences.csv", "Occurrences.TSV", "published ranges.xlsx", "taxa.zip"])(
    "%s is refused",
    (name) => {
      const folder = freshFolder();
      writeFileSync(join(folder, name), "x");
      const { status, stderr } = lastbed("run", smallStudy(), "--out", folder);
      expect(status).toBe(2);
      expect(stderr).toContain(`which holds ${name}`);
      expect(readdirSync(folder)).toEqual([name]);
    },
  );

  it("is refused where the study itself lies there under any name, or is one of several", () => {
    const folder = freshFolder();
    writeFileSync(join(folder, "my finds.tsv"), table.replaceAll(",", "\t"));
    expect(lastbed("run", join(folder, "my finds.tsv"), "--out", folder).status).toBe(2);
    const parent = freshFolder();
    for (const name of ["a", "b"]) cpSync(smallStudy(), join(parent, name), { recursive: true });
    const { status, stderr } = lastbed("run", join(parent, "a"), join(parent, "b"), "--out", parent);
    expect([status, stderr]).toEqual([2, expect.stringContaining("which holds")]);
    expect(readdirSync(join(parent, "a")).toSorted()).toEqual(["horizons.csv", "occurrences.csv"]);
  });
});

describe("new and check", () => {
  it("a new study holds every table with a worked row, and checks without a remark", () => {
    const folder = join(freshFolder(), "mine");
    expect(lastbed("new", folder).status).toBe(0);
    expect(readdirSync(folder)).toContain("searches.csv");
    const { status, stdout } = lastbed("check", folder, "--json");
    expect(status).toBe(0);
    const { command, version, problems, files } = JSON.parse(stdout);
    expect({ command, files }).toEqual({ command: "check", files: [] });
    expect(version).toMatch(/^\d+\.\d+\.\d+$/);
    expect(problems).toEqual([]);
    expect(lastbed("new", folder).status).toBe(2);
  });

  it("a table behind a link is read, and one kept in another form is named", () => {
    const [folder, study] = [smallStudy(), freshFolder()];
    for (const file of ["occurrences.csv", "horizons.csv"])
      symlinkSync(join(folder, file), join(study, file));
    writeFileSync(join(study, "Samples.xlsx"), "a workbook");
    const { stdout } = lastbed("check", study, "--json");
    const { summary, problems } = JSON.parse(stdout);
    expect(summary.sections).toMatchObject([{ section: "Orskel Ledge", occurrences: 12 }]);
    expect(problems).toContainEqual(expect.objectContaining({ file: "Samples.xlsx" }));
  });

  it("errors are told with file, row, column and a way to mend them, and exit 1", () => {
    const folder = smallStudy();
    appendFileSync(join(folder, "occurrences.csv"), "Orskel Ledge,Orvella tenuis,high\n");
    const { status, stdout } = lastbed("check", folder);
    expect(status).toBe(1);
    expect(stdout).toMatch(/error\s+occurrences\.csv\s+row 14\s+height \(m\)\s+high/);
    expect(stdout).toContain("expected");
  });
});

describe("run and repeat", () => {
  const out = freshFolder();
  beforeAll(() => {
    expect(lastbed("run", example, "--out", out).status).toBe(0);
  });

  it("writes every file it promises, and the tables byte for byte", () => {
    const written = readdirSync(out);
    for (const name of [
      "finds",
      "markers",
      "flags",
      "anomalies",
      "alignment",
      "ties",
      "candidates",
      "range-ends",
      "timing",
    ])
      expect(written).toContain(`${name}.csv`);
    for (const name of ["report.html", "repeat.json", "ro-crate-metadata.json", "datapackage.json"])
      expect(written).toContain(name);
    expect(readdirSync(join(out, "figures")).length).toBeGreaterThan(12);
    for (const name of readdirSync(join(out, "study")))
      expect(readFileSync(join(out, "study", name))).toEqual(readFileSync(join(example, name)));
  });

  it("the report stands alone", () => {
    const report = readFileSync(join(out, "report.html"), "utf8");
    expect(report).not.toMatch(/<(?:script|link|img|iframe)\b/i);
    expect(report.match(/(?:src|href)="(?!#)[^"]*"/g)).toBeNull();
    expect(report).not.toMatch(/url\((?!#|data:)/);
    expect(report.match(/<svg /g)?.length).toBeGreaterThan(12);
  });

  it("repeats to the last digit with one thread and with two", () => {
    for (const threads of ["1", "2"]) {
      const { status, stdout } = lastbed("repeat", join(out, "repeat.json"), "--threads", threads);
      expect(stdout).toContain("0 differences");
      expect(status).toBe(0);
    }
  });

  it("names the cell of a number that was changed, and the table that was", () => {
    const copy = freshFolder();
    cpSync(out, copy, { recursive: true });
    const timing = join(copy, "timing.csv");
    const [header, first, ...rest] = readFileSync(timing, "utf8").split("\n");
    const changed = first.replace(/0\.95/, "0.951").replace(/^([^,]*,)/, "$1");
    writeFileSync(
      timing,
      [header, changed === first ? first.replace(/\d/, "7") : changed, ...rest].join("\n"),
    );
    const cells = lastbed("repeat", join(copy, "repeat.json"));
    expect(cells.status).toBe(1);
    expect(cells.stdout).toMatch(/timing\.csv\s+row 2/);
    appendFileSync(join(copy, "study", "taxa.csv"), "Nova nova,bivalves,,,,,\n");
    const study = lastbed("repeat", join(copy, "repeat.json"));
    expect(study.status).toBe(1);
    expect(study.stdout).toContain("study/taxa.csv");
  });

  it("replaces an earlier run's files and leaves the rest", () => {
    const folder = freshFolder();
    lastbed("run", example, "--out", folder, "--quiet");
    writeFileSync(join(folder, "mine.txt"), "kept");
    expect(lastbed("run", smallStudy(), "--out", folder, "--quiet").status).toBe(0);
    expect(readdirSync(join(folder, "study")).toSorted()).toEqual(["horizons.csv", "occurrences.csv"]);
    expect(existsSync(join(folder, "figures", "fence.svg"))).toBe(false);
    expect(readFileSync(join(folder, "mine.txt"), "utf8")).toBe("kept");
  });

  it("never writes over a file that no run wrote, nor takes one away that another program's crate lists", () => {
    const folder = freshFolder();
    const crate = { "@graph": [{ "@id": "./", hasPart: [{ "@id": "field.txt" }] }] };
    writeFileSync(join(folder, "field.txt"), "kept");
    writeFileSync(join(folder, "ro-crate-metadata.json"), JSON.stringify(crate));
    const { status, stderr } = lastbed("run", smallStudy(), "--out", folder, "--quiet");
    expect(status).toBe(2);
    expect(stderr).toContain("which holds ro-crate-metadata.json");
    expect(readdirSync(folder).toSorted()).toEqual(["field.txt", "ro-crate-metadata.json"]);
  });

  it("a run that was cut short can be replaced", () => {
    const folder = freshFolder();
    lastbed("run", smallStudy(), "--out", folder, "--quiet");
    rmSync(join(folder, "report.html"));
    expect(lastbed("run", smallStudy(), "--out", folder, "--quiet").status).toBe(0);
    expect(existsSync(join(folder, "report.html"))).toBe(true);
  });

  it("ends well where nobody reads its output", async () => {
    const checking = start("check", example);
    checking.stdout.destroy();
    let told = "";
    checking.stderr.on("data", (chunk) => (told += String(chunk)));
    const status = await new Promise((resolve) => checking.once("close", resolve));
    expect(told).toBe("");
    expect(status).toBe(0);
  });

  it("repeat tells a result table that the sheet lacks or alone has, and a seed that its settings contradict", () => {
    const folder = freshFolder();
    lastbed("run", smallStudy(), "--out", folder, "--quiet");
    const path = join(folder, "repeat.json");
    const sheet = JSON.parse(readFileSync(path, "utf8"));
    const results = [
      ...sheet.results.filter(({ name }: { name: string }) => name !== "ties.csv"),
      { name: "gone.csv", sha256: "0" },
    ];
    writeFileSync(path, JSON.stringify({ ...sheet, seed: 77, results }));
    const { status, stdout } = lastbed("repeat", path, "--json");
    expect(status).toBe(1);
    expect(JSON.parse(stdout).summary.differences).toEqual([
      { table: "seed beside the settings", was: "77", now: "1" },
      { table: "gone.csv", was: "a table", now: "no such table" },
      { table: "ties.csv", was: "no such table", now: "a table" },
    ]);
  });

  it("several studies get a folder each", () => {
    const parent = freshFolder();
    const [a, b] = [join(parent, "a"), join(parent, "b")];
    for (const folder of [a, b]) cpSync(smallStudy(), folder, { recursive: true });
    const results = join(parent, "results");
    expect(lastbed("run", a, b, "--out", results).status).toBe(0);
    expect(readdirSync(results).toSorted()).toEqual(["a", "b", "summary.csv"]);
  });

  it("a setting of the call is kept in the sheet and repeated", () => {
    const folder = freshFolder();
    lastbed("run", smallStudy(), "--out", folder, "--set", "confidence=0.8", "--seed", "9");
    expect(JSON.parse(readFileSync(join(folder, "repeat.json"), "utf8"))).toMatchObject({
      seed: 9,
      settings: { confidence: 0.8, seed: 9 },
    });
    expect(lastbed("repeat", join(folder, "repeat.json")).status).toBe(0);
  });
});

describe("hostile text", () => {
  it("is text in the report and the figures, and no formula in a spreadsheet", () => {
    const hostile = [
      "=cmd|' /C calc'!A0",
      "<img src=x onerror=alert(1)>",
      "__proto__",
      "Orvella tenuis",
      "x".repeat(200_000),
    ];
    const folder = freshFolder();
    expect(lastbed("run", smallStudy(hostile), "--out", folder, "--quiet").status).toBe(0);
    const report = readFileSync(join(folder, "report.html"), "utf8");
    expect(report).not.toContain("<img");
    for (const figure of readdirSync(join(folder, "figures")))
      expect(readFileSync(join(folder, "figures", figure), "utf8")).not.toContain("<img");
    for (const file of readdirSync(folder).filter((name) => name.endsWith(".csv")))
      expect(readFileSync(join(folder, file), "utf8")).not.toMatch(/(?:^|[,\n])"?[=@]/);
    expect(readFileSync(join(folder, "candidates.csv"), "utf8")).toContain("__proto__");
    expect(readFileSync(join(folder, "datapackage.json"), "utf8")).toContain('"lastbed:apostrophes"');
  });
});

describe("open", () => {
  it("serves the page and the study on the loopback address only, and nothing outside them", async () => {
    const folder = smallStudy();
    mkdirSync(join(folder, "inner"));
    const server = start("open", folder);
    try {
      const address = await new Promise<string>((resolve, reject) => {
        server.stdout.on("data", (chunk) => {
          const found = /http:\/\/127\.0\.0\.1:\d+\//.exec(String(chunk));
          if (found) resolve(found[0]);
        });
        server.on("exit", () => reject(new Error("open ended")));
      });
      const page = await fetch(address);
      expect(await page.text()).toContain("<title>");
      expect(page.headers.get("content-security-policy")).toContain("default-src 'self'");
      const index = await (await fetch(`${address}study/index.json`)).json();
      expect(index.files).toEqual(["horizons.csv", "occurrences.csv"]);
      expect((await fetch(`${address}study/taxa.csv`)).status).toBe(404);
      expect((await fetch(`${address}..%2f..%2fpackage.json`)).status).not.toBe(200);
      expect((await fetch(address, { method: "POST" })).status).toBe(405);
    } finally {
      server.kill();
    }
  });
});
