// Loaded before the command (node --import): kills its own process, as kill -9 does, just before the n-th call that
// changes a file, n being SALTERN_KILL_AT; and writes the number of such calls to SALTERN_CALLS where that is a file.
import fs from "node:fs";
import { syncBuiltinESMExports } from "node:module";

const at = Number(process.env.SALTERN_KILL_AT ?? 0);
let calls = 0;
for (const name of ["mkdirSync", "symlinkSync", "writeSync", "fsyncSync", "renameSync", "rmSync", "ftruncateSync"]) {
  const real = fs[name];
  fs[name] = (...given) => {
    calls++;
    if (calls === at) process.kill(process.pid, "SIGKILL");
    return real(...given);
  };
}
syncBuiltinESMExports();
process.on("exit", () => {
  if (process.env.SALTERN_CALLS) fs.writeFileSync(process.env.SALTERN_CALLS, String(calls));
});
