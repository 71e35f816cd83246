import { describe, expect, test } from "vitest";
import { type GradeEvidence, proposeGrade } from "../../pipeline/grade/grade.ts";
import type { Agreement, Flag } from "../../pipeline/records/fits.ts";
import { plainPoints } from "../fit/plain-system.ts";

interface Case {
  readonly celsius?: readonly number[];
  readonly laboratories?: number;
  readonly methods?: number;
  readonly solidChecked?: boolean;
  readonly agreement?: Agreement;
  readonly flags?: readonly Flag["severity"][];
}

const SPRING = [5, 15, 25, 35, 45];

/** The grade of a system with five temperatures over 40 K from two laboratories that agree, some of it changed. */
function graded(given: Case = {}) {
  const { celsius = SPRING, laboratories = 2, methods = 2, solidChecked = true, agreement = "agreed" } = given;
  const points = plainPoints(
    celsius.map((t) => t + 273.15),
    celsius.map(() => -3),
  );
  const flags = (given.flags ?? []).map(
    (severity): Flag => ({ scope: "measurement", code: "off-curve", severity, evidence: "", lookAt: "" }),
  );
  const fit = { robust: { points, agreement }, curves: [] } as unknown as GradeEvidence["fit"];
  return proposeGrade({ fit, flags, laboratories, methods, solidChecked });
}

describe("the proposed grade", () => {
  test("is tentative at best: recommended needs a ruling with a name", () => {
    expect(graded().grade).toBe("tentative");
    expect(graded({ laboratories: 7, methods: 4 }).grade).toBe("tentative");
  });

  test("is tentative for one laboratory that covers temperature", () => {
    expect(graded({ laboratories: 1, methods: 1 }).grade).toBe("tentative");
  });

  test.each([
    ["sources in conflict", { agreement: "conflict" }],
    ["an open flag that needs a person", { flags: ["blocking"] }],
    ["one laboratory with three temperatures only", { laboratories: 1, celsius: [5, 25, 45] }],
    ["one laboratory over less than 20 K", { laboratories: 1, celsius: [20, 25, 30, 35] }],
  ] satisfies [string, Case][])("is doubtful for %s", (_, given) => {
    expect(graded(given).grade).toBe("doubtful");
  });

  test("is not lowered by a notice", () => {
    expect(graded({ flags: ["notice", "notice"] }).grade).toBe("tentative");
  });

  test("is rejected where no point is left to fit", () => {
    const { grade, reasons } = graded({ celsius: [], laboratories: 0, methods: 0 });
    expect([grade, reasons[0]]).toEqual(["rejected", "no point to fit"]);
  });
});

describe("the reasons of a grade", () => {
  test("tell every criterion with its number, and what is wanted", () => {
    const { reasons } = graded({ laboratories: 1, methods: 1, flags: ["blocking", "blocking"] });
    expect(reasons).toEqual([
      "1 independent laboratory (at least 2 wanted)",
      "5 temperatures over 40 K (at least 4 over 20 K wanted)",
      "1 method",
      "solid phase checked at equilibrium",
      "sources agree or only one measured",
      "2 open flags need a person",
    ]);
  });

  test("say that an unchecked solid phase caps the grade", () => {
    expect(graded({ solidChecked: false }).reasons.join()).toContain("not checked");
  });
});
