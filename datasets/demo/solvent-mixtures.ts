/** Paracetamol over ethanol + water: a kilo laboratory that mixes volumes, and a solvent screen that weighs. */
import { normalStream, significant } from "./measure.ts";
import * as mistakes from "./mistakes.ts";
import { COMMA_TABLE, laboratoryCard, type Row, type SourceFile, typedRow } from "./source-file.ts";
import { massFractionOfVolumes, mixedMassRatio, mixedMoleFraction } from "./truth.ts";

const SOLVENTS = ["paracetamolEthanol", "paracetamolWater"] as const;
/** Standard deviations of what a source is off as a whole, and of what each composition it made up is off besides. */
const [SOURCE_SD, COMPOSITION_SD] = [0.025, 0.012];

/** One composition, mass fraction of ethanol, at several temperatures: the mole fractions read. */
function series(source: string, fraction: number, temperatures: readonly number[], noise: number) {
  const bias = SOURCE_SD * normalStream(source)() + COMPOSITION_SD * normalStream(`${source} ${fraction}`)();
  const normal = normalStream(`${source} ${fraction} readings`);
  return temperatures.map((celsius) => {
    const x = mixedMoleFraction(...SOLVENTS, fraction, celsius + 0.1 * normal());
    return { celsius, x: x * Math.exp(bias + noise * normal()) };
  });
}

const about = (composition: string, celsius: number) =>
  `paracetamol (form I) in ethanol + water ${composition} at ${celsius} °C`;

/** The kilo laboratory mixes volumes and writes them into the solvent cell. */
export function kiloLaboratory(): SourceFile {
  const source = "kilo-lab-2026-antisolvent";
  const rows = [90, 80, 70, 50].flatMap((volumes): Row[] => {
    const composition = `${volumes}:${100 - volumes} v/v`;
    const fraction = massFractionOfVolumes(...SOLVENTS, volumes / 100);
    return series(source, fraction, [10, 20, 30, 40, 50], 0.012).map(({ celsius, x }) => {
      const value = significant(100 * mixedMassRatio(...SOLVENTS, fraction, x), 4);
      const cells = ["paracetamol", `ethanol/water ${composition}`, String(celsius), value, ""];
      return { cells, about: about(composition, celsius) };
    });
  });
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(source, "Water as antisolvent", "kilo-laboratory chemist", "kilo laboratory", "2026-03-20"),
      method: "gravimetric",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "product" },
        solvent: { column: "solvent" },
        temperature: { column: "T", unit: "°C" },
        solubility: { column: "g/100 g", unit: "g/100 g solvent" },
      },
      constants: { solid_form: "form I", solid_check: "XRPD", excess_solid: "yes", temperature_probe: "solution" },
      carry: ["remark"],
    },
    headings: ["product", "solvent", "T", "g/100 g", "remark"],
    rows: [
      ...rows,
      typedRow(["paracetamol", "95 % ethanol", "25", "22.8", "from the drum"], {
        cause: "refused",
        done: "95 % of what? by volume and by mass are two liquids",
        truth: "95 % vol, 22.8",
      }),
    ],
  };
}

/** The solvent screen weighs its mixtures: per cent of ethanol by mass in a column, one series counted the water. */
export function solventScreen(): SourceFile {
  const source = "solvent-screen-2025-refractometry";
  const rows = [85, 75, 45, 20].flatMap((percent): Row[] => {
    const honest = series(source, percent / 100, [10, 20, 25, 30, 40], 0.015).map(({ celsius, x }) => ({
      cells: ["paracetamol", "ethanol + water", String(percent), String(celsius), significant(1000 * x, 4)],
      about: about(`${percent}:${100 - percent} w/w`, celsius),
    }));
    return percent === 75 ? mistakes.compositionReversed(honest, 2) : honest;
  });
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(source, "Solvent screen", "solvent-screening chemist", "screening laboratory", "2025-12-04"),
      method: "refractive-index",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "solute" },
        solvent: { column: "solvent" },
        composition: { column: "% EtOH" },
        temperature: { column: "T/°C", unit: "°C" },
        solubility: { column: "1000 x", unit: "10^3 x" },
      },
      constants: { solid_form: "form I", composition_basis: "mass", excess_solid: "yes", temperature_probe: "bath" },
      carry: [],
    },
    headings: ["solute", "solvent", "% EtOH", "T/°C", "1000 x"],
    rows,
  };
}
