/**
 * Half a unit of the last digit that a number is written with, as a part of the number; trailing zeros are lost in a
 * number, so a value such as 250 counts as written to 10.
 */
export function roundingOf(value: number): number {
  const [digits = "", exponent = "0"] = String(Math.abs(value)).split("e");
  const [whole = "", part = ""] = digits.split(".");
  const trailing = part === "" ? /0*$/.exec(whole)![0].length : 0;
  const lastPlace = part === "" ? trailing : -part.length;
  return (0.5 * 10 ** (lastPlace + Number(exponent))) / Math.abs(value);
}
