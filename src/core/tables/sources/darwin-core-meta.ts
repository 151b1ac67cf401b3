import { xmlTags } from "./xml-tags.ts";

/** A file of a Darwin Core archive as its meta.xml describes it. */
export interface DescribedFile {
  /** Last part of the row type: Event, Occurrence, MeasurementOrFact ... */
  readonly rowType: string;
  readonly location: string;
  readonly encoding: string;
  readonly delimiter: string;
  /** Blank where cells are not enclosed. */
  readonly quote: string;
  readonly headerLines: number;
  /** Column of the id (core) or of the core's id (extension). */
  readonly idIndex?: number;
  readonly fields: readonly DescribedField[];
}

export interface DescribedField {
  /** Last part of the term: eventID, scientificName ... */
  readonly term: string;
  readonly index?: number;
  readonly default?: string;
}

const lastPart = (uri: string): string => uri.split(/[/#:]/).at(-1) ?? uri;

const plain = (text: string): string => text.replace("\\t", "\t").replace("\\n", "\n").replace("\\r", "\r");

const indexOf = (attributes: ReadonlyMap<string, string>): number | undefined => {
  const index = attributes.get("index") ?? "";
  return /^\d{1,6}$/.test(index) ? Number(index) : undefined;
};

/** Reads meta.xml (Darwin Core Text Guide); undefined where the text describes no archive. */
export function readMeta(text: string): readonly DescribedFile[] | undefined {
  const files: DescribedFile[] = [];
  let isArchive = false;
  for (const { name, kind, attributes, text: content } of xmlTags(text)) {
    if (kind === "close") continue;
    const file = files.at(-1);
    if (name === "archive") isArchive = true;
    else if (name === "core" || name === "extension") files.push(fileOf(attributes));
    else if (file === undefined) continue;
    else if (name === "location" && file.location === "")
      files.splice(-1, 1, { ...file, location: content.trim() });
    else if (name === "id" || name === "coreid")
      files.splice(-1, 1, { ...file, idIndex: indexOf(attributes) });
    else if (name === "field")
      files.splice(-1, 1, { ...file, fields: [...file.fields, fieldOf(attributes)] });
  }
  return isArchive ? files : undefined;
}

const fileOf = (attributes: ReadonlyMap<string, string>): DescribedFile => ({
  rowType: lastPart(attributes.get("rowType") ?? ""),
  location: "",
  encoding: attributes.get("encoding") ?? "UTF-8",
  delimiter: plain(attributes.get("fieldsTerminatedBy") ?? ","),
  quote: attributes.get("fieldsEnclosedBy") ?? '"',
  headerLines: Number(attributes.get("ignoreHeaderLines") ?? "0") || 0,
  fields: [],
});

const fieldOf = (attributes: ReadonlyMap<string, string>): DescribedField => {
  const index = indexOf(attributes);
  const given = attributes.get("default");
  return {
    term: lastPart(attributes.get("term") ?? ""),
    ...(index === undefined ? {} : { index }),
    ...(given === undefined ? {} : { default: given }),
  };
};
