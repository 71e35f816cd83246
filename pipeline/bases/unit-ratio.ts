import { type Basis, decimalScale, type ParsedUnit, type Unit } from "./unit.ts";
import { molalityAssumption, openUnit, statedUnit } from "./unit-names.ts";
import { type DecimalUnit, decimalUnit, decimalUnitPattern } from "./unit-spelling.ts";

type Reference = "solvent" | "solution" | "unclear";

const solutionWords = "(?:sat(?:urated|urd|d|\\.|d\\.)?)?(?:solution|soln\\.?|sln\\.?)";
const referenceWords = `(?:pure)?solvent|solv\\.?|water|h2o|${solutionWords}|sol\\.?|solute`;
const upper = `(?<upper>${decimalUnitPattern})(?:of)?(?<upperOf>${referenceWords})?`;
const lower = `(?<count>10*)?(?<join>[.·*])?(?<lower>${decimalUnitPattern})(?:of)?(?<lowerOf>${referenceWords})?`;

/** g/100 g solvent, mg per mL of solution, g/(100.g), mL solvent/g. */
const quotient = new RegExp(
  `^${upper}(?:/|per)(?<open>\\()?${lower}(?<close>\\))?(?:of)?(?<lastOf>${referenceWords})?$`,
);
/** g kg-1, mg·mL^-1, g (100 g)^-1 solvent. */
const power = new RegExp(
  `^${upper}[.·*]?(?<open>\\()?${lower}(?<close>\\))?(?:\\^?-1|\\^\\(-1\\))(?:of)?(?<lastOf>${referenceWords})?$`,
);
/** mol dm-3, kg·m^-3. */
const cubicPower = new RegExp(
  `^${upper}[.·*]?(?<count>10*)?(?<lower>dm|cm|m)(?:\\^?-3|\\^\\(-3\\))(?:of)?(?<lastOf>${referenceWords})?$`,
);

interface Ratio {
  readonly upper: DecimalUnit;
  readonly upperOf: string | undefined;
  readonly lower: DecimalUnit;
  readonly lowerOf: string | undefined;
  /** Power of ten of the number before the lower unit: 2 in g/100 g. */
  readonly count: number;
}

function readRatio(plain: string): Ratio | undefined {
  const cubic = cubicPower.exec(plain)?.groups;
  const groups = cubic ?? quotient.exec(plain)?.groups ?? power.exec(plain)?.groups;
  if (groups?.upper === undefined || groups.lower === undefined) return undefined;
  if ((groups.open === undefined) !== (groups.close === undefined)) return undefined;
  // UCUM reads terms from left to right: g/100.g is (g/100).g, a mass squared.
  if (groups.join !== undefined && groups.open === undefined && groups.count !== undefined) return undefined;
  if (groups.lowerOf !== undefined && groups.lastOf !== undefined) return undefined;
  const upperUnit = decimalUnit(groups.upper);
  const lowerUnit = decimalUnit(cubic === undefined ? groups.lower : `${groups.lower}3`);
  if (upperUnit === undefined || lowerUnit === undefined) return undefined;
  const count = (groups.count?.length ?? 1) - 1;
  return {
    upper: upperUnit,
    upperOf: groups.upperOf,
    lower: lowerUnit,
    lowerOf: groups.lowerOf ?? groups.lastOf,
    count,
  };
}

function referenceOf(word: string): Reference {
  if (/^(?:pure)?solvent$|^solv\.?$|^water$|^h2o$/.test(word)) return "solvent";
  return /^sol\.?$/.test(word) ? "unclear" : "solution";
}

const bases: Readonly<Record<string, Basis>> = {
  "mass/mass solvent": "mass ratio",
  "mass/mass solution": "mass fraction",
  "mass/volume solvent": "mass per volume of solvent",
  "mass/volume solution": "mass per volume of solution",
  "amount/mass solvent": "amount per mass of solvent",
  "amount/volume solvent": "amount per volume of solvent",
  "amount/volume solution": "amount per volume of solution",
  "amount/amount solvent": "mole ratio",
  "amount/amount solution": "mole fraction",
};

function printed(ratio: Ratio): string {
  const count = ratio.count === 0 ? "" : `1${"0".repeat(ratio.count)} `;
  return `${ratio.upper.symbol}/${count}${ratio.lower.symbol}`;
}

