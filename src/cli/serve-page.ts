import { readFile } from "node:fs/promises";
import { createServer, type ServerResponse } from "node:http";
import { extname, join, normalize, sep } from "node:path";
import type { StudyOnDisk } from "./study-files.ts";

const types: Readonly<Record<string, string>> = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".json": "application/json",
  ".csv": "text/csv; charset=utf-8",
  ".svg": "image/svg+xml",
  ".ttf": "font/ttf",
};

/** Nothing may be loaded from, or sent to, anywhere but this address. */
const headers = {
  "content-security-policy":
    "default-src 'self'; style-src 'self' 'unsafe-inline'; img-src 'self' data: blob:; font-src 'self' data:; worker-src 'self' blob:; connect-src 'self'",
  "cross-origin-opener-policy": "same-origin",
  "x-content-type-options": "nosniff",
  "cache-control": "no-store",
};

export interface PageServer {
  readonly address: string;
  readonly closed: Promise<void>;
  readonly close: () => void;
}

/** Serves a folder on the loopback address; an opened study lies over the bundled one under `study/`. */
export async function servePage(
  folder: string,
  { port, study }: { port: number; study: StudyOnDisk | undefined },
): Promise<PageServer> {
  const overlay = study === undefined ? undefined : overlayOf(study);
  const server = createServer((request, response) => {
    const path = pathOf(request.url);
    const isRead = request.method === "GET" || request.method === "HEAD";
    if (path === undefined || !isRead) send(response, { status: isRead ? 400 : 405 });
    else void respond(response, { folder, path, overlay });
  });
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, "127.0.0.1", resolve);
  });
  const bound = server.address();
  const actual = typeof bound === "object" && bound !== null ? bound.port : port;
  const closed = new Promise<void>((resolve) => server.once("close", resolve));
  const close = () => {
    server.close();
    server.closeAllConnections();
  };
  return { address: `http://127.0.0.1:${actual}/`, closed, close };
}

type Overlay = ReadonlyMap<string, string | Uint8Array>;

function overlayOf({ name, files }: StudyOnDisk): Overlay {
  const index = JSON.stringify({ name, files: [...files.keys()] });
  return new Map<string, string | Uint8Array>([["index.json", index], ...files]);
}

/** The decoded path below the root, or undefined where it would leave it. */
function pathOf(url: string | undefined): string | undefined {
  try {
    const path = normalize(decodeURIComponent(new URL(url ?? "/", "http://localhost").pathname))
      .split(sep)
      .join("/");
    if (path.includes("\0") || path.split("/").includes("..")) return undefined;
    return path.endsWith("/") ? `${path}index.html` : path;
  } catch {
    return undefined;
  }
}

interface Wanted {
  readonly folder: string;
  readonly path: string;
  readonly overlay: Overlay | undefined;
}

async function respond(response: ServerResponse, { folder, path, overlay }: Wanted): Promise<void> {
  const type = types[extname(path)] ?? "application/octet-stream";
  if (overlay !== undefined && path.startsWith("/study/")) {
    const body = overlay.get(path.slice("/study/".length));
    send(response, body === undefined ? { status: 404 } : { status: 200, type, body });
    return;
  }
  const body = await readFile(join(folder, path)).catch(() => undefined);
  send(response, body === undefined ? { status: 404 } : { status: 200, type, body });
}

function send(
  response: ServerResponse,
  { status, type, body }: { status: number; type?: string; body?: string | Uint8Array },
) {
  response.writeHead(status, { ...headers, ...(type === undefined ? {} : { "content-type": type }) });
  response.end(body ?? String(status));
}
