import { decimalScale, type ParsedUnit } from "./unit.ts";
import { namedUnit, openUnit, percentage, statedUnit } from "./unit-names.ts";
import { ratioUnit } from "./unit-ratio.ts";
import { plainSpelling } from "./unit-spelling.ts";

/** The spellings to offer where a unit was not understood. Every one of them parses. */
export const unitSpellings: readonly string[] = [
  "g/100 g solvent",
  "g/100 g solution",
  "% w/w",
  "% w/v",
  "g/100 mL solvent",
  "g/100 mL solution",
  "g/L solution",
  "g/L solvent",
  "g/g solvent",
  "g/kg solvent",
  "g/kg solution",
  "g/mL solution",
  "mg/mL solution",
  "mg/mL solvent",
  "mg/L solution",
  "ug/mL solution",
  "mg/kg solution",
  "mole fraction",
  "mol %",
  "mole ratio",
  "mass fraction",
  "mol/L solution",
  "mol/L solvent",
  "mmol/L solution",
  "mol/kg solvent",
  "log10(mol/L)",
  "ln x",
  "-ln x",
  "10^3 x",
  "1000 x",
  "100 w",
  "mL solvent/g",
  "pharmacopoeia term",
];

const unknown: ParsedUnit = { kind: "unknown" };

/** `ln x`, `-ln x`, `log10(mol/L)`: the inner unit must be an ordinary one. A bare `log` leaves its base open. */
function logarithm(plain: string): ParsedUnit | undefined {
  const match = /^(-)?(ln|log_?10|lg|log)(?:\((.+)\)|\[(.+)\]|(.+))$/.exec(plain);
  if (match === null) return undefined;
  const [, minus = "", name, round, square, bare] = match;
  const inner = parsePlain(round ?? square ?? bare ?? "");
  if (inner.kind !== "unit")
    return inner.kind === "open" && name !== "log" ? openLogarithm(inner, minus, name) : unknown;
  const { scale, basis, canonical } = inner.unit;
  if (scale.kind !== "linear" || canonical === "pharmacopoeia term") return unknown;
  const shown = canonical === "mol/L solution" ? "mol/L" : canonical;
  const kind = name === "ln" ? "ln" : "log10";
  const print = (base: string) => {
    const symbol = basis === "mole fraction" ? "x" : basis === "mass fraction" ? "w" : undefined;
    const direct = symbol !== undefined && scale.numerator === scale.denominator;
    return `${minus}${base}${direct ? ` ${symbol}` : `(${shown})`}`;
  };
  if (name === "log") return openUnit(print("log10"), print("ln"));
  const sign = minus === "" ? 1 : -1;
  const readings = inner.unit.readings.map((reading) => `${minus}${kind}(${reading})`);
  return { kind: "unit", unit: { ...inner.unit, canonical: print(kind), scale: { ...scale, kind, sign }, readings } };
}

function openLogarithm(inner: { readings: readonly string[] }, minus: string, name: string | undefined): ParsedUnit {
  const base = name === "ln" ? "ln" : "log10";
  return openUnit(...inner.readings.map((reading) => `${minus}${base}(${reading})`));
}

const symbolOf: Readonly<Record<string, "x" | "w">> = { x: "x", w: "w", molefraction: "x", massfraction: "w" };
const symbolPattern = "(x|w|molefraction|massfraction)";
const powerOfTen = "(?:10\\^\\(?(-?\\d{1,2})\\)?|10\\*\\*(-?\\d{1,2})|1e(-?\\d{1,2})|(10+))";
const leadingPower = new RegExp(`^${powerOfTen}[*·]?${symbolPattern}$`);
const trailingPower = new RegExp(`^${symbolPattern}[*·]?${powerOfTen}$`);
const dividedByPower = new RegExp(`^${symbolPattern}/${powerOfTen}$`);

function exponentIn(match: readonly (string | undefined)[], first: number): number {
  const written = match[first] ?? match[first + 1] ?? match[first + 2];
  return written === undefined ? (match[first + 3]?.length ?? 1) - 1 : Number(written);
}

function scaled(symbol: string, exponent: number): ParsedUnit {
  const letter = symbolOf[symbol];
  if (letter === undefined || Math.abs(exponent) > 12) return unknown;
  const basis = letter === "x" ? "mole fraction" : "mass fraction";
  const heading = letter === "w" && exponent === 2 ? "100 w" : `10^${exponent} ${letter}`;
  const canonical = exponent === 0 ? basis : heading;
  return statedUnit(canonical, basis, 0, { scale: decimalScale(-exponent) });
}

/**
 * A scaled heading, `10^3 x`, `1000 x`, `x·10^3`, `x/10^-3`, `100 w`: the written number is the power times the fraction.
 * A negative power after the symbol is as often a factor to be applied by the reader, so it stays open; so does
 * `103 x`, which has lost a superscript.
 */
function scaledHeading(plain: string): ParsedUnit | undefined {
  const leading = leadingPower.exec(plain);
  if (leading !== null) return scaled(leading[5] ?? "", exponentIn(leading, 1));
  const divided = dividedByPower.exec(plain);
  if (divided !== null) return scaled(divided[1] ?? "", -exponentIn(divided, 2));
  const trailing = trailingPower.exec(plain);
  if (trailing !== null) {
    const exponent = exponentIn(trailing, 2);
    const letter = symbolOf[trailing[1] ?? ""];
    return exponent < 0
      ? openUnit(`10^${-exponent} ${letter}`, `10^${exponent} ${letter}`)
      : scaled(`${letter}`, exponent);
  }
  const flattened = /^10([2-9])[*·]?([xw])$/.exec(plain);
  return flattened === null ? undefined : openUnit(`10^${flattened[1]} ${flattened[2]}`);
}

function parsePlain(plain: string): ParsedUnit {
  const lower = plain.toLowerCase();
  const unbraced = lower.replace(/\{([^{}]*)\}/g, "$1");
  return (
    namedUnit(plain) ??
    percentage(lower) ??
    scaledHeading(lower) ??
    ratioUnit(unbraced) ??
    logarithm(lower) ??
    (unbraced === lower ? unknown : (namedUnit(unbraced) ?? unknown))
  );
}

/**
 * Understands a unit of solubility. Case and spacing are free (but `M` is molar and `m` is open), typography too
 * (`µ`, superscripts, middle dots); UCUM codes are read where they say enough, with `{solvent}` or `{solution}` as the
 * reference. Nothing is guessed: a spelling that does not say per what is `open` and lists what it could stand for.
 * `mg/mL`, `g/L` and the like are units with `bareVolume`, to be settled at 20 g/L by `isOpenAt`.
 *
 * Costs some regular expressions: parse a column's unit once, not once a row.
 * @example parseUnit("g/100 g solvent") // { kind: "unit", unit: { basis: "mass ratio", ... } }
 * @example parseUnit("g/100 g") // { kind: "open", readings: ["g/100 g solution", "g/100 g solvent"] }
 */
export function parseUnit(text: string): ParsedUnit {
  const plain = plainSpelling(text)?.replaceAll(" ", "");
  if (plain === undefined) return unknown;
  const unwrapped = /^\(([^()]*)\)$|^\[([^[\]]*)\]$/.exec(plain);
  return parsePlain(unwrapped?.[1] ?? unwrapped?.[2] ?? plain);
}
