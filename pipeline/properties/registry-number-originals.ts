/** Blocks of a registry number that a spreadsheet may have turned into a date; the last digit where the date keeps it. */
export interface LostRegistryNumber {
  readonly first: string;
  readonly second: string;
  /** The day, which was the check digit; undefined where the date shows no day. */
  readonly digit: number | undefined;
}

const MONTHS = "jan feb mar apr may jun jul aug sep oct nov dec".split(" ");

/**
 * Registry numbers FIRST-MONTH-DAY of which a spreadsheet makes this date: in any order of day, month and year, with
 * the month in digits or letters, a year of two digits, month and year alone (`Feb-57`), or the count of days
 * (`20852`). Undefined for a text that is no date; empty for a date that was no registry number, whose last block is a
 * single digit.
 */
export function originalsOfDate(text: string): LostRegistryNumber[] | undefined {
  const readings = [...fullDates(text), ...monthsOfYears(text), ...dayCounts(text)];
  const dates = readings.filter(
    ({ month, day }) => month >= 1 && month <= 12 && (day === undefined || (day >= 1 && day <= 31)),
  );
  if (dates.length === 0) return undefined;
  return dates.flatMap(({ year, month, day }) => {
    if (day !== undefined && day > 9) return [];
    const second = String(month).padStart(2, "0");
    return firstBlocks(year).map((first) => ({ first, second, digit: day }));
  });
}

interface DateReading {
  readonly year: string;
  readonly month: number;
  readonly day: number | undefined;
}

const monthOf = (text: string): number =>
  /^\d/.test(text) ? Number(text) : MONTHS.indexOf(text.slice(0, 3).toLowerCase()) + 1;

function fullDates(text: string): DateReading[] {
  const time = "(?:[ T]0{1,2}:00(?::00(?:\\.0+)?)?(?: ?AM)?Z?)?";
  const shape = new RegExp(`^(\\d{1,4}|[A-Za-z]{3,9})[-/., ]+(\\d{1,2}|[A-Za-z]{3,9})[-/., ]+(\\d{1,4})${time}$`);
  const date = shape.exec(text);
  if (date === null) return [];
  const [, first = "", middle = "", last = ""] = date;
  if (first.length === 4) return [{ year: first, month: monthOf(middle), day: Number(last) }];
  const inWords = /[A-Za-z]/.test(first + middle);
  const ends = /[A-Za-z]/.test(first)
    ? [{ year: last, month: monthOf(first), day: Number(middle) }]
    : [
        { year: last, month: monthOf(middle), day: Number(first) },
        ...(inWords ? [] : [{ year: last, month: Number(first), day: Number(middle) }]),
        ...(first.length === 2 && last.length === 2
          ? [{ year: first, month: monthOf(middle), day: Number(last) }]
          : []),
      ];
  return ends.filter(({ year }) => year.length === 4 || year.length === 2);
}

function monthsOfYears(text: string): DateReading[] {
  const shape = /^([A-Za-z]{3,9})[-/. ]+(\d{4}|\d{2})$|^(\d{4}|\d{2})[-/. ]+([A-Za-z]{3,9})$/.exec(text);
  if (shape === null) return [];
  return [{ year: shape[2] ?? shape[3] ?? "", month: monthOf(shape[1] ?? shape[4] ?? ""), day: undefined }];
}

/** A whole number as the count of days since 1900 by which spreadsheets keep dates; years from 1930 to 9999. */
function dayCounts(text: string): DateReading[] {
  const days = /^\d{5,7}(?:\.0+)?$/.test(text) ? Number(text) : Number.NaN;
  if (!(days >= 10_959 && days <= 2_958_465)) return [];
  return [dateOfDay(days)];
}

/** Days from 1 March of year 0 to 30 December 1899, day 0 of spreadsheets (60 and more agree with the calendar). */
const DAYS_BEFORE = 693_899;

/** Gregorian date of a day count: years of 400 with 146,097 days, begun in March so that the leap day ends them. */
function dateOfDay(count: number): DateReading {
  const days = count + DAYS_BEFORE;
  const era = Math.floor(days / 146_097);
  const ofEra = days - era * 146_097;
  const leap = Math.floor(ofEra / 1460) - Math.floor(ofEra / 36_524) + Math.floor(ofEra / 146_096);
  const yearOfEra = Math.floor((ofEra - leap) / 365);
  const dayOfYear = ofEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const marchMonth = Math.floor((5 * dayOfYear + 2) / 153);
  const month = marchMonth < 10 ? marchMonth + 3 : marchMonth - 9;
  const year = yearOfEra + era * 400 + (month <= 2 ? 1 : 0);
  return { year: String(year), month, day: dayOfYear - Math.floor((153 * marchMonth + 2) / 5) + 1 };
}

/** A year from 1930 to 2029 may stand for a first block of two digits that the spreadsheet completed, or be cut to two. */
function firstBlocks(year: string): string[] {
  if (year.length === 2) return [year, (Number(year) < 30 ? "20" : "19") + year].filter((block) => block[0] !== "0");
  return Number(year) >= 1930 && Number(year) <= 2029 ? [year, year.slice(2)].filter((b) => b[0] !== "0") : [year];
}

/** The digits of a text whose other characters can only have been hyphens, blanks, points or padding; else "". */
export function digitsOnly(text: string): string {
  const power = /^(\d)(?:[.,](\d+))?E\+?0*(\d{1,2})$/i.exec(text);
  const whole = power === null ? undefined : wholeNumber(power);
  if (whole !== undefined) return whole;
  const kept = /^[\d\s.,/_-]+$/.test(text) ? text.replace(/[.,]0+$/, "").replace(/\D/g, "") : "";
  const digits = kept.replace(/^0+/, "");
  return digits.length >= 5 && digits.length <= 10 ? digits : "";
}

/** `6.4175E+04` in digits; undefined where the power of ten has lost some. */
function wholeNumber([, first = "", rest = "", power = ""]: RegExpExecArray): string | undefined {
  return rest.length === Number(power) ? first + rest : undefined;
}
