import { readFile } from "node:fs/promises";
import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { readSources } from "../../src/core/tables/read-sources.ts";
import { findBrowser } from "./find-browser.mjs";
import { dropFiles, finding, type OpenedPage, openPage } from "./opened-page.ts";
import { smallStudy } from "./small-study.ts";

const grid = (page: Page) => page.getByRole("grid");
const activeText = (page: Page) =>
  grid(page).evaluate((grid) => {
    const cell = document.getElementById(grid.getAttribute("aria-activedescendant") ?? "");
    return [...(cell?.childNodes ?? [])].findLast((node) => node.nodeName !== "SPAN")?.textContent ?? "";
  });
const press = async (page: Page, ...keys: readonly string[]) => {
  for (const key of keys) await page.keyboard.press(key);
};
const problems = (page: Page, text: string | RegExp) => page.locator("aside button", { hasText: text });
const log = (page: Page) => page.locator("section[aria-label^='Log of']");
const marked = (page: Page) => log(page).locator("svg desc").textContent();
const openTable = async (page: Page, table: string) => {
  await page.evaluate((table) => {
    location.hash = `#tables?table=${table}`;
  }, table);
  await page.getByRole("grid", { name: new RegExp(`^${table}`) }).waitFor();
};
const save = async (page: Page, what: string) => {
  const [saved] = await Promise.all([
    page.waitForEvent("download"),
    page
      .getByRole("button", { name: "Save…" })
      .click()
      .then(() => page.getByRole("menuitem", { name: what }).click()),
  ]);
  return { name: saved.suggestedFilename(), bytes: new Uint8Array(await readFile(await saved.path())) };
};

/** The study with a row of too many cells and a table that lacks a column under the name it should have. */
const troubledStudy = {
  ...smallStudy,
  "samples.csv": (smallStudy["samples.csv"] ?? "").replace("LB-9,4.5", "LB-9,4,5"),
  "horizons.csv": (smallStudy["horizons.csv"] ?? "").replace("horizon,kind", "level,kind"),
};

