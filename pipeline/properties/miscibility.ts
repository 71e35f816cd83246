/** What a mixture's components tell of their miscibility. */
export interface MiscibleSubstance {
  readonly name: string;
  readonly properties: ReadonlyMap<string, { readonly text: string }>;
}

/** Whether two liquids in a stated proportion are one phase at 25 °C. */
export type Miscibility =
  | { readonly kind: "one phase" }
  /** Inside the gap: at this mass fraction of the first liquid there are two phases between the limits. */
  | { readonly kind: "two phases"; readonly low: number; readonly high: number }
  /** Known to mix in part only, and nothing says where the gap lies. */
  | { readonly kind: "partial" };

export const MISCIBILITY_REFERENCE = "mutual solubilities at 25 °C, from memory, not verified";

/**
 * Gap with water at 25 °C: mass fraction of the solvent in the water-rich and in the solvent-rich phase. All from memory,
 * not verified.
 */
const GAPS_WITH_WATER: Readonly<Record<string, readonly [low: number, high: number]>> = {
  "1-butanol": [0.074, 0.796],
  "2-butanol": [0.18, 0.58],
  "2-methyl-1-propanol": [0.083, 0.835],
  "1-pentanol": [0.022, 0.925],
  "3-methyl-1-butanol": [0.027, 0.904],
  cyclohexanol: [0.038, 0.882],
  "benzyl alcohol": [0.04, 0.92],
  "2-butanone": [0.25, 0.89],
  "4-methyl-2-pentanone": [0.018, 0.979],
  cyclohexanone: [0.024, 0.92],
  "methyl acetate": [0.245, 0.92],
  "ethyl acetate": [0.08, 0.967],
  "propyl acetate": [0.023, 0.971],
  "isopropyl acetate": [0.029, 0.975],
  "butyl acetate": [0.007, 0.986],
  "dimethyl carbonate": [0.139, 0.968],
  "diethyl ether": [0.061, 0.985],
  "methyl tert-butyl ether": [0.042, 0.985],
  "2-methyltetrahydrofuran": [0.14, 0.955],
  nitromethane: [0.111, 0.978],
  "propylene carbonate": [0.175, 0.915],
};
/** A liquid listed as not miscible with water: at most 1 g per 100 g of water, and 8 % of water in it. */
const IMMISCIBLE_WITH_WATER = [0.01, 0.92] as const;

const ALKANES = [
  ...["pentane", "hexane", "heptane", "octane", "2,2,4-trimethylpentane", "decane", "dodecane"],
  ...["cyclohexane", "methylcyclohexane"],
];
const AROMATICS = ["benzene", "toluene", "o-xylene", "m-xylene", "p-xylene", "ethylbenzene", "cumene"];
/**
 * Liquids that do not mix at 25 °C with those beside them in comparable amounts, and part on heating to 45 °C as well.
 * From memory, not verified.
 */
const NOT_MISCIBLE: readonly (readonly [polar: readonly string[], apolar: readonly string[]])[] = [
  [["acetonitrile", "dimethyl sulfoxide", "nitromethane", "N,N-dimethylformamide"], ALKANES],
  [
    ["ethylene glycol", "propylene glycol", "glycerol", "formamide", "sulfolane", "propylene carbonate"],
    [...ALKANES, "dibutyl ether"],
  ],
  [
    ["ethylene glycol", "glycerol", "formamide"],
    [...AROMATICS, "chloroform", "carbon disulfide", "diethyl ether"],
  ],
];
const COMPARABLE = [0.2, 0.8] as const;

/** The limits shift by this factor with temperature and solute, so only what lies deeper in the gap is told (common practice). */
const MARGIN = 1.3;

/**
 * Whether a binary mixture is one liquid at 25 °C, as far as is known: inside a gap only where the smaller share exceeds
 * the limit of its solubility by a third, since limits shift with temperature and with the solute.
 *
 * @param massFraction mass fraction of `a` [1]
 */
export function miscibility(a: MiscibleSubstance, b: MiscibleSubstance, massFraction: number): Miscibility {
  if (b.name === "water") return withWater(a, massFraction);
  if (a.name === "water") {
    const found = withWater(b, 1 - massFraction);
    return found.kind === "two phases" ? { ...found, low: 1 - found.high, high: 1 - found.low } : found;
  }
  const apart = NOT_MISCIBLE.some(
    ([polar, apolar]) =>
      (polar.includes(a.name) && apolar.includes(b.name)) || (polar.includes(b.name) && apolar.includes(a.name)),
  );
  return apart ? inside(massFraction, COMPARABLE, 1) : { kind: "one phase" };
}

function withWater({ name, properties }: MiscibleSubstance, massFraction: number): Miscibility {
  const word = properties.get("miscible_with_water")?.text;
  const known = GAPS_WITH_WATER[name] ?? (word === "no" ? IMMISCIBLE_WITH_WATER : undefined);
  if (known !== undefined) return inside(massFraction, known, MARGIN);
  return { kind: word === "partial" ? "partial" : "one phase" };
}

function inside(w: number, [low, high]: readonly [number, number], margin: number): Miscibility {
  const deep = w > margin * low && 1 - w > margin * (1 - high);
  return deep ? { kind: "two phases", low, high } : { kind: "one phase" };
}
