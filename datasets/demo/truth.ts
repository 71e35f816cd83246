/**
 * The invented world behind the demo collection: what every solubility would be if nobody made a mistake. All levels
 * are invented; they are merely of the size a chemist expects. Nothing here uses the program's own conversions.
 */

/** Molar mass (g/mol) and density (kg/m3) of the solid, unsolvated. */
export interface Solute {
  readonly name: string;
  readonly molarMass: number;
  readonly solidDensity: number;
}

/** Molar mass (g/mol), density at 20 °C (kg/m3) and its slope with temperature (kg/m3/K). */
export interface Solvent {
  readonly name: string;
  readonly molarMass: number;
  readonly density20: number;
  readonly densitySlope: number;
}

/** One system: ln x = ln x25 + H/R (1/298.15 - 1/T) + c (298.15/T - 1 + ln(T/298.15)). */
export interface System {
  readonly solute: Solute;
  readonly solvent: Solvent;
  /** Solid form as the group names it; empty where nobody names one. */
  readonly form: string;
  /** Mole fraction of unsolvated solute at 25 °C. */
  readonly moleFraction25: number;
  /** Enthalpy of dissolution at 25 °C, kJ/mol. */
  readonly enthalpy: number;
  /** Heat capacity of dissolution over the gas constant. */
  readonly curvature: number;
  /** Molar mass of the crystal over that of the unsolvated solute. */
  readonly crystalRatio: number;
  /** Another solid of the same solute, which takes over where its solubility is the lower one. */
  readonly otherSolid?: { readonly moleFraction25: number; readonly enthalpy: number };
}

const GAS_CONSTANT = 8.314462618e-3;

const SOLUTES = {
  paracetamol: { name: "paracetamol", molarMass: 151.165, solidDensity: 1293 },
  benzoic: { name: "benzoic acid", molarMass: 122.123, solidDensity: 1266 },
  salicylic: { name: "salicylic acid", molarMass: 138.122, solidDensity: 1443 },
  succinic: { name: "succinic acid", molarMass: 118.088, solidDensity: 1572 },
  adipic: { name: "adipic acid", molarMass: 146.142, solidDensity: 1360 },
  ibuprofen: { name: "ibuprofen", molarMass: 206.285, solidDensity: 1110 },
  caffeine: { name: "caffeine", molarMass: 194.194, solidDensity: 1230 },
  nicotinamide: { name: "nicotinamide", molarMass: 122.127, solidDensity: 1400 },
  harbour14: { name: "HBR-14", molarMass: 312.325, solidDensity: 1310 },
  harbour31: { name: "HBR-31", molarMass: 265.309, solidDensity: 1290 },
  copper: { name: "copper(II) sulfate", molarMass: 159.602, solidDensity: 3600 },
  sulfate: { name: "sodium sulfate", molarMass: 142.036, solidDensity: 2700 },
} as const satisfies Record<string, Solute>;

const SOLVENTS = {
  water: { name: "water", molarMass: 18.015, density20: 998.2, densitySlope: -0.32 },
  ethanol: { name: "ethanol", molarMass: 46.069, density20: 790.3, densitySlope: -0.88 },
  propanol: { name: "2-propanol", molarMass: 60.096, density20: 786.3, densitySlope: -0.91 },
  ethylAcetate: { name: "ethyl acetate", molarMass: 88.106, density20: 900.0, densitySlope: -1.2 },
  toluene: { name: "toluene", molarMass: 92.141, density20: 867.3, densitySlope: -0.94 },
  acetone: { name: "acetone", molarMass: 58.08, density20: 791.2, densitySlope: -1.14 },
  heptane: { name: "heptane", molarMass: 100.205, density20: 683.8, densitySlope: -0.85 },
} as const satisfies Record<string, Solvent>;

function system(
  solute: keyof typeof SOLUTES,
  solvent: keyof typeof SOLVENTS,
  moleFraction25: number,
  enthalpy: number,
  curvature = 0,
  form = "",
  crystalRatio = 1,
): System {
  return {
    solute: SOLUTES[solute],
    solvent: SOLVENTS[solvent],
    form,
    moleFraction25,
    enthalpy,
    curvature,
    crystalRatio,
  };
}

/** Every invented system of the demo that has a curve. */
export const SYSTEMS = {
  paracetamolEthanol: system("paracetamol", "ethanol", 0.0532, 14.9, 3, "form I"),
  paracetamolWater: system("paracetamol", "water", 0.00176, 25.2, 12, "form I"),
  benzoicToluene: system("benzoic", "toluene", 0.0661, 27.5),
  benzoicWater: system("benzoic", "water", 0.000505, 27.0, 22),
  salicylicEthylAcetate: system("salicylic", "ethylAcetate", 0.131, 13.2, 4),
  succinicPropanol: system("succinic", "propanol", 0.0252, 25.6),
  succinicWater: system("succinic", "water", 0.01245, 32.4, 4),
  adipicAcetone: system("adipic", "acetone", 0.0197, 25.9),
  adipicWater: system("adipic", "water", 0.00296, 41.5, 14),
  ibuprofenEthylAcetate: system("ibuprofen", "ethylAcetate", 0.188, 25.8),
  ibuprofenHeptane: system("ibuprofen", "heptane", 0.0312, 51.0),
  caffeineEthylAcetate: system("caffeine", "ethylAcetate", 0.00352, 22.4),
  nicotinamideEthanol: system("nicotinamide", "ethanol", 0.0476, 22.1, 3),
  formAPropanol: system("harbour14", "propanol", 0.00412, 36.4, 0, "form A"),
  formBPropanol: system("harbour14", "propanol", 0.00537, 34.2, 0, "form B"),
  formAEthylAcetate: system("harbour14", "ethylAcetate", 0.0128, 29.8, 0, "form A"),
  // A hydrate in the cold, the anhydrous solid above 41 °C; nobody says which one was at the bottom.
  harbour31Water: {
    ...system("harbour31", "water", 0.00236, 47.5),
    otherSolid: { moleFraction25: 0.00424, enthalpy: 18.7 },
  },
  copperWater: system("copper", "water", 0.02486, 12.6, 10, "pentahydrate", 249.677 / 159.602),
  sulfateWater: system("sulfate", "water", 0.03405, 50.3, 0, "decahydrate", 322.186 / 142.036),
} as const satisfies Record<string, System>;

