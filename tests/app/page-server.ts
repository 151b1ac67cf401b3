import { readdir, readFile } from "node:fs/promises";
import { createServer } from "node:http";
import { extname, join, normalize } from "node:path";

const TYPES: Readonly<Record<string, string>> = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript",
  ".css": "text/css",
  ".svg": "image/svg+xml",
  ".ttf": "font/ttf",
  ".woff2": "font/woff2",
  ".json": "application/json",
};

export interface PageServer {
  readonly address: string;
  readonly close: () => Promise<void>;
}

/** Serves a built page on this machine alone, with a study folder beside it. */
export async function servePage(page: string, study: { name: string; folder: string }): Promise<PageServer> {
  const files = (await readdir(study.folder)).filter((file) => /\.(csv|json)$/.test(file)).toSorted();
  const server = createServer((request, answer) => {
    const path = decodeURIComponent(new URL(request.url ?? "/", "http://localhost").pathname);
    respond(path).then(
      ({ type, bytes }) => answer.writeHead(200, { "content-type": type }).end(bytes),
      () => answer.writeHead(404).end(),
    );
  });
  const respond = async (path: string) => {
    if (path === "/study/index.json")
      return { type: "application/json", bytes: JSON.stringify({ name: study.name, files }) };
    const inStudy = path.startsWith("/study/");
    const file = inStudy
      ? join(study.folder, normalize(path.slice("/study".length)))
      : join(page, normalize(path === "/" ? "/index.html" : path));
    return { type: TYPES[extname(file)] ?? "application/octet-stream", bytes: await readFile(file) };
  };
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const at = server.address();
  if (at === null || typeof at === "string") throw new Error("servePage: expected a port on 127.0.0.1");
  return {
    address: `http://127.0.0.1:${at.port}/`,
    close: () =>
      new Promise((resolve) => {
        server.closeAllConnections();
        server.close(() => resolve());
      }),
  };
}
