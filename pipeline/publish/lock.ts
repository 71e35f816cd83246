import {
  closeSync,
  lstatSync,
  openSync,
  readFileSync,
  readlinkSync,
  renameSync,
  rmSync,
  symlinkSync,
  writeSync,
} from "node:fs";
import { hostname } from "node:os";

/** A lock that is held until it is released; releasing twice does no harm. */
export interface Lock {
  readonly release: () => void;
}

/** Who holds a lock, in words. */
export interface HeldBy {
  readonly heldBy: string;
}

/** Errors of file systems that know no symbolic links. */
const NO_LINKS: ReadonlySet<string> = new Set(["EPERM", "ENOSYS", "ENOTSUP", "EOPNOTSUPP", "EINVAL"]);

/** When a process started, as the kernel counts it: tells a process from a later one with its number. "" where unknown. */
function startOf(pid: number): string {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, "utf8");
    // The name in parentheses may hold anything; the start time is the 20th field behind it.
    return text.slice(text.lastIndexOf(")") + 2).split(" ")[19] ?? "";
  } catch {
    return "";
  }
}

const separator = "|";
const mark = (pid: number) => [pid, startOf(pid), hostname()].join(separator);

/** True if the holder may still be at work: running here, or on another machine, where nobody can tell. */
function isAlive(holder: string): boolean {
  const [pid = "", started = "", host = ""] = holder.split(separator);
  if (!/^\d+$/.test(pid) || host !== hostname()) return true;
  try {
    process.kill(Number(pid), 0);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== "EPERM") return false;
  }
  const now = startOf(Number(pid));
  return started === "" || now === "" || started === now;
}

/** Creates the lock with its content in one step; false if it is there already. */
function create(path: string, content: string): boolean {
  try {
    symlinkSync(content, path);
    return true;
  } catch (error) {
    const { code = "" } = error as NodeJS.ErrnoException;
    if (code === "EEXIST") return false;
    if (!NO_LINKS.has(code)) throw error;
  }
  try {
    const descriptor = openSync(path, "wx");
    writeSync(descriptor, content);
    closeSync(descriptor);
    return true;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === "EEXIST") return false;
    throw error;
  }
}

/** Content of a lock; undefined where there is none. */
function contentOf(path: string): string | undefined {
  try {
    return lstatSync(path).isSymbolicLink() ? readlinkSync(path) : readFileSync(path, "utf8");
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === "ENOENT") return undefined;
    throw error;
  }
}

/** Removes the lock of a process that has ended; if another took it meanwhile, it is put back. */
function removeStale(path: string, stale: string): void {
  const aside = `${path}-${process.pid}`;
  try {
    renameSync(path, aside);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === "ENOENT") return;
    throw error;
  }
  const taken = contentOf(aside);
  if (taken !== undefined && taken !== stale) create(path, taken);
  rmSync(aside, { force: true });
}

/**
 * Takes a lock or says who holds it. The lock is a symbolic link whose target names process, start time and machine, so
 * that it appears with its content in one step; one left behind by a process that has ended on this machine is removed.
 * @throws NodeJS.ErrnoException where the folder cannot be written
 */
export function takeLock(path: string): Lock | HeldBy {
  const content = mark(process.pid);
  for (let attempt = 0; attempt < 5; attempt++) {
    if (create(path, content)) {
      return {
        release: () => {
          if (contentOf(path) === content) rmSync(path, { force: true });
        },
      };
    }
    const holder = contentOf(path);
    if (holder === undefined) continue;
    if (isAlive(holder)) return { heldBy: describe(holder, path) };
    removeStale(path, holder);
  }
  return { heldBy: `another process (lock ${path})` };
}

function describe(holder: string, path: string): string {
  const [pid, , host = ""] = holder.split(separator);
  const where = host === hostname() ? "" : ` on the machine ${host}`;
  return `process ${pid}${where} (lock ${path}; remove it by hand if that process is gone)`;
}
