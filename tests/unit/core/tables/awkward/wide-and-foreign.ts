import type { AwkwardFile } from "./awkward-file.ts";

const tarn = (taxon: string, heightM: number) => ["Tarn Cut", taxon, heightM] as const;

/** Wide sheets, headers in other languages and tables without all their columns. */
export const wideAndForeign: readonly AwkwardFile[] = [
  {
    title: "samples down with a title, groups over the taxa and a legend below",
    files: {
      "Tarn.csv":
        "Table 2. Fossils of the cut\n,,,Ammonites,,Bivalves\nSection,Sample,Depth (ft),Velorites alta,Velorites parva,Quenstra lenis\nTarn Cut,T1,10,R,,0\nTarn Cut,T2,5,,C,-\nR = rare; C = common\n",
    },
    finds: [tarn("Velorites alta", -3.048), tarn("Velorites parva", -1.524)],
    told: ["read-as", "notes-above", "read-wide"],
  },
  {
    title: "taxa down with rows for sample and position",
    files: {
      "a.csv":
        "Section,,Tarn Cut,Tarn Cut\nSample,,T1,T2\nHeight (m),,1,2.5\nGroup,Species,,\nammonites,Velorites alta,x,x?\n,Velorites parva,,2\n",
    },
    finds: [tarn("Velorites alta", 1), tarn("Velorites alta", 2.5), tarn("Velorites parva", 2.5)],
    told: ["read-wide"],
  },
  {
    title: "units in a row of their own, tabs and decimal commas",
    files: {
      "a.txt":
        "Profil\tProbe\tTeufe\tVelorites alta\tVelorites parva\n\t\tm\t\t\nTarn Cut\tT1\t1,5\tx\t0\nTarn Cut\tT2\t0,5\t0\tx\n",
    },
    finds: [tarn("Velorites alta", -1.5), tarn("Velorites parva", -0.5)],
    told: ["read-as", "read-wide"],
  },
  {
    title: "a code that nothing explains leaves its cells out",
    files: {
      "a.csv":
        "Section,Sample,Height (m),Velorites alta,Velorites parva\nTarn Cut,T1,1,x,VR\nTarn Cut,T2,2,0,x\n",
    },
    finds: [tarn("Velorites alta", 1), tarn("Velorites parva", 2)],
    told: ["read-wide", "code-unknown"],
  },
  {
    title: "the same, explained by a scale of the settings",
    files: {
      "a.csv":
        "Section,Sample,Height (m),Velorites alta,Velorites parva\nTarn Cut,T1,1,x,VR\nTarn Cut,T2,2,0,x\n",
    },
    settings: { taxa: { scales: { usual: { VR: 1 } } } },
    finds: [tarn("Velorites alta", 1), tarn("Velorites parva", 1), tarn("Velorites parva", 2)],
    told: ["read-wide"],
  },
  {
    title: "nd can mean two things and asks",
    files: {
      "a.csv":
        "Section,Sample,Height (m),Velorites alta,Velorites parva\nTarn Cut,T1,1,x,nd\nTarn Cut,T2,2,0,n/a\n",
    },
    finds: [tarn("Velorites alta", 1)],
    told: ["read-wide", "code-unknown"],
  },
  {
    title: "a sample that is blank throughout is told",
    files: {
      "a.csv":
        "Section,Sample,Height (m),Velorites alta,Velorites parva\nTarn Cut,T1,1,x,\nTarn Cut,T2,2,,\n",
    },
    finds: [tarn("Velorites alta", 1)],
    told: ["read-wide", "blank-samples"],
  },
  {
    title: "a column of totals is no taxon",
    files: {
      "a.csv":
        "Section,Sample,Height (m),Velorites alta,Velorites parva,Total\nTarn Cut,T1,1,2,5,7\nTarn Cut,T2,2,0,1,1\n",
    },
    finds: [tarn("Velorites alta", 1), tarn("Velorites parva", 1), tarn("Velorites parva", 2)],
    told: ["read-wide"],
  },
  {
    title: "French headers",
    files: { "occurrences.csv": "Coupe,Espèce,Profondeur (m)\nTarn Cut,Velorites alta,2\n" },
    finds: [tarn("Velorites alta", -2)],
    told: [],
  },
  {
    title: "Spanish headers without accents, in capitals",
    files: { "occurrences.csv": "SECCION,ESPECIE,ALTURA (M)\nTarn Cut,Velorites alta,2\n" },
    finds: [tarn("Velorites alta", 2)],
    told: [],
  },
  {
    title: "Chinese headers",
    files: { "occurrences.csv": "剖面,种,深度 (m)\nTarn Cut,Velorites alta,2\n" },
    finds: [tarn("Velorites alta", -2)],
    told: [],
  },
  {
    title: "a table without a section is of the section the settings name",
    files: { "occurrences.csv": "taxon,height (m)\nVelorites alta,2\n" },
    settings: { tables: { occurrences: { section: "Tarn Cut" } } },
    finds: [tarn("Velorites alta", 2)],
    told: [],
  },
  {
    title: "names of taxa and heights under unknown headers are taken by content, told",
    files: {
      "occurrences.csv":
        "section,who,where\nTarn Cut,Velorites alta,1\nTarn Cut,Velorites parva,2\nTarn Cut,Quenstra lenis,3\n",
    },
    settings: { sections: { axis: "height", unit: "m" } },
    finds: [tarn("Velorites alta", 1), tarn("Velorites parva", 2), tarn("Quenstra lenis", 3)],
    told: ["taken-by-content", "taken-by-content"],
  },
  {
    title: "a position without a unit asks, and a choice for its column answers",
    files: { "occurrences.csv": "section,taxon,Höhe\nTarn Cut,Velorites alta,200\n" },
    settings: { tables: { occurrences: { columns: { Höhe: { unit: "cm" } } } } },
    finds: [tarn("Velorites alta", 2)],
    told: [],
  },
  {
    title: "a choice for a header that no column has is told",
    files: { "occurrences.csv": "section,taxon,height (m)\nTarn Cut,Velorites alta,2\n" },
    settings: { tables: { occurrences: { columns: { hieght: { unit: "cm" } } } } },
    finds: [tarn("Velorites alta", 2)],
    told: ["column-setting-unused"],
  },
];
