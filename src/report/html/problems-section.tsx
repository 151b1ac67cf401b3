import type { ReactElement } from "react";
import type { Problem } from "../../core/study/problem.ts";

const MOST = 500;

/** Every problem of the input: where it stands, what was expected, how to mend it. */
export function ProblemsSection({ problems }: { readonly problems: readonly Problem[] }): ReactElement {
  return (
    <section>
      <h2 id="problems">Problems of the input</h2>
      {problems.length === 0 ? (
        <p>None.</p>
      ) : (
        <div className="wide">
          <table>
            <thead>
              <tr>
                <th>Kind</th>
                <th>File</th>
                <th>Row</th>
                <th>Column</th>
                <th>Stands there</th>
                <th>Expected</th>
                <th>To mend it</th>
              </tr>
            </thead>
            <tbody>
              {problems.slice(0, MOST).map((problem, i) => (
                <tr key={`${i}`}>
                  <td>{problem.severity}</td>
                  <td>{problem.file}</td>
                  <td>{problem.row}</td>
                  <td>{problem.column}</td>
                  <td className="cell">{problem.found.slice(0, 120)}</td>
                  <td>{problem.expected}</td>
                  <td>{problem.mend}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      {problems.length > MOST && (
        <p>
          {problems.length - MOST} more; <code>lastbed check</code> lists them all.
        </p>
      )}
    </section>
  );
}