/** Name of one of the invented systems. */
export type SystemName = keyof typeof SYSTEMS;

/** g unsolvated solute per g total solvent at a temperature in °C. */
export function trueMassRatio(name: SystemName, celsius: number): number {
  const { solute, solvent, moleFraction25, enthalpy, curvature, otherSolid }: System = SYSTEMS[name];
  const step = 298.15 / (celsius + 273.15);
  const bent = curvature * (step - 1 - Math.log(step));
  const level = (x25: number, heat: number) => x25 * Math.exp((heat / GAS_CONSTANT / 298.15) * (1 - step));
  const own = level(moleFraction25, enthalpy) * Math.exp(bent);
  const x = otherSolid ? Math.min(own, level(otherSolid.moleFraction25, otherSolid.enthalpy)) : own;
  return ((x / (1 - x)) * solute.molarMass) / solvent.molarMass;
}

/** Mass fraction of the first solvent in a mixture of two volumes measured at 20 °C. */
export function massFractionOfVolumes(first: SystemName, second: SystemName, volumeFraction: number): number {
  const mass = volumeFraction * SYSTEMS[first].solvent.density20;
  return mass / (mass + (1 - volumeFraction) * SYSTEMS[second].solvent.density20);
}

/**
 * Mole fraction of the solute in a mixture of the solvents of two systems, from the volume fraction f of the first: ln x
 * lies f (1 - f) (3.6 + 1.9 (2 f - 1)) 298.15/T above the straight line between both.
 */
export function mixedMoleFraction(first: SystemName, second: SystemName, massFraction: number, celsius: number) {
  const lnX = (name: SystemName) => {
    const { solute, solvent }: System = SYSTEMS[name];
    const moles = trueMassRatio(name, celsius) / solute.molarMass;
    return Math.log(moles / (moles + 1 / solvent.molarMass));
  };
  const volume = massFraction / SYSTEMS[first].solvent.density20;
  const f = volume / (volume + (1 - massFraction) / SYSTEMS[second].solvent.density20);
  const excess = f * (1 - f) * (3.6 + 1.9 * (2 * f - 1)) * (298.15 / (celsius + 273.15));
  return Math.exp(f * lnX(first) + (1 - f) * lnX(second) + excess);
}

/** g solute per g of a mixture of two solvents, of a mole fraction in it. */
export function mixedMassRatio(first: SystemName, second: SystemName, massFraction: number, moleFraction: number) {
  const [one, other] = [SYSTEMS[first], SYSTEMS[second]];
  const moles = massFraction / one.solvent.molarMass + (1 - massFraction) / other.solvent.molarMass;
  return (moleFraction / (1 - moleFraction)) * one.solute.molarMass * moles;
}

/** Temperature in °C at which a mass ratio is saturated, by bisection between -20 and 120 °C. */
export function saturationTemperature(name: SystemName, massRatio: number): number {
  let low = -20;
  let high = 120;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (trueMassRatio(name, middle) < massRatio) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** A system in words, as in "caffeine in water". */
export function inWords(name: SystemName): string {
  const { solute, form, solvent } = SYSTEMS[name];
  return `${solute.name}${form === "" ? "" : ` (${form})`} in ${solvent.name}`;
}

/** What the demo's sources report in. */
export type DemoUnit =
  | "g/100 g solvent"
  | "g/kg solvent"
  | "g/100 g solution"
  | "mg/mL solution"
  | "g/L solution"
  | "mg/mL solvent"
  | "mol/kg solvent"
  | "10^3 x";

/** A mass ratio (unsolvated, per total solvent) written in a unit; volumes of solvent at 20 °C, of solution at T. */
export function inUnit(unit: DemoUnit, name: SystemName, massRatio: number, celsius: number): number {
  const { solute, solvent } = SYSTEMS[name];
  const massFraction = massRatio / (1 + massRatio);
  switch (unit) {
    case "g/100 g solvent":
      return 100 * massRatio;
    case "g/kg solvent":
      return 1000 * massRatio;
    case "g/100 g solution":
      return 100 * massFraction;
    case "mg/mL solvent":
      return massRatio * solvent.density20;
    case "mol/kg solvent":
      return (1000 * massRatio) / solute.molarMass;
    case "10^3 x": {
      const moles = massRatio / solute.molarMass;
      return (1000 * moles) / (moles + 1 / solvent.molarMass);
    }
    default: {
      const solventDensity = solvent.density20 + solvent.densitySlope * (celsius - 20);
      const volume = massFraction / (0.93 * solute.solidDensity) + (1 - massFraction) / solventDensity;
      return massFraction / volume;
    }
  }
}

/** g crystal (hydrate) per g solvent added that gives the mass ratio: r R / (1 - r (R - 1)). */
export function hydratePerAddedSolvent(name: SystemName, massRatio: number): number {
  const { crystalRatio } = SYSTEMS[name];
  return (massRatio * crystalRatio) / (1 - massRatio * (crystalRatio - 1));
}
