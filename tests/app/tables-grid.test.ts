import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findBrowser } from "./find-browser.mjs";
import { dropFiles, finding, type OpenedPage, openPage } from "./opened-page.ts";
import { smallStudy } from "./small-study.ts";

const grid = (page: Page) => page.getByRole("grid");
/** The cell that the keys act on, without what is said about it. */
const activeText = (page: Page) =>
  grid(page).evaluate((grid) => {
    const cell = document.getElementById(grid.getAttribute("aria-activedescendant") ?? "");
    return [...(cell?.childNodes ?? [])].findLast((node) => node.nodeName !== "SPAN")?.textContent ?? "";
  });
const press = async (page: Page, ...keys: readonly string[]) => {
  for (const key of keys) await page.keyboard.press(key);
};
const paste = (page: Page, text: string) =>
  grid(page).evaluate((grid, text) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData("text/plain", text);
    grid.dispatchEvent(new ClipboardEvent("paste", { clipboardData, bubbles: true, cancelable: true }));
  }, text);
const problems = (page: Page, text: string) => page.locator("aside button", { hasText: text });

describe.skipIf(findBrowser() === undefined)("the tables by keyboard", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage({ hash: "#tables?table=samples.csv" });
    await finding(opened.page);
    await dropFiles(opened.page, smallStudy);
    await opened.page.getByRole("heading", { name: "Dropped tables" }).waitFor();
    await grid(opened.page).getByText("LB-9", { exact: true }).waitFor();
  }, 90_000);
  afterAll(() => opened?.close());

  it("moves as a spreadsheet does", async () => {
    const { page } = opened;
    await grid(page).focus();
    await press(page, "ArrowDown", "ArrowRight");
    expect(await activeText(page)).toBe("LB-2");
    await press(page, "End");
    expect(await activeText(page)).toBe("1");
    await press(page, "Control+End");
    expect(await activeText(page)).toBe("14");
    await press(page, "Control+Home", "Tab", "Tab", "Tab", "Tab");
    expect(await activeText(page)).toBe("LB-2");
    await press(page, "Shift+Tab", "PageDown", "PageUp", "Home");
    expect(await activeText(page)).toBe("lorn-bank");
  });

  it("tells a problem at its cell and in the margin once a cell is mistyped, and mends it by undoing", async () => {
    const { page } = opened;
    await press(page, "Control+Home", "End", "ArrowDown");
    await page.keyboard.type("two and a bit");
    await press(page, "Enter");
    const told = problems(page, "two and a bit");
    await told.waitFor();
    expect(await told.textContent()).toMatch(/samples\.csv · row 3 · position/);
    expect(await activeText(page)).toBe("1.5");
    const cell = grid(page).locator("td", { hasText: "two and a bit" });
    expect(await cell.textContent()).toContain("error: expected");
    await press(page, "Control+z");
    await told.waitFor({ state: "detached" });
    await press(page, "Control+y");
    await told.waitFor();
    await press(page, "Control+z");
    await told.waitFor({ state: "detached" });
  });

  it("mends by one key what has one mend alone", async () => {
    const { page } = opened;
    await press(page, "Control+Home", "End", "ArrowDown");
    await page.keyboard.type("1.25 m");
    await press(page, "Enter");
    await page.locator("aside").getByRole("button", { name: "Write “1.25”" }).click();
    await problems(page, "1.25 m").waitFor({ state: "detached" });
    await grid(page).getByText("1.25", { exact: true }).waitFor();
    await grid(page).focus();
    await press(page, "Control+z", "Control+z", "ArrowUp");
    expect(await activeText(page)).toBe("1");
  });

  it("writes in a cell, gives up, and takes", async () => {
    const { page } = opened;
    await press(page, "Control+Home", "End", "F2", "Backspace", "7", "Escape");
    expect(await activeText(page)).toBe("0.5");
    await press(page, "Enter", "5", "Tab");
    expect(await activeText(page)).toBe("lorn-bank");
    await press(page, "Shift+Tab");
    expect(await activeText(page)).toBe("0.55");
    await press(page, "Control+z");
    expect(await activeText(page)).toBe("0.5");
  });

  it("has no accessibility violation while a cell is written in", async () => {
    const { page } = opened;
    await press(page, "F2");
    await page.getByRole("textbox", { name: "Row 2, position" }).waitFor();
    const { violations } = await new AxeBuilder({ page }).include("main > section").analyze();
    expect(violations.map(({ id, nodes }) => `${id} ${nodes[0]?.html}`)).toEqual([]);
    await press(page, "Escape");
  });

  it("copies a block, clears it, and pastes it back", async () => {
    const { page } = opened;
    await press(page, "Control+Home", "ArrowRight", "Shift+ArrowRight", "Shift+ArrowDown", "Control+c");
    await press(page, "Delete");
    expect(await activeText(page)).toBe("");
    await press(page, "Control+v");
    expect(await activeText(page)).toBe("1");
    await press(page, "Control+z", "Control+z");
    expect(await activeText(page)).toBe("1");
  });

  it("adds the rows that a pasted block needs", async () => {
    const { page } = opened;
    await press(page, "Control+End", "Home");
    await paste(page, "lorn-bank\tLB-28\t14\r\nlorn-bank\tLB-29\t14.5\r\nlorn-bank\tLB-30\tfifteen\r\n");
    await problems(page, "fifteen").waitFor();
    expect(await problems(page, "fifteen").textContent()).toMatch(/row 31 · position/);
    expect(await grid(page).getAttribute("aria-rowcount")).toBe("31");
    await press(page, "Control+z");
    await problems(page, "fifteen").waitFor({ state: "detached" });
    expect(await grid(page).getAttribute("aria-rowcount")).toBe("29");
  });

  it("sets a row aside with a reason, lists it, and takes it back", async () => {
    const { page } = opened;
    await press(page, "Control+Home", "ArrowDown");
    await page.getByRole("button", { name: "Set aside…" }).click();
    await page.keyboard.type("label washed off");
    await press(page, "Enter");
    const list = page.locator("aside").getByText("label washed off");
    await list.waitFor();
    expect(await grid(page).locator("tr", { hasText: "LB-2" }).first().textContent()).toContain(
      "set aside: label washed off",
    );
    await page
      .locator("aside")
      .getByRole("button", { name: /Take back/ })
      .click();
    await list.waitFor({ state: "detached" });
  });

  it("sorts by a column and shows rows with problems alone, and changes no file by that", async () => {
    const { page } = opened;
    await page.getByLabel("Sort by").selectOption("position");
    await page.getByRole("columnheader", { name: /position/ }).click();
    expect(await page.getByRole("columnheader", { name: /position/ }).getAttribute("aria-sort")).toBe(
      "descending",
    );
    await grid(page).focus();
    await press(page, "Control+Home", "End");
    expect(await activeText(page)).toBe("14");
    await page.keyboard.type("high");
    await press(page, "Enter");
    await problems(page, "high").waitFor();
    await page.getByLabel("only rows with problems").check();
    await expect.poll(() => grid(page).getAttribute("aria-rowcount")).toBe("2");
    await page.getByRole("button", { name: "Undo" }).click();
    await problems(page, "high").waitFor({ state: "detached" });
    expect(await grid(page).getAttribute("aria-rowcount")).toBe("29");
    await page.getByLabel("Sort by").selectOption("");
  });

  it("lets a person who comes by Tab leave by Tab, and one who works here by Escape and Tab", async () => {
    const { page } = opened;
    const isInGrid = () => page.evaluate(() => document.activeElement?.getAttribute("role") === "grid");
    await page.getByLabel("Sort by").focus();
    for (let presses = 0; presses < 8 && !(await isInGrid()); presses++) await press(page, "Tab");
    expect(await isInGrid()).toBe(true);
    await press(page, "Tab");
    expect(await isInGrid()).toBe(false);
    await press(page, "Shift+Tab", "Control+Home", "Tab");
    expect(await isInGrid()).toBe(true);
    await press(page, "Escape", "Tab");
    expect(await isInGrid()).toBe(false);
  });

  it("complained of nothing", () => expect(opened.complaints).toEqual([]));
});
