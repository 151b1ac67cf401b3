import { Credits, creditLines } from "../../../src/figures/credits.tsx";
import { HeightAxis } from "../../../src/figures/height-axis.tsx";
import { heightScale } from "../../../src/figures/height-scale.ts";
import { slantedNames } from "../../../src/figures/layout/slanted-names.ts";
import { Legend, type LegendEntry, legendLayout } from "../../../src/figures/legend.tsx";
import { lithologyLegend, PATTERN_CREDIT } from "../../../src/figures/lithology/lithology-legend.ts";
import { PATTERN_TILES, type PatternId } from "../../../src/figures/lithology/pattern-tiles.ts";
import { GroupBracket } from "../../../src/figures/marks/group-bracket.tsx";
import { HorizonLine } from "../../../src/figures/marks/horizon-line.tsx";
import { LensBreak } from "../../../src/figures/marks/lens-break.tsx";
import { markPath } from "../../../src/figures/marks/mark-path.ts";
import { ScaleBar } from "../../../src/figures/marks/scale-bar.tsx";
import { SlantedNames } from "../../../src/figures/marks/slanted-names.tsx";
import { Taper } from "../../../src/figures/marks/taper.tsx";
import { GROUP_SIGNS, groupSign, TEXT } from "../../../src/figures/theme.ts";
import { frame, y } from "./frame.tsx";

const outward = [0.5, 1, 2, 4, 9].map((heightM) => ({ heightM, confidence: 1 - 1 / (1 + heightM) ** 2 }));
const colour = groupSign(0).colour;
const lens = { baseM: -0.5, topM: 0.5, magnification: 10 };
const lensed = heightScale({ bottomM: -10, topM: 8, top: 40, bottom: 220 }, lens);

export const PATTERN_IDS = Object.keys(PATTERN_TILES).filter((id): id is PatternId => id in PATTERN_TILES);

const SIGNS: readonly LegendEntry[] = [
  { sign: { kind: "find", colour }, label: "find" },
  { sign: { kind: "open-find", colour }, label: "find set aside" },
  { sign: { kind: "taper", colour }, label: "chance that the taxon was still here" },
  { sign: { kind: "reaches-top", colour }, label: "still found in the highest sample" },
  { sign: { kind: "found", colour }, label: "sample that held the group" },
  { sign: { kind: "barren", colour }, label: "searched, nothing found" },
  { sign: { kind: "main-horizon" }, label: "main horizon, 95% interval" },
  { sign: { kind: "other-horizon" }, label: "other horizon" },
  { sign: { kind: "value" }, label: "value" },
  { sign: { kind: "anomaly" }, label: "above background" },
  { sign: { kind: "limit" }, label: "below detection limit" },
  { sign: { kind: "background" }, label: "background" },
  { sign: { kind: "curve" }, label: "mixing curve" },
  { sign: { kind: "density" }, label: "common level" },
  { sign: { kind: "contact", contact: "erosive" }, label: "erosive" },
  { sign: { kind: "contact", contact: "hardground" }, label: "hardground" },
];

export const markCases = {
  taper: frame(
    "taper",
    <>
      <Taper
        x={30}
        width={6}
        y={y}
        colour={colour}
        firstM={-8}
        lastM={-0.4}
        above={outward.map((step) => ({ ...step, heightM: step.heightM - 0.4 }))}
        topEndM={3.1}
        occurrencesM={[-8, -6.4, -5, -4.9, -2, -0.4]}
        openOccurrencesM={[1.2]}
      />
      <Taper
        x={50}
        width={6}
        y={y}
        colour={colour}
        firstM={-3}
        lastM={2}
        above={[]}
        below={outward.map((step) => ({ ...step, heightM: -3 - step.heightM }))}
        baseEndM={-6.2}
        occurrencesM={[-3, -1, 2]}
      />
      <Taper
        x={70}
        width={6}
        y={y}
        colour={colour}
        firstM={-12}
        lastM={9}
        reachesTop
        occurrencesM={[-12, 3, 9]}
      />
    </>,
  ),
  "horizon-line": frame(
    "horizon-line",
    <>
      <HorizonLine
        x={10}
        width={140}
        y={y}
        horizon={{
          label: "impact surface, given and found",
          heightM: 0,
          lowM: -0.3,
          highM: 0.5,
          rank: "main",
        }}
      />
      <HorizonLine x={10} width={140} y={y} horizon={{ label: "earlier step", heightM: -4, rank: "other" }} />
    </>,
    { width: 160 },
  ),
  "slanted-names": frame(
    "slanted-names",
    <SlantedNames
      y={40}
      style={TEXT.taxon}
      names={slantedNames({
        names: ["Selvites dorso", "S. minor", "C. cf. alta", "Palmidium arx"].map((text, i) => ({
          text,
          x: 20 + 5 * i,
        })),
        style: TEXT.taxon,
      })}
    />,
    { height: 110 },
  ),
  "lens-break": frame(
    "lens-break",
    <>
      <HeightAxis
        x={50}
        y={lensed}
        reading={{ unit: "m", metresPerUnit: 1, zeroM: 0, direction: "height", signed: true }}
      />
      <LensBreak x={50} width={60} y={lensed} lens={lens} />
    </>,
  ),
  "scale-bar": frame("scale-bar", <ScaleBar x={20} y={60} length={40} label="2 m" />, { height: 80 }),
  "group-brackets": frame(
    "group-brackets",
    <>
      {GROUP_SIGNS.map((sign, i) => (
        <g key={sign.letter}>
          <GroupBracket x={14} width={64} y={20 + i * 16} sign={sign} name="calcareous nannoplankton" />
          <path
            d={markPath(sign.shape, 92, 17 + i * 16, 2)}
            fill={sign.colour}
            stroke={sign.colour}
            strokeWidth={0.4}
          />
          <path d={`M100 ${17 + i * 16}h40`} stroke={sign.colour} strokeDasharray={sign.dash || undefined} />
        </g>
      ))}
    </>,
    { width: 150, height: 150 },
  ),
  legend: frame("legend", <Legend plateId="legend" x={10} y={10} layout={legendLayout(SIGNS, 280)} />, {
    width: 300,
    height: 100,
  }),
  "rock-legend": frame(
    "rock-legend",
    <>
      <Legend
        plateId="rock-legend"
        x={10}
        y={10}
        layout={legendLayout(lithologyLegend(["marl", "greywacke"], PATTERN_IDS), 280)}
      />
      <Credits x={10} y={130} lines={creditLines([PATTERN_CREDIT], 280)} />
    </>,
    { width: 300, height: 140, patterns: PATTERN_IDS },
  ),
};
