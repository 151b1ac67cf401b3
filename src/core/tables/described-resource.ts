import type { Delimiter } from "../study/model.ts";
import type { DeclaredDialect } from "./dialect/declared.ts";
import { namedEncoding } from "./dialect/encoding.ts";

/** A part of a data package that is not read. */
export interface UnreadPart {
  readonly path: string;
  readonly reason: string;
}

export const property = (value: unknown, name: string): unknown =>
  typeof value === "object" && value !== null
    ? new Map<string, unknown>(Object.entries(value)).get(name)
    : undefined;

export function listOf(value: unknown, name: string): readonly unknown[] {
  const list = property(value, name);
  return Array.isArray(list) ? list : [];
}

const textOf = (value: unknown, name: string): string | undefined => {
  const text = property(value, name);
  return typeof text === "string" ? text : undefined;
};

interface ResourceReading {
  /** Absent where the resource cannot be read. */
  readonly path?: string;
  readonly name: string;
  readonly dialect: DeclaredDialect;
  readonly faults: readonly UnreadPart[];
}

/** What a resource (Data Resource 1.0 or 2.0, with its dialect and Table Schema) says about its file. */
export function describeResource(resource: unknown): ResourceReading {
  const name = textOf(resource, "name") ?? "";
  const path = property(resource, "path");
  const whole =
    typeof path === "string" ? path : Array.isArray(path) && path.length === 1 ? path[0] : undefined;
  const unread = (reason: string): ResourceReading => ({
    name,
    dialect: {},
    faults: [{ path: typeof whole === "string" ? whole : name, reason }],
  });
  if (typeof whole !== "string")
    return unread(
      property(resource, "data") === undefined
        ? "a resource in several files is not put together"
        : "data inside the descriptor are not read",
    );
  if (/^[a-z][a-z0-9+.-]*:\/\//i.test(whole)) return unread("nothing is fetched from elsewhere");
  const { dialect, faults } = dialectOf(resource);
  return { path: whole, name, dialect, faults: faults.map((reason) => ({ path: whole, reason })) };
}

const delimiters: readonly Delimiter[] = [",", ";", "\t", "|"];

function dialectOf(resource: unknown) {
  const said = property(resource, "dialect");
  const fields = listOf(property(resource, "schema"), "fields");
  const faults: string[] = [];
  const delimiter = delimiters.find((sign) => sign === textOf(said, "delimiter"));
  if (delimiter === undefined && textOf(said, "delimiter") !== undefined)
    faults.push(`its delimiter ${textOf(said, "delimiter")} is none that is read`);
  const encodingName = textOf(resource, "encoding");
  const encoding = encodingName === undefined ? undefined : namedEncoding(encodingName);
  if (encodingName !== undefined && encoding === undefined)
    faults.push(`its encoding ${encodingName} is none that is read`);
  if (textOf(said, "commentChar") !== undefined) faults.push("its comment rows are read as rows");
  const quote = textOf(said, "quoteChar");
  const names = fields.flatMap((field) => textOf(field, "name") ?? []);
  const decimalSigns = new Set(
    fields.filter(isNumberField).map((field) => textOf(field, "decimalChar") ?? "."),
  );
  const missing = listOf(property(resource, "schema"), "missingValues").filter(
    (cell) => typeof cell === "string",
  );
  const dialect: DeclaredDialect = {
    ...(delimiter === undefined ? {} : { delimiter }),
    ...(encoding === undefined ? {} : { encoding }),
    ...(quote?.length === 1 ? { quote } : {}),
    ...(decimalSigns.size === 1 && decimalSigns.has(",") ? { decimal: "comma" as const } : {}),
    missing: missing.filter((cell) => cell !== ""),
    ...(property(said, "header") === false && names.length > 0 ? { headers: names } : {}),
  };
  return { dialect, faults };
}

const isNumberField = (field: unknown): boolean => textOf(field, "type") === "number";
