import { readdirSync, readFileSync } from "node:fs";
import { dirname, join, normalize, sep } from "node:path";
import { describe, expect, it } from "vitest";
import { BLOCK_LAYOUT_VERSION, VERSION } from "../../src/core/version.ts";
import { wordedCautions } from "../../src/report/wordings/cautions.ts";

interface SourceFile {
  readonly path: string;
  readonly text: string;
}

const sources: readonly SourceFile[] = readdirSync("src", { recursive: true, encoding: "utf8" })
  .filter((path) => /\.tsx?$/.test(path))
  .map((path) => ({ path: path.split(sep).join("/"), text: readFileSync(join("src", path), "utf8") }));

/** What a file imports, as paths below src; packages by their name. */
const importsOf = ({ path, text }: SourceFile): readonly string[] =>
  [...text.matchAll(/(?:from|import)\s*\(?\s*"([^"]+)"/g)].map(([, target]) =>
    target.startsWith(".")
      ? normalize(join(dirname(path), target))
          .split(sep)
          .join("/")
      : target,
  );

const layers = ["kernels", "core", "figures", "report", "run", "cli", "app"];
const stages = ["numeric", "study", "tables", "markers", "alignment", "ranges", "timing"];

/** Place of a file in an order of folders, or of files directly in the parent. */
const rank = (order: readonly string[], folder: string | undefined) =>
  folder === undefined ? -1 : order.indexOf(folder);

describe("the structure", () => {
  it("layers import to the left only", () => {
    const wrong = sources.flatMap((file) =>
      importsOf(file)
        .filter((target) => layers.includes(target.split("/")[0]))
        .filter((target) => rank(layers, target.split("/")[0]) > rank(layers, file.path.split("/")[0]))
        .map((target) => `${file.path} -> ${target}`),
    );
    expect(wrong).toEqual([]);
  });

  it("the command line and the page do not import each other", () => {
    const wrong = sources.filter(({ path }) => path.startsWith("app/")).flatMap(importsOf);
    expect(wrong.filter((target) => target.startsWith("cli/"))).toEqual([]);
  });

  it("inside core later stages import earlier ones and never the reverse", () => {
    const wrong = sources
      .filter(({ path }) => path.startsWith("core/"))
      .flatMap((file) => {
        const own = rank(stages, file.path.split("/")[1]);
        if (own < 0) return [];
        return importsOf(file)
          .filter((target) => target.startsWith("core/") && rank(stages, target.split("/")[1]) > own)
          .map((target) => `${file.path} -> ${target}`);
      });
    expect(wrong).toEqual([]);
  });

  it("core imports nothing but itself, what parts and unpacks tables, valibot and the compiled kernels", () => {
    const packages = sources
      .filter(({ path }) => path.startsWith("core/"))
      .flatMap(importsOf)
      .filter((target) => !target.startsWith("core/"));
    expect(new Set(packages)).toEqual(
      new Set(["fflate", "papaparse", "read-excel-file/universal", "valibot", "virtual:kernels"]),
    );
  });

  it("an index.ts stands at a layer's edge, or gathers a list", () => {
    const deep = sources.filter(({ path }) => path.endsWith("/index.ts")).map(({ path }) => path);
    const allowed = [
      "kernels/index.ts",
      "core/index.ts",
      "figures/index.ts",
      "report/index.ts",
      "core/study/tables/index.ts",
      "report/findings/index.ts",
      "report/tables/index.ts",
      "cli/verbs/index.ts",
    ];
    expect(deep.filter((path) => !allowed.includes(path))).toEqual([]);
  });

  it("no file grew past 300 lines", () => {
    const long = sources.filter(
      ({ path, text }) => !path.includes("generated") && text.split("\n").length > 301,
    );
    expect(long.map(({ path }) => path)).toEqual([]);
  });

  it("core does not touch a clock, the console or chance", () => {
    const touching = sources.filter(
      ({ path, text }) =>
        path.startsWith("core/") &&
        /\bDate\b|\bconsole\.|Math\.random|\bprocess\.|\bperformance\b/.test(text),
    );
    expect(touching.map(({ path }) => path)).toEqual([]);
  });

  it("nothing in the sources reaches the network", () => {
    const reaching = sources.filter(({ text }) =>
      /XMLHttpRequest|WebSocket|sendBeacon|EventSource/.test(text),
    );
    expect(reaching.map(({ path }) => path)).toEqual([]);
  });
});

describe("what is declared once", () => {
  it("every caution of the core has words", () => {
    const codes = sources
      .filter(({ path }) => /^core\/(?:markers|alignment|ranges|timing)\//.test(path))
      .flatMap(({ text }) => [
        ...text.matchAll(/code: "([a-z-]+)"/g),
        ...text.matchAll(/(?:of|counted|told|compare)\(\s*(?:input,\s*)?"((?:range|timing)-[a-z-]+)"/g),
        ...text.matchAll(/"(main-horizon-[a-z-]+)"/g),
      ])
      .map(([, code]) => code);
    expect(codes.length).toBeGreaterThan(30);
    expect([...new Set(codes)].filter((code) => !wordedCautions.has(code))).toEqual([]);
  });

  it("no caution has words that nothing raises", () => {
    const core = sources
      .filter(({ path }) => path.startsWith("core/"))
      .map(({ text }) => text)
      .join("\n");
    expect([...wordedCautions].filter((code) => !core.includes(`"${code}"`))).toEqual([]);
  });

  it("the version stands in one place and in package.json alike", () => {
    const { version } = JSON.parse(readFileSync("package.json", "utf8"));
    expect(VERSION).toBe(version);
    expect(BLOCK_LAYOUT_VERSION).toBe(1);
  });
});
