const taxa = ["Velorites parvus", "Velorites altus", "Quenstra lenis", "Quenstra dura", "Ombrella tenuis"];
const HOSTILE = '<img src=x onerror="document.title=1">';

/** A study of one section that is worked out at once: five taxa that end near an impact at 10 m, and a hostile name. */
export const smallStudy: Readonly<Record<string, string>> = {
  "sections.csv": "section,name,axis,unit,bottom,top\nlorn-bank,Lorn Bank,height,m,0,14\n",
  "horizons.csv":
    "section,horizon,kind,position,below,above,shape\nlorn-bank,lorn-impact,impact,10,0.05,0.05,normal\n",
  "samples.csv": rows("section,sample,position", 28, (i) => `lorn-bank,LB-${i + 1},${(i + 1) * 0.5}`),
  "occurrences.csv": [
    "section,sample,taxon",
    ...taxa.flatMap((taxon, t) =>
      Array.from({ length: 18 }, (_, i) => i)
        .filter((i) => (i * 7 + t * 3) % 4 !== 0)
        .map((i) => `lorn-bank,LB-${i + 1},${taxon}`),
    ),
    ...[2, 6, 11, 15].map((i) => `lorn-bank,LB-${i},"${HOSTILE.replaceAll('"', '""')}"`),
    ...[3, 7, 12, 16].map((i) => `lorn-bank,LB-${i},__proto__`),
    "",
  ].join("\n"),
};

/** The same study with a cell that cannot be read. */
export const faultyStudy: Readonly<Record<string, string>> = {
  ...smallStudy,
  "samples.csv": (smallStudy["samples.csv"] ?? "").replace("LB-9,4.5", "LB-9,four and a half"),
};

export const hostileName = HOSTILE;

function rows(header: string, count: number, row: (index: number) => string): string {
  return `${[header, ...Array.from({ length: count }, (_, index) => row(index))].join("\n")}\n`;
}
