import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { VERSION } from "../../core/version.ts";
import type { PlateFile } from "../../figures/index.ts";
import type { Finding } from "../findings/finding.ts";
import type { ResultTable } from "../tables/result-table.ts";
import { Block } from "./block.tsx";
import { ChoicesSection } from "./choices-section.tsx";
import { MethodsSection } from "./methods-section.tsx";
import { ProblemsSection } from "./problems-section.tsx";
import { RangesPart } from "./ranges-part.tsx";
import { ResultTableBlock } from "./result-table-block.tsx";
import { reportStyle } from "./style.ts";
import { InShort, TimingPart } from "./timing-part.tsx";

export interface ReportContent {
  readonly analysis: Analysis;
  readonly findings: readonly Finding[];
  readonly plates: readonly PlateFile[];
  readonly tables: readonly ResultTable[];
  readonly fontFaces: string;
}

/** The whole report as one page that needs nothing beside itself. */
export function ReportPage({ analysis, findings, plates, tables, fontFaces }: ReportContent): ReactElement {
  const { study } = analysis;
  const of = (station: Finding["station"], section?: string) =>
    findings.filter((finding) => finding.station === station && finding.section === section);
  const titleOf = (name: string) =>
    name === "joint"
      ? "All sections"
      : (study.sections.find((section) => section.name === name)?.title ?? name);
  const drawn = (subject: PlateFile["subject"], section?: string, set?: string) =>
    plates
      .filter((plate) => plate.subject === subject && plate.section === section && plate.set === set)
      .map(({ drawing }) => drawing);
  const idOf = (name: string) =>
    name === "joint" ? name : `section-${study.sections.findIndex((section) => section.name === name) + 1}`;
  const together = of("timing", "joint");
  return (
    <html lang="en">
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <title>{`${study.name}: report`}</title>
        <style>{fontFaces + reportStyle}</style>
      </head>
      <body>
        <header>
          <h1>{study.name}</h1>
          <p>
            Local disappearance against marker horizons. Worked out by Lastbed {VERSION}, seed{" "}
            {study.settings.seed}; <code>repeat.json</code> beside this page repeats every number.
          </p>
          <Contents
            sections={[
              ...(together.length > 0 ? [["joint", "All sections together"] as const] : []),
              ...study.sections.map((section) => [idOf(section.name), section.title] as const),
            ]}
          />
        </header>
        <main>
          <Block findings={of("tables")} />
          <InShort findings={findings} titleOf={titleOf} idOf={idOf} />
          <h2 id="fence">Sections lined up</h2>
          <Block findings={of("fence")} drawings={drawn("fence")} />
          {together.length > 0 && (
            <section className="of-section">
              <h2 id="joint">All sections together</h2>
              <TimingPart findings={together} plateOf={() => []} />
            </section>
          )}
          {study.sections.map((section) => (
            <section key={section.name} className="of-section">
              <h2 id={idOf(section.name)}>{section.title}</h2>
              <h3>Markers</h3>
              <Block findings={of("markers", section.name)} drawings={drawn("markers", section.name)} />
              <RangesPart
                {...{ analysis, section }}
                findings={of("ranges", section.name)}
                drawings={drawn("ranges", section.name)}
              />
              <TimingPart
                findings={of("timing", section.name)}
                plateOf={(set) => drawn("timing", section.name, set)}
              />
            </section>
          ))}
          <MethodsSection analysis={analysis} />
          <ChoicesSection study={study} />
          <ProblemsSection problems={study.problems} />
          <section>
            <h2 id="tables">Result tables</h2>
            <p>The full tables lie beside this page as CSV.</p>
            {tables.map((table) => (
              <ResultTableBlock key={table.name} table={table} />
            ))}
          </section>
        </main>
      </body>
    </html>
  );
}

function Contents({ sections }: { readonly sections: readonly (readonly [string, string])[] }): ReactElement {
  const entries = [
    ["short", "In short"],
    ["fence", "Sections lined up"],
    ...sections,
    ["methods", "Methods"],
    ["choices", "Choices"],
    ["problems", "Problems of the input"],
    ["tables", "Result tables"],
  ];
  return (
    <nav aria-label="Contents">
      {entries.map(([id, title]) => (
        <a key={id} href={`#${id}`}>
          {title}
        </a>
      ))}
    </nav>
  );
}