describe.skipIf(findBrowser() === undefined)("work in the tables", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage({ hash: "#tables?table=samples.csv" });
    await finding(opened.page);
    await dropFiles(opened.page, troubledStudy);
    await opened.page.getByRole("heading", { name: "Dropped tables" }).waitFor();
    await grid(opened.page).getByText("LB-9", { exact: true }).waitFor();
  }, 90_000);
  afterAll(() => opened?.close());

  it("a row of too many cells is at its place, and is used once it is mended", async () => {
    const { page } = opened;
    const row = grid(page).locator("tr", { has: page.getByText("LB-9", { exact: true }) });
    expect(await row.locator("td").allTextContents()).toEqual(["lorn-bank", "LB-9", "4", "5"]);
    await problems(page, /samples\.csv · row 10/).waitFor();
    await row.locator("td").nth(2).click();
    await page.keyboard.type("4.5");
    await press(page, "Tab", "Delete");
    await problems(page, /samples\.csv · row 10/).waitFor({ state: "detached" });
    await expect.poll(() => row.locator("td").allTextContents()).toEqual(["lorn-bank", "LB-9", "4.5", ""]);
  });

  it("a table that could not be read is, once its column is renamed by keyboard alone", async () => {
    const { page } = opened;
    await openTable(page, "horizons.csv");
    await problems(page, /horizons\.csv/)
      .first()
      .waitFor();
    await grid(page).focus();
    await press(page, "Control+Home", "ArrowRight", "ArrowUp");
    expect(await activeText(page)).toBe("level");
    await press(page, "F2");
    await page.getByRole("textbox", { name: "Name of column 2" }).fill("horizon");
    await press(page, "Enter");
    await problems(page, /horizons\.csv/)
      .first()
      .waitFor({ state: "detached" });
    expect(await activeText(page)).toBe("lorn-impact");
    await press(page, "Control+z");
    await problems(page, /horizons\.csv/)
      .first()
      .waitFor();
    await press(page, "Control+y");
    await problems(page, /horizons\.csv/)
      .first()
      .waitFor({ state: "detached" });
  });

  it("the log follows the row in hand and is drawn anew when a cell is edited", async () => {
    const { page } = opened;
    await openTable(page, "samples.csv");
    await grid(page).focus();
    await press(page, "Control+Home", "ArrowDown", "ArrowDown");
    await expect.poll(() => marked(page)).toMatch(/row 4 is at 1\.5 m/);
    await press(page, "End", "ArrowLeft");
    await page.keyboard.type("1.75");
    await press(page, "Enter", "ArrowUp");
    await expect.poll(() => marked(page), { timeout: 20_000 }).toMatch(/row 4 is at 1\.75 m/);
  });

  it("a level chosen in the log chooses the nearest row, by pointer and by keys", async () => {
    const { page } = opened;
    const box = await log(page).locator("svg").boundingBox();
    if (box === null) throw new Error("no log in view");
    const middle = await log(page).locator("[data-mark=row] path").last().boundingBox();
    if (middle === null) throw new Error("no row is marked");
    await page.mouse.click(box.x + box.width / 2, middle.y + middle.height / 2);
    await expect.poll(() => marked(page)).toMatch(/row 4 is at 1\.75 m/);
    await log(page).focus();
    for (let presses = 0; presses < 6; presses++) await press(page, "Shift+ArrowUp");
    await press(page, "Enter");
    await expect.poll(() => marked(page)).not.toMatch(/row 4 /);
  });

  it("has no accessibility violation with the log and its menus open", async () => {
    const { page } = opened;
    const { violations } = await new AxeBuilder({ page })
      .include("main > section")
      .exclude("svg[role=img] > g")
      .analyze();
    expect(violations.map(({ id, nodes }) => `${id} ${nodes[0]?.html}`)).toEqual([]);
    await page.getByRole("button", { name: "Keys" }).click();
    await page.getByRole("dialog", { name: "Keys in the table" }).waitFor();
    const keys = await new AxeBuilder({ page }).include("[role=dialog]").analyze();
    expect(keys.violations.map(({ id }) => id)).toEqual([]);
    await press(page, "Escape");
  });

  it("puts a row between others by a key, fills it down, and counts as a spreadsheet does", async () => {
    const { page } = opened;
    await grid(page).focus();
    await press(page, "Control+Home", "ArrowDown", "Alt+ArrowUp");
    expect(await activeText(page)).toBe("");
    expect(await grid(page).getAttribute("aria-rowcount")).toBe("30");
    await press(page, "Shift+ArrowRight", "Shift+ArrowRight", "Control+d");
    await press(page, "ArrowLeft");
    expect(await activeText(page)).toBe("LB-1");
    await page.keyboard.type("LB-1b");
    await press(page, "Tab");
    await page.keyboard.type("high");
    await press(page, "Enter");
    await problems(page, /samples\.csv · row 3 · position/).waitFor();
    const row = grid(page).locator("tr", { has: page.getByText("LB-1b", { exact: true }) });
    expect(await row.locator("th").textContent()).toBe("3");
    expect(await row.locator("td").nth(2).textContent()).toContain("error");
    await press(page, "ArrowUp");
    await page.keyboard.type("0.75");
    await press(page, "Enter");
    await problems(page, /row 3 · position/).waitFor({ state: "detached" });
  });

  it("finds words from the table, one cell after another, with all rows in view", async () => {
    const { page } = opened;
    await press(page, "Control+Home", "Control+f");
    await page.keyboard.type("LB-2");
    await page.getByLabel("all rows").check();
    await page.getByRole("button", { name: "Find the next" }).click();
    await expect.poll(() => activeText(page)).toBe("LB-2");
    await page.getByLabel("Find", { exact: true }).press("Enter");
    await expect.poll(() => activeText(page)).toBe("LB-20");
    await page.getByLabel("Find", { exact: true }).press("Shift+Enter");
    await expect.poll(() => activeText(page)).toBe("LB-2");
    await page.getByLabel("Find", { exact: true }).fill("");
  });

  it("goes back to named tables with rows between and columns renamed", async () => {
    const { page } = opened;
    await page.getByLabel("Name these tables").fill("with the row between");
    await page.getByRole("button", { name: "Keep", exact: true }).click();
    await page.getByText("with the row between").first().waitFor();
    for (let undo = 0; undo < 4; undo++) await page.getByRole("button", { name: "Undo" }).click();
    await page
      .getByRole("listitem")
      .filter({ hasText: "with the row between" })
      .getByRole("button", { name: "Go back to this" })
      .click();
    await grid(page).getByText("LB-1b", { exact: true }).waitFor();
  });

  it("saves a workbook, and a folder of its own, that read back as the tables are", async () => {
    const { page } = opened;
    const book = await save(page, "Tables as a workbook");
    expect(book.name).toBe("Dropped tables.xlsx");
    const study = await readSources(new Map([[book.name, book.bytes]]));
    const samples = study.sheets.find(({ table }) => table === "samples");
    expect([...(samples?.rows ?? [])].slice(0, 3).map((row) => row.slice(0, 3))).toEqual([
      ["lorn-bank", "LB-1", "0.5"],
      ["lorn-bank", "LB-1b", "0.75"],
      ["lorn-bank", "LB-2", "1"],
    ]);
    expect(study.problems.filter(({ severity }) => severity === "error")).toEqual([]);
    // A folder of this page's own stands for the one that a person chooses.
    await page.evaluate(() => {
      Object.assign(globalThis, { showDirectoryPicker: () => navigator.storage.getDirectory() });
    });
    const toFolder = async () => {
      await page.getByRole("button", { name: "Save…" }).click();
      await page.getByRole("menuitem", { name: "Study as a folder" }).click();
    };
    await toFolder();
    await page.getByText("Saved in the new folder Dropped tables.").waitFor();
    await toFolder();
    await page.getByText("Saved in the new folder Dropped tables 2.").waitFor();
    const files = await page.evaluate(async () => {
      const root = await navigator.storage.getDirectory();
      const folder = await root.getDirectoryHandle("Dropped tables");
      const file = await (await folder.getFileHandle("samples.csv")).getFile();
      return file.text();
    });
    expect(files.split("\n").slice(0, 4)).toEqual([
      "section,sample,position",
      "lorn-bank,LB-1,0.5",
      "lorn-bank,LB-1b,0.75",
      "lorn-bank,LB-2,1",
    ]);
  });

  it("closes the log by its button and opens it by a key", async () => {
    const { page } = opened;
    await page.getByRole("button", { name: "Close the section log" }).click();
    await log(page).waitFor({ state: "detached" });
    await grid(page).click();
    await page.getByRole("button", { name: "Undo" }).focus();
    await press(page, "l");
    await log(page).waitFor();
  });

  it("complained of nothing", () => expect(opened.complaints).toEqual([]));
});
