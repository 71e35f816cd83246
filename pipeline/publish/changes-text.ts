import { safeText } from "../problems/safe-text.ts";
import type {
  ComparedMeasurement,
  CompareResult,
  CurveMove,
  GradeChange,
} from "../records/generated/compare-result.ts";

/** A heading with what stands below it, one thing a line. */
export interface ChangeSection {
  readonly heading: string;
  readonly lines: readonly string[];
}

/** What is said where no section has anything to say. */
export const NO_CHANGES = "The systems, grades, curves and measurements are the same.";

/** Longest piece of data in a line. */
const LONGEST = 300;
/** Measurements of one group named one by one; larger groups are told by their number and range. */
const NAMED = 4;

const text = (data: string) => safeText(data, LONGEST);
const celsius = (kelvin: number) => `${(kelvin - 273.15).toFixed(1)} °C`;
const between = (low: number, high: number) =>
  high - low < 0.05 ? `at ${celsius(low)}` : `from ${celsius(low)} to ${celsius(high)}`;
const figures = (value: number, digits = 3) => String(Number(value.toPrecision(digits)));

/** What changed between two editions in a chemist's words; only sections that have something to say. */
export function changeSections(result: CompareResult): ChangeSection[] {
  const named = ({ name, system }: { name: string; system: string }) => `${text(name)} [${system}]`;
  const sections: ChangeSection[] = [
    { heading: "Systems added", lines: result.systems_added.map(named) },
    { heading: "Systems gone", lines: result.systems_gone.map(named) },
    { heading: "Grades changed", lines: result.grades_changed.map(gradeLine) },
    { heading: "Systems that have a curve now", lines: result.curves_added.map(named) },
    { heading: "Systems that have no curve any more", lines: result.curves_gone.map(named) },
    { heading: "Curves that moved by more than their limits", lines: result.curves_moved.map(curveLine) },
    { heading: "Measurements added", lines: grouped(result.measurements_added) },
    { heading: "Measurements gone", lines: grouped(result.measurements_gone) },
    { heading: "Measurements set aside", lines: grouped(result.measurements_set_aside) },
    { heading: "Measurements taken back into the curves", lines: grouped(result.measurements_taken_back) },
    { heading: "Measurements corrected", lines: grouped(result.measurements_corrected) },
    {
      heading: "Measurements whose source reports something else now",
      lines: grouped(result.measurements_reported_otherwise),
    },
    { heading: "Measurements on another line of their source", lines: moved(result.measurements_moved) },
    { heading: "Settings changed", lines: result.settings_changed.map(text) },
    { heading: "Curves that could not be compared: no common temperature", lines: result.curves_not_compared },
  ];
  return sections.filter(({ lines }) => lines.length > 0);
}

const moved = (count: number) => (count === 0 ? [] : [`${count}, with nothing else changed`]);

function gradeLine({ name, old_grade, new_grade, reasons }: GradeChange): string {
  return `${text(name)}: ${old_grade}, now ${new_grade} (${safeText(reasons, 1000)})`;
}

function curveLine(move: CurveMove): string {
  const { change_percent: change, largest_at_K: at, quantity } = move;
  const values = `${quantity} ${figures(move.old_value)}, now ${figures(move.new_value)}`;
  return (
    `${text(move.name)}: ${change > 0 ? "up" : "down"} by ${figures(Math.abs(change), 2)} % at ${celsius(at)} ` +
    `(${values}; limits ${figures(move.limit_percent, 2)} %); beyond its limits ` +
    `${between(move.beyond_from_K, move.beyond_to_K)}, compared ${between(move.compared_from_K, move.compared_to_K)}`
  );
}

/** Measurements by source, system and ruling: each named where they are few, else their number and range. */
function grouped(measurements: readonly ComparedMeasurement[]): string[] {
  const groups = new Map<string, ComparedMeasurement[]>();
  for (const measurement of measurements) {
    const { measurement_id: id, system, ruling = "" } = measurement;
    const key = JSON.stringify([id.slice(0, id.indexOf(":")), system, ruling]);
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [measurement]);
    else group.push(measurement);
  }
  return [...groups].flatMap(([key, group]) => {
    const [source = ""] = JSON.parse(key) as string[];
    return group.length > NAMED ? [groupLine(source, group)] : group.map(measurementLine);
  });
}

function measurementLine({ measurement_id, name, temperature_K, reported, ruling }: ComparedMeasurement): string {
  const of = `${text(measurement_id)}: ${text(name)}, ${text(reported)} at ${celsius(temperature_K)}`;
  return ruling === undefined ? of : `${of}; ${safeText(ruling, 1000)}`;
}

function groupLine(source: string, group: readonly ComparedMeasurement[]): string {
  const temperatures = group.map(({ temperature_K: T }) => T);
  const [low, high] = [Math.min(...temperatures), Math.max(...temperatures)];
  const [first] = group;
  const of = `${source}: ${group.length} of ${text(first?.name ?? "")} ${between(low, high)}`;
  return first?.ruling === undefined ? of : `${of}; ${safeText(first.ruling, 1000)}`;
}

/** One line on both editions. */
export function changesTitle({ old, new: now }: CompareResult): string {
  return `Edition ${text(now.edition)} (${text(now.date)}) against edition ${text(old.edition)} (${text(old.date)})`;
}

/** Markup of Markdown and HTML made harmless. */
const plain = (line: string) =>
  line.replace(/([\\`*_[\]#|])/g, "\\$1").replace(/[&<>]/g, (c) => `&#${c.charCodeAt(0)};`);

/** CHANGES.md: what changed, as Markdown. */
export function* changesMarkdown(result: CompareResult): Generator<string> {
  yield `# ${plain(changesTitle(result))}\n`;
  const sections = changeSections(result);
  if (sections.length === 0) yield `\n${NO_CHANGES}\n`;
  for (const { heading, lines } of sections) {
    yield `\n## ${heading}\n\n`;
    for (const line of lines) yield `- ${plain(line)}\n`;
  }
}
