/** The harbour site: gravimetry, chromatography and clear points of organic solutes, each with its habits and slips. */
import { measure, normalStream, type Reported, type SeriesPlan, significant } from "./measure.ts";
import * as mistakes from "./mistakes.ts";
import { COMMA_TABLE, laboratoryCard, measuredRows, type Row, type SourceFile, typedRow } from "./source-file.ts";
import { inUnit, inWords, SYSTEMS, type SystemName, saturationTemperature, trueMassRatio } from "./truth.ts";

/** Bench chemist 2 weighs dry residues, per 100 g solvent. */
export function gravimetry(): SourceFile {
  const source = "harbour-2026-gravimetry";
  const plan = (system: SystemName, temperatures: readonly number[]): SeriesPlan => ({
    source,
    system,
    temperatures,
    unit: "g/100 g solvent",
    noise: 0.012,
  });
  const cells = (r: Reported) => [
    ...names(r.system),
    ...[r.temperature, r.value, significant(0.012 * Number(r.value), 2), "3"],
    ...[SYSTEMS[r.system].form === "" ? "none" : "XRPD", ""],
  ];
  const rows = (readings: readonly Reported[]) => measuredRows(readings, cells);
  const paracetamol = rows(measure(plan("paracetamolEthanol", [5, 10, 20, 25, 30, 40, 50, 60])));
  const fromBoth = [5, 15, 20, 25, 30, 40, 50, 60];
  const formA = plan("formAPropanol", fromBoth);
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(source, "Gravimetric series, spring campaign", "bench chemist 2", "bench 4", "2026-03-14"),
      method: "gravimetric",
      file: `${source}.csv`,
      shape: "long",
      table: { delimiter: "auto", decimal: "auto", header_line: 1, missing: ["", "n.d.", "-"] },
      columns: {
        solute: { column: "Compound" },
        solid_form: { column: "Form" },
        solvent: { column: "Solvent" },
        temperature: { column: "T", unit: "°C" },
        solubility: { column: "S", unit: "g/100 g solvent" },
        uncertainty: { column: "u(S)", kind: "standard", relative: false },
        n: { column: "n" },
        solid_check: { column: "Solid checked by" },
      },
      constants: { excess_solid: "yes", temperature_probe: "bath", equilibration_h: 24, approach: "from below" },
      carry: ["Remarks"],
    },
    headings: ["Compound", "Form", "Solvent", "T", "S", "u(S)", "n", "Solid checked by", "Remarks"],
    rows: [
      ...paracetamol,
      ...repeated(paracetamol[3], "typed twice"),
      ...rows(measure(plan("benzoicToluene", fromBoth))),
      ...rows(mistakes.powerOfTen(measure(plan("salicylicEthylAcetate", [5, 15, 25, 35, 45, 55, 65])), 2)),
      ...rows(measure(plan("succinicPropanol", [10, 20, 25, 30, 40, 50, 60]))),
      ...rows(
        mistakes.lossOnFiltration(
          measure(plan("adipicAcetone", [5, 10, 20, 25, 30, 40, 50])),
          new Map([
            [5, 0.22],
            [6, 0.36],
          ]),
        ),
      ),
      ...rows(
        mistakes.perSolutionAsPerSolvent(measure(plan("ibuprofenEthylAcetate", [5, 10, 15, 20, 25, 30, 35, 40]))),
      ),
      ...rows(mistakes.anotherSolvent(measure(formA), 5, formA, "formAEthylAcetate")),
      typedRow([
        "paracetamol",
        "form I",
        "heptane",
        "25",
        "n.d.",
        "",
        "3",
        "none",
        "below the balance, not weighed out",
      ]),
      ...rows(measure(plan("harbour31Water", [5, 15, 25, 32, 38, 44, 50, 60, 70]))),
    ],
  };
}

