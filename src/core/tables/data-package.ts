import { tableSchema } from "../study/table-schema.ts";
import type { TableDeclaration } from "../study/tables/declare.ts";
import { describeResource, listOf, property, type UnreadPart } from "./described-resource.ts";
import type { DeclaredDialect } from "./dialect/declared.ts";

/** The property of a resource that lists the columns in which `writeCsv` put apostrophes. */
export const apostrophesProperty = "lastbed:apostrophes";

/** A table in a folder, as datapackage.json tells it. */
export interface PackageResource {
  readonly name: string;
  /** The file's path in the folder. */
  readonly path: string;
  readonly title: string;
  readonly description: string;
  /** A Table Schema, as plain JSON. */
  readonly schema: object;
  /** Headers of the columns whose text cells were given an apostrophe, as `writeCsv` returns them. */
  readonly guarded: readonly string[];
}

/** The resource of a study table in a folder. */
export const tableResource = (
  declaration: TableDeclaration,
  guarded: readonly string[] = [],
  path = `${declaration.name}.csv`,
): PackageResource => ({
  name: declaration.name,
  path,
  title: declaration.title,
  description: declaration.help,
  schema: tableSchema(declaration),
  guarded,
});

/** The text of datapackage.json (Frictionless Data Package 2.0) for a folder of tables. */
export function writeDataPackage(name: string, resources: readonly PackageResource[], title = name): string {
  const descriptor = {
    $schema: "https://datapackage.org/profiles/2.0/datapackage.json",
    name: packageName(name),
    title,
    resources: resources.map(resourceOf),
  };
  return `${JSON.stringify(descriptor, null, 2)}\n`;
}

const resourceOf = ({ name, path, title, description, schema, guarded }: PackageResource) => ({
  name,
  path,
  type: "table",
  title,
  description,
  format: "csv",
  mediatype: "text/csv",
  encoding: "utf-8",
  ...(guarded.length > 0 ? { [apostrophesProperty]: guarded } : {}),
  schema,
});

/** A name as a data package allows it: lower case, digits, hyphen, dot, underscore. */
const packageName = (name: string): string =>
  name
    .toLowerCase()
    .replace(/[^a-z0-9._-]+/g, "-")
    .replace(/^-+|-+$/g, "") || "study";

/** What our reading needs of a data package: per path, the columns that carry apostrophes. */
export type Apostrophes = ReadonlyMap<string, ReadonlySet<string>>;

/** A table of a data package: the name it goes by and how its file is written. */
export interface DescribedResource {
  readonly name: string;
  readonly dialect: DeclaredDialect;
}

/** A study folder as its data package describes it. */
export interface DescribedPackage {
  readonly title?: string;
  readonly apostrophes: Apostrophes;
  /** By path. */
  readonly resources: ReadonlyMap<string, DescribedResource>;
  /** What of it is not read, and why. */
  readonly unread: readonly UnreadPart[];
}

/** Reads a data package of version 1 or 2: title, apostrophes, and what each resource says; undefined where it is none. */
export function readDataPackage(text: string): DescribedPackage | undefined {
  const descriptor = parseObject(text);
  if (descriptor === undefined) return undefined;
  const apostrophes = new Map<string, ReadonlySet<string>>();
  const resources = new Map<string, DescribedResource>();
  const unread: UnreadPart[] = [];
  for (const resource of listOf(descriptor, "resources")) {
    const { path, name, dialect, faults } = describeResource(resource);
    unread.push(...faults);
    if (path === undefined) continue;
    resources.set(path, { name, dialect });
    const guarded = listOf(resource, apostrophesProperty).filter((header) => typeof header === "string");
    apostrophes.set(path, new Set(guarded));
  }
  const title = property(descriptor, "title");
  return { ...(typeof title === "string" && title !== "" ? { title } : {}), apostrophes, resources, unread };
}

function parseObject(text: string): object | undefined {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === "object" && value !== null && !Array.isArray(value) ? value : undefined;
  } catch {
    return undefined;
  }
}
