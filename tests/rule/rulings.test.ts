import { beforeAll, describe, expect, test } from "vitest";
import { type Edition, needsRuling, statusOf } from "../../pipeline/records/edition.ts";
import { textOf } from "../../pipeline/records/measurements.ts";
import { editionOf, fingerprintIn, flagIds, rowNamed, rulingsFile, series, threeSources } from "./ruled.ts";

const FLAG = "off-curve@alpha:4";
let plain: Edition;
let system: string;
let print: Record<"flag" | "line" | "block" | "source" | "system", string>;

beforeAll(async () => {
  plain = await editionOf(threeSources());
  system = plain.systems[0]?.id ?? "";
  const of = (target: string) => fingerprintIn(threeSources(), target);
  print = {
    flag: await of(FLAG),
    line: await of("alpha:4"),
    block: await of(`alpha@${system}`),
    source: await of("alpha"),
    system: await of(`recommended@${system}`),
  };
}, 60_000);

/** The edition of the three sources with these rulings. */
const ruled = (...rulings: Readonly<Record<string, string>>[]) =>
  editionOf(threeSources({ "rulings.csv": rulingsFile(rulings) }));

const problems = ({ rulings }: Edition) => rulings.problems.map(({ code, place, found }) => [code, place.line, found]);
const codes = (edition: Edition) => edition.rulings.problems.map(({ code, place }) => `${code}:${place.line}`);
const setAside = (edition: Edition) => [...edition.rulings.setAside.keys()].map((row) => edition.table.line[row]);

describe("without rulings", () => {
  test("the planted fault is a blocking flag that needs a ruling", () => {
    const at = flagIds(plain).indexOf(FLAG);
    expect(at).toBeGreaterThanOrEqual(0);
    expect(needsRuling(plain, at)).toBe(true);
    expect(plain.rulings.applied).toEqual([]);
  });

  test("a measurement and a flag on it are judged by the same fingerprint, a block of one source by that of the source", () => {
    expect(print.flag).toBe(print.line);
    expect(print.block).toBe(print.source);
    expect(new Set(Object.values(print)).size).toBe(3);
    expect(print.line).toMatch(/^sha256:[0-9a-f]{16}$/);
  });
});

