/** A solute that the sources lack: facts from general knowledge, each registry number checked by its check digit. */
export interface AdditionalSolute {
  readonly name: string;
  readonly formula: string;
  readonly cas: string;
  readonly synonyms: string;
  readonly smiles?: string;
}

const solute = (name: string, formula: string, cas = "", synonyms = "", smiles = ""): AdditionalSolute => ({
  name,
  formula,
  cas,
  synonyms,
  smiles,
});

/** Inorganic salts met in solubility tables, and the unsolvated parents of hydrates. */
export const additionalSalts: readonly AdditionalSolute[] = [
  solute("aluminium chloride", "AlCl3", "7446-70-0", "aluminum chloride"),
  solute("aluminium sulfate", "Al2(SO4)3", "10043-01-3", "aluminum sulfate"),
  solute("ammonium aluminium sulfate", "NH4Al(SO4)2", "7784-25-0", "AlNH4(SO4)2"),
  solute("ammonium bromide", "NH4Br", "12124-97-9"),
  solute("ammonium hydrogen carbonate", "NH4HCO3", "1066-33-7", "ammonium bicarbonate"),
  solute("ammonium oxalate", "(NH4)2C2O4", "1113-38-8"),
  solute("arsenic(III) oxide", "As2O3", "1327-53-3", "arsenic trioxide"),
  solute("barium chlorate", "Ba(ClO3)2", "13477-00-4"),
  solute("barium nitrate", "Ba(NO3)2", "10022-31-8"),
  solute("cadmium sulfate", "CdSO4", "10124-36-4"),
  solute("calcium hydroxide", "Ca(OH)2", "1305-62-0", "slaked lime"),
  solute("calcium iodate", "Ca(IO3)2", "7789-80-2"),
  solute("calcium nitrate", "Ca(NO3)2", "10124-37-5"),
  solute("cerium(III) sulfate", "Ce2(SO4)3", "13454-94-9"),
  solute("chromium(VI) oxide", "CrO3", "1333-82-0", "chromium trioxide"),
  solute("cobalt(II) chloride", "CoCl2", "7646-79-9"),
  solute("iodic acid", "HIO3", "7782-68-5"),
  solute("lead(II) chloride", "PbCl2", "7758-95-4"),
  solute("lead(II) iodide", "PbI2", "10101-63-0"),
  solute("lead(II) nitrate", "Pb(NO3)2", "10099-74-8"),
  solute("lithium carbonate", "Li2CO3", "554-13-2"),
  solute("lithium sulfate", "Li2SO4", "10377-48-7"),
  solute("magnesium chloride", "MgCl2", "7786-30-3"),
  solute("magnesium nitrate", "Mg(NO3)2", "10377-60-3"),
  solute("manganese(II) chloride", "MnCl2", "7773-01-5"),
  solute("manganese(II) sulfate", "MnSO4", "7785-87-7"),
  solute("nickel(II) sulfate", "NiSO4", "7786-81-4"),
  solute("potassium chromate", "K2CrO4", "7789-00-6"),
  solute("potassium iodate", "KIO3", "7758-05-6"),
  solute("potassium permanganate", "KMnO4", "7722-64-7"),
  solute("rubidium chloride", "RbCl", "7791-11-9"),
  solute("sodium bromide", "NaBr", "7647-15-6"),
  solute("sodium dihydrogen phosphate", "NaH2PO4", "7558-80-7", "monosodium phosphate"),
  solute("sodium fluoride", "NaF", "7681-49-4"),
  solute("sodium hydroxide", "NaOH", "1310-73-2", "caustic soda"),
  solute("sodium iodide", "NaI", "7681-82-5"),
  solute("sodium nitrite", "NaNO2", "7632-00-0"),
  solute("sodium oxalate", "Na2C2O4", "62-76-0"),
  solute("sodium sulfite", "Na2SO3", "7757-83-7"),
  solute("strontium chloride", "SrCl2", "10476-85-4"),
  solute("strontium nitrate", "Sr(NO3)2", "10042-76-9"),
  solute("trisodium phosphate", "Na3PO4", "7601-54-9", "sodium phosphate tribasic"),
  solute("trisodium citrate", "Na3C6H5O7", "68-04-2", "sodium citrate"),
  solute("monosodium L-glutamate", "NaC5H8NO4", "142-47-2", "monosodium glutamate;MSG"),
  solute("warfarin sodium", "NaC19H15O4", "129-06-6", "sodium warfarin"),
  solute("donepezil hydrochloride", "C24H29NO3·HCl", "120011-70-3"),
];

