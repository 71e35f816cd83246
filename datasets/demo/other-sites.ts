/** Organic solutes from elsewhere: a report in mole fractions, titrations in °F, a north works table, UV notes. */
import { measure, type Reported, type SeriesPlan } from "./measure.ts";
import * as mistakes from "./mistakes.ts";
import { COMMA_TABLE, laboratoryCard, measuredRows, type SourceFile, typedRow } from "./source-file.ts";
import { SYSTEMS, type SystemName } from "./truth.ts";

/** A report written like a paper: K and 1000 x. */
export function report(): SourceFile {
  const source = "report-2019-mole-fractions";
  const plan = (system: SystemName, temperatures: readonly number[]): SeriesPlan => ({
    source,
    system,
    temperatures,
    unit: "10^3 x",
    noise: 0.012,
    temperatureAs: "K",
  });
  const cells = (r: Reported) => {
    const [solute, solvent] = names(r.system);
    return [solute, SYSTEMS[r.system].form, solvent, r.temperature, r.value];
  };
  const every5 = [10, 15, 20, 25, 30, 35, 40, 45, 50];
  const series = [
    measure(plan("paracetamolEthanol", every5)),
    mistakes.rowsShifted(measure(plan("benzoicToluene", [10, 17, 24, 31, 38, 45, 52, 59])), 3),
    mistakes.celsiusInKelvinColumn(measure(plan("salicylicEthylAcetate", every5)), 6),
    measure(plan("succinicPropanol", every5)),
    measure(plan("caffeineEthylAcetate", every5)),
    measure(plan("ibuprofenEthylAcetate", [5, 10, 15, 20, 25, 30, 35, 40])),
  ];
  return {
    ...COMMA_TABLE,
    card: {
      format: 1,
      source,
      title: "Mole fractions from a report written like a paper (invented)",
      origin: "literature",
      reported_by: "project chemist 5",
      laboratory: "report authors",
      date: "2019-06-30",
      reference: "Invented report 7 of the invented group, table 2",
      doi: null,
      licence: "invented data, free to use",
      method: "isothermal-synthetic",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "Solute (1)" },
        solid_form: { column: "Solid phase" },
        solvent: { column: "Solvent (2)" },
        temperature: { column: "T/K", unit: "K" },
        solubility: { column: "10^3 x1", unit: "10^3 x" },
      },
      constants: { temperature_uncertainty: { value: 0.1, unit: "K" } },
      carry: [],
    },
    headings: ["Solute (1)", "Solid phase", "Solvent (2)", "T/K", "10^3 x1"],
    rows: series.flatMap((readings) => measuredRows(readings, cells)),
  };
}

/** The pilot-plant shift chemist titrates acids; °F, mol per kg, two lines above the headings. */
export function titration(): SourceFile {
  const source = "pilot-plant-2024-titration";
  const plan = (system: SystemName): SeriesPlan => ({
    source,
    system,
    unit: "mol/kg solvent",
    noise: 0.01,
    temperatureAs: "°F",
    temperatures: [5, 15, 25, 35, 45, 55, 65, 75],
  });
  const cells = (r: Reported) => [...names(r.system), r.temperature, r.value, ""];
  const propanol: SeriesPlan = { ...plan("succinicPropanol"), temperatures: [15, 25, 35, 45, 55, 65] };
  const series = [
    mistakes.celsiusInFahrenheitColumn(measure(plan("benzoicWater"))),
    measure(plan("succinicWater")),
    measure(plan("adipicWater")),
    measure(propanol),
  ];
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(
        source,
        "Acid titrations at the pilot plant",
        "pilot-plant shift chemist",
        "pilot plant",
        "2024-09-05",
      ),
      method: "titration",
      file: `${source}.csv`,
      shape: "long",
      table: { header_line: 3 },
      columns: {
        solute: { column: "acid" },
        solvent: { column: "solvent" },
        temperature: { column: "T (F)", unit: "°F" },
        solubility: { column: "m (mol/kg)", unit: "mol/kg solvent" },
      },
      constants: { temperature_probe: "jacket", excess_solid: "yes" },
      carry: ["shift log"],
    },
    preamble: ["Saturated liquors, titrated hot,,,,", "sheet 2 of 2,,,,"],
    headings: ["acid", "solvent", "T (F)", "m (mol/kg)", "shift log"],
    rows: [
      ...series.flatMap((readings) => measuredRows(readings, cells)),
      typedRow(["succinic acid", "water", "50", "-0.382", "blank larger than the sample?"], {
        cause: "refused",
        done: "negative value",
        truth: "not known: the titration was not repeated",
      }),
    ],
  };
}

const REGISTRY_NUMBERS: ReadonlyMap<string, string> = new Map([
  ["paracetamol", "103-90-2"],
  ["benzoic acid", "65-85-0"],
  ["succinic acid", "110-15-6"],
  ["adipic acid", "124-04-9"],
  ["nicotinamide", "98-92-0"],
  ["copper(II) sulfate", "7758-98-7"],
  ["sodium sulfate", "7757-82-6"],
]);

