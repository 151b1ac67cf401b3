// The compiled common-end statistic against its twin, a literal simulation and, where present, numpy and R, in one run:
// nanoseconds per replicate and taxon. `npm run bench` runs it.
import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { createServer } from "vite";

const at = (path) => fileURLToPath(new URL(path, import.meta.url));
const server = await createServer({
  configFile: at("../../../vite.config.ts"),
  server: { middlewareMode: true },
});
const { kernels, twins } = await server.ssrLoadModule(at("../../../src/core/numeric/kernels.ts"));

const REPLICATES = 1024;
const DRAWS = 2e7;
const EXPONENT = 10;

const literal = {
  commonEndStatistics(_, m, replicates) {
    const ends = new Float64Array(m.length);
    return Float64Array.from({ length: replicates }, () => {
      let highest = 0;
      for (let i = 0; i < m.length; i++) {
        ends[i] = Math.random() ** (1 / m[i]);
        if (ends[i] > highest) highest = ends[i];
      }
      let sum = 0;
      for (let i = 0; i < m.length; i++) sum += m[i] * Math.log(highest / ends[i]);
      return sum;
    });
  },
};

function nanoseconds({ commonEndStatistics }, taxa, draws) {
  const m = new Float64Array(taxa).fill(EXPONENT);
  const blocks = Math.max(1, Math.round(draws / taxa / REPLICATES));
  let least = Number.POSITIVE_INFINITY;
  for (let round = 0; round < 5; round++) {
    const from = performance.now();
    for (let block = 0; block < blocks; block++)
      commonEndStatistics({ seed: 1, stream: "extinctionTiming", block }, m, REPLICATES);
    least = Math.min(least, ((performance.now() - from) * 1e6) / (blocks * REPLICATES * taxa));
  }
  return least;
}

/** Figures of another program, one a line; none where it is not on this machine. */
function elsewhere(command, script) {
  const { status, stdout } = spawnSync(command, [at(script)], { encoding: "utf8" });
  return status === 0 ? stdout.trim().split("\n").map(Number) : [];
}

const numpy = elsewhere("python3", "common-end-numpy.py");
const r = elsewhere("Rscript", "common-end.R");
const show = (ns) => (ns === undefined ? "not here" : ns.toFixed(2));
console.log("taxa  compiled  twin  literal  numpy  R   numpy/compiled  R/compiled");
[10, 50, 200].forEach((taxa, i) => {
  const compiled = nanoseconds(kernels, taxa, DRAWS);
  const row = [
    compiled,
    nanoseconds(twins, taxa, DRAWS / 20),
    nanoseconds(literal, taxa, DRAWS / 20),
    numpy[i],
    r[i],
  ];
  const ratios = [numpy[i], r[i]].map((ns) => (ns === undefined ? "-" : (ns / compiled).toFixed(1)));
  console.log([taxa, ...row.map(show), ...ratios].join("  "));
});
await server.close();
