/** A value of the sources that is wrong, doubtful or of another substance, by the name of the substance and column. */
export interface Correction {
  readonly column: "melting_point_K" | "fusion_enthalpy_kJ_per_mol" | "density_kg_per_m3" | "liquid_density";
  /** The value to put in its place; undefined leaves the cell empty. */
  readonly value: number | undefined;
  readonly why: string;
}

const MEMORY = "from memory, not verified";

const drop = (column: Correction["column"], why: string): Correction => ({ column, value: undefined, why });
const put = (column: Correction["column"], value: number, why = MEMORY): Correction => ({ column, value, why });

const noMelting = (why: string) => drop("melting_point_K", why);
const noFusion = (why: string) => drop("fusion_enthalpy_kJ_per_mol", why);
const noDensity = (why: string) => drop("density_kg_per_m3", why);

/** Corrections to the values read, with the reason of each. */
export const corrections: ReadonlyMap<string, readonly Correction[]> = new Map([
  ["paracetamol", [put("fusion_enthalpy_kJ_per_mol", 27.6, `form I, ${MEMORY} (a handbook compilation has 30.5)`)]],
  ["ibuprofen", [put("density_kg_per_m3", 1110)]],
  ["acetylsalicylic acid", [put("density_kg_per_m3", 1400)]],
  ["glycine", [noMelting("decomposes"), put("density_kg_per_m3", 1607, `${MEMORY} (1161 circulates and is wrong)`)]],
  ["naphthalene", [put("density_kg_per_m3", 1145, `crystal, ${MEMORY} (1025 circulates and is not the crystal)`)]],
  ["phenanthrene", [noDensity("980 kg/m3 is not the crystal")]],
  ["sulfanilamide", [noDensity("1080 kg/m3 is not the crystal")]],
  ["vanillin", [noDensity("1056 kg/m3 is the liquid")]],
  ["propylparaben", [noDensity("1063 kg/m3 is the liquid at 102 °C")]],
  ["maleic acid", [noMelting("403 to 417 K in circulation")]],
  ["L-alanine", [noMelting("decomposes")]],
  ["L-serine", [noMelting("decomposes")]],
  ["L-glutamic acid", [noMelting("decomposes")]],
  ["L-phenylalanine", [noMelting("decomposes")]],
  ["L-asparagine", [noMelting("decomposes")]],
  ["L-asparagine monohydrate", [noMelting("loses its water and decomposes")]],
  ["theophylline monohydrate", [noMelting("545 K is the anhydrous form")]],
  ["citric acid monohydrate", [noMelting("408 K is after loss of water")]],
  ["alpha-lactose monohydrate", [noMelting("475 K is after loss of water")]],
  ["lactose", [noMelting("475 K belongs to the monohydrate")]],
  ["sodium benzoate", [noMelting("573 to 709 K in circulation")]],
  ["trisodium citrate dihydrate", [noMelting("423 K is the loss of water")]],
  ["sodium hydrogen carbonate", [noFusion("decomposes before it melts")]],
  ["copper(II) sulfate", [noMelting("decomposes")]],
  ["copper(II) sulfate pentahydrate", [noMelting("383 K is a loss of water")]],
  ["zinc sulfate heptahydrate", [noMelting("373 K is a loss of water")]],
  ["sodium carbonate decahydrate", [noMelting("303 K is rounded; see the transition")]],
  ["barium chloride dihydrate", [noMelting("386 K is the loss of water")]],
  ["calcium sulfate hemihydrate", [noMelting("436 K is the loss of water")]],
  ["calcium carbonate", [noMelting("decomposes"), noFusion("decomposes")]],
  ["ammonium sulfate", [noMelting("decomposes")]],
  ["ammonium chloride", [noMelting("sublimes"), noFusion("sublimes")]],
  ["sodium thiosulfate", [noMelting("321 K is the pentahydrate"), noDensity("1690 kg/m3 is the pentahydrate")]],
  ["sodium thiosulfate pentahydrate", [put("melting_point_K", 321.15, `incongruent, ${MEMORY} (338 K circulates)`)]],
  ["boric acid", [noFusion("refers to a nominal melt")]],
  ["hexane", [drop("liquid_density", "660.6 kg/m3 at 25 °C is wrong; measured 654.9")]],
  ["acetonitrile", [drop("liquid_density", "785.7 kg/m3 at 20 °C is wrong; measured 782.0")]],
  ["dimethyl sulfoxide", [drop("liquid_density", "1101.0 kg/m3 is the value at 20 °C")]],
  [
    "N-methyl-2-pyrrolidone",
    [put("liquid_density", 1032.9, "fit to the NIST ThermoML archive (1023 at 25 °C circulates)")],
  ],
  ["1-hexanol", [drop("liquid_density", "813.6 kg/m3 at 20 °C is wrong")]],
  ["1-octanol", [drop("liquid_density", "826.2 kg/m3 is the value at 20 °C")]],
  ["cumene", [drop("liquid_density", "864.0 kg/m3 at 25 °C is too high; correlations give 859")]],
  ["cyclohexanol", [put("liquid_density", 951, "supercooled liquid, estimated by the correlation; solid at 20 °C")]],
  ["1-methoxy-2-propanol", [put("liquid_density", 922, `${MEMORY} (962 circulates)`)]],
  ["trifluoroacetic acid", [put("liquid_density", 1489, `${MEMORY} (1535 at 25 °C circulates)`)]],
]);
