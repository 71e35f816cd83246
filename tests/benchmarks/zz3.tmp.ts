import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { createIdentityRegister, identifySource } from "/tmp/bld/build/identify/source.js";
import { indexSubstances, massFromSmiles } from "/tmp/bld/build/identify/substance-tables.js";
import { normaliseEdition } from "/tmp/bld/build/normalise/edition.js";
import { readCollection } from "/tmp/bld/build/read/collection.js";
import { settingsInForce } from "/tmp/bld/build/records/settings.js";
import { makeCollection } from "./make-collection.ts";

const folder = mkdtempSync(join(tmpdir(), "saltern-bench-"));
try {
  makeCollection(join(folder, "collection"), { measurements: 200000, systems: 10000, seed: 20261201 });
  const collection = await readCollection(join(folder, "collection"));
  const { index } = indexSubstances(collection.program, collection.own);
  const sm = await massFromSmiles(collection.sources);
  for (let k = 0; k < 3; k++) {
    const register = createIdentityRegister();
    const identified = collection.sources.map((s) => identifySource(s, index, sm, register));
    const c = process.cpuUsage();
    const t = performance.now();
    const n = normaliseEdition(
      identified,
      collection.sources.map((_, i) => i),
      register.identities,
      settingsInForce(undefined),
    );
    const d = process.cpuUsage(c);
    console.log(
      "cpu",
      ((d.user + d.system) / 1e6).toFixed(2),
      "wall",
      ((performance.now() - t) / 1e3).toFixed(2),
      n.table.count,
      n.refused.length,
    );
  }
} finally {
  rmSync(folder, { recursive: true, force: true });
}
