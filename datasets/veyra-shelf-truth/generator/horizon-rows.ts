import type { Row } from "./csv.ts";
import { drawsFor } from "./draws.ts";
import { heightAtKa, lengthText, ownText, smearBaseM, toStep, upwardFromM } from "./scale.ts";
import type { SectionData } from "./section-data.ts";
import type { Truth } from "./truth.ts";

function givenImpact(truth: Truth, { section }: SectionData): Row[] {
  const given = section.givenHorizon;
  if (given === undefined) return [];
  const { position, below, above, shape, notes } = given;
  return [
    { horizon: truth.horizon, kind: "impact", position: position.toFixed(1), below, above, shape, notes },
  ];
}

function ashes(truth: Truth, { section, beds, index }: SectionData): Row[] {
  const draws = drawsFor(truth.seed, index, "dating");
  return truth.ashes.flatMap((ash): Row[] => {
    if (!section.ashes.includes(ash.horizon)) return [];
    const bed = beds.find(({ notes }) => notes.startsWith(ash.bed));
    if (bed === undefined) return [];
    const half = lengthText(section, (bed.top - bed.base) / 2 + section.step / 2);
    const errorMa = 0.02 + 0.002 * draws.integer(6);
    return [
      {
        horizon: ash.horizon,
        kind: "ash",
        position: ownText(section, (bed.base + bed.top) / 2, 1),
        below: half,
        above: half,
        shape: "uniform",
        age_ma: (truth.eventAgeMa - ash.ka / 1000 + (errorMa / 2) * draws.normal()).toFixed(3),
        age_error_ma: errorMa.toFixed(3),
        age_error_kind: "2s",
        dating_method: "U-Pb zircon, single grains",
        laboratory: section.axis === "depth" ? "Vessarn Institute" : "Ormelin Laboratory",
        notes: ash.bed,
      },
    ];
  });
}

function reversal(truth: Truth, { section, measurements }: SectionData): Row[] {
  const turn = heightAtKa(section, truth.reversalKa);
  const levels = measurements
    .filter(({ analyte }) => analyte === "polarity")
    .map(({ sample }) => sample)
    .toSorted((a, b) => a.heightM - b.heightM);
  const below = levels.findLast(({ heightM }) => heightM < turn);
  const above = levels.find(({ heightM }) => heightM >= turn);
  if (below === undefined || above === undefined) return [];
  const [from, to] = [(below.base + below.top) / 2, (above.base + above.top) / 2];
  const half = lengthText(section, (to - from) / 2);
  return [
    {
      horizon: "reversal-1",
      kind: "reversal",
      position: ownText(section, (from + to) / 2),
      below: half,
      above: half,
      shape: "uniform",
      notes: "N below, R above",
    },
  ];
}

function hiatus({ section }: SectionData): Row[] {
  if (section.hiatus === undefined) return [];
  const position = ownText(section, toStep(section, upwardFromM(section, smearBaseM(section))));
  const notes = "uneven surface, 5 mm of relief, clasts of the limestone below";
  return [
    {
      horizon: `${section.section}-surface`,
      kind: "hiatus",
      position,
      below: section.step,
      above: section.step,
      shape: "uniform",
      notes,
    },
  ];
}

/** The horizons that people placed, from below upward. */
export function horizonRows(truth: Truth, data: SectionData): Row[] {
  const isDepth = data.section.axis === "depth";
  return [...reversal(truth, data), ...ashes(truth, data), ...hiatus(data), ...givenImpact(truth, data)]
    .map((row): Row => ({ section: data.section.section, ...row }))
    .toSorted((a, b) => (isDepth ? -1 : 1) * (Number(a["position"]) - Number(b["position"])));
}