function exponentOf(ratio: Ratio): number {
  return ratio.upper.exponent - ratio.lower.exponent - ratio.count;
}

function printedWith(ratio: Ratio, reference: "solvent" | "solution"): string {
  const same = exponentOf(ratio) === 0 && ratio.upper.kind === ratio.lower.kind && ratio.count === 0;
  if (same && ratio.upper.kind === "amount") return reference === "solvent" ? "mole ratio" : "mole fraction";
  return `${printed(ratio)} ${reference}`;
}

function stated(ratio: Ratio, reference: "solvent" | "solution", extra: Partial<Unit> = {}): ParsedUnit {
  const basis = bases[`${ratio.upper.kind}/${ratio.lower.kind} ${reference}`];
  if (basis === undefined) return { kind: "unknown" };
  return statedUnit(printedWith(ratio, reference), basis, exponentOf(ratio), extra);
}

/** Solute per something without saying of what: some are settled by convention, the others open. */
function unstated(ratio: Ratio): ParsedUnit {
  const kinds = `${ratio.upper.kind}/${ratio.lower.kind}`;
  if (kinds === "amount/volume") return stated(ratio, "solution");
  if (kinds === "amount/mass") return stated(ratio, "solvent", { assumption: molalityAssumption });
  if (bases[`${kinds} solvent`] === undefined) return { kind: "unknown" };
  const readings = [printedWith(ratio, "solution"), printedWith(ratio, "solvent")];
  const perDecilitre = ratio.lower.exponent + ratio.count === -4;
  if (kinds !== "mass/volume" || perDecilitre) return openUnit(...readings);
  const canonical = printed(ratio);
  const assumption = `${canonical} without a reference taken per volume of solution`;
  return statedUnit(canonical, bases[`${kinds} solution`] ?? "mass per volume of solution", exponentOf(ratio), {
    bareVolume: true,
    readings,
    assumption,
  });
}

/** Solvent or solution per solute (`mL solvent/g`): the reciprocal of the ordinary unit. */
function inverted(ratio: Ratio): ParsedUnit {
  const { upper: top, lower: bottom } = ratio;
  const word = ratio.upperOf;
  if (word === undefined || referenceOf(word) === "unclear") {
    const perSolute = `/${printed(ratio).split("/")[1]}`;
    return openUnit(`${top.symbol} solvent${perSolute}`, `${top.symbol} solution${perSolute}`);
  }
  const reference = referenceOf(word) === "solvent" ? "solvent" : "solution";
  const basis = bases[`${bottom.kind}/${top.kind} ${reference}`];
  if (basis === undefined) return { kind: "unknown" };
  const canonical = printed(ratio).replace("/", ` ${reference}/`);
  return statedUnit(canonical, basis, 0, { scale: decimalScale(-exponentOf(ratio), "reciprocal"), ...named(word) });
}

function named(word: string): { namedSolvent?: "water" } {
  return word === "water" || word === "h2o" ? { namedSolvent: "water" } : {};
}

/**
 * A unit written as one quantity per another: `g/100 g solvent`, `mg per mL of solution`, `mol·kg^-1`, `mL solvent/g`,
 * and UCUM codes such as `g/(100.g)`. `plain` in lower case, without spaces.
 */
export function ratioUnit(plain: string): ParsedUnit | undefined {
  const ratio = readRatio(plain);
  if (ratio === undefined) return undefined;
  const upperIsSolute = ratio.upperOf === undefined || ratio.upperOf === "solute";
  const volumeOverMass = ratio.upper.kind === "volume" && ratio.lower.kind !== "volume";
  if (!upperIsSolute || (volumeOverMass && ratio.upperOf === undefined)) {
    const lowerIsSolute = ratio.lowerOf === undefined || ratio.lowerOf === "solute";
    return lowerIsSolute ? inverted(ratio) : { kind: "unknown" };
  }
  if (ratio.lowerOf === "solute" || ratio.upper.kind === "volume") return { kind: "unknown" };
  if (ratio.lowerOf === undefined) return unstated(ratio);
  const reference = referenceOf(ratio.lowerOf);
  if (reference === "unclear") return openUnit(printedWith(ratio, "solution"), printedWith(ratio, "solvent"));
  return stated(ratio, reference, named(ratio.lowerOf));
}
