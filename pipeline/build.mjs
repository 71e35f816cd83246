// Builds the command: one file a command and what they share, for Node opens four hundred modules slowly.
// With --when-stale it does nothing while build/ is newer than every source, so that `npm run demo` and `npm test` never
// run yesterday's program. Types are checked by `npm run types`, not here.
import { chmodSync, existsSync, mkdtempSync, readdirSync, readFileSync, renameSync, rmSync, statSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const command = join(root, "build", "main.js");

/** Newest modification time (ms) of the files a build depends on. */
function newestSource() {
  const inputs = readdirSync(join(root, "pipeline"), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|js|mjs)$/.test(entry.name))
    .map((entry) => join(entry.parentPath, entry.name));
  inputs.push(join(root, "tsconfig.json"), join(root, "package.json"));
  return Math.max(...inputs.map((file) => statSync(file).mtimeMs));
}

const stale = !existsSync(command) || statSync(command).mtimeMs < newestSource();
if (stale || !process.argv.includes("--when-stale")) {
  // Compiled beside its place and swapped in, so that a command running meanwhile never finds half a program.
  const fresh = mkdtempSync(join(root, ".build-"));
  try {
    await build({
      entryPoints: [join(root, "pipeline", "main.ts")],
      outdir: fresh,
      // Two folders deep, as the modules lie in pipeline/: they find schemas and datasets by `../../`.
      chunkNames: "parts/[name]-[hash]",
      ...{ bundle: true, splitting: true, format: "esm", platform: "node", target: "node20" },
      ...{
        external: ["openchemlib", "commander", "cli-progress"],
        mainFields: ["module", "main"],
        charset: "utf8",
        legalComments: "none",
        logLevel: "warning",
      },
    });
    if (/"\.\.\/\.\.\//.test(readFileSync(join(fresh, "main.js"), "utf8"))) {
      throw new Error("main.js holds a module that looks for its data two folders up: import it lazily");
    }
    chmodSync(join(fresh, "main.js"), 0o755);
    chmodSync(fresh, 0o755);
    rmSync(join(root, "build"), { recursive: true, force: true });
    renameSync(fresh, join(root, "build"));
  } catch (error) {
    // The build that stands is left alone.
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  } finally {
    rmSync(fresh, { recursive: true, force: true });
  }
}
