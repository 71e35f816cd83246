/**
 * Half a unit of the last digit that a number is written with; trailing zeros are lost in a number, so a value such as
 * 250 counts as written to 10.
 *
 * @example halfLastDigit(12.5) // 0.05
 */
export function halfLastDigit(value: number): number {
  const [digits = "", exponent = "0"] = String(Math.abs(value)).split("e");
  const [whole = "", part = ""] = digits.split(".");
  const trailing = part === "" ? /0*$/.exec(whole)![0].length : 0;
  const lastPlace = part === "" ? trailing : -part.length;
  return 0.5 * 10 ** (lastPlace + Number(exponent));
}

/** The same as a part of the number. */
export function relativeRounding(value: number): number {
  return halfLastDigit(value) / Math.abs(value);
}
