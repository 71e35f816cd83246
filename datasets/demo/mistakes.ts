/** The mistakes planted in the demo: each takes honest readings and returns them as somebody got them wrong. */

import { type Mistake, type Reported, type SeriesPlan, significant, trueValue } from "./measure.ts";
import type { Row } from "./source-file.ts";
import { hydratePerAddedSolvent, inWords, SYSTEMS, type SystemName, trueMassRatio } from "./truth.ts";

type Spoil = (reading: Reported, index: number, all: readonly Reported[]) => Partial<Reported> & { mistake: Mistake };

/** Least relative change that a planted mistake must make, so that it can be found at all. */
const LEAST_CHANGE = 0.15;

function spoil(readings: readonly Reported[], indices: readonly number[], change: Spoil): Reported[] {
  return readings.map((reading, index) =>
    indices.includes(index) ? { ...reading, ...change(reading, index, readings) } : reading,
  );
}

function from(readings: readonly Reported[], first: number): number[] {
  return readings.map((_, index) => index).filter((index) => index >= first);
}

function changed(reading: Reported, value: number, cause: string, done: string) {
  if (Math.abs(Math.log(value / Number(reading.value))) < LEAST_CHANGE)
    throw new Error(
      `${cause} in ${inWords(reading.system)} at ${reading.celsius} °C changes ${reading.value} too little`,
    );
  return { value: significant(value, 4), mistake: { cause, done, truth: reading.value } };
}

/** The decimal mark slipped: ten times too high. */
export function powerOfTen(readings: readonly Reported[], index: number): Reported[] {
  return spoil(readings, [index], (r) =>
    changed(r, 10 * Number(r.value), "power of ten", "decimal mark one place right"),
  );
}

/** A five-fold dilution was counted twice. */
export function dilutionFactor(readings: readonly Reported[], index: number): Reported[] {
  return spoil(readings, [index], (r) =>
    changed(r, 5 * Number(r.value), "dilution factor", "dilution 1:5 counted twice"),
  );
}

/** Two neighbouring digits changed places. */
export function digitsTransposed(readings: readonly Reported[], index: number, at: number): Reported[] {
  return spoil(readings, [index], (r) => {
    const swapped = `${r.value.slice(0, at)}${r.value[at + 1]}${r.value[at]}${r.value.slice(at + 2)}`;
    return changed(r, Number(swapped), "digits transposed", "two neighbouring digits swapped in typing");
  });
}

/** The value measured for the same solute in another solvent was typed into this row. */
export function anotherSolvent(readings: readonly Reported[], index: number, plan: SeriesPlan, other: SystemName) {
  return spoil(readings, [index], (r) =>
    changed(
      r,
      trueValue(plan, r.celsius, other),
      "value of another solvent",
      `value in ${SYSTEMS[other].solvent.name} typed here`,
    ),
  );
}

/** From one row on, the values stand one row too low. */
export function rowsShifted(readings: readonly Reported[], first: number): Reported[] {
  return spoil(readings, from(readings, first), (r, index, all) => ({
    value: all[index - 1]?.value ?? r.value,
    mistake: { cause: "rows shifted", done: "values one row down from here on", truth: r.value },
  }));
}

/** All the solid had dissolved: from one row on, the value is the charge. */
export function everythingDissolved(readings: readonly Reported[], first: number): Reported[] {
  const charge = readings[first - 1]?.value ?? "";
  return spoil(readings, from(readings, first), (r) => ({
    value: significant(Number(charge) * 1.004, 4),
    mistake: { cause: "everything dissolved", done: "no solid left: the value is the charge", truth: r.value },
  }));
}

/** Solute came out in a cold filter at the hottest rows; the loss grows with temperature. */
export function lossOnFiltration(readings: readonly Reported[], losses: ReadonlyMap<number, number>): Reported[] {
  return spoil(readings, [...losses.keys()], (r, index) => {
    const lost = losses.get(index) ?? 0;
    return changed(
      r,
      (1 - lost) * Number(r.value),
      "loss on filtration",
      "solute left behind in a cold filter, more the hotter",
    );
  });
}

/** g/100 g solution written into a column that the card calls g/100 g solvent, for the whole block. */
export function perSolutionAsPerSolvent(readings: readonly Reported[]): Reported[] {
  return spoil(readings, from(readings, 0), (r) => {
    const value = Number(r.value);
    return changed(r, (100 * value) / (100 + value), "basis mix-up", "written per 100 g of solution");
  });
}

/** Temperatures of the whole block typed in °C into a column of °F. */
export function celsiusInFahrenheitColumn(readings: readonly Reported[]): Reported[] {
  return spoil(readings, from(readings, 0), (r) => ({
    temperature: String(r.celsius),
    mistake: { cause: "temperature unit", done: "°C typed into the °F column", truth: `${r.temperature} °F` },
  }));
}

/** One temperature typed in °C into a column of K. */
export function celsiusInKelvinColumn(readings: readonly Reported[], index: number): Reported[] {
  return spoil(readings, [index], (r) => ({
    temperature: String(r.celsius),
    mistake: { cause: "temperature unit", done: "°C typed into the K column", truth: `${r.temperature} K` },
  }));
}

/** The block says anhydrous, but the numbers are g hydrate per g solvent added. */
export function hydrateCalledAnhydrous(readings: readonly Reported[], plan: SeriesPlan): Reported[] {
  return spoil(readings, from(readings, 0), (r) => {
    const scale = Number(r.value) / trueValue(plan, r.celsius);
    const ratio = scale * trueMassRatio(r.system, r.celsius);
    const perHydrate = (Number(r.value) * hydratePerAddedSolvent(r.system, ratio)) / ratio;
    return changed(r, perHydrate, "hydrate basis", "g pentahydrate per solvent added, called anhydrous");
  });
}

/** The share of the other solvent in the column of per cents, for a whole series of rows. */
export function compositionReversed(rows: readonly Row[], column: number): Row[] {
  return rows.map(({ cells, about }) => {
    const truth = cells[column] ?? "";
    const mistake = {
      cause: "composition mix-up",
      done: "per cent of water in the column of ethanol",
      truth: `${truth} %`,
    };
    return { cells: cells.with(column, String(100 - Number(truth))), about, mistake };
  });
}
