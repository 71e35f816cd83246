import type { Cause } from "./cause.ts";

const LOGARITHM = /^(log10|ln|-ln|-log10)\b/;

/**
 * A logarithm to the wrong base: ln for log10 or the reverse.
 *
 * Computes the number times ln 10, and divided by it. Only where the unit is a logarithm. Belongs to a column.
 */
export const logarithmBase: Cause = {
  name: "logarithm base",
  pointPrior: 0.03,
  blockPrior: 0.15,
  lookAt: "Look at the base of the logarithm: ln or log10.",
  explanations: ({ unit, reportedValue }) => {
    if (!LOGARITHM.test(unit)) return [];
    const given = unit.includes("ln") ? "ln" : "log10";
    const factor = given === "ln" ? Math.LN10 : 1 / Math.LN10;
    return [
      {
        detail: `${given} should read ${given === "ln" ? "log10" : "ln"}`,
        weight: 1,
        change: (row) => ({ kind: "value", value: reportedValue(row) * factor }),
      },
    ];
  },
};
