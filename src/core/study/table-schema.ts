import type { ColumnDeclaration, TableDeclaration } from "./tables/declare.ts";

const dwcTerms = "http://rs.tdwg.org/dwc/terms/";
/** Terms that Darwin Core takes over from Dublin Core, in the latter's namespace. */
const dcTerms = new Map([["references", "http://purl.org/dc/terms/references"]]);

const typeNames = {
  text: "string",
  number: "number",
  integer: "integer",
  enum: "string",
  boolean: "boolean",
} as const;

/** The Table Schema (Frictionless, version 2) of a declared table, as plain JSON. */
export function tableSchema(table: TableDeclaration) {
  return {
    $schema: "https://datapackage.org/profiles/2.0/tableschema.json",
    fields: Object.entries(table.columns).map(([name, column]) => fieldOf(name, column)),
    fieldsMatch: "partial",
    missingValues: [""],
    ...(table.key ? { primaryKey: table.key } : {}),
    ...(table.references ? { foreignKeys: table.references.map(foreignKey) } : {}),
  };
}

const foreignKey = ({ columns, table, to }: NonNullable<TableDeclaration["references"]>[number]) => ({
  fields: columns,
  reference: { resource: table, fields: to },
});

function fieldOf(name: string, column: ColumnDeclaration) {
  const limits = constraintsOf(column);
  return {
    name,
    type: typeNames[column.type],
    description: column.help,
    ...(column.example === undefined ? {} : { example: column.example }),
    ...(column.unit === undefined
      ? {}
      : { unit: column.unit === "section" ? "the section's own unit" : column.unit }),
    ...(column.dwc === undefined ? {} : { rdfType: dcTerms.get(column.dwc) ?? `${dwcTerms}${column.dwc}` }),
    ...(column.type === "boolean"
      ? { trueValues: ["yes", "true", "1"], falseValues: ["no", "false", "0"] }
      : {}),
    ...(Object.keys(limits).length === 0 ? {} : { constraints: limits }),
  };
}

const constraintsOf = ({ required, minimum, maximum, values }: ColumnDeclaration) => ({
  ...(required ? { required } : {}),
  ...(minimum === undefined ? {} : { minimum }),
  ...(maximum === undefined ? {} : { maximum }),
  ...(values === undefined ? {} : { enum: values }),
});
