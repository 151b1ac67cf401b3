import type { Analysis } from "../../core/analysis-result.ts";
import { HeightAxis, heightAxisWidth } from "../height-axis.tsx";
import type { Drawing, View } from "./drawing.ts";
import { FenceLabels, labelColumns, labelColumnWidth } from "./fence-labels.tsx";
import { correlations } from "./fence-lines.ts";
import { type FencePosts, fencePosts } from "./fence-posts.ts";
import { FenceTies } from "./fence-ties.tsx";
import { horizonLegend } from "./horizon-labels.tsx";
import { type PlateColumn, placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import { PostPanel, postPanel } from "./post-panel.tsx";
import { scaleColumn } from "./scale-column.tsx";
import { horizonReading } from "./section-frame.ts";

const BODY_HEIGHT = 400;
const GAP = 84;
const HEADS = 14;

/** Sections side by side, flattened on the datum, with the horizons they share. */
export function fenceDiagram(
  analysis: Analysis,
  view: View & { readonly bodyHeight?: number } = {},
): Drawing {
  const top = BODY_TOP + HEADS;
  const span = { top, bottom: top + (view.bodyHeight ?? BODY_HEIGHT) };
  const fence = fencePosts(analysis, view, span);
  const axis = placeColumns(axisOf(fence), MARGIN);
  const panels = placePanels(analysis, fence, axis.right + 20);
  const datum = fence.commonY && analysis.alignment.datum;
  const ties = fence.commonY ? correlations(panels, analysis.alignment.horizons) : [];
  const right = panels.at(-1)?.right ?? MARGIN;
  const labels = labelColumns(panels, datum);
  const marks = panels.flatMap(({ horizons }) => horizons).map(({ horizon }) => rankOf(horizon === datum));
  return setSheet({
    id: "fence",
    title: `${analysis.study.name}: fence diagram`.slice(0, 200),
    subtitle: subtitleOf(datum),
    description: describe(analysis, panels.length, datum),
    right: right + labelColumnWidth(labels.at(-1)),
    bottom: span.bottom + 12,
    columns: axis.placed,
    body: (
      <g>
        <FenceTies ties={ties} />
        {panels.map((panel) => (
          <PostPanel key={panel.section.name} panel={panel} datum={datum} />
        ))}
        {labels.map((column) => (
          <FenceLabels key={column.x} span={span} column={column} />
        ))}
      </g>
    ),
    legend: [
      ...panels.flatMap(({ columns }) => columns.flatMap((column) => column.legend ?? [])),
      ...horizonLegend(marks),
    ],
    patterns: panels.flatMap(({ columns }) => columns.flatMap((column) => column.patterns ?? [])),
    notes: notesOf(fence, analysis),
    panels: panels.map(({ section, left, right: end, y }) => ({
      section: section.name,
      left,
      right: end,
      top: Math.min(...y.range()),
      bottom: Math.max(...y.range()),
      scale: y,
    })),
    view,
  });
}

function rankOf(isMain: boolean) {
  return {
    name: "",
    label: "",
    detail: "",
    heightM: 0,
    rank: isMain ? ("main" as const) : ("other" as const),
  };
}

function axisOf({ commonY, lens, posts }: FencePosts): readonly PlateColumn[] {
  const scale = commonY ?? posts[0]?.y;
  if (scale === undefined) return [];
  if (commonY === undefined) return [scaleColumn(longest(posts).y)];
  const reading = horizonReading(0);
  const width = heightAxisWidth(commonY, reading);
  return [
    { key: "axis", width, draw: (x) => <HeightAxis x={x + width} y={commonY} reading={reading} /> },
    scaleColumn(commonY, lens),
  ];
}

function longest(posts: FencePosts["posts"]) {
  return posts.reduce((a, b) => (spread(b.y.range()) > spread(a.y.range()) ? b : a));
}

function spread(values: readonly number[]): number {
  return Math.max(...values) - Math.min(...values);
}

function placePanels(analysis: Analysis, { posts }: FencePosts, left: number) {
  const panels: ReturnType<typeof postPanel>[] = [];
  let x = left;
  for (const post of posts) {
    const panel = postPanel(analysis, post, x);
    panels.push(panel);
    x = panel.right + GAP;
  }
  return panels;
}

function subtitleOf(datum: string | undefined): string {
  if (datum === undefined)
    return "Each section stands on its own base: no datum places them against each other.";
  return `Metres from ${datum.slice(0, 120)}, on which the sections are flattened; each section's own readings beside it.`;
}

function describe(analysis: Analysis, drawn: number, datum: string | undefined): string {
  const count = `${drawn} ${drawn === 1 ? "section" : "sections"}`;
  if (datum === undefined) return `${count}, each on its own: no datum is shared.`;
  const used = analysis.alignment.horizons.length;
  return `${count} flattened on ${datum}, ${used} shared ${used === 1 ? "horizon" : "horizons"} used.`;
}

function notesOf({ unaligned, posts, commonY }: FencePosts, { alignment }: Analysis): readonly string[] {
  return [
    ...(posts.length === 0 ? ["The study has no section to draw."] : []),
    ...(posts.length > 0 && commonY === undefined
      ? ["Heights of different sections cannot be compared here: declare one horizon for them all."]
      : []),
    ...(unaligned.length > 0
      ? [
          `Not drawn, since the datum is not placed there: ${unaligned.map((name) => name.slice(0, 80)).join(", ")}.`,
        ]
      : []),
    ...(commonY && alignment.sections.length > 1
      ? [
          "Solid ties: horizons the sections were lined up on. Dashed ties: the same name in neighbouring sections, not used.",
        ]
      : []),
  ];
}
