import { CountColumn } from "../../../src/figures/columns/count-column.tsx";
import { DensityColumn } from "../../../src/figures/columns/density-column.tsx";
import { LithologyColumn, lithologyPatterns } from "../../../src/figures/columns/lithology-column.tsx";
import { SearchRail } from "../../../src/figures/columns/search-rail.tsx";
import { ValueColumn } from "../../../src/figures/columns/value-column.tsx";
import { linearColumn, logColumn } from "../../../src/figures/columns/value-scale.ts";
import { Credits, creditLines } from "../../../src/figures/credits.tsx";
import { HeightAxis } from "../../../src/figures/height-axis.tsx";
import { heightScale } from "../../../src/figures/height-scale.ts";
import { slantedNames } from "../../../src/figures/layout/slanted-names.ts";
import { Legend, legendLayout } from "../../../src/figures/legend.tsx";
import { lithologyLegend, PATTERN_CREDIT } from "../../../src/figures/lithology/lithology-legend.ts";
import { GroupBracket } from "../../../src/figures/marks/group-bracket.tsx";
import { HorizonLine } from "../../../src/figures/marks/horizon-line.tsx";
import { SlantedNames } from "../../../src/figures/marks/slanted-names.tsx";
import { Taper } from "../../../src/figures/marks/taper.tsx";
import { Plate, POINTS_PER_MM } from "../../../src/figures/plate.tsx";
import { groupSign, TEXT } from "../../../src/figures/theme.ts";
import { BEDS, HIDDEN, RAIL } from "./columns.tsx";

const WIDTH = 180 * POINTS_PER_MM;
const y = heightScale({ bottomM: -10, topM: 8, top: 40, bottom: 350 });
const GROUPS = ["ammonoids", "bivalves", "foraminifera", "survivors"];
const NAMES = [
  "Selvites dorso",
  "S. minor",
  "Cerulia alta",
  "C. cf. alta",
  "O. costata",
  "Brachyma pila",
  "Palmidium arx",
  "Orvella tenuis",
  "Gyrella sola",
  "Ilmenia vadum",
  "Fossaria rupes",
  "Eurypta lens",
  "Dendrix nova",
  "Harpax cor",
  "Mendax ultor",
  "Jugosa ora",
  "Norvia umbra",
  "Lumaria spes",
  "Kalydia trux",
  "Oculina rex",
  "Pyrgula mons",
  "Quadria lux",
  "Rimella os",
  "Solvia ardens",
];
const GROUP_OF = [8, 14, 21, 24];
const PITCH = 8.6;
const RANGES_X = 224;

interface DrawnTaxon {
  readonly name: string;
  readonly x: number;
  readonly group: number;
  readonly finds: readonly number[];
  readonly lastM: number;
}

/** Places that look scattered, the same every time. */
function scattered(seed: number, count: number, lastM: number): readonly number[] {
  return Array.from(
    { length: count },
    (_, i) => lastM - (lastM + 9.6) * (((i * 0.618 + seed * 0.37) % 1) * (i > 0 ? 1 : 0)),
  );
}

const TAXA: readonly DrawnTaxon[] = NAMES.map((name, i) => {
  const group = GROUP_OF.findIndex((end) => i < end);
  const lastM = group === 3 ? 3 + (i % 3) * 2 : i % 7 === 1 ? -3.4 : -0.15 - ((i * 0.37) % 1.4);
  return {
    name,
    x: RANGES_X + i * PITCH + group * 5,
    group,
    lastM,
    finds: scattered(i, 5 + ((i * 7) % 17), lastM),
  };
});

function TaxonRange({ taxon }: { readonly taxon: DrawnTaxon }) {
  const n = taxon.finds.length;
  const firstM = Math.min(...taxon.finds);
  const length = taxon.lastM - firstM;
  const outward = Array.from({ length: 60 }, (_, i) => i * 0.2);
  const isSurvivor = taxon.group === 3;
  return (
    <Taper
      x={taxon.x}
      width={4.6}
      y={y}
      colour={groupSign(taxon.group).colour}
      firstM={firstM}
      lastM={taxon.lastM}
      above={
        isSurvivor
          ? []
          : outward.map((d) => ({
              heightM: taxon.lastM + d,
              confidence: 1 - (length / (length + d)) ** (n - 1),
            }))
      }
      {...(isSurvivor ? {} : { topEndM: taxon.lastM + length * (0.05 ** (-1 / (n - 1)) - 1) })}
      reachesTop={isSurvivor}
      occurrencesM={taxon.finds}
    />
  );
}

