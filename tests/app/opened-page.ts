import { existsSync } from "node:fs";
import { fileURLToPath } from "node:url";
import type { Browser, Page } from "playwright-core";
import { startBrowser } from "./browser.ts";
import { type PageServer, servePage } from "./page-server.ts";

const at = (path: string) => fileURLToPath(new URL(`../../${path}`, import.meta.url));

export const BUILT = process.env.LASTBED_PAGE ?? at("dist/page");

export const EXAMPLE = { name: "Veyra Shelf", folder: at("datasets/veyra-shelf") };

/** The built page in a real browser, with the example beside it. */
export interface OpenedPage {
  readonly page: Page;
  readonly address: string;
  /** Hosts that the page asked for anything, and what it complained of. */
  readonly hosts: ReadonlySet<string>;
  readonly complaints: readonly string[];
  readonly close: () => Promise<void>;
}

export interface OpenOptions {
  readonly hash?: string;
  readonly viewport?: { readonly width: number; readonly height: number };
}

export async function openPage({
  hash = "",
  viewport = { width: 1440, height: 900 },
}: OpenOptions = {}): Promise<OpenedPage> {
  if (!existsSync(`${BUILT}/index.html`))
    throw new Error(
      `openPage: expected the built page in ${BUILT}, got none; build it first (npm run build)`,
    );
  const server: PageServer = await servePage(BUILT, EXAMPLE);
  const browser: Browser = await startBrowser();
  const context = await browser.newContext({ viewport, reducedMotion: "reduce", acceptDownloads: true });
  const page = await context.newPage();
  const hosts = new Set<string>();
  const complaints: string[] = [];
  page.on("request", (request) => {
    const { protocol, hostname } = new URL(request.url());
    if (protocol !== "blob:" && protocol !== "data:") hosts.add(hostname);
  });
  page.on("pageerror", (error) => complaints.push(String(error)));
  page.on("console", (message) => {
    if (message.type() === "error") complaints.push(message.text());
  });
  await page.goto(`${server.address}${hash}`);
  const close = async () => {
    await browser.close();
    await server.close();
  };
  return { page, address: server.address, hosts, complaints, close };
}

/** Waits until the study is worked out and its finding stands in the margin. */
export async function finding(page: Page): Promise<string> {
  const sentence = page.getByTestId("finding");
  await sentence.waitFor({ timeout: 60_000 });
  return (await sentence.textContent()) ?? "";
}

/** Drops files on the page as a person would. */
export async function dropFiles(page: Page, files: Readonly<Record<string, string>>): Promise<void> {
  const transfer = await page.evaluateHandle((given) => {
    const transfer = new DataTransfer();
    for (const [name, text] of Object.entries(given)) transfer.items.add(new File([text], name));
    return transfer;
  }, files);
  await page.dispatchEvent("body > #page main", "dragover", { dataTransfer: transfer });
  await page.dispatchEvent("body > #page main", "drop", { dataTransfer: transfer });
}