describe("each action", () => {
  test("keep settles the flag and changes no measurement, curve or grade criterion but the open flag", async () => {
    const edition = await ruled({ target: FLAG, action: "keep", fingerprint: print.flag });
    const at = flagIds(edition).indexOf(FLAG);
    expect(needsRuling(edition, at)).toBe(false);
    expect(edition.rulings.ofFlag.get(at)?.id).toBe("R0001");
    expect(edition.fits[0]?.curves[0]?.coefficients).toEqual(plain.fits[0]?.curves[0]?.coefficients);
    expect(edition.grades[0]?.reasons).toContain("no open flag");
    expect([plain.grades[0]?.grade, edition.grades[0]?.grade]).toEqual(["doubtful", "tentative"]);
  });

  test("set aside keeps the row in the table with its deviation, out of the curve, and names the decision", async () => {
    const edition = await ruled({
      target: "alpha:4",
      action: "set aside",
      fingerprint: print.line,
      reason: "cold filter",
    });
    const row = rowNamed(edition, "alpha:4");
    expect(statusOf(edition, row)).toBe("set aside");
    expect(edition.rowResults.weight[row]).toBe(0);
    expect(edition.rowResults.z[row]).toBe(plain.rowResults.z[row]);
    expect(textOf(edition.table, edition.table.assumptions[row] as number)).toContain(
      "set aside by data steward on 2026-04-01: cold filter (R0001)",
    );
    expect(edition.fits[0]?.robust.points.n).toBe(17);
  });

  test("correct reads the value again and leaves the reported one beside it", async () => {
    const evidence = "notebook 3 page 9";
    const edition = await ruled({
      ...{ target: FLAG, action: "correct", corrected_value: "15.13", evidence, fingerprint: print.flag },
    });
    const row = rowNamed(edition, "alpha:4");
    const { table } = edition;
    expect(table.reportedValue[row]).toBe(151.3);
    expect(100 * (table.massRatio[row] as number)).toBeCloseTo(15.13, 10);
    expect(Math.abs(edition.rowResults.deviationPercent[row] as number)).toBeLessThan(5);
    expect(textOf(table, table.assumptions[row] as number)).toContain(
      `read as 15.13 g/100 g solvent: corrected by data steward on 2026-04-01: looked at; evidence: ${evidence} (R0001)`,
    );
    expect(plain.table.massRatio[row]).toBeCloseTo(1.513, 10);
  });

  test("correct with a unit alone reads a whole block in it", async () => {
    const block = { target: `beta@${system}`, fingerprint: await fingerprintIn(threeSources(), "beta") };
    const unit = { action: "correct", corrected_unit: "g/100 g solution", evidence: "reply of the author" };
    const edition = await ruled({ ...block, ...unit });
    for (const id of ["beta:2", "beta:7"]) {
      const row = rowNamed(edition, id);
      const w = (edition.table.reportedValue[row] as number) / 100;
      expect(edition.table.massRatio[row]).toBeCloseTo(w / (1 - w), 12);
    }
    // The fault of alpha, 151.3, cannot be per 100 g of solution: one impossible line stops the whole ruling.
    const impossible = await ruled({ target: `alpha@${system}`, ...unit, fingerprint: print.block });
    expect(codes(impossible)).toEqual(["correction-impossible:2"]);
    expect(impossible.table.massRatio).toEqual(plain.table.massRatio);
  });

  test("a system fitted again without any change has the same curve: what was pooled over the edition stays", async () => {
    const same = { action: "correct", corrected_value: "151.3", evidence: "read again", fingerprint: print.line };
    const edition = await ruled({ target: "alpha:4", ...same });
    const [now, before] = [edition, plain].map(({ fits }) => fits[0]?.curves[0]);
    expect(edition.rulings.corrected.size).toBe(1);
    expect([now?.model, now?.n, now?.coefficients]).toEqual([before?.model, before?.n, before?.coefficients]);
    expect(now?.limits(300)).toEqual(before?.limits(300));
    expect(edition.rowResults.z).toEqual(plain.rowResults.z);
  });

  test("ask holds no edition back, and the question stays open in the grade", async () => {
    const edition = await ruled({ target: FLAG, action: "ask", fingerprint: print.flag });
    expect(needsRuling(edition, flagIds(edition).indexOf(FLAG))).toBe(false);
    expect(edition.grades[0]?.grade).toBe("doubtful");
    expect(edition.grades[0]?.reasons).toContain("1 open flag needs a person");
  });

  test("flags do not depend on any of them", async () => {
    const edition = await ruled(
      { target: "alpha:4", action: "set aside", fingerprint: print.line },
      { target: "beta", action: "set aside", fingerprint: await fingerprintIn(threeSources(), "beta") },
    );
    expect(edition.flags).toEqual(plain.flags);
  });
});

