import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { VERSION } from "../../core/version.ts";
import type { Drawing } from "../../figures/index.ts";
import type { Finding } from "../findings/finding.ts";
import type { ResultTable } from "../tables/result-table.ts";
import { ChoicesSection } from "./choices-section.tsx";
import { FindingBlock } from "./finding-block.tsx";
import { MethodsSection } from "./methods-section.tsx";
import { ProblemsSection } from "./problems-section.tsx";
import { ResultTableBlock } from "./result-table-block.tsx";
import { reportStyle } from "./style.ts";

export interface ReportContent {
  readonly analysis: Analysis;
  readonly findings: readonly Finding[];
  readonly drawings: readonly Drawing[];
  readonly tables: readonly ResultTable[];
  readonly fontFaces: string;
}

/** The whole report as one page that needs nothing beside itself. */
export function ReportPage({ analysis, findings, drawings, tables, fontFaces }: ReportContent): ReactElement {
  const { study } = analysis;
  const of = (station: Finding["station"], section?: string) =>
    findings.filter((finding) => finding.station === station && finding.section === section);
  const plate = (id: string) => drawings.filter((drawing) => drawing.id.startsWith(id));
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
          <Contents sections={study.sections.map((section) => [section.name, section.title])} />
        </header>
        <main>
          <Block findings={of("tables")} />
          <h2 id="fence">Sections lined up</h2>
          <Block findings={of("fence")} drawings={plate("fence")} />
          {study.sections.map((section) => (
            <section key={section.name} className="of-section">
              <h2 id={`section-${section.name}`}>{section.title}</h2>
              <h3>Markers</h3>
              <Block findings={of("markers", section.name)} drawings={plate(`markers-${section.name}`)} />
              <h3>Ranges</h3>
              <Block findings={of("ranges", section.name)} drawings={plate(`range-chart-${section.name}`)} />
              <h3>Timing</h3>
              {of("timing", section.name).map((finding) => (
                <div key={finding.set}>
                  <h4 className="set">Set: {finding.set}</h4>
                  <Block
                    findings={[finding]}
                    drawings={drawings.filter((d) => d.id === `timing-${section.name}-${finding.set}`)}
                  />
                </div>
              ))}
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
    ["fence", "Sections lined up"],
    ...sections.map(([name, title]) => [`section-${name}`, title]),
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

interface BlockProps {
  readonly findings: readonly Finding[];
  readonly drawings?: readonly Drawing[];
}

function Block({ findings, drawings = [] }: BlockProps): ReactElement {
  return (
    <>
      {findings.map((finding, i) => (
        <FindingBlock key={`${i}`} finding={finding} />
      ))}
      {drawings.map((drawing) => (
        <figure key={drawing.id}>
          {drawing.element}
          <figcaption>
            <strong>{drawing.title}.</strong> {drawing.description}
          </figcaption>
        </figure>
      ))}
    </>
  );
}
