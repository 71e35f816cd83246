/** Where the published values come from: one entry an origin, with the reference as it can be looked up. */

/** What the card of a source says about its origin. */
export interface Origin {
  readonly source: string;
  readonly title: string;
  readonly origin: "handbook" | "literature" | "open-dataset";
  /** Who stands behind the numbers, so that two tables of one compiler do not count as two. */
  readonly compiler: string;
  readonly reference: string;
  readonly doi: string | null;
  readonly licence: string;
}

const FACTS = "published values, quoted as facts with their reference";
const CRC = "J. R. Rumble (ed.), CRC Handbook of Chemistry and Physics, 98th ed., CRC Press 2017, table";
const COPY = "read in a public copy (chicolucio/solutions), the printed table was not seen";
const MOHOS = "F. A. Mohos, Confectionery and Chocolate Engineering, 2010, Table";
const MEMORY = "from memory, not verified against the source";

function origin(
  source: string,
  kind: Origin["origin"],
  compiler: string,
  title: string,
  reference: string,
  doi: string | null = null,
  licence = FACTS,
): Origin {
  return { source, origin: kind, compiler, title, reference, doi, licence };
}

/** Every origin of the collection, by the code that the reference tables use for it. */
export const ORIGINS = {
  CRC98: origin(
    "handbook-crc98-mass-percent",
    "handbook",
    "CRC Handbook",
    "Aqueous solubility of inorganic compounds at various temperatures, mass % anhydrous",
    `${CRC} Aqueous Solubility of Inorganic Compounds at Various Temperatures; ${COPY}`,
  ),
  "CRC98-molality": origin(
    "handbook-crc98-molality",
    "handbook",
    "CRC Handbook",
    "Solubility of common salts at ambient temperatures, mol/kg water",
    `${CRC} Solubility of Common Salts at Ambient Temperatures; ${COPY}`,
  ),
  "TEXTBOOK-A": origin(
    "teaching-table-a",
    "open-dataset",
    "teaching data set A",
    "Teaching data set of salts and sucrose in water, g/100 g water",
    "Teaching data set in a public repository that names the CRC Handbook and various references; original of each row not known",
  ),
  "TEXTBOOK-B": origin(
    "teaching-table-b",
    "open-dataset",
    "teaching data set B",
    "Short teaching table, English, g/100 g water",
    "Short table in a public teaching repository (English); original not known",
  ),
  "TEXTBOOK-C": origin(
    "teaching-table-c",
    "open-dataset",
    "teaching data set C",
    "Short teaching table, Czech, g/100 g water",
    "Short table in a public teaching repository (Czech); original not known",
  ),
  "WIKIPEDIA-TABLE": origin(
    "encyclopedia-solubility-table",
    "open-dataset",
    "Wikipedia, Solubility table",
    "Encyclopedia solubility table, selection, g/100 g water",
    `Wikipedia, Solubility table; some rows read as quoted in public files, the others ${MEMORY} (see the column obtained)`,
    null,
    "CC BY-SA; individual values quoted as facts",
  ),
  "SIGMA-ALDRICH-TABLE": origin(
    "supplier-solubility-table",
    "handbook",
    "supplier's table",
    "Supplier's table of compounds in water at temperature, first part, g/100 g water",
    "Solubility Table of Compounds in Water at Temperature, sigmaaldrich.com (letter A only)",
  ),
  "PERRY-2-122": origin(
    "handbook-perry-2-122",
    "handbook",
    "Perry's handbook",
    "Fragment of a chemical engineers' table, g/100 g water",
    "Perry's Chemical Engineers' Handbook, Table 2-122, fragment; columns re-aligned by hand, treat as weak",
  ),
  "SALT-INSTITUTE": origin(
    "brine-table-salt-institute",
    "handbook",
    "Salt Institute",
    "Saturated brine, -21 to 109 °C, mass %",
    "Salt Institute, chemical properties page (saltinstitute.org/About-salt/Chemical-properties)",
  ),
  ANTOKOLSKAYA: origin(
    "literature-antokolskaya-1964",
    "literature",
    "Antokolskaya",
    "Sucrose in water, g/100 g water",
    `Antokolskaya 1964 as reprinted in ${MOHOS} A2.2`,
  ),
  SOKOLOVSKY: origin(
    "literature-sokolovsky-1958",
    "literature",
    "Sokolovsky",
    "Sucrose in water, mass %",
    `Sokolovsky 1958 as reprinted in ${MOHOS} A2.3 (mass % column)`,
  ),
  "K-MASHZAVOD": origin(
    "sugar-engineering-page",
    "handbook",
    "sugar engineering page",
    "Sucrose in water, 0 to 140 °C, mass %",
    "Sugar engineering page k-mashzavod.narod.ru/SvoystvaSaharozi5.htm (mass % column)",
  ),
  GRANBERG: origin(
    "literature-granberg-1999",
    "literature",
    "Granberg and Rasmuson",
    "Paracetamol in water, g/kg water",
    `R. A. Granberg, Å. C. Rasmuson, J. Chem. Eng. Data 44 (1999) 1391-1395; water row ${MEMORY}`,
  ),
  ENCYCLOPEDIA: origin(
    "encyclopedia-organic-pages",
    "open-dataset",
    "Wikipedia, pages of the compounds",
    "Organic compounds and boric acid in water, from their encyclopedia pages, units as printed",
    `Wikipedia, the page of each compound; ${MEMORY}`,
    null,
    "CC BY-SA; individual values quoted as facts",
  ),
  RECALLED: origin(
    "handbook-organics-recalled",
    "handbook",
    "older handbooks, recalled",
    "Organic compounds in water, from older handbooks, units as recalled",
    `Tables of the kind of Seidell, Merck Index, Kirk-Othmer and CRC; ${MEMORY}`,
  ),
  "BIGSOLDB-2": origin(
    "open-organics-mole-fraction",
    "open-dataset",
    "BigSolDB 2.0",
    "Organic solids in ethanol and methanol, mole fraction, each row with the doi of its paper",
    "L. Krasnov, D. Malikov, M. Kiseleva et al., Sci. Data 12 (2025) 1236 (Zenodo 10.5281/zenodo.15094979); rows read there, not in the papers",
    "10.1038/s41597-025-05559-8",
    "see the licence of the data set (Zenodo 10.5281/zenodo.15094979)",
  ),
  "ARTEMISININ-2006": origin(
    "literature-artemisinin-2006",
    "literature",
    "authors of je0603426",
    "Artemisinin in ethanol, the older of two papers that disagree by a factor of two, mole fraction",
    "J. Chem. Eng. Data, doi 10.1021/je0603426; rows read in BigSolDB 2.0 (doi 10.1038/s41597-025-05559-8), not in the paper",
    "10.1021/je0603426",
    "see the licence of the data set (Zenodo 10.5281/zenodo.15094979)",
  ),
} as const satisfies Record<string, Origin>;

/** Code of an origin. */
export type OriginCode = keyof typeof ORIGINS;