describe("a line that moved or changed", () => {
  const moved = (lines: string[]) => ({ "sources/alpha.csv": `Compound,Solvent,T,S\n${lines.join("\n")}\n` });
  const lines = series(1, { 2: "151.3" });
  const aside = () => rulingsFile([{ target: "alpha:4", action: "set aside", fingerprint: print.line }]);

  test("is followed where exactly one other line of the source is what was judged", async () => {
    const files = threeSources({ ...moved(["salicylic acid,ethanol,5,6.9", ...lines]), "rulings.csv": aside() });
    const edition = await editionOf(files);
    expect(setAside(edition)).toEqual([5]);
    expect(problems(edition)).toEqual([["ruling-moved", 2, "R0001 on alpha:4: the line it judged is now line 5"]]);
    expect(needsRuling(edition, flagIds(edition).indexOf("off-curve@alpha:5"))).toBe(false);
  });

  test("is not followed where two other lines are alike, or none is: the ruling is stale, named and not applied", async () => {
    const twice = threeSources({
      ...moved(["salicylic acid,ethanol,5,6.9", ...lines, lines[2] as string]),
      "rulings.csv": aside(),
    });
    const edited = threeSources({ ...moved(series(1, { 2: "150.3" })), "rulings.csv": aside() });
    for (const files of [twice, edited]) {
      const edition = await editionOf(files);
      expect(setAside(edition)).toEqual([]);
      expect(codes(edition)).toEqual(["stale-ruling:2"]);
    }
  });

  test("stays with its line where another one is exactly alike", async () => {
    const files = threeSources({ ...moved([...lines, lines[2] as string]), "rulings.csv": aside() });
    expect(setAside(await editionOf(files))).toEqual([4]);
  });

  test("makes no difference to a block whose lines are only in another order, and makes it stale where one is added", async () => {
    const block = rulingsFile([{ target: `alpha@${system}`, action: "set aside", fingerprint: print.block }]);
    const turned = await editionOf(threeSources({ ...moved([...lines].reverse()), "rulings.csv": block }));
    expect(setAside(turned)).toEqual([2, 3, 4, 5, 6, 7]);
    const longer = await editionOf(
      threeSources({ ...moved([...lines, "salicylic acid,ethanol,5,6.9"]), "rulings.csv": block }),
    );
    expect(codes(longer)).toEqual(["stale-ruling:2"]);
  });

  test("is what it was after a remark was added, and is not after its unit in the card changed", async () => {
    const alpha = threeSources()["sources/alpha.source.json"] as string;
    const remark = alpha.replace('"columns":{', '"constants":{"note":"seen by the steward"},"columns":{');
    const unit = alpha.replace("g/100 g solvent", "g/kg solvent");
    const of = async (card: string) =>
      codes(await editionOf(threeSources({ "sources/alpha.source.json": card, "rulings.csv": aside() })));
    expect(remark).not.toBe(alpha);
    expect(await of(remark)).toEqual([]);
    expect(await of(unit)).toEqual(["stale-ruling:2"]);
  });
});

describe("rulings that meet", () => {
  test("that say different things of one measurement are both named with their lines, and the later one holds", async () => {
    const edition = await ruled(
      { target: "alpha:4", action: "keep", fingerprint: print.line, by: "chemist 1" },
      { target: FLAG, action: "set aside", fingerprint: print.flag, by: "chemist 2" },
    );
    expect(setAside(edition)).toEqual([4]);
    expect(problems(edition)).toEqual([
      [
        "contradicting-rulings",
        3,
        "R0002 (line 3, chemist 2) says set aside of off-curve@alpha:4, R0001 (line 2, chemist 1) says keep of alpha:4",
      ],
    ]);
  });

  test("an answer after a question is no contradiction", async () => {
    const edition = await ruled(
      { target: FLAG, action: "ask", fingerprint: print.flag },
      { target: FLAG, action: "set aside", fingerprint: print.flag },
    );
    expect(codes(edition)).toEqual([]);
    expect(edition.rulings.ofFlag.get(flagIds(edition).indexOf(FLAG))?.id).toBe("R0002");
  });

  test.each([false, true])("a measurement is an exception to its source, whichever comes first", async (first) => {
    const rulings = [
      { target: "alpha", action: "set aside", fingerprint: print.source },
      { target: "alpha:2", action: "keep", fingerprint: await fingerprintIn(threeSources(), "alpha:2") },
    ];
    const edition = await ruled(...(first ? rulings : rulings.reverse()));
    expect(setAside(edition).sort()).toEqual([3, 4, 5, 6, 7]);
    expect(codes(edition)).toEqual([]);
  });

  test("with one name are both applied and told", async () => {
    const of = (target: string, fingerprint: string) => ({
      ruling_id: "R0001",
      target,
      action: "set aside",
      fingerprint,
    });
    const edition = await ruled(of("alpha:4", print.line), of("beta", await fingerprintIn(threeSources(), "beta")));
    expect(codes(edition)).toEqual(["same-ruling-id:3"]);
    expect(edition.rulings.setAside.size).toBe(7);
  });
});

