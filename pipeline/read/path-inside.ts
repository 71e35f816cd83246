import { existsSync, realpathSync, statSync } from "node:fs";
import { isAbsolute, relative, resolve, sep, win32 } from "node:path";
import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";

/** True if `path` is `folder` or lies below it; both are absolute and normalised. */
function isWithin(folder: string, path: string): boolean {
  return path === folder || path.startsWith(folder.endsWith(sep) ? folder : folder + sep);
}

/**
 * Absolute path of an ordinary file that a card or the layout names, checked to lie inside the collection.
 *
 * @param root folder of the collection
 * @param base folder that `path` is relative to
 * @param place where the path is named, for the message
 * @throws InputError `outside-collection` for an absolute path, one that leaves by `..`, or a symbolic link that leads
 *   out; `missing-file`; `unreadable-file` for anything but an ordinary file (a folder, a pipe)
 */
export function fileInside(root: string, base: string, path: string, place: Place): string {
  const outside = (found: string) => new InputError(problem("outside-collection", place, { found }));
  if (isAbsolute(path) || win32.isAbsolute(path)) throw outside(`"${path}" is an absolute path`);
  const file = resolve(base, path);
  if (!isWithin(resolve(root), file)) throw outside(`"${path}" leads out of the collection`);
  if (!existsSync(file)) throw new InputError(problem("missing-file", place, { found: `there is no file "${path}"` }));
  const [realRoot, realFile] = [realpathSync(root), realpathSync(file)];
  if (!isWithin(realRoot, realFile)) throw outside(`"${path}" is a symbolic link out of the collection`);
  if (!statSync(realFile).isFile()) {
    throw new InputError(problem("unreadable-file", place, { found: `"${path}" is not an ordinary file` }));
  }
  return file;
}

/** Path of a file relative to a folder, with forward slashes on every system, for messages and tables. */
export function shownPath(folder: string, file: string): string {
  return relative(folder, file).split(sep).join("/");
}
