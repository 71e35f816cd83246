/**
 * Half a unit of the last digit that a number is written with; trailing zeros are lost in a number, so a value such as
 * 250 counts as written to 10.
 *
 * @example halfLastDigit(12.5) // 0.05
 */
export function halfLastDigit(value: number): number {
  const size = Math.abs(value);
  if (size > 0 && size < PLAIN) {
    for (let places = 0; places < POWERS.length; places++) {
      // The nearest double of an integer over a power of ten is what reading that decimal gives.
      if (Math.round(size * POWERS[places]!) / POWERS[places]! !== size) continue;
      return places > 0 ? 0.5 * 10 ** -places : 0.5 * 10 ** trailingZeros(size);
    }
  }
  return halfLastDigitAsWritten(size);
}

/** Powers of ten tried as denominators, and the size below which numerators stay exact integers. */
const POWERS = [1, 10, 100, 1e3, 1e4, 1e5, 1e6];
const PLAIN = 1e9;

function trailingZeros(integer: number): number {
  let zeros = 0;
  for (let rest = integer; rest % 10 === 0; rest /= 10) zeros++;
  return zeros;
}

/** The same from the digits as JavaScript writes them: for the very large, the very small and those with many digits. */
function halfLastDigitAsWritten(value: number): number {
  const [digits = "", exponent = "0"] = String(value).split("e");
  const [whole = "", part = ""] = digits.split(".");
  const trailing = part === "" ? /0*$/.exec(whole)![0].length : 0;
  const lastPlace = part === "" ? trailing : -part.length;
  return 0.5 * 10 ** (lastPlace + Number(exponent));
}

/** The same as a part of the number. */
export function relativeRounding(value: number): number {
  return halfLastDigit(value) / Math.abs(value);
}