describe("a line of rulings.csv that cannot be followed is told with its line and not applied", () => {
  test.each([
    ["a correction without evidence", { action: "correct", corrected_value: "15.13" }, "wrong-ruling"],
    ["a correction without value and unit", { action: "correct", evidence: "page 3" }, "wrong-ruling"],
    ["a value beside another action", { action: "keep", corrected_value: "15.13" }, "wrong-ruling"],
    ["no reason", { action: "keep", reason: "" }, "wrong-ruling"],
    ["nobody who decided", { action: "set aside", by: "" }, "wrong-ruling"],
    ["an unknown action", { action: "delete" }, "wrong-ruling"],
    ["a date that does not exist", { action: "keep", date: "2026-02-30" }, "wrong-ruling"],
    ["a target that does not exist", { action: "keep", target: "nowhere:4" }, "stale-ruling"],
    [
      "a fingerprint of something else",
      { action: "set aside", fingerprint: "sha256:0123456789abcdef" },
      "stale-ruling",
    ],
    [
      "a corrected value that no solution has",
      { action: "correct", corrected_value: "-1", evidence: "page 3" },
      "correction-impossible",
    ],
    [
      "a corrected unit that is unknown",
      { action: "correct", corrected_unit: "spoons", evidence: "page 3" },
      "correction-impossible",
    ],
  ])("%s", async (_, cells, code) => {
    const edition = await ruled({ target: "alpha:4", fingerprint: print.line, ...cells });
    expect(codes(edition)).toEqual([`${code}:2`]);
    expect(edition.rulings.applied).toEqual([]);
    expect(edition.notices.map(({ code }) => code)).toContain(code);
    expect(edition.fits[0]?.curves[0]?.coefficients).toEqual(plain.fits[0]?.curves[0]?.coefficients);
  });

  test("one value for several measurements", async () => {
    const edition = await ruled({
      ...{ target: "alpha", action: "correct", corrected_value: "3", evidence: "x", fingerprint: print.source },
    });
    expect(codes(edition)).toEqual(["wrong-ruling:2"]);
  });
});

test("a file that a spreadsheet saved again is read with a notice, local dates and decimal commas included", async () => {
  const text =
    "\ufeffruling_id;target;action;corrected_value;corrected_unit;reason;evidence;by;date;fingerprint\r\n" +
    `R0001;${FLAG};correct;15,13;;decimal mark;page 3;data steward;20.03.2026;${print.flag}\r\n`;
  const edition = await editionOf(threeSources({ "rulings.csv": text }));
  expect(edition.rulings.applied.map(({ date, correctedValue }) => [date, correctedValue])).toEqual([
    ["2026-03-20", 15.13],
  ]);
  const told = edition.notices.filter(({ place }) => place.file === "rulings.csv").map(({ found }) => found);
  expect(told).toEqual([
    "a byte-order mark, semicolons between the cells, line ends CR LF",
    "the date is written 20.03.2026",
  ]);
});

test("a system is recommended only where a ruling with a name says so and every criterion is met", async () => {
  const confirm = rulingsFile([
    { target: `recommended@${system}`, action: "keep", fingerprint: print.system, by: "head of quality" },
    { target: FLAG, action: "set aside", fingerprint: print.flag },
  ]);
  const [unchecked] = (await editionOf(threeSources({ "rulings.csv": confirm }))).grades;
  expect(unchecked?.grade).toBe("tentative");
  expect(unchecked?.reasons.at(-1)).toMatch(
    /^recommendation without effect while 1 criterion above is not met: confirmed by head of quality/,
  );

  const checked = (name: string) =>
    (threeSources()[`sources/${name}.source.json`] as string).replace(
      '"columns":{',
      '"constants":{"solid_check":"XRPD"},"columns":{',
    );
  const cards = Object.fromEntries(
    ["alpha", "beta", "gamma"].map((name) => [`sources/${name}.source.json`, checked(name)]),
  );
  const files = threeSources(cards);
  const aside = { target: FLAG, action: "set aside", fingerprint: await fingerprintIn(files, FLAG) };
  const target = `recommended@${system}`;
  const keep = { target, action: "keep", fingerprint: await fingerprintIn(files, target), by: "head of quality" };
  const [waiting] = (await editionOf({ ...files, "rulings.csv": rulingsFile([aside]) })).grades;
  expect(waiting?.grade).toBe("tentative");
  expect(waiting?.reasons.at(-1)).toContain("meets every criterion");
  const [grade] = (await editionOf({ ...files, "rulings.csv": rulingsFile([aside, keep]) })).grades;
  expect(grade?.grade).toBe("recommended");
  expect(grade?.reasons.at(-1)).toContain("recommended, confirmed by head of quality on 2026-04-01");
});
