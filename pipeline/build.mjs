// Builds the command: clean, compile, make it executable. With --when-stale it does nothing while build/ is newer than
// every source, so that `npm run demo` and `npm test` never run yesterday's program.
import { execFileSync } from "node:child_process";
import { chmodSync, existsSync, mkdtempSync, readdirSync, renameSync, rmSync, statSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const command = join(root, "build", "main.js");

/** Newest modification time (ms) of the files a build depends on. */
function newestSource() {
  const inputs = readdirSync(join(root, "pipeline"), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|js|mjs)$/.test(entry.name))
    .map((entry) => join(entry.parentPath, entry.name));
  inputs.push(join(root, "tsconfig.json"), join(root, "tsconfig.build.json"), join(root, "package.json"));
  return Math.max(...inputs.map((file) => statSync(file).mtimeMs));
}

const stale = !existsSync(command) || statSync(command).mtimeMs < newestSource();
if (stale || !process.argv.includes("--when-stale")) {
  // Compiled beside its place and swapped in, so that a command running meanwhile never finds half a program.
  const fresh = mkdtempSync(join(root, ".build-"));
  try {
    const tsc = join(root, "node_modules", "typescript", "bin", "tsc");
    execFileSync(process.execPath, [tsc, "-p", "tsconfig.build.json", "--outDir", fresh], {
      cwd: root,
      stdio: "inherit",
    });
    chmodSync(join(fresh, "main.js"), 0o755);
    chmodSync(fresh, 0o755);
    rmSync(join(root, "build"), { recursive: true, force: true });
    renameSync(fresh, join(root, "build"));
  } catch {
    // The compiler has said what is wrong; the build that stands is left alone.
    process.exitCode = 1;
  } finally {
    rmSync(fresh, { recursive: true, force: true });
  }
}