function GroupBrackets() {
  return GROUPS.map((name, group) => {
    const xs = TAXA.filter((taxon) => taxon.group === group).map((taxon) => taxon.x);
    const [from, to] = [Math.min(...xs) - 2.3, Math.max(...xs) + 2.3];
    return <GroupBracket key={name} x={from} width={to - from} y={34} sign={groupSign(group)} name={name} />;
  });
}

const iridium = logColumn([0.008, 20], 46);
const carbon = linearColumn([-1, 3], 30);
const spherules = linearColumn([0, 12], 26);
const decay = Array.from({ length: 26 }, (_, i) => i / 10).map((d) => ({
  heightM: 0.1 + d,
  value: 9 * Math.exp(-d / 0.5) + 0.03,
}));

const points = [
  ...Array.from({ length: 16 }, (_, i) => ({ heightM: -9.6 + i * 0.6, value: 0.02 + ((i * 7) % 5) * 0.006 })),
  { heightM: -7.3, value: 0.012, censored: "below" as const },
  { heightM: -2.1, value: 0.012, censored: "below" as const },
  ...decay
    .filter((_, i) => i % 3 === 0)
    .map((point, i) => ({ ...point, value: point.value * (i % 2 ? 1.2 : 0.9), isAnomaly: true })),
  ...Array.from({ length: 6 }, (_, i) => ({ heightM: 3.2 + i * 0.8, value: 0.03 + (i % 3) * 0.008 })),
];

export const sheetCases = {
  sheet: (
    <Plate
      id="sheet"
      title="Sample sheet"
      description="Every primitive together, with invented numbers."
      width={WIDTH}
      height={480}
      patterns={lithologyPatterns(BEDS, HIDDEN)}
    >
      <HeightAxis
        x={30}
        y={y}
        reading={{ unit: "m", metresPerUnit: 1, zeroM: 0, direction: "height", signed: true }}
      />
      <LithologyColumn plateId="sheet" x={34} width={22} y={y} beds={BEDS} hidden={HIDDEN} />
      <SearchRail plateId="sheet" x={61} y={y} groups={RAIL} hidden={HIDDEN} />
      <ValueColumn
        x={86}
        width={46}
        y={y}
        {...iridium}
        title="Iridium"
        unit="ng/g, log"
        background={[0.012, 0.05]}
        points={points}
        curve={decay.map((point) => ({ ...point, low: point.value * 0.75, high: point.value * 1.35 }))}
      />
      <CountColumn
        x={139}
        width={26}
        y={y}
        {...spherules}
        title="Spherules"
        unit="per g"
        bars={[0, 1, 2, 3].map((i) => ({
          baseM: i * 0.3,
          topM: (i + 1) * 0.3,
          value: [6, 11, 5, 2][i] ?? 0,
        }))}
      />
      <ValueColumn
        x={187}
        width={30}
        y={y}
        {...carbon}
        title="δ¹³C"
        unit="‰ VPDB"
        isJoined
        points={Array.from({ length: 60 }, (_, i) => ({
          heightM: -10 + i * 0.3,
          value: (i < 34 ? 2 : 0.4 + (i - 34) * 0.03) + ((i * 13) % 7) * 0.03,
        }))}
      />
      <GroupBrackets />
      {TAXA.map((taxon) => (
        <TaxonRange key={taxon.name} taxon={taxon} />
      ))}
      <HorizonLine
        x={34}
        width={WIDTH - 44}
        y={y}
        labelX={450}
        horizon={{
          label: "impact surface, given and found",
          heightM: 0.1,
          lowM: -0.1,
          highM: 0.3,
          rank: "main",
        }}
      />
      <HorizonLine
        x={34}
        width={WIDTH - 44}
        y={y}
        labelX={450}
        horizon={{ label: "earlier step", heightM: -3.2, rank: "other" }}
      />
      <SlantedNames
        y={350}
        style={TEXT.taxon}
        names={slantedNames({
          names: TAXA.map((taxon) => ({ text: taxon.name, x: taxon.x })),
          style: TEXT.taxon,
        })}
      />
      <DensityColumn
        x={456}
        width={44}
        y={y}
        title="One level"
        unit="density"
        density={Array.from({ length: 60 }, (_, i) => -2 + i * 0.1).map((heightM) => ({
          heightM,
          density: Math.exp(-(((heightM - 0.4) / (heightM < 0.4 ? 0.2 : 0.6)) ** 2)),
        }))}
      />
      <Legend
        plateId="sheet"
        x={14}
        y={428}
        layout={legendLayout(
          lithologyLegend(
            BEDS.map((bed) => bed.lithology),
            ["covered"],
          ),
          WIDTH - 28,
        )}
      />
      <Credits x={14} y={472} lines={creditLines([PATTERN_CREDIT], WIDTH - 28)} />
    </Plate>
  ),
};