/** Organic solutes met in published series. */
export const additionalOrganics: readonly AdditionalSolute[] = [
  solute("N-acetylglycine", "C4H7NO3", "543-24-8", "aceturic acid", "CC(=O)NCC(O)=O"),
  solute("artemisinin", "C15H22O5", "63968-64-9"),
  solute("triphenylphosphine", "C18H15P", "603-35-0", "", "c1ccc(cc1)P(c1ccccc1)c1ccccc1"),
  solute("sulpiride", "C15H23N3O4S", "15676-16-1"),
  solute("hexamethylenetetramine", "C6H12N4", "100-97-0", "methenamine;hexamine;urotropine"),
  solute("pimelic acid", "C7H12O4", "111-16-0", "heptanedioic acid", "OC(=O)CCCCCC(O)=O"),
  solute("suberic acid", "C8H14O4", "505-48-6", "octanedioic acid", "OC(=O)CCCCCCC(O)=O"),
  solute("azelaic acid", "C9H16O4", "123-99-9", "nonanedioic acid", "OC(=O)CCCCCCCC(O)=O"),
  solute("sebacic acid", "C10H18O4", "111-20-6", "decanedioic acid", "OC(=O)CCCCCCCCC(O)=O"),
  solute("mesalazine", "C7H7NO3", "89-57-6", "5-aminosalicylic acid;mesalamine", "Nc1ccc(O)c(c1)C(O)=O"),
  solute(
    "itaconic acid",
    "C5H6O4",
    "97-65-4",
    "methylenesuccinic acid;2-methylidenebutanedioic acid",
    "OC(=O)CC(=C)C(O)=O",
  ),
  solute("palmitic acid", "C16H32O2", "57-10-3", "hexadecanoic acid", "CCCCCCCCCCCCCCCC(O)=O"),
  solute("stearic acid", "C18H36O2", "57-11-4", "octadecanoic acid", "CCCCCCCCCCCCCCCCCC(O)=O"),
  solute("phenyl salicylate", "C13H10O3", "118-55-8", "salol;phenyl 2-hydroxybenzoate", "O=C(Oc1ccccc1)c1ccccc1O"),
  solute("2,4-dinitro-L-phenylalanine", "C9H9N3O6"),
  solute("quercetin", "C15H10O7", "117-39-5"),
  solute("beta-sitosterol", "C29H50O", "83-46-5", "24-ethylcholesterol"),
  solute("sucralose", "C12H19Cl3O8", "56038-13-2"),
  solute("omeprazole sulfide", "C17H19N3O2S", "73590-85-9", "ufiprazole"),
  solute("warfarin", "C19H16O4", "81-81-2"),
  solute("hydroquinone", "C6H6O2", "123-31-9", "1,4-dihydroxybenzene", "Oc1ccc(O)cc1"),
  solute("resorcinol", "C6H6O2", "108-46-3", "1,3-dihydroxybenzene", "Oc1cccc(O)c1"),
  solute("phthalic acid", "C8H6O4", "88-99-3", "benzene-1,2-dicarboxylic acid", "OC(=O)c1ccccc1C(O)=O"),
  solute("cinnamic acid", "C9H8O2", "140-10-3", "trans-cinnamic acid", "OC(=O)/C=C/c1ccccc1"),
  solute("L-valine", "C5H11NO2", "72-18-4", "Val;(S)-2-amino-3-methylbutanoic acid", "CC(C)[C@H](N)C(O)=O"),
  solute("L-leucine", "C6H13NO2", "61-90-5", "Leu", "CC(C)C[C@H](N)C(O)=O"),
  solute("L-histidine", "C6H9N3O2", "71-00-1", "His"),
  solute("D-fructose", "C6H12O6", "57-48-7", "fructose;levulose"),
];
