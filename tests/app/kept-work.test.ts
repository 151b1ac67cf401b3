import { readFile } from "node:fs/promises";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { readSources } from "../../src/core/tables/read-sources.ts";
import { findBrowser } from "./find-browser.mjs";
import { dropFiles, finding, type OpenedPage, openPage } from "./opened-page.ts";
import { smallStudy } from "./small-study.ts";

const grid = (page: Page) => page.getByRole("grid");
const cell = (page: Page, text: string) => grid(page).getByText(text, { exact: true });

/** Writes in the first row's second column. */
async function rename(page: Page, text: string): Promise<void> {
  await grid(page).focus();
  for (const key of ["Control+Home", "ArrowRight"]) await page.keyboard.press(key);
  await page.keyboard.type(text);
  await page.keyboard.press("Enter");
  await cell(page, text).waitFor();
}

async function save(page: Page, what: string): Promise<void> {
  await page.getByRole("button", { name: "Save…" }).click();
  await page.getByRole("menuitem", { name: what }).click();
}

const isKept = (page: Page) => page.getByText(/^Edits up to .* are kept in this browser only/).waitFor();

describe.skipIf(findBrowser() === undefined)("edited tables", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage({ hash: "#tables?table=samples.csv" });
    await finding(opened.page);
  }, 90_000);
  afterAll(() => opened?.close());

  it("of the study beside the page are there again when it is opened again", async () => {
    const { page } = opened;
    await rename(page, "OL-first");
    await isKept(page);
    await page.reload();
    await page.getByText(/^Opened with 1 edit kept in this browser/).waitFor({ timeout: 60_000 });
    await cell(page, "OL-first").waitFor();
  });

  it("go back to the tables as they were, and forward", async () => {
    const { page } = opened;
    await page.getByRole("button", { name: "Back to the tables as they were" }).click();
    await cell(page, "OL-001").waitFor();
    await page.getByRole("button", { name: "Redo" }).click();
    await cell(page, "OL-first").waitFor();
  });

  it("of a dropped study are offered after a reload, and open with it", async () => {
    const { page } = opened;
    await dropFiles(page, smallStudy);
    await cell(page, "LB-1").waitFor({ timeout: 60_000 });
    await rename(page, "LB-first");
    await isKept(page);
    await page.reload();
    await page.getByText(/^Dropped tables, edited .*, is kept in this browser/).waitFor({ timeout: 60_000 });
    await page.getByRole("button", { name: "Open it" }).click();
    await cell(page, "LB-first").waitFor({ timeout: 60_000 });
    expect(await page.locator("header h1").textContent()).toBe("Dropped tables");
  });

  it("are kept under a name to go back to", async () => {
    const { page } = opened;
    await page.getByLabel("Name these tables").fill("before the second look");
    await page.getByRole("button", { name: "Keep", exact: true }).click();
    await page.getByText("before the second look").waitFor();
    await rename(page, "LB-other");
    await page.getByRole("button", { name: "Go back to this" }).first().click();
    await cell(page, "LB-first").waitFor();
    await page.getByText("before going back to “before the second look”").waitFor();
  });

  it("are given out as a table and as a zip that opens again", async () => {
    const { page } = opened;
    const [table] = await Promise.all([page.waitForEvent("download"), save(page, "This table as CSV")]);
    expect(table.suggestedFilename()).toBe("samples.csv");
    expect(await readFile(await table.path(), "utf8")).toBe(
      (smallStudy["samples.csv"] ?? "").replace("LB-1,", "LB-first,"),
    );
    const [packed] = await Promise.all([page.waitForEvent("download"), save(page, "Study as a zip")]);
    const bytes = new Uint8Array(await readFile(await packed.path()));
    const study = await readSources(new Map([["study.zip", bytes]]));
    expect(study.sheets.find(({ file }) => file === "samples.csv")?.rows.at(0)?.[1]).toBe("LB-first");
    expect(study.sheets.map(({ file }) => file).toSorted()).toEqual(Object.keys(smallStudy).toSorted());
  });

  it("tell a second tab that it keeps nothing", async () => {
    const second = await opened.page.context().newPage();
    await second.goto(`${opened.address}#tables`);
    await finding(second);
    await dropFiles(second, smallStudy);
    await second.getByText(/^This study is open in another tab too/).waitFor({ timeout: 60_000 });
    expect(await second.getByText("Edits made in this tab are not kept").count()).toBe(1);
    await second.close();
  });

  it("complained of nothing", () => expect(opened.complaints).toEqual([]));
});
