import { mkdirSync, mkdtempSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

const RIGHT_TO_LEFT = "\u202e";
/** Names that try to break out of a page: markup, quotes, control and bidirectional characters, great length. */
export const HOSTILE_NAMES = [
  "<script>window.hit=1</script>",
  '"><img src=x onerror="window.hit=1">',
  "' onmouseover='window.hit=1",
  "</title></style></script><b>bold",
  "{{7*7}} <!-- --> ]]>",
  "&lt;b&gt; &amp; &#60;",
  `left${RIGHT_TO_LEFT}right\u2066end\u200f`,
  "bell\u0007escape\u001b[31mred\u001b[0m\u0085",
  "x".repeat(2000),
  "long words ".repeat(180).trim(),
] as const;

/** Number of solvents in which one solute was measured. */
export const MANY = 200;

const quoted = (cell: string): string => `"${cell.replaceAll('"', '""')}"`;
const line = (...cells: readonly (string | number)[]): string => `${cells.map((c) => quoted(String(c))).join(",")}\n`;

/** Solubility of an invented solute, g/100 g solvent, so that a curve can be fitted. */
const solubility = (celsius: number, which: number): string =>
  (Math.exp(8 - 2400 / (celsius + 273.15)) * (1 + 0.01 * which)).toPrecision(4);

/** A collection whose every free text is hostile, and one solute in 200 solvents. Returns its folder. */
export function makeHostileCollection(): string {
  const folder = mkdtempSync(join(tmpdir(), "saltern-hostile-"));
  mkdirSync(join(folder, "sources"));
  const [script = "", image = ""] = HOSTILE_NAMES;
  const everything = HOSTILE_NAMES.join(" ");
  writeFileSync(
    join(folder, "collection.json"),
    JSON.stringify({ format: 1, name: "hostile", title: everything.slice(0, 900), steward: image }),
  );
  const solvents = Array.from({ length: MANY }, (_, i) => `invented solvent ${i} <i>${i}</i>`);
  writeFileSync(
    join(folder, "substances.csv"),
    `name,role,synonyms,cas,inchikey,smiles,formula,molar_mass,melting_point_K,fusion_enthalpy_kJ_per_mol,density_kg_per_m3,hazards,reference\n${HOSTILE_NAMES.map(
      (name, i) => line(name, "solute", "", "", "", "", "", 150 + i, "", "", "", image, script),
    ).join("")}${solvents.map((name) => line(name, "solvent", "", "", "", "", "", 90, "", "", 900, "", "")).join("")}`,
  );
  const rows: string[] = [];
  HOSTILE_NAMES.forEach((name, i) => {
    for (const t of [10, 20, 30, 40, 50]) {
      rows.push(line(name, "water", t, solubility(t, i), "g/100 g solvent", image, everything));
    }
  });
  for (const solvent of solvents) {
    for (const t of [10, 30])
      rows.push(line(HOSTILE_NAMES[3], solvent, t, solubility(t, 3), "g/100 g solvent", script, ""));
  }
  rows.push(line(script, image, 20, "1", "g/100 g solvent", "", ""), line(script, "water", 20, image, script, "", ""));
  writeFileSync(
    join(folder, "sources", "bad.csv"),
    `Compound,Solvent,T,S,unit,"${image.replaceAll('"', '""')}",note\n${rows.join("")}`,
  );
  writeFileSync(
    join(folder, "sources", "bad.source.json"),
    JSON.stringify({
      format: 1,
      source: "bad",
      title: everything.slice(0, 1500),
      reported_by: script,
      laboratory: image,
      reference: everything.slice(0, 1500),
      file: "bad.csv",
      columns: {
        solute: { column: "Compound" },
        solvent: { column: "Solvent" },
        temperature: { column: "T", unit: "°C" },
        solubility: { column: "S", unit_column: "unit" },
      },
      carry: [image],
    }),
  );
  return folder;
}
