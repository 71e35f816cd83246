import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, expect, test } from "vitest";
import { cardFor, readTable, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const out = join(folder, "out");
const EVIL = `<script>alert(1)</script>"><img src=x onerror='alert(2)'>\u202etxt\u061c\u001b[2J`;

beforeAll(async () => {
  const quoted = `"${EVIL.replaceAll('"', '""')}"`;
  const rows = [5, 15, 25, 35, 45].map((t) => `${quoted},water,${t},${1 + t / 10},${quoted}`);
  writeFiles(join(folder, "collection"), {
    "collection.json": JSON.stringify({ format: 1, name: "evil", title: EVIL, steward: EVIL }),
    "sources/bench.csv": `Compound,Solvent,T,S,Note\n${rows.join("\n")}\n${quoted},${quoted},25,1,\n`,
    "sources/bench.source.json": cardFor("bench", {
      ...{ title: EVIL, reported_by: EVIL, laboratory: EVIL, reference: EVIL, licence: EVIL },
      carry: ["Note"],
    }),
  });
  await saltern(["merge", join(folder, "collection"), "--out", out, "--quiet"]);
}, 60_000);

test("names, titles and remarks with markup are shown in the report, and never run there", () => {
  const pages = readdirSync(join(out, "report"), { recursive: true })
    .map(String)
    .filter((name) => name.endsWith(".html"));
  const texts = pages.map((name) => readFileSync(join(out, "report", name), "utf8"));
  expect(texts.some((text) => text.includes("&lt;script&gt;alert(1)"))).toBe(true);
  for (const [i, text] of texts.entries()) {
    expect([
      pages[i],
      text.match(/<script>alert|<img|\sonerror=['"]|[\u202e\u061c]|\p{Cc}(?<![\n\t])/giu) ?? [],
    ]).toEqual([pages[i], []]);
  }
});

test("no file is written under a name that comes from the data", () => {
  const names = readdirSync(out, { recursive: true }).map(String);
  expect(names.filter((name) => !/^[a-z0-9./-]+$/.test(name))).toEqual([]);
});

test("the tables keep the data unescaped, for a program may need them; the key of a name is its plain spelling", () => {
  // Quotes are primes, letters small, and what cannot be seen is gone.
  expect(readTable(out, "measurements.csv").rows[0]?.solute).toBe(
    "<script>alert(1)</script>''><img src=x onerror='alert(2)'>txt[2j",
  );
});
