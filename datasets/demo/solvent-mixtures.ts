/** Paracetamol over ethanol + water: a kilo laboratory that mixes volumes, and a solvent screen that weighs. */
import { normalStream, significant } from "./measure.ts";
import { COMMA_TABLE, laboratoryCard, type Row, type SourceFile, typedRow } from "./source-file.ts";
import { massFractionOfVolumes, mixedMassRatio } from "./truth.ts";

const SOLVENTS = ["paracetamolEthanol", "paracetamolWater"] as const;
/** Standard deviations of what a source is off as a whole, of a composition it made up, and of one reading. */
const [SOURCE_SD, COMPOSITION_SD] = [0.025, 0.012];

/** One composition at several temperatures: mass fraction of ethanol, and what a reading gives, g per g solvent. */
function series(source: string, fraction: number, temperatures: readonly number[], noise: number) {
  const bias = SOURCE_SD * normalStream(source)() + COMPOSITION_SD * normalStream(`${source} ${fraction}`)();
  const normal = normalStream(`${source} ${fraction} readings`);
  return temperatures.map((celsius) => {
    const ratio = mixedMassRatio(...SOLVENTS, fraction, celsius + 0.1 * normal());
    return { celsius, ratio: ratio * Math.exp(bias + noise * normal()) };
  });
}

const about = (composition: string, celsius: number) =>
  `paracetamol (form I) in ethanol + water ${composition} at ${celsius} °C`;

/** The kilo laboratory mixes volumes and writes them into the solvent cell; one series bears the proportion reversed. */
export function kiloLaboratory(): SourceFile {
  const source = "kilo-lab-2026-antisolvent";
  const rows = [90, 80, 70, 50].flatMap((volumes): Row[] => {
    const fraction = massFractionOfVolumes(...SOLVENTS, volumes / 100);
    const truth = `${volumes}:${100 - volumes} v/v`;
    const written = volumes === 70 ? "30:70 v/v" : truth;
    return series(source, fraction, [10, 20, 30, 40, 50], 0.012).map(({ celsius, ratio }) => {
      const cells = ["paracetamol", `ethanol/water ${written}`, String(celsius), significant(100 * ratio, 4), ""];
      const row = { cells, about: about(written, celsius) };
      const done = "the two volumes of the whole series exchanged";
      return written === truth ? row : { ...row, mistake: { cause: "composition mix-up", done, truth } };
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
      typedRow(["paracetamol", "95 % ethanol", "25", "22.1", "from the drum"], {
        cause: "refused",
        done: "95 % of what? by volume and by mass are two liquids",
        truth: "95 % vol; 22.1",
      }),
    ],
  };
}

/** The solvent screen weighs its mixtures: mass per cent of ethanol in a column, per 100 g of solution. */
export function solventScreen(): SourceFile {
  const source = "solvent-screen-2025-refractometry";
  const rows = [85, 65, 45, 20].flatMap((percent): Row[] =>
    series(source, percent / 100, [10, 20, 25, 30, 40], 0.015).map(({ celsius, ratio }) => ({
      cells: [
        "paracetamol",
        "ethanol + water",
        ...[percent, celsius].map(String),
        significant((100 * ratio) / (1 + ratio), 4),
      ],
      about: about(`${percent}:${100 - percent} w/w`, celsius),
    })),
  );
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(source, "Solvent screen", "solvent-screening chemist", "crystal laboratory", "2025-12-04"),
      method: "refractive-index",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "solute" },
        solvent: { column: "solvent" },
        composition: { column: "% EtOH" },
        temperature: { column: "T/°C", unit: "°C" },
        solubility: { column: "% in solution", unit: "g/100 g solution" },
      },
      constants: { solid_form: "form I", composition_basis: "mass %", excess_solid: "yes", temperature_probe: "bath" },
      carry: [],
    },
    headings: ["solute", "solvent", "% EtOH", "T/°C", "% in solution"],
    rows,
  };
}
