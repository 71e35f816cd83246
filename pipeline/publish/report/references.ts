import { type Html, html, raw } from "./html.ts";

/** A publication that a method rests on; `verified` is false where it is cited from memory. */
interface Reference {
  readonly text: string;
  readonly verified: boolean;
}

const cited = (text: string): Reference => ({ text, verified: true });
const fromMemory = (text: string): Reference => ({ text, verified: false });

/** References by key, in the order of the list. */
const REFERENCES = {
  greenBook: cited("IUPAC, Quantities, Units and Symbols in Physical Chemistry, 3rd ed. (2007), section 2.10."),
  atomicWeights: cited(
    "T. Prohaska et al., Standard atomic weights of the elements 2021, Pure Appl. Chem. 94 (2022) 573-600.",
  ),
  gum: cited("JCGM 100:2008, Evaluation of measurement data: guide to the expression of uncertainty in measurement."),
  water: cited("M. Tanaka et al., Metrologia 38 (2001) 301-309."),
  salts: cited(
    "M. Laliberté, W. E. Cooper, J. Chem. Eng. Data 49 (2004) 1141-1151; M. Laliberté, ibid. 54 (2009) 1725-1760.",
  ),
  alcohol: cited("OIML R 22, International Alcoholometric Tables (1975)."),
  pharmacopoeia: cited("USP General Notices 5.30; European Pharmacopoeia 1.4."),
  grant: fromMemory("D. J. W. Grant, M. Mehdizadeh, A. H.-L. Chow, J. E. Fairbrother, Int. J. Pharm. 18 (1984) 25-38."),
  apelblat: cited("A. Apelblat, E. Manzurola, J. Chem. Thermodyn. 31 (1999) 85-91."),
  buchowski: cited("H. Buchowski, A. Ksiazczak, S. Pietrzyk, J. Phys. Chem. 84 (1980) 975-979."),
  acree: fromMemory(
    "W. E. Acree, Thermochim. Acta 198 (1992) 71-79; A. Jouyban, J. Pharm. Pharm. Sci. 11 (2008) 32-58.",
  ),
  prausnitz: fromMemory(
    "J. M. Prausnitz, R. N. Lichtenthaler, E. Gomes de Azevedo, Molecular Thermodynamics of Fluid-Phase Equilibria, 3rd ed. (1999), chapter 11; S. H. Neau, G. L. Flynn, Pharm. Res. 7 (1990) 1157-1162.",
  ),
  krug: cited("R. R. Krug, W. G. Hunter, R. A. Grieger, J. Phys. Chem. 80 (1976) 2335-2341."),
  orear: cited("J. Orear, Am. J. Phys. 50 (1982) 912-916."),
  aicc: cited("C. M. Hurvich, C.-L. Tsai, Biometrika 76 (1989) 297-307."),
  burnham: cited(
    "K. P. Burnham, D. R. Anderson, Model Selection and Multimodel Inference, 2nd ed. (2002), section 2.6.",
  ),
  henderson: cited("C. R. Henderson, Biometrics 31 (1975) 423-447."),
  fellner: cited("W. H. Fellner, Technometrics 28 (1986) 51-60."),
  paule: cited("R. C. Paule, J. Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385."),
  smyth: cited("G. K. Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3."),
  satterthwaite: cited("F. E. Satterthwaite, Biometrics Bull. 2 (1946) 110-114."),
  benjamini: cited("Y. Benjamini, Y. Hochberg, J. R. Stat. Soc. B 57 (1995) 289-300."),
  series: fromMemory(
    "IUPAC Solubility Data Series (from 1979): compilation and critical evaluation of solubility data.",
  ),
} as const satisfies Record<string, Reference>;

type ReferenceKey = keyof typeof REFERENCES;

const NUMBERS = new Map(Object.keys(REFERENCES).map((key, i) => [key, i + 1]));

/** Numbers in brackets that lead to the list of references. */
export function cite(...keys: readonly ReferenceKey[]): Html {
  return html` [${keys.map((key, i) => html`${i > 0 ? ", " : ""}<a href="#ref-${NUMBERS.get(key)}">${NUMBERS.get(key)}</a>`)}]`;
}

/** The list of references, each with the anchor that citations lead to. */
export function referenceList(): Html {
  const entries = Object.values(REFERENCES).map(
    ({ text, verified }, i) =>
      html`<li id="ref-${i + 1}">${text}${verified ? "" : " (From memory, not verified.)"}</li>`,
  );
  return html`${raw('<ol class="references">')}${entries}</ol>`;
}
