import { readdirSync, readFileSync } from "node:fs";
import { dirname, join, posix, relative, sep } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, test } from "vitest";

const ROOT = fileURLToPath(new URL("..", import.meta.url));

const FOUNDATIONS = ["records", "problems", "properties", "numerics", "bases", "curves"];
const STAGES = ["read", "identify", "normalise", "group", "fit", "screen", "rule", "grade", "publish"];

interface Module {
  /** Path below pipeline/, with forward slashes. */
  readonly path: string;
  readonly text: string;
  /** First folder below pipeline/, or the file name for a module at its top. */
  readonly layer: string;
  readonly imports: readonly Import[];
}

interface Import {
  /** Path below pipeline/ for a module of ours, else the name of the package. */
  readonly target: string;
  readonly ours: boolean;
  /** True for `import type` and where every name is marked as a type: gone once compiled. */
  readonly typeOnly: boolean;
}

const layerOf = (path: string) => path.split("/")[0] as string;

/** Import and re-export statements and dynamic imports of a module, comments left out. */
function importsOf(path: string, text: string): Import[] {
  const code = text.replace(/\/\*[\s\S]*?\*\//g, "").replace(/^\s*\/\/.*$/gm, "");
  const statements = [
    ...code.matchAll(/^\s*(?:import|export)\s+([^;"']*?)\s*from\s*["']([^"']+)["']/gm),
    ...code.matchAll(/^\s*import\s*()["']([^"']+)["']/gm),
    ...code.matchAll(/\bimport\s*()\(\s*["']([^"']+)["']\s*\)/g),
  ];
  return statements.map(([, names = "", from = ""]) => {
    const listed = /^\{([\s\S]*)\}$/.exec(names)?.[1]?.split(",") ?? [];
    const marked = listed.map((name) => name.trim()).filter((name) => name !== "");
    const typeOnly = /^type\b/.test(names) || (marked.length > 0 && marked.every((name) => name.startsWith("type ")));
    const ours = from.startsWith(".");
    return { target: ours ? posix.join(posix.dirname(path), from) : from, ours, typeOnly };
  });
}

const modules: readonly Module[] = readdirSync(join(ROOT, "pipeline"), { recursive: true, withFileTypes: true })
  .filter((entry) => entry.isFile() && /\.(ts|mjs)$/.test(entry.name) && !entry.name.endsWith(".d.ts"))
  .map((entry) => relative(join(ROOT, "pipeline"), join(entry.parentPath, entry.name)).replaceAll(sep, "/"))
  .sort()
  .map((path) => {
    const text = readFileSync(join(ROOT, "pipeline", path), "utf8");
    return { path, text, layer: layerOf(path), imports: importsOf(path, text) };
  });

/** Imports between our modules that a rule forbids, as `from -> to`. */
function offences(forbidden: (from: Module, to: string, found: Import) => boolean): string[] {
  return modules.flatMap((from) =>
    from.imports
      .filter((found) => found.ours && forbidden(from, layerOf(found.target), found))
      .map(({ target }) => `${from.path} -> ${target}`),
  );
}

const isFoundation = (layer: string) => FOUNDATIONS.includes(layer);
const isStage = (layer: string) => STAGES.includes(layer);

describe("imports run foundations <- stages <- curate <- commands <- main", () => {
  test("the modules are found, and every one has its place in the order", () => {
    expect(modules.length).toBeGreaterThan(100);
    expect(modules.flatMap(({ imports }) => imports.filter(({ ours }) => ours)).length).toBeGreaterThan(200);
    const places = new Set([...FOUNDATIONS, ...STAGES, "curate.ts", "commands", "main.ts", "build.mjs"]);
    expect(modules.filter(({ layer }) => !places.has(layer)).map(({ path }) => path)).toEqual([]);
  });

  test("a foundation imports foundations only", () => {
    expect(offences((from, to) => isFoundation(from.layer) && !isFoundation(to))).toEqual([]);
  });

  test("numerics imports nothing of ours: it knows no chemistry", () => {
    expect(offences((from, to) => from.layer === "numerics" && to !== "numerics")).toEqual([]);
  });

  test("properties imports records, problems and numerics only", () => {
    const allowed = ["properties", "records", "problems", "numerics"];
    expect(offences((from, to) => from.layer === "properties" && !allowed.includes(to))).toEqual([]);
  });

  test("curves imports numerics and records only, so that a model is an equation", () => {
    const allowed = ["curves", "numerics", "records"];
    expect(offences((from, to) => from.layer === "curves" && !allowed.includes(to))).toEqual([]);
  });

  test("a stage imports foundations and itself, never another stage", () => {
    expect(offences((from, to) => isStage(from.layer) && to !== from.layer && !isFoundation(to))).toEqual([]);
  });

  test("the map of the stages imports stages and foundations only", () => {
    expect(offences((from, to) => from.layer === "curate.ts" && !isStage(to) && !isFoundation(to))).toEqual([]);
  });

  test("nothing imports main.ts, and only main.ts imports the commands", () => {
    expect(offences((_, to) => to === "main.ts")).toEqual([]);
    expect(offences((from, to) => to === "commands" && from.layer !== "commands" && from.layer !== "main.ts")).toEqual(
      [],
    );
  });

  test("main.ts loads every command only when it is asked for, so that --help stays quick", () => {
    const main = modules.find(({ path }) => path === "main.ts") as Module;
    const early = main.text.matchAll(/^import\s+\{?([^;]*)from\s+"\.\/commands\/(\w+)\.ts"/gm);
    expect([...early].map(([, , name]) => name)).toEqual(["terminal"]);
  });

  test("no module imports itself round a circle", () => {
    const next = new Map(
      modules.map(({ path, imports }) => [
        path,
        imports.filter(({ ours, typeOnly }) => ours && !typeOnly).map(({ target }) => target),
      ]),
    );
    const done = new Set<string>();
    const circles: string[] = [];
    const visit = (path: string, way: readonly string[]) => {
      if (way.includes(path)) circles.push([...way.slice(way.indexOf(path)), path].join(" -> "));
      if (way.includes(path) || done.has(path)) return;
      for (const target of next.get(path) ?? []) visit(target, [...way, path]);
      done.add(path);
    };
    for (const path of next.keys()) visit(path, []);
    expect(circles).toEqual([]);
  });
});

describe("what the middle of the pipeline may not do", () => {
  const HELPERS = ["build.mjs", "problems/write-readme.ts"];
  const isInside = ({ path, layer }: Module) => layer !== "commands" && layer !== "main.ts" && !HELPERS.includes(path);
  const inside = modules.filter(isInside);

  test("only read and publish touch files", () => {
    const touching = inside.filter(
      ({ layer, imports }) =>
        layer !== "read" && layer !== "publish" && imports.some(({ target }) => /^node:fs\b/.test(target)),
    );
    expect(touching.map(({ path }) => path)).toEqual([]);
  });

  test("nothing outside main and the commands knows a terminal, an argument or the environment", () => {
    const knowing = inside.filter(({ text }) =>
      /\bconsole\.|\bprocess\.(stdout|stderr|stdin|argv|env|exit|exitCode)\b/.test(text),
    );
    expect(knowing.map(({ path }) => path)).toEqual([]);
  });

  test("nothing reads a clock, chance or a locale: the same input gives the same bytes", () => {
    const loose = inside.filter(({ text }) =>
      /\bnew Date\b|\bDate\.now\b|\bperformance\.now\b|Math\.random|localeCompare|toLocale\w*\(|\bIntl\./.test(text),
    );
    expect(loose.map(({ path }) => path)).toEqual([]);
  });

  test("no module has more than 300 lines", () => {
    const long = modules.filter(({ path, text }) => !path.includes("/generated/") && text.split("\n").length - 1 > 300);
    expect(long.map(({ path }) => path)).toEqual([]);
  });
});

describe("the top level of the project", () => {
  test("holds the folders of the layout, the documents of a project and configuration, nothing else", () => {
    const folders = ["build", "datasets", "node_modules", "pipeline", "reports", "schemas", "tests"];
    const files = ["CHANGELOG.md", "DEVELOPERS.md", "LICENSE", "README.md", "package.json", "package-lock.json"];
    const config = ["biome.json", "tsconfig.json", "vitest.config.ts"];
    const needed = ["datasets", "pipeline", "schemas", "tests", ...files];
    const entries = readdirSync(ROOT).filter((name) => !name.startsWith("."));
    expect(entries.filter((name) => ![...folders, ...files, ...config].includes(name))).toEqual([]);
    expect(needed.filter((name) => !entries.includes(name))).toEqual([]);
  });

  test("has a test folder for every folder of the pipeline that has rules of its own", () => {
    const layers = new Set(modules.map(({ path }) => dirname(path).split("/")[0] as string));
    const tested = readdirSync(join(ROOT, "tests"));
    expect([...layers].filter((layer) => layer !== "." && !tested.includes(layer))).toEqual([]);
  });
});
