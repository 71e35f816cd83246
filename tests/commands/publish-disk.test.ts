import { cpSync, mkdirSync, readdirSync, readFileSync, statfsSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { FLAG, publish, rule, writeCollection } from "./ruled-collection.ts";
import { run, scratch } from "./saltern.ts";

const folder = scratch();
const collection = join(folder, "collection");
const disk = join(folder, "disk");
const onDisk = join(disk, "collection");
let mounted = false;

const mount = (...options: readonly string[]) =>
  run("mount", ["-t", "tmpfs", "-o", options.join(","), "tmpfs", disk]).catch(() => undefined);

/** Leaves no room on the small disk. */
function fill(): void {
  const { bavail, bsize } = statfsSync(disk);
  writeFileSync(join(disk, "filler"), Buffer.alloc(bavail * bsize));
}

beforeAll(async () => {
  writeCollection(collection);
  await rule(collection, FLAG, "set aside");
  mkdirSync(disk);
  mounted = (await mount("size=160k"))?.code === 0;
  if (!mounted)
    console.warn("skipped: no small disk can be mounted here, so that none can be filled or write-protected");
  else cpSync(collection, onDisk, { recursive: true });
});
afterAll(async () => {
  if (mounted) await run("umount", [disk]);
});

const everything = () => readdirSync(disk, { recursive: true }).map(String).sort();

describe("on a disk that is full", () => {
  test("publish ends with 3 and leaves no edition and no temporary folder", async (context) => {
    if (!mounted) context.skip();
    const before = everything();
    const found = await publish(collection, "e", join(disk, "editions"), { report: true });
    expect([found.code, found.stdout]).toEqual([3, ""]);
    expect(found.stderr).toContain("[no-space]");
    expect(everything()).toEqual([...before, "editions"].sort());
  });

  test("rule ends with 3 and rulings.csv keeps every byte", async (context) => {
    if (!mounted) context.skip();
    // The file is made to fill its last block of 4096 bytes, so that not one more fits.
    const file = join(onDisk, "rulings.csv");
    const padded = readFileSync(file, "utf8").replace("looked at", "looked at ".padEnd(4096 - 200, "-"));
    writeFileSync(file, padded.replace("---", "-".repeat(3 + 4096 - Buffer.byteLength(padded))));
    const before = readFileSync(file);
    expect(before.length).toBe(4096);
    fill();
    const found = await rule(onDisk, "beta:3", "keep");
    expect([found.code, found.stdout]).toEqual([3, ""]);
    expect(found.stderr).toContain("[no-space]");
    expect(readFileSync(file).equals(before)).toBe(true);
  });
});

test("on a disk that is write-protected publish and rule end with 3 and change nothing", async (context) => {
  if (!mounted) context.skip();
  expect((await mount("remount", "ro"))?.code).toBe(0);
  const before = everything();
  for (const found of [
    await publish(collection, "e2", join(disk, "editions")),
    await publish(onDisk, "e2", join(disk, "new-place")),
    await rule(onDisk, "beta:3", "keep"),
  ]) {
    expect([found.code, found.stdout]).toEqual([3, ""]);
    expect(found.stderr).toContain("[output-not-writable]");
  }
  expect(everything()).toEqual(before);
});
