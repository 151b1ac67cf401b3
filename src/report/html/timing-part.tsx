import type { ReactElement } from "react";
import type { Drawing } from "../../figures/index.ts";
import type { Finding } from "../findings/finding.ts";
import { isGroupSet, setTitle } from "../wordings/set-title.ts";
import { Block } from "./block.tsx";
import { FindingNotes } from "./finding-block.tsx";
import { Sentence } from "./words.tsx";

interface TimingPartProps {
  readonly findings: readonly Finding[];
  readonly plateOf: (set: string) => readonly Drawing[];
}

/** The sets of a section with their plates, then the groups, each as one sentence that unfolds. */
export function TimingPart({ findings, plateOf }: TimingPartProps): ReactElement {
  const groups = findings.filter(isOfGroup);
  const sets = findings.filter((finding) => !isOfGroup(finding));
  return (
    <>
      <h3>Timing</h3>
      {sets.map((finding, i) => (
        <div key={finding.set}>
          <h4 className="set">{setTitle(finding.set ?? "")}</h4>
          <Block
            findings={[i === 0 ? finding : withoutSurvivors(finding)]}
            drawings={plateOf(finding.set ?? "")}
          />
        </div>
      ))}
      {groups.length > 0 && <h4 className="set">Group by group</h4>}
      {groups.map((finding) => (
        <details key={finding.set} className="group">
          <summary>
            <Sentence words={finding.sentence} />
          </summary>
          <FindingNotes finding={withoutSurvivors(finding)} />
        </details>
      ))}
      {findings.length === 0 && <p>No taxon has its end in question here.</p>}
    </>
  );
}

const isOfGroup = ({ set }: Finding) => set !== undefined && isGroupSet(set);

/** The survivors of a section are the same for every set: told once, at the first. */
const withoutSurvivors = (finding: Finding): Finding => ({
  ...finding,
  weaknesses: finding.weaknesses.filter(({ code }) => !code?.endsWith("-survivors")),
});

interface InShortProps {
  readonly findings: readonly Finding[];
  readonly titleOf: (section: string) => string;
  readonly idOf: (section: string) => string;
}

/** What each section answers, before its evidence. */
export function InShort({ findings, titleOf, idOf }: InShortProps): ReactElement | null {
  const told = findings.filter((finding) => finding.station === "timing" && !isOfGroup(finding));
  if (told.length === 0) return null;
  return (
    <section>
      <h2 id="short">In short</h2>
      <ul className="short">
        {told.map((finding) => (
          <li key={`${finding.section} ${finding.set}`}>
            <a href={`#${idOf(finding.section ?? "")}`}>{titleOf(finding.section ?? "")}</a>:{" "}
            <Sentence words={finding.sentence} />
          </li>
        ))}
      </ul>
    </section>
  );
}
