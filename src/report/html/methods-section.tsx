import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { basesOf, references, shortSources } from "../methods-text.ts";

/** What was computed, under which assumptions, after whom: written from the results' own basis. */
export function MethodsSection({ analysis }: { readonly analysis: Analysis }): ReactElement {
  return (
    <section>
      <h2 id="methods">Methods</h2>
      <dl className="methods">
        {basesOf(analysis).map((basis) => (
          <div key={basis.method}>
            <dt>{basis.method}</dt>
            <dd>
              {basis.statement} {shortSources(basis) !== "" && <em>({shortSources(basis)})</em>}
              {basis.assumptions.length > 0 && (
                <p className="assumes">Assumes: {basis.assumptions.join("; ")}.</p>
              )}
            </dd>
          </div>
        ))}
      </dl>
      <h2 id="references">References</h2>
      <ul className="references">
        {references(analysis).map((reference) => (
          <li key={reference}>{reference}</li>
        ))}
      </ul>
    </section>
  );
}
