import { Fragment, type ReactElement } from "react";
import type { Finding } from "../findings/finding.ts";
import { Sentence } from "./words.tsx";

/** A finding in the order of an argument: the sentence, its numbers, what weakens it. */
export function FindingBlock({ finding }: { readonly finding: Finding }): ReactElement {
  return (
    <div className="finding">
      <p className="sentence">
        <Sentence words={finding.sentence} />
      </p>
      <FindingNotes finding={finding} />
    </div>
  );
}

/** The numbers of a finding, and what weakens it. */
export function FindingNotes({ finding }: { readonly finding: Finding }): ReactElement {
  const { numbers, weaknesses } = finding;
  return (
    <>
      {numbers.length > 0 && (
        <table className="numbers">
          <tbody>
            {numbers.map(({ group, label, value, note }, i) => (
              <Fragment key={`${i}`}>
                {group !== undefined && group !== numbers[i - 1]?.group && (
                  <tr>
                    <th colSpan={3} scope="colgroup" className="group-of-numbers">
                      {group}
                    </th>
                  </tr>
                )}
                <tr>
                  <th scope="row">{label}</th>
                  <td>{value}</td>
                  <td className="note">{note}</td>
                </tr>
              </Fragment>
            ))}
          </tbody>
        </table>
      )}
      {weaknesses.length > 0 && (
        <>
          <h4>What weakens this</h4>
          <ul className="weaknesses">
            {weaknesses.map(({ severity, words }, i) => (
              <li key={`${i}`} className={severity}>
                <span className="sign">{severity === "warning" ? "\u25b3" : "\u25cb"}</span>
                <Sentence words={words} />
              </li>
            ))}
          </ul>
        </>
      )}
    </>
  );
}