/** The north works writes decimal commas, semicolons and its own headings; % of the solution by mass. */
export function northWorks(): SourceFile {
  const source = "werk-nord-2025-trockenrueckstand";
  const plan = (system: SystemName, temperatures: readonly number[]): SeriesPlan => ({
    source,
    system,
    temperatures,
    unit: "g/100 g solution",
    noise: 0.015,
  });
  const comma = (text: string) => text.replace(".", ",");
  const cells = (r: Reported) => {
    const { solute, form, solvent, crystalRatio } = SYSTEMS[r.system];
    const basis = crystalRatio > 1 ? "anhydrous" : "";
    return [
      ...[solute.name, REGISTRY_NUMBERS.get(solute.name) ?? "", form, basis],
      ...[solvent.name, comma(r.temperature), comma(r.value), ""],
    ];
  };
  const tens = [10, 20, 30, 40, 50, 60, 70];
  const series = [
    measure(plan("paracetamolWater", tens)),
    measure(plan("benzoicWater", tens)),
    measure(plan("succinicWater", tens)),
    measure(plan("adipicAcetone", [7.5, 15, 22.5, 30, 37.5, 45])),
    mistakes.everythingDissolved(measure(plan("nicotinamideEthanol", [10, 20, 25, 30, 40, 50, 60])), 5),
    measure(plan("copperWater", tens)),
    measure(plan("sulfateWater", [5, 10, 15, 20, 25, 30])),
  ];
  const later = measuredRows(measure(plan("harbour31Water", tens)), cells);
  return {
    delimiter: ";",
    lineEnd: "\r\n",
    byteOrderMark: true,
    preamble: [],
    card: {
      ...laboratoryCard(
        source,
        "Trockenrückstände 2025",
        "laboratory technician, north works",
        "north works",
        "2025-08-21",
      ),
      method: "gravimetric",
      file: `${source}.csv`,
      shape: "long",
      table: { encoding: "auto", delimiter: ";", decimal: ",", header_line: 1, missing: ["", "-"] },
      columns: {
        solute: { column: "Stoff" },
        cas: { column: "CAS-Nr." },
        solid_form: { column: "Bodenkörper" },
        solute_basis: { column: "Bezug" },
        solvent: { column: "Lösemittel" },
        temperature: { column: "Temp. in °C", unit: "°C" },
        solubility: { column: "Massenanteil in %", unit: "g/100 g solution" },
      },
      constants: { temperature_probe: "bath" },
      carry: ["Bemerkung"],
    },
    headings: [
      "Stoff",
      "CAS-Nr.",
      "Bodenkörper",
      "Bezug",
      "Lösemittel",
      "Temp. in °C",
      "Massenanteil in %",
      "Bemerkung",
    ],
    rows: [
      ...series.flatMap((readings) => measuredRows(readings, cells)),
      typedRow(["salicylic acid", "69-72-7", "", "", "Essigester", "25", "19,2", "nur ein Ansatz"], {
        cause: "refused",
        done: "solvent under a name the tables do not know",
        truth: "ethyl acetate, 19.12",
      }),
      typedRow(["caffeine", "02.08.1958", "", "", "ethyl acetate", "25", "0,77", "Einzelwert"], {
        cause: "refused",
        done: "CAS number turned into a date by the spreadsheet",
        truth: "58-08-2, 0.77",
      }),
      ...later,
    ],
  };
}

/** The formulation scientist keeps a tab-separated notebook with a unit in every row. */
export function formulationNotes(): SourceFile {
  const source = "formulation-2026-uv";
  const plan = (system: SystemName, temperatures: readonly number[]): SeriesPlan => ({
    source,
    system,
    temperatures,
    unit: "g/L solution",
    noise: 0.025,
  });
  const cells = (r: Reported) => [...names(r.system), r.temperature, r.value, "g/L solution", ""];
  const refused = (done: string, truth: string) => ({ cause: "refused", done, truth });
  const openUnit = refused("open unit: mg per g of what?", "mg per g solvent; 7.79 at 25 °C, 11.06 at 37 °C");
  const series = [
    measure(plan("paracetamolWater", [15, 25, 32, 37])),
    measure(plan("benzoicWater", [15, 20, 25, 32, 37])),
    measure(plan("adipicWater", [15, 20, 25, 32, 37])),
  ];
  return {
    ...COMMA_TABLE,
    delimiter: "\t",
    card: {
      ...laboratoryCard(source, "UV notes for dissolution media", "formulation scientist", "formulation", "2026-02-11"),
      method: "uv",
      file: `${source}.tsv`,
      shape: "long",
      table: { delimiter: "auto", missing: [""] },
      columns: {
        solute: { column: "drug" },
        solvent: { column: "vehicle" },
        temperature: { column: "t (C)", unit: "°C" },
        solubility: { column: "result", unit_column: "units" },
      },
      carry: ["remark"],
    },
    headings: ["drug", "vehicle", "t (C)", "result", "units", "remark"],
    rows: [
      ...series.flatMap((readings) => measuredRows(readings, cells)),
      typedRow(["ibuprofen", "water", "25", "<0.05", "mg/mL solution", "below quantification"]),
      typedRow(["ibuprofen", "water", "37", "0.04 - 0.08", "mg/mL solution", "two lots"]),
      typedRow(["nicotinamide", "ethanol", "20", "soluble", "pharmacopoeia term", "from the monograph"]),
      typedRow(
        ["nicotinamide", "water", "25", "n.d.", "mg/mL solution", "vial broken"],
        refused("n.d. is no number", "never measured"),
      ),
      typedRow(["caffeine", "ethyl acetate", "25", "7.7", "mg/g", ""], openUnit),
      typedRow(["caffeine", "ethyl acetate", "37", "11.2", "mg/g", ""], openUnit),
      typedRow(["benzoic acid", "water", "25", "slightly soluble", "pharmacopoeia term", "from the monograph"]),
      typedRow(
        ["salicylic acid", "ethyl acetate", "25", "slightly soluble", "pharmacopoeia term", "from the monograph"],
        {
          cause: "contradicted range",
          done: "term of the monograph for water",
          truth: "freely soluble",
        },
      ),
    ],
  };
}

function names(system: SystemName): [string, string] {
  const { solute, solvent } = SYSTEMS[system];
  return [solute.name, solvent.name];
}
