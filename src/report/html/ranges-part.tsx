import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { Section } from "../../core/study/model.ts";
import type { Drawing } from "../../figures/index.ts";
import { endWords } from "../findings/end-words.ts";
import type { Finding } from "../findings/finding.ts";
import { rowsOfEnd } from "../findings/range-tops.ts";
import { inMetres, position } from "../wordings/numbers.ts";
import { Block } from "./block.tsx";

interface RangesPartProps {
  readonly analysis: Analysis;
  readonly section: Section;
  readonly findings: readonly Finding[];
  readonly drawings: readonly Drawing[];
}

/** The range chart of a section, and a table of its ends by the leading method. */
export function RangesPart({ analysis, section, findings, drawings }: RangesPartProps): ReactElement {
  const rows = endLines(analysis, section);
  return (
    <>
      <h3>Ranges</h3>
      <Block findings={findings} drawings={drawings} />
      {rows.length > 0 && (
        <details className="group">
          <summary>Ends by the leading method, and how far each leans on the shape of recovery</summary>
          <div className="wide">
            <table>
              <thead>
                <tr>
                  <th>Taxon</th>
                  <th>Method</th>
                  <th>Horizons</th>
                  <th>Last find</th>
                  <th>Its end</th>
                  <th>Bound moves</th>
                </tr>
              </thead>
              <tbody>
                {rows.map(({ taxon, cells }) => (
                  <tr key={taxon}>
                    <td className="cell">
                      <i>{taxon}</i>
                    </td>
                    {cells.map((cell, i) => (
                      <td key={`${i}`}>{cell}</td>
                    ))}
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        </details>
      )}
    </>
  );
}

interface EndLine {
  readonly taxon: string;
  readonly cells: readonly string[];
}

function endLines(analysis: Analysis, section: Section): readonly EndLine[] {
  const asked = analysis.candidates.filter((c) => c.section === section.name && c.role === "candidate");
  const tops = rowsOfEnd(analysis, section.name, "top");
  const leanings = new Map(
    analysis.ranges.leanings
      .filter((one) => one.section === section.name && one.end === "top")
      .map((one) => [one.taxon, one]),
  );
  return asked.flatMap(({ taxon }) => {
    const top = tops.get(taxon)?.[0];
    if (top === undefined) return [];
    const { nearestM, furthestM } = leanings.get(taxon) ?? {};
    const moves =
      nearestM === undefined || furthestM === undefined
        ? "no bound"
        : `${inMetres(furthestM - nearestM)}, from ${position(section, nearestM)}`;
    const cells = [
      top.method,
      String(top.horizons),
      position(section, top.lastM),
      endWords(section, top),
      moves,
    ];
    return [{ taxon, cells }];
  });
}
