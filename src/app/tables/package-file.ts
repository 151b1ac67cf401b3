import { baseName } from "../../core/tables/base-name.ts";
import { decodeText } from "../../core/tables/csv.ts";
import {
  type Apostrophes,
  apostrophesProperty,
  type PackageResource,
  readDataPackage,
  writeDataPackage,
} from "../../core/tables/data-package.ts";

/** The file of a folder that describes its tables. */
export const PACKAGE_FILE = "datapackage.json";

export function packageIn(files: ReadonlyMap<string, Uint8Array>): string | undefined {
  const bytes = [...files].find(([path]) => baseName(path) === PACKAGE_FILE)?.[1];
  return bytes === undefined ? undefined : decodeText(bytes);
}

/** By file name, the columns in which the package says that texts carry an apostrophe. */
export function guardedColumns(files: ReadonlyMap<string, Uint8Array>): Apostrophes {
  const described = packageIn(files);
  const byPath = described === undefined ? undefined : readDataPackage(described)?.apostrophes;
  return new Map([...(byPath ?? [])].map(([path, columns]) => [baseName(path), columns]));
}

/** The data package as it was described, with the apostrophes of now; a new one where there was none. */
export function packageText(
  name: string,
  resources: readonly PackageResource[],
  described: string | undefined,
): string {
  const fresh = writeDataPackage(name, resources);
  const before = parsed(described ?? "");
  const own = parsed(fresh);
  if (before === undefined || own === undefined) return fresh;
  const now = new Map(own.resources.map((resource) => [fileOf(resource), resource]));
  const known = before.resources.map((resource) => {
    const guarded = now.get(fileOf(resource))?.[apostrophesProperty];
    return guarded === undefined ? resource : { ...resource, [apostrophesProperty]: guarded };
  });
  const knownFiles = new Set(known.map(fileOf));
  const added = own.resources.filter((resource) => !knownFiles.has(fileOf(resource)));
  return `${JSON.stringify({ ...before, resources: [...known, ...added] }, null, 2)}\n`;
}

/** Names of columns that changed in a file: before to now. */
export interface RenamedColumns {
  readonly file: string;
  readonly names: ReadonlyMap<string, string>;
}

/** The data package with the columns called by the names that they have now; the same bytes where none changed. */
export function packageWithNames(bytes: Uint8Array, renamed: readonly RenamedColumns[]): Uint8Array {
  const before = parsed(decodeText(bytes) ?? "");
  const changed = new Map(
    renamed.filter(({ names }) => names.size > 0).map(({ file, names }) => [file, names]),
  );
  if (before === undefined || !before.resources.some((resource) => changed.has(fileOf(resource))))
    return bytes;
  const resources = before.resources.map((resource) => {
    const names = changed.get(fileOf(resource));
    return names === undefined ? resource : withNames(resource, names);
  });
  return new TextEncoder().encode(`${JSON.stringify({ ...before, resources }, null, 2)}\n`);
}

function withNames(resource: Resource, names: ReadonlyMap<string, string>): Resource {
  const guarded = resource[apostrophesProperty];
  const { schema } = resource;
  const fields = isObject(schema) ? schema.fields : undefined;
  return {
    ...resource,
    ...(Array.isArray(guarded)
      ? { [apostrophesProperty]: guarded.map((name: unknown) => renamedTo(name, names)) }
      : {}),
    ...(isObject(schema) && Array.isArray(fields)
      ? {
          schema: {
            ...schema,
            fields: fields.map((field: unknown) =>
              isObject(field) ? { ...field, name: renamedTo(field.name, names) } : field,
            ),
          },
        }
      : {}),
  };
}

const renamedTo = (name: unknown, names: ReadonlyMap<string, string>): unknown =>
  typeof name === "string" ? (names.get(name) ?? name) : name;

type Resource = Readonly<Record<string, unknown>>;

const isObject = (value: unknown): value is Resource =>
  typeof value === "object" && value !== null && !Array.isArray(value);

const fileOf = ({ path }: Resource): string => (typeof path === "string" ? baseName(path) : "");

interface PackageJson {
  readonly resources: readonly Resource[];
}

function parsed(text: string): PackageJson | undefined {
  if (readDataPackage(text) === undefined) return undefined;
  const value: PackageJson = JSON.parse(text);
  return Array.isArray(value.resources) && value.resources.every(isObject) ? value : undefined;
}