/** Analyst 1 injects diluted liquor, mg per mL of solution. */
export function chromatography(): SourceFile {
  const source = "harbour-2026-hplc";
  const plan = (system: SystemName, temperatures: readonly number[], replicates = 1): SeriesPlan => ({
    source,
    system,
    temperatures,
    replicates,
    unit: "mg/mL solution",
    noise: 0.02,
  });
  const cells = (r: Reported) => [...names(r.system), r.temperature, String(r.replicate), r.value, "yes", ""];
  const rows = (readings: readonly Reported[]) => measuredRows(readings, cells);
  const formB = rows(measure(plan("formBPropanol", [10, 20, 25, 30, 40, 50])));
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(source, "Assay of saturated liquors", "analyst 1", "analytical laboratory", "2026-04-02"),
      method: "hplc",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "Analyte" },
        solid_form: { column: "Solid" },
        solvent: { column: "Medium" },
        temperature: { column: "temp/°C", unit: "°C" },
        replicate: { column: "rep" },
        solubility: { column: "conc [mg/mL]", unit: "mg/mL solution" },
        excess_solid: { column: "solid left?" },
      },
      constants: { temperature_probe: "solution", equilibration_h: 48 },
      carry: ["comment"],
    },
    headings: ["Analyte", "Solid", "Medium", "temp/°C", "rep", "conc [mg/mL]", "solid left?", "comment"],
    rows: [
      ...rows(measure(plan("paracetamolEthanol", [10, 20, 25, 30, 40, 50], 2))),
      ...rows(mistakes.digitsTransposed(measure(plan("paracetamolWater", [5, 15, 25, 35, 45, 55, 65], 2)), 11, 0)),
      ...rows(measure(plan("ibuprofenEthylAcetate", [5, 10, 20, 25, 30, 35]))),
      ...rows(measure(plan("ibuprofenHeptane", [5, 10, 15, 20, 25, 30, 35]))),
      ...rows(mistakes.dilutionFactor(measure(plan("caffeineEthylAcetate", [10, 20, 25, 30, 40, 50, 60])), 4)),
      ...rows(measure(plan("formAPropanol", [10, 20, 25, 30, 40, 50, 60]))),
      ...rows(measure(plan("formAEthylAcetate", [10, 20, 25, 30, 40, 50, 60]))),
      ...formB,
      ...repeated(formB[2], "re-exported from the instrument"),
      typedRow([...names("formAEthylAcetate"), "65", "1", "118", "no", "all dissolved, so at least this much"]),
    ],
  };
}

/** The crystallisation technologist heats and cools weighed loads; clear and cloud temperatures, mg per mL solvent. */
export function clearPoints(): SourceFile {
  const source = "crystal-lab-2025-clear-points";
  const series: readonly (readonly [SystemName, readonly number[]])[] = [
    ["benzoicToluene", [8, 16, 25, 33, 42, 50, 58]],
    ["ibuprofenHeptane", [6, 11, 16, 20, 25, 30, 34]],
    ["formAPropanol", [12, 20, 28, 36, 45, 54, 62]],
    ["formAEthylAcetate", [10, 18, 27, 35, 43, 52, 60]],
    ["nicotinamideEthanol", [10, 18, 27, 36, 44, 52, 60]],
  ];
  const runs = series.flatMap(([system, targets]) => heatingRuns(source, system, targets));
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(
        source,
        "Clear and cloud points of weighed loads",
        "crystallisation technologist",
        "crystal laboratory",
        "2025-11-20",
      ),
      method: "clear-point",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "substance" },
        solid_form: { column: "form loaded" },
        solvent: { column: "in" },
        solubility: { column: "load", unit: "mg/mL solvent" },
        temperature: { column: "temperature", unit: "°C" },
        method: { column: "event" },
        approach: { column: "direction" },
      },
      constants: { heating_rate_K_per_min: 0.3, temperature_probe: "solution" },
      carry: ["run"],
    },
    headings: ["run", "substance", "form loaded", "in", "load", "temperature", "event", "direction"],
    rows: runs.map((row, index) => ({ ...row, cells: [`run ${Math.floor(index / 2) + 1}`, ...row.cells] })),
  };
}

function heatingRuns(source: string, system: SystemName, targets: readonly number[]): Row[] {
  const normal = normalStream(`${source} ${system}`);
  const bias = 0.3 * normal();
  return targets.flatMap((target, index) => {
    const load = significant(inUnit("mg/mL solvent", system, trueMassRatio(system, target), target), 3);
    const saturated = saturationTemperature(system, Number(load) / SYSTEMS[system].solvent.density20);
    const clear = (saturated + 0.3 + bias + 0.35 * normal()).toFixed(1);
    const cloud = (saturated - 12 - 2 * normal()).toFixed(1);
    const swapped = system === "benzoicToluene" && index === 4;
    const cells = (temperature: string, event: string, direction: string) => [
      ...[...names(system), load, temperature, event, direction],
    ];
    const mistake = {
      cause: "cloud point for clear point",
      done: "clear and cloud temperature of this run swapped",
      truth: `clear ${clear} °C, cloud ${cloud} °C`,
    };
    const about = `${inWords(system)}, load ${load} mg/mL`;
    const heating = { cells: cells(swapped ? cloud : clear, "clear-point", "heating to clear"), about };
    const cooling = { cells: cells(swapped ? clear : cloud, "cloud-point", "cooling to cloud"), about };
    return swapped
      ? [
          { ...heating, mistake },
          { ...cooling, mistake },
        ]
      : [heating, cooling];
  });
}

/** Solute, form and solvent as the harbour laboratories write them. */
function names(system: SystemName): [string, string, string] {
  const { solute, form, solvent } = SYSTEMS[system];
  return [solute.name, form, solvent.name];
}

function repeated(row: Row | undefined, remark: string): Row[] {
  return row ? [{ ...row, cells: [...row.cells.slice(0, -1), remark] }] : [];
}
