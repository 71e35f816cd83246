import type { Kind } from "./kind.ts";

/** Problems of single cells and of what they say together. Each stops one reading unless it says otherwise. */
export const cellKinds = {
  "missing-solvent": {
    stops: "reading",
    meaning: "The row names no solvent.",
    expected: "a name of the solvent",
    mend: "fill the cell, or state the solvent as a constant in the card",
  },
  "missing-temperature": {
    stops: "reading",
    meaning: "The row has no temperature.",
    expected: "the temperature of the measurement",
    mend: "fill the cell, or state the temperature as a constant in the card",
  },
  "not-a-number": {
    stops: "reading",
    meaning: "The cell is not a number.",
    expected: "a number such as 12.5, -3 or 1.2e-4, in digits only",
    mend: "correct the cell; remarks and units belong in columns of their own; a mark for no value is listed under missing in the card",
  },
  "number-out-of-range": {
    stops: "reading",
    meaning: "The number is too large or too small to be stored.",
    expected: "a number between 1e-307 and 1e308 in magnitude",
    mend: "check the exponent",
  },
  "ambiguous-number": {
    stops: "reading",
    meaning:
      "The number can be read in more than one way, because a comma or point may separate thousands or decimals.",
    expected: "no thousands separators, and one decimal mark throughout the source",
    mend: 'write the number without thousands separators, or state "decimal" in the card',
  },
  "value-not-positive": {
    stops: "reading",
    meaning: "A solubility of zero or below cannot be a measured value.",
    expected: "a value above 0",
    mend: "correct the cell; for a value below the limit of detection write it as a limit, such as <0.05",
  },
  "fraction-at-or-above-one": {
    stops: "reading",
    meaning: "A fraction of one (100 %) or more leaves no room for the solvent.",
    expected: "a mass or mole fraction below 1 (100 %)",
    mend: "check the unit: grams per 100 g of solvent may exceed 100, per 100 g of solution may not",
  },
  "below-absolute-zero": {
    stops: "reading",
    meaning: "The temperature is at or below absolute zero.",
    expected: "a temperature above 0 K (-273.15 °C)",
    mend: "check the value and the temperature unit",
  },
  "unknown-unit": {
    stops: "reading",
    meaning: "The unit of solubility is not known.",
    expected: "a unit such as g/100 g solvent, g/L solution, mole fraction or mol/kg solvent",
    mend: "correct the unit in the card or in the unit column",
  },
  "open-unit": {
    stops: "reading",
    meaning: "The unit does not say what the amount refers to, so it has several readings.",
    expected: "a unit that says solvent or solution",
    mend: "write the unit out in full, as the origin of the data defines it",
  },
  "unknown-temperature-unit": {
    stops: "reading",
    meaning: "The unit of temperature is not known, or none was stated.",
    expected: "°C, K or °F",
    mend: "state the unit of the temperature in the card",
  },
  "open-volume-basis": {
    stops: "reading",
    meaning:
      "Above 20 g/L it matters whether the volume is that of the solution or of the solvent, and the unit does not say.",
    expected: "mg/mL solution, mg/mL solvent, g/L solution or g/L solvent",
    mend: "write the unit out in full, as the origin of the data defines it; state volume_temperature where the volume was not measured at 20 °C (solvent) or at the temperature of the measurement (solution)",
  },
  "open-hydrate-basis": {
    stops: "reading",
    meaning: "The solid is a hydrate or solvate, and it is open whether the amount counts its crystal solvent.",
    expected: "solute_basis: anhydrous, hydrate per added solvent, or hydrate equivalent per total solvent",
    mend: "state solute_basis in a column or as a constant of the card",
  },
  "open-salt-basis": {
    stops: "reading",
    meaning:
      "The solid is a salt or co-crystal of the solute, and it is open whether the amount is the mass of the salt or of the free acid or base.",
    expected:
      "solute_basis: anhydrous for the mass of the free acid or base, or hydrate equivalent per total solvent for the mass of the salt",
    mend: "state solute_basis in a column or as a constant of the card; or name the salt itself as the solute",
  },
  "unknown-guest-count": {
    stops: "reading",
    meaning:
      "The conversion needs to know how much crystal solvent or counter-ion the form holds, and it is not known.",
    expected: "a form whose name says its water (monohydrate, pentahydrate), or one listed with its molar mass",
    mend: "name the count in solid_form, or add the form with guest_per_solute and molar_mass to solid_forms.csv",
  },
  "open-composition": {
    stops: "reading",
    meaning: "The composition of the solvent does not say on which basis it is.",
    expected: "composition_basis: mass, mole, volume before mixing, or % vol",
    mend: "state composition_basis in a column or as a constant of the card, or write w/w, v/v, mol/mol or % vol in the cell",
  },
  "unsupported-composition": {
    stops: "reading",
    meaning: "This way of giving a solvent mixture cannot be followed.",
    expected: "up to three listed solvents with their fractions, such as ethanol/water 70:30 v/v",
    mend: "give the mixture as components with a composition and its basis",
  },
  "missing-composition": {
    stops: "reading",
    meaning: "The row names a mixture of solvents but not how much of each, or a fraction but not of what with what.",
    expected: "all components, with a fraction for each of them or for all but one",
    mend: "write the components and their proportion into the solvent cell, or fill composition and composition_basis",
  },
  "contradictory-composition": {
    stops: "reading",
    meaning: "The row states the composition of its solvent twice, and the two do not agree.",
    expected: "one composition, or the same one in both places",
    mend: "find out which is right and leave the other out",
  },
  "fractions-do-not-add-up": {
    stops: "reading",
    meaning: "The fractions of the components do not add up to 1 or 100 %.",
    expected: "fractions whose sum is 1 or 100 %, or a ratio such as 7:3",
    mend: "correct the fractions; where the solute is counted among them, say so in composition_basis",
  },
  "composition-out-of-range": {
    stops: "reading",
    meaning: "A fraction of a solvent lies above 100 % or below 0.",
    expected: "a fraction from 0 to 1, or 0 to 100 %",
    mend: "correct the fraction; check whether it is in percent or a fraction of 1",
  },
  "unknown-mixture-partner": {
    stops: "reading",
    meaning: "A component of the solvent mixture is no solvent of the tables.",
    expected: "names, synonyms or registry numbers of listed solvents",
    mend: "correct the name, or add the solvent to substances.csv of the collection",
  },
  "ambiguous-mixture": {
    stops: "reading",
    meaning: "The name of the mixture can be divided into components in more than one way.",
    expected: "components with / or + between them",
    mend: "write the components out with / between them",
  },
  "too-many-components": {
    stops: "reading",
    meaning: "The solvent is a mixture of more than three components.",
    expected: "at most three solvents",
    mend: "leave the row out, or name the smallest component under medium if it is no solvent",
  },
  "miscibility-gap": {
    stops: "reading",
    meaning: "The components do not mix in this proportion: there are two liquids, and it is open which was measured.",
    expected: "a composition outside the miscibility gap",
    mend: "check the components and their basis; give the composition of the one liquid that was analysed",
  },
  "composition-counts-solute": {
    stops: "reading",
    meaning: "The fractions count the solute, and the row does not allow to take it out.",
    expected:
      "fractions of all solvents, or a solubility that gives the solute's own fraction on the same basis (mass or mole)",
    mend: "give the composition free of solute, or the fractions of all solvents of the solution",
  },
  "nearby-compositions": {
    stops: "nothing",
    meaning:
      "Two compositions of one mixture are nearly the same but lie on two sides of an edge between composition keys, so they are two systems.",
    expected: "one composition for measurements that belong together",
    mend: "correct the composition where the difference is only rounding; otherwise nothing is to be done",
  },
  "unknown-solvent": {
    stops: "reading",
    meaning: "The solvent is not in the tables of substances.",
    expected: "a name, synonym or registry number of a listed solvent",
    mend: "correct the name, or add the solvent to substances.csv of the collection",
  },
  "no-molar-mass": {
    stops: "reading",
    meaning: "The conversion needs a molar mass that is not known.",
    expected: "a molar mass, formula or structure of the substance",
    mend: "add the formula or molar mass to substances.csv or to the row",
  },
  "no-density": {
    stops: "reading",
    meaning: "The conversion needs a density that is not known at this temperature.",
    expected: "a density of the solvent that covers the temperature",
    mend: "give solution_density in the row, or add the density to property-values",
  },
  "unknown-density-unit": {
    stops: "reading",
    meaning: "The unit of the solution density is not known, or none was stated.",
    expected: "g/mL, g/cm3, kg/L, kg/m3 or g/L",
    mend: "state the unit of solution_density in the card",
  },
  "implausible-density": {
    stops: "reading",
    meaning: "No saturated solution has such a density, so its unit or value is wrong.",
    expected: "a density between 300 and 5000 kg/m3 (0.3 and 5 g/mL)",
    mend: "check the unit: 0.8 kg/m3 is usually 0.8 g/mL",
  },
  "bad-uncertainty": {
    stops: "reading",
    meaning: "The uncertainty cannot be used.",
    expected: "a number at or above 0, and a coverage factor above 0 where one is given",
    mend: "correct the cell, or leave it empty",
  },
  "bad-choice": {
    stops: "reading",
    meaning: "The field takes certain words only, and this is none of them.",
    expected: "one of the words listed",
    mend: "correct the cell",
  },
  "unknown-setting": {
    stops: "command",
    meaning: "This setting does not exist, or its value cannot be used.",
    expected: "a setting described in schemas/collection.schema.json",
    mend: "correct the name or the value in collection.json",
  },
} as const satisfies Record<string, Kind>;
