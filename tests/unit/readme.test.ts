import { spawnSync } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";

const readme = readFileSync("README.md", "utf8");

describe("the README", () => {
  it("shows library code that runs as it stands, on the built package", () => {
    const code = /```ts\n([\s\S]*?)```/.exec(readme)?.[1] ?? "";
    const { status, stdout, stderr } = spawnSync(process.execPath, ["--input-type=module", "-e", code], {
      encoding: "utf8",
    });
    expect(stderr).toBe("");
    expect(status).toBe(0);
    expect(stdout).toContain("4 sections");
    expect(stdout).toMatch(/\n\d+\n$/);
  });

  it("points at files that exist", () => {
    const targets = [...readme.matchAll(/\]\(([^)#]+)\)/g)].map(([, target]) => target);
    expect(targets.length).toBeGreaterThan(2);
    expect(targets.filter((target) => !existsSync(target))).toEqual([]);
  });
});
