import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { type Browser, type BrowserContext, chromium } from "playwright-core";
import { findBrowser } from "./find-browser.mjs";

const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

/** Starts the browser without a window, with a profile of its own that it leaves behind nowhere. */
export function startBrowser(): Promise<Browser> {
  const executablePath = findBrowser();
  if (executablePath === undefined)
    throw new Error(
      "startBrowser: expected an installed Chromium or Chrome, found none (set LASTBED_BROWSER)",
    );
  return chromium.launch({ executablePath, headless: true, args: FLAGS });
}

/** A browser with a profile that it can be started on again, and how to end it at once, as a power cut does. */
export interface ProfiledBrowser {
  readonly context: BrowserContext;
  readonly kill: () => Promise<void>;
}

/** Starts the browser on a profile. Its process is started here, so that it can be killed with everything it started. */
export async function startProfile(profile: string): Promise<ProfiledBrowser> {
  const executablePath = findBrowser();
  if (executablePath === undefined) throw new Error("startProfile: expected an installed Chromium or Chrome");
  const own = ["--headless=new", "--remote-debugging-port=0", `--user-data-dir=${profile}`, "about:blank"];
  const started = spawn(executablePath, [...FLAGS, ...own], {
    detached: true,
    stdio: ["ignore", "ignore", "pipe"],
  });
  const browser = await chromium.connectOverCDP(await debuggingAddress(started));
  const [context = await browser.newContext()] = browser.contexts();
  const kill = async () => {
    if (started.pid === undefined || started.exitCode !== null || started.signalCode !== null) return;
    const ended = once(started, "exit");
    process.kill(-started.pid, "SIGKILL");
    await ended;
  };
  return { context, kill };
}

/** The address that the browser tells on its error stream. */
function debuggingAddress({ stderr }: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = "";
    stderr?.on("data", (text) => {
      said += String(text);
      const [, address] = /DevTools listening on (ws:\S+)/.exec(said) ?? [];
      if (address !== undefined) resolve(address);
    });
    stderr?.on("end", () => reject(new Error(`startProfile: expected a debugging address, got ${said}`)));
  });
}
