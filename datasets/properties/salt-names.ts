/** Cations with their charge, by formula; a roman numeral only where an element has several usual charges. */
const CATIONS: ReadonlyArray<readonly [formula: string, name: string, charge: number]> = [
  ["(NH4)", "ammonium", 1],
  ["NH4", "ammonium", 1],
  ["UO2", "uranyl", 2],
  ["Hg2", "mercury(I)", 2],
  ["Ag", "silver", 1],
  ["Li", "lithium", 1],
  ["Na", "sodium", 1],
  ["K", "potassium", 1],
  ["Rb", "rubidium", 1],
  ["Cs", "caesium", 1],
  ["Tl", "thallium(I)", 1],
  ["Be", "beryllium", 2],
  ["Mg", "magnesium", 2],
  ["Ca", "calcium", 2],
  ["Sr", "strontium", 2],
  ["Ba", "barium", 2],
  ["Zn", "zinc", 2],
  ["Cd", "cadmium", 2],
  ["Hg", "mercury(II)", 2],
  ["Mn", "manganese(II)", 2],
  ["Fe", "iron(II)", 2],
  ["Fe", "iron(III)", 3],
  ["Co", "cobalt(II)", 2],
  ["Ni", "nickel(II)", 2],
  ["Cu", "copper(II)", 2],
  ["Sn", "tin(II)", 2],
  ["Pb", "lead(II)", 2],
  ["Al", "aluminium", 3],
  ["Sc", "scandium", 3],
  ["Y", "yttrium", 3],
  ["La", "lanthanum", 3],
  ["Ce", "cerium(III)", 3],
  ["Pr", "praseodymium", 3],
  ["Nd", "neodymium", 3],
  ["Sm", "samarium(III)", 3],
  ["Eu", "europium(III)", 3],
  ["Gd", "gadolinium", 3],
  ["Tb", "terbium", 3],
  ["Dy", "dysprosium", 3],
  ["Ho", "holmium", 3],
  ["Er", "erbium", 3],
  ["Tm", "thulium", 3],
  ["Yb", "ytterbium(III)", 3],
  ["Lu", "lutetium", 3],
  ["Sb", "antimony(III)", 3],
];

/** Anions with their charge. */
const ANIONS: ReadonlyArray<readonly [formula: string, name: string, charge: number]> = [
  ["F", "fluoride", 1],
  ["Cl", "chloride", 1],
  ["Br", "bromide", 1],
  ["I", "iodide", 1],
  ["OH", "hydroxide", 1],
  ["SCN", "thiocyanate", 1],
  ["CN", "cyanide", 1],
  ["NO2", "nitrite", 1],
  ["NO3", "nitrate", 1],
  ["ClO", "hypochlorite", 1],
  ["ClO2", "chlorite", 1],
  ["ClO3", "chlorate", 1],
  ["ClO4", "perchlorate", 1],
  ["BrO3", "bromate", 1],
  ["IO3", "iodate", 1],
  ["IO4", "periodate", 1],
  ["MnO4", "permanganate", 1],
  ["BF4", "tetrafluoroborate", 1],
  ["HCO3", "hydrogen carbonate", 1],
  ["HSO4", "hydrogen sulfate", 1],
  ["H2PO4", "dihydrogen phosphate", 1],
  ["H2AsO4", "dihydrogen arsenate", 1],
  ["C2H3O2", "acetate", 1],
  ["CHO2", "formate", 1],
  ["S", "sulfide", 2],
  ["CO3", "carbonate", 2],
  ["C2O4", "oxalate", 2],
  ["SO3", "sulfite", 2],
  ["SO4", "sulfate", 2],
  ["S2O3", "thiosulfate", 2],
  ["S2O5", "disulfite", 2],
  ["S2O8", "peroxodisulfate", 2],
  ["SeO3", "selenite", 2],
  ["SeO4", "selenate", 2],
  ["CrO4", "chromate", 2],
  ["Cr2O7", "dichromate", 2],
  ["MoO4", "molybdate", 2],
  ["WO4", "tungstate", 2],
  ["HPO3", "phosphonate", 2],
  ["HPO4", "hydrogen phosphate", 2],
  ["HAsO4", "hydrogen arsenate", 2],
  ["B4O7", "tetraborate", 2],
  ["PO4", "phosphate", 3],
  ["AsO4", "arsenate", 3],
  ["Fe(CN)6", "hexacyanidoferrate(III)", 3],
  ["Fe(CN)6", "hexacyanidoferrate(II)", 4],
  ["P2O7", "diphosphate", 4],
];

const counted = (ion: string, count: number): string => {
  if (count === 1) return ion;
  const single = /^[A-Z][a-z]?$/.test(ion) || ion.startsWith("(");
  return single ? `${ion}${count}` : `(${ion})${count}`;
};

const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));

/**
 * Every neutral salt of one of the cations with one of the anions above, by the formula as solubility tables write it:
 * `Ba(NO3)2` to "barium nitrate". A formula that two pairs of ions share is left out.
 */
export function saltNames(): ReadonlyMap<string, string> {
  const names = new Map<string, string>();
  const shared = new Set<string>();
  for (const [cation, cationName, plus] of CATIONS) {
    for (const [anion, anionName, minus] of ANIONS) {
      const common = divisor(plus, minus);
      const cations = minus / common;
      // The bracketed ammonium is for several of them, the plain one for a single one.
      if (cation === "(NH4)" ? cations === 1 : cation === "NH4" && cations > 1) continue;
      const formula = counted(cation, cations) + counted(anion, plus / common);
      const name = `${cationName} ${anionName}`;
      if (names.has(formula)) shared.add(formula);
      names.set(formula, name);
    }
  }
  for (const formula of shared) names.delete(formula);
  return names;
}
