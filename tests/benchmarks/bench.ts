// Times the whole path on a seeded, invented collection: npm run bench [-- MEASUREMENTS SYSTEMS]
// Prints rows per second, CPU seconds a stage and peak memory. One process, one thread.
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { curate } from "../../pipeline/curate.ts";
import { openOutputFolder } from "../../pipeline/publish/output-folder.ts";
import { countsOf } from "../../pipeline/publish/tables/summary.ts";
import { writeWorkingTables } from "../../pipeline/publish/working-tables.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import { makeCollection } from "./make-collection.ts";

const SEED = 20261201;
const [measurements = 200_000, systems = 10_000] = process.argv.slice(2).map(Number);

const folder = mkdtempSync(join(tmpdir(), "saltern-bench-"));
try {
  makeCollection(join(folder, "collection"), { measurements, systems, seed: SEED });
  const stages: { name: string; cpu: number; wall: number }[] = [];
  let started = { cpu: process.cpuUsage(), wall: performance.now() };
  const end = (name: string) => {
    const { user, system } = process.cpuUsage(started.cpu);
    stages.push({ name, cpu: (user + system) / 1e6, wall: (performance.now() - started.wall) / 1e3 });
    started = { cpu: process.cpuUsage(), wall: performance.now() };
  };

  const collection = await readCollection(join(folder, "collection"));
  end("read");
  let running = "";
  const { edition } = await curate(collection, "benchmark", (stage) => {
    if (running !== "") end(running);
    running = stage;
  });
  end(running);
  const output = openOutputFolder(join(folder, "tables"), join(folder, "collection"));
  writeWorkingTables(edition, output, false);
  output.commit();
  end("write");

  const counts = countsOf(edition);
  const total = stages.reduce((sum, { wall }) => sum + wall, 0);
  console.log(
    `${counts.readings} readings, ${counts.accepted} accepted, ${counts.systems} systems, ${counts.curves} curves, ${counts.flags} flags; seed ${SEED}`,
  );
  console.log("stage        CPU s   wall s");
  for (const { name, cpu, wall } of stages) {
    console.log(`${name.padEnd(10)}${cpu.toFixed(2).padStart(8)}${wall.toFixed(2).padStart(9)}`);
  }
  console.log(`${Math.round(counts.readings / total)} readings/s over all stages`);
  console.log(`peak memory ${Math.round(process.resourceUsage().maxRSS / 1024)} MB`);
} finally {
  rmSync(folder, { recursive: true, force: true });
}
