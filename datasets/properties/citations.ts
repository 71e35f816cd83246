/** What is said of a value that was not read in a source. */
export const MEMORY = "from memory, not verified";

/** Short human citations of the sources named in the reference files. */
const CITATIONS: ReadonlyArray<readonly [mark: RegExp, citation: string]> = [
  [/Physical Constants of (?:Org|Inorg)anic Compounds/, "CRC Handbook, Physical Constants (via chemicals)"],
  [/CRC Handbook Heat of Fusion/, "CRC Handbook, Enthalpy of Fusion (via chemicals)"],
  [/common_chemistry_data/, "CAS Common Chemistry (via chemicals)"],
  [/webbook_constants/, "NIST Chemistry WebBook (via chemicals)"],
  [/wikidata_properties/, "Wikidata (via chemicals)"],
  [/IEC 60079-20-1/, "IEC 60079-20-1:2010 (via chemicals)"],
  [/NFPA 497/, "NFPA 497:2008 (via chemicals)"],
  [/chemical identifiers|Inorganic db/, "identifier tables of chemicals"],
  [/from memory/, MEMORY],
];

/** Citation of a source text of the reference files. @throws Error for a source that has none. */
export function citation(source: string): string {
  const found = CITATIONS.find(([mark]) => mark.test(source));
  if (found === undefined) throw new Error(`no citation for the source "${source}"`);
  return found[1];
}

/** Joins remarks such as "melting point: CRC Handbook" into one reference cell; empty ones fall away. */
export function joinReferences(parts: readonly string[]): string {
  return parts.filter((part) => part !== "").join("; ");
}
