import { type Score, scoreWorld } from "./faults-score.ts";
import { makeWorld, USUAL } from "./faults-world.ts";
const score: Score = new Map(); const misses: string[] = [];
for (let seed = 401; seed < 409; seed++) { const m: string[] = []; scoreWorld(makeWorld({ ...USUAL, seed, solutes: 22, sources: [2, 4] }), score, m); misses.push(...m.map((x) => `${seed} ${x}`)); }
for (const [line, { hits, cases }] of [...score].sort((a, b) => (a[0] < b[0] ? -1 : 1))) console.log(`${line}: ${hits} of ${cases} (${((100 * hits) / Math.max(1, cases)).toFixed(2)} %)`);
for (const m of misses) if (/random|named/.test(m)) console.log(m.slice(0, 250));
