import type { Study } from "../core/study/model.ts";
import { VERSION } from "../core/version.ts";

export const CRATE_FILE = "ro-crate-metadata.json";

const PROGRAM = "#lastbed";

const context = "https://w3id.org/ro/crate/1.2/context";
const profile = "https://w3id.org/ro/crate/1.2";

/**
 * The folder's own description, so that an archive or a repository knows what lies in it.
 * It holds no time, path or user: those belong to whoever deposits the folder.
 *
 * Source: RO-Crate 1.2, https://w3id.org/ro/crate/1.2.
 */
export function roCrate(study: Study, files: readonly string[]): string {
  const program = {
    "@id": PROGRAM,
    "@type": "SoftwareApplication",
    name: "Lastbed",
    softwareVersion: VERSION,
  };
  const results = files.map((name) => ({ "@id": name }));
  const tables = study.files.map(({ name }) => ({ "@id": `study/${name}` }));
  const graph = [
    {
      "@id": CRATE_FILE,
      "@type": "CreativeWork",
      conformsTo: { "@id": profile },
      about: { "@id": "./" },
    },
    {
      "@id": "./",
      "@type": "Dataset",
      name: `${study.name}: disappearances against marker horizons`,
      description: "Study tables, result tables, figures and the sheet from which the run can be repeated.",
      hasPart: [...results, ...tables],
    },
    program,
    {
      "@id": "#run",
      "@type": "CreateAction",
      name: "analysis",
      instrument: { "@id": PROGRAM },
      object: tables,
      result: results,
    },
    ...[...results, ...tables].map(({ "@id": id }) => ({
      "@id": id,
      "@type": "File",
      encodingFormat: formatOf(id),
    })),
  ];
  return `${JSON.stringify({ "@context": context, "@graph": graph }, null, 2)}\n`;
}

function formatOf(file: string): string {
  const formats: Readonly<Record<string, string>> = {
    csv: "text/csv",
    json: "application/json",
    html: "text/html",
    svg: "image/svg+xml",
  };
  const ending = file.slice(file.lastIndexOf(".") + 1);
  return formats[ending] ?? "application/octet-stream";
}

/** The files of a run by its folder's description; empty where it cannot be read or tells of no run of ours. */
export function filesOfCrate(text: string): readonly string[] {
  const graph = parsed(text)?.["@graph"];
  if (!Array.isArray(graph)) return [];
  const isOurs = graph.some(
    (entity) => isRecord(entity) && entity["@id"] === PROGRAM && entity.name === "Lastbed",
  );
  if (!isOurs) return [];
  const root: unknown = graph.find((entity) => isRecord(entity) && entity["@id"] === "./");
  const parts = isRecord(root) && Array.isArray(root.hasPart) ? root.hasPart : [];
  return parts.flatMap((part: unknown) =>
    isRecord(part) && typeof part["@id"] === "string" ? [part["@id"]] : [],
  );
}

function parsed(text: string): Record<string, unknown> | undefined {
  try {
    const content: unknown = JSON.parse(text);
    return isRecord(content) ? content : undefined;
  } catch {
    return undefined;
  }
}

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null;
