import type { ReactElement } from "react";
import type { Study } from "../../core/study/model.ts";
import { defaultSettings } from "../../core/study/settings.ts";

/** Every setting in force with its default beside it where it differs, and every choice made by hand. */
export function ChoicesSection({ study }: { readonly study: Study }): ReactElement {
  const settings = flatten(study.settings);
  const defaults = new Map(flatten(defaultSettings));
  return (
    <section>
      <h2 id="choices">Choices</h2>
      {study.choices.length === 0 ? (
        <p>No choice made by hand is recorded in choices.csv.</p>
      ) : (
        <div className="wide">
          <table>
            <thead>
              <tr>
                <th>Choice</th>
                <th>Was</th>
                <th>Became</th>
                <th>Reason</th>
                <th>By</th>
                <th>After results were seen</th>
              </tr>
            </thead>
            <tbody>
              {study.choices.map((choice) => (
                <tr key={choice.order}>
                  <td>{choice.choice}</td>
                  <td>{choice.old}</td>
                  <td>{choice.new}</td>
                  <td>{choice.reason}</td>
                  <td>{choice.by}</td>
                  <td>{choice.afterResults ? "yes" : "no"}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      <h3>Settings in force</h3>
      <table>
        <thead>
          <tr>
            <th>Setting</th>
            <th>Value</th>
            <th>Default, where it differs</th>
          </tr>
        </thead>
        <tbody>
          {settings.map(([path, value]) => (
            <tr key={path}>
              <td>
                <code>{path}</code>
              </td>
              <td>{value}</td>
              <td>{defaults.get(path) === value ? "" : (defaults.get(path) ?? "none")}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

/** A settings tree as dotted paths with their values as text. */
function flatten(value: unknown, path = ""): [string, string][] {
  const isBranch =
    typeof value === "object" && value !== null && !Array.isArray(value) && Object.keys(value).length > 0;
  if (!isBranch) return [[path, typeof value === "string" ? value : JSON.stringify(value)]];
  return Object.entries(value).flatMap(([key, child]) =>
    flatten(child, path === "" ? key : `${path}.${key}`),
  );
}
