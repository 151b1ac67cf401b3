import { CountColumn } from "../../../src/figures/columns/count-column.tsx";
import { DensityColumn } from "../../../src/figures/columns/density-column.tsx";
import {
  LithologyColumn,
  type LoggedBed,
  lithologyPatterns,
} from "../../../src/figures/columns/lithology-column.tsx";
import {
  type SearchedGroup,
  SearchRail,
  searchRailPatterns,
} from "../../../src/figures/columns/search-rail.tsx";
import { ValueColumn } from "../../../src/figures/columns/value-column.tsx";
import { linearColumn, logColumn } from "../../../src/figures/columns/value-scale.ts";
import { HeightAxis } from "../../../src/figures/height-axis.tsx";
import { groupSign } from "../../../src/figures/theme.ts";
import { frame, y } from "./frame.tsx";

export const BEDS: readonly LoggedBed[] = [
  { baseM: -10, topM: -6.2, lithology: "marl" },
  { baseM: -6.2, topM: -5, lithology: "marly limestone", baseContact: "gradational" },
  { baseM: -5, topM: -2.6, lithology: "Marl, grey" },
  { baseM: -2.6, topM: -1.8, lithology: "limestone", baseContact: "erosive" },
  { baseM: -1.8, topM: 0, lithology: "chalk", baseContact: "hardground" },
  { baseM: 0, topM: 0.3, lithology: "boundary clay", baseContact: "burrowed" },
  { baseM: 0.3, topM: 2.4, lithology: "black shale" },
  { baseM: 2.4, topM: 2.8, lithology: "bentonite" },
  { baseM: 2.8, topM: 4, lithology: "greywacke", baseContact: "faulted" },
  { baseM: 6, topM: 8, lithology: "sandstone", baseContact: "karst" },
];
export const HIDDEN = [{ kind: "covered", baseM: 4, topM: 6 }] as const;

export const RAIL: readonly SearchedGroup[] = [
  {
    name: "ammonoids",
    sign: groupSign(0),
    samples: [-9.5, -8, -7.1, -5.5, -4, -3.2, -2, -1, -0.4, 0.6, 1.8, 2.6].map((heightM, i) => ({
      heightM,
      isFound: i < 9,
    })),
  },
  {
    name: "nannoplankton",
    sign: groupSign(1),
    samples: [-9, -7, -5, -3, -1, 1, 3, 6.5, 7.5].map((heightM, i) => ({ heightM, isFound: i % 3 !== 1 })),
  },
];

const metres = { unit: "m", metresPerUnit: 1, zeroM: 0, direction: "height", signed: true } as const;
const feet = { unit: "ft depth", metresPerUnit: 0.3048, zeroM: 400, direction: "depth" } as const;

const iridium = logColumn([0.01, 20], 60);
const carbon = linearColumn([-1, 3], 50);
const grains = linearColumn([0, 12], 44, 3);

export const columnCases = {
  "height-axis": frame("height-axis", <HeightAxis x={60} y={y} reading={metres} />),
  "depth-axis": frame("depth-axis", <HeightAxis x={60} y={y.copy().domain([370, 388])} reading={feet} />),
  "lithology-column": frame(
    "lithology-column",
    <LithologyColumn plateId="lithology-column" x={40} width={36} y={y} beds={BEDS} hidden={HIDDEN} />,
    { patterns: lithologyPatterns(BEDS, HIDDEN) },
  ),
  "search-rail": frame(
    "search-rail",
    <SearchRail plateId="search-rail" x={40} y={y} groups={RAIL} hidden={HIDDEN} />,
    {
      patterns: searchRailPatterns(HIDDEN),
    },
  ),
  "value-column": frame(
    "value-column",
    <ValueColumn
      x={30}
      width={60}
      y={y}
      {...iridium}
      title="Iridium"
      unit="ng/g, log"
      background={[0.012, 0.05]}
      points={[
        { heightM: -9, value: 0.02 },
        { heightM: -7, value: 0.015, censored: "below" },
        { heightM: -5, value: 0.03, low: 0.02, high: 0.045 },
        { heightM: -3, value: 0.04, isSetAside: true },
        { heightM: 0.1, value: 8.2, low: 7, high: 9.5, isAnomaly: true },
        { heightM: 1.4, value: 0.9, isAnomaly: true },
        { heightM: 20, value: 0.9 },
      ]}
      curve={[
        { heightM: 0, value: 9, low: 7, high: 12 },
        { heightM: 1, value: 2, low: 1.5, high: 2.6 },
        { heightM: 3, value: 0.1, low: 0.06, high: 0.16 },
      ]}
    />,
  ),
  "joined-column": frame(
    "joined-column",
    <ValueColumn
      x={30}
      width={50}
      y={y}
      {...carbon}
      title="δ¹³C"
      unit="‰ VPDB"
      isJoined
      points={[-10, -6, -2, -0.2, 0.3, 2, 7].map((heightM, i) => ({
        heightM,
        value: [2, 2.1, 1.9, 2, 0.2, 0.6, 0.9][i] ?? 0,
      }))}
    />,
  ),
  "count-column": frame(
    "count-column",
    <CountColumn
      x={30}
      width={44}
      y={y}
      {...grains}
      title="Spherules"
      unit="per g"
      bars={[
        { baseM: -0.2, topM: 0, value: 2 },
        { baseM: 0, topM: 0.4, value: 11 },
        { baseM: 0.4, topM: 0.9, value: 5 },
        { baseM: 2, topM: 2.02, value: 0 },
      ]}
    />,
  ),
  "density-column": frame(
    "density-column",
    <DensityColumn
      x={30}
      width={50}
      y={y}
      title="One level"
      unit="density"
      density={[-2, -1, 0, 1, 2, 3].map((heightM, i) => ({
        heightM,
        density: [0, 0.1, 0.8, 0.5, 0.1, 0][i] ?? 0,
      }))}
    />,
  ),
  "level-set": frame(
    "level-set",
    <DensityColumn
      x={30}
      width={50}
      y={y}
      title="One level"
      unit="95% set"
      sets={[
        { baseM: -0.2, topM: 0.9 },
        { baseM: 2, topM: 2.4 },
      ]}
      pointM={0.3}
    />,
  ),
};
