import { describe, expect, test } from "vitest";
import { type GradeEvidence, proposeGrade } from "../../pipeline/grade/grade.ts";

interface Case extends Partial<Omit<GradeEvidence, "temperatureK">> {
  readonly celsius?: readonly number[];
}

const SPRING = [5, 15, 25, 35, 45];
const CONFIRMED = "confirmed by head of quality on 2026-04-01: agreed (R0007)";

/** A system without a point. */
const NOTHING = { celsius: [], points: 0, kept: 0, judged: 0, withinUncertainty: 0, laboratories: 0, methods: 0 };

/** The grade of a system that meets every criterion, some of it changed: ten points of two laboratories that agree. */
function graded({ celsius = SPRING, ...given }: Case = {}) {
  return proposeGrade({
    ...{ points: 10, kept: 10, withinUncertainty: 10, judged: 10, agreement: "agreed" },
    ...{ laboratories: 2, methods: 2, solidChecked: 10, openFlags: 0, confirmedBy: undefined },
    ...{ ranges: 0, notFitted: 0, setAside: 0, ...given },
    temperatureK: Float64Array.from(celsius, (t) => t + 273.15),
  });
}

describe("the proposed grade", () => {
  test("is tentative at best: recommended needs a ruling with a name", () => {
    expect(graded().grade).toBe("tentative");
    expect(graded({ laboratories: 7, methods: 4 }).grade).toBe("tentative");
    expect(graded().reasons.at(-1)).toContain("meets every criterion");
  });

  test("is recommended where every criterion is met and a person confirms it by name", () => {
    const { grade, reasons } = graded({ confirmedBy: CONFIRMED });
    expect([grade, reasons.at(-1)]).toEqual(["recommended", `recommended, ${CONFIRMED}`]);
  });

  test.each([
    ["one laboratory", { laboratories: 1 }],
    ["89 % of the points within two standard deviations", { points: 100, judged: 100, withinUncertainty: 89 }],
    ["three temperatures", { celsius: [5, 25, 45] }],
    ["temperatures over 19 K", { celsius: [5, 10, 20, 24] }],
    ["the solid checked for fewer than half of the points", { solidChecked: 4 }],
  ] satisfies [string, Case][])("stays tentative with %s, whoever confirms it", (_, given) => {
    const { grade, reasons } = graded({ ...given, confirmedBy: CONFIRMED });
    expect(grade).toBe("tentative");
    expect(reasons.at(-1)).toMatch(
      /^recommendation without effect while (1 criterion|2 criteria) above (is|are) not met/,
    );
  });

  test.each([
    ["90 % of the points within two standard deviations", { withinUncertainty: 9 }],
    ["temperatures over exactly 20 K", { celsius: [5, 10, 20, 25] }],
    ["the solid checked for half of the points", { solidChecked: 5 }],
    ["one method", { methods: 1 }],
  ] satisfies [string, Case][])("can be recommended with %s", (_, given) => {
    expect(graded({ ...given, confirmedBy: CONFIRMED }).grade).toBe("recommended");
  });

  test("is tentative for one laboratory that covers temperature, or that measured one temperature only", () => {
    expect(graded({ laboratories: 1, methods: 1 }).grade).toBe("tentative");
    expect(graded({ laboratories: 1, methods: 1, celsius: [25] }).grade).toBe("tentative");
  });

  test.each([
    ["sources in conflict", { agreement: "conflict" }],
    ["an open flag that needs a person", { openFlags: 1 }],
    ["one laboratory with three temperatures only", { laboratories: 1, celsius: [5, 25, 45] }],
    ["one laboratory over less than 20 K", { laboratories: 1, celsius: [20, 25, 30, 35] }],
  ] satisfies [string, Case][])("is doubtful for %s, whoever recommends it", (_, given) => {
    expect(graded(given).grade).toBe("doubtful");
    expect(graded({ ...given, confirmedBy: CONFIRMED }).grade).toBe("doubtful");
  });

  test("is rejected where no point is left to fit, or none is kept", () => {
    expect(graded({ ...NOTHING, setAside: 3 })).toMatchObject({
      grade: "rejected",
      reasons: expect.arrayContaining(["no point to fit: 3 rows set aside by a ruling"]),
    });
    expect(graded({ kept: 0, ranges: 4 })).toMatchObject({
      grade: "rejected",
      reasons: expect.arrayContaining(["no point is kept"]),
    });
  });

  test("is doubtful where there is no number, and says what there is instead", () => {
    expect(graded({ ...NOTHING, ranges: 2, openFlags: 1 })).toEqual({
      grade: "doubtful",
      reasons: ["no number to evaluate: only 2 ranges", "1 open flag needs a person"],
    });
    expect(graded({ ...NOTHING, ranges: 1, notFitted: 3, confirmedBy: CONFIRMED })).toEqual({
      grade: "doubtful",
      reasons: ["no number to evaluate: only 1 range and 3 values shown and never fitted", "no open flag"],
    });
    expect(graded({ ...NOTHING, notFitted: 1 }).reasons[0]).toBe(
      "no number to evaluate: 1 value shown and never fitted",
    );
  });
});

test("the reasons tell every criterion with its number, and what is wanted", () => {
  const { reasons } = graded({
    ...{ laboratories: 1, methods: 1, openFlags: 2, withinUncertainty: 8, judged: 9, kept: 8, solidChecked: 3 },
  });
  expect(reasons).toEqual([
    "1 independent laboratory (at least 2 wanted)",
    "8 of 9 points within 2 standard deviations of what the others say (at least 90 % wanted), all of one laboratory",
    "5 temperatures over 40 K (at least 4 over 20 K wanted)",
    "1 method (more than one rules out an error they share)",
    "solid phase checked at equilibrium for 3 of 8 kept points (at least half wanted): tentative at best",
    "2 open flags need a person",
  ]);
});
