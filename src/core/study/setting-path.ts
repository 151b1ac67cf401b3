import * as v from "valibot";
import { suggestName } from "./nearest.ts";
import { settingsSchema } from "./settings.ts";

type Node = v.GenericSchema | undefined;

/** The schema beneath `optional`. */
function unwrapped(schema: unknown): Node {
  const node = asSchema(schema);
  const inner = node && "wrapped" in node ? asSchema(node.wrapped) : undefined;
  return inner ? unwrapped(inner) : node;
}

const isSchema = (value: unknown): value is v.GenericSchema =>
  typeof value === "object" && value !== null && "kind" in value && value.kind === "schema";

const asSchema = (value: unknown): Node => (isSchema(value) ? value : undefined);

/** The named parts of an object schema. */
function partsOf(schema: Node): ReadonlyMap<string, unknown> {
  if (!schema || !("entries" in schema) || typeof schema.entries !== "object" || schema.entries === null)
    return new Map();
  return new Map(Object.entries(schema.entries));
}

const isRecord = (schema: Node): boolean => schema?.type === "record";

/** Every path of a setting, in the order declared. */
export function knownSettingPaths(schema: Node = settingsSchema, before = ""): readonly string[] {
  return [...partsOf(schema)].flatMap(([name, part]) => {
    const inner = unwrapped(part);
    const path = `${before}${name}`;
    return partsOf(inner).size > 0 ? knownSettingPaths(inner, `${path}.`) : [path];
  });
}

/** The schema of one setting, with its words, and the one beneath its default; undefined where there is none. */
export function settingSchema(
  path: string,
): { readonly schema: v.GenericSchema; readonly inner: v.GenericSchema } | undefined {
  let schema: Node = settingsSchema;
  for (const name of path.split(".")) schema = asSchema(partsOf(unwrapped(schema)).get(name));
  const inner = unwrapped(schema);
  return schema === undefined || inner === undefined ? undefined : { schema, inner };
}

/** True where a path leads to a setting, to a part that holds settings, or to an entry of a named list. */
function isKnown(path: readonly string[], schema: Node = settingsSchema): boolean {
  if (path.length === 0) return true;
  const [name, ...rest] = path;
  const part = partsOf(schema).get(name);
  if (part !== undefined) return isKnown(rest, unwrapped(part));
  return isRecord(schema);
}

const entriesOf = (value: unknown): Map<string, unknown> =>
  typeof value === "object" && value !== null && !Array.isArray(value)
    ? new Map(Object.entries(value))
    : new Map();

function withValue(value: unknown, [name, ...rest]: readonly string[], set: unknown): unknown {
  if (name === undefined) return set;
  const entries = entriesOf(value);
  entries.set(name, withValue(entries.get(name), rest, set));
  return Object.fromEntries(entries);
}

/** The value without what stands at a path; within a list the whole list is taken out. */
export function withoutPath(value: unknown, [name, ...rest]: readonly string[]): unknown {
  if (name === undefined || typeof value !== "object" || value === null || Array.isArray(value))
    return undefined;
  const entries = entriesOf(value);
  const inner = rest.length === 0 ? undefined : withoutPath(entries.get(name), rest);
  if (inner === undefined) entries.delete(name);
  else entries.set(name, inner);
  return Object.fromEntries(entries);
}

const isPart = (value: unknown): boolean =>
  typeof value === "object" && value !== null && !Array.isArray(value);

/** The second settings over the first, part by part; lists and single values are replaced whole. */
export function mergeSettings(under: unknown, over: unknown): unknown {
  if (over === undefined) return under;
  if (!isPart(under) || !isPart(over)) return over;
  const merged = entriesOf(under);
  for (const [name, value] of entriesOf(over)) merged.set(name, mergeSettings(merged.get(name), value));
  return Object.fromEntries(merged);
}

export type SetSetting =
  | { readonly kind: "set"; readonly settings: unknown }
  | { readonly kind: "unknown"; readonly path: string; readonly nearest?: string };

/** Raw settings with one set by its path, from JSON or, where the text is not JSON, from the text itself. */
export function setSetting(raw: unknown, path: string, text: string): SetSetting {
  const names = partedPath(path);
  if (names === undefined || !isKnown(names))
    return { kind: "unknown", path, nearest: suggestName(path, knownSettingPaths()) };
  return { kind: "set", settings: withValue(raw ?? {}, names, jsonOrText(text)) };
}

/** A name as it stands in a path: in brackets and quotes where it holds more than letters, digits, hyphens. */
const stepOf = (name: string): string =>
  /^[\p{L}\p{N}_-]+$/u.test(name) ? `.${name}` : `[${JSON.stringify(name)}]`;

/** The path of a setting as `setSetting` takes it: `tables["finds.csv"].decimal`. */
export const settingPath = (names: readonly string[]): string =>
  names.map(stepOf).join("").replace(/^\./, "");

/** The names of a path; undefined where a bracket or a quote is not closed. */
function partedPath(path: string): readonly string[] | undefined {
  const names: string[] = [];
  let rest = path;
  while (rest !== "") {
    const [step, quoted, plain = ""] =
      /^\[("(?:[^"\\]|\\.)*")\](?:\.(?=[^.[]))?|^([^.[]*)(?:\.|(?=\[)|$)/.exec(rest) ?? [];
    if (step === undefined || step === "") return undefined;
    const name = quoted === undefined ? plain : jsonOrText(quoted);
    if (typeof name !== "string" || name === "" || (step === rest && step.endsWith("."))) return undefined;
    names.push(name);
    rest = rest.slice(step.length);
  }
  return names;
}

/** A path and the text behind its equals sign; undefined where there is none. */
export function partedAssignment(assignment: string): readonly [path: string, text: string] | undefined {
  const parts = /^((?:[^="[]|\[(?:"(?:[^"\\]|\\.)*"\])?)+)=(.*)$/s.exec(assignment);
  return parts === null ? undefined : [parts[1], parts[2]];
}

function jsonOrText(text: string): unknown {
  try {
    const value: unknown = JSON.parse(text);
    return value;
  } catch {
    return text;
  }
}
