/** A text of the shape of an InChIKey. */
export interface Inchikey {
  readonly ok: true;
  readonly inchikey: string;
  /** First block: the same for all stereoisomers and isotopologues of one skeleton. */
  readonly skeleton: string;
  readonly standard: boolean;
}

/** Why a text is not an InChIKey. */
export interface InchikeyFault {
  readonly ok: false;
  readonly message: string;
}

/**
 * Reads an InChIKey by its shape: 14 letters (connectivity), 8 letters (stereo, isotopes) with the flag S or N and the
 * version A, 1 letter (protonation). There is no check digit: a mistyped letter cannot be found.
 *
 * @see S. R. Heller et al., InChI, the IUPAC International Chemical Identifier, J. Cheminform. 7 (2015) 23.
 */
export function readInchikey(text: string): Inchikey | InchikeyFault {
  const folded = text.trim().replace(/^InChIKey=/i, "");
  if (/^InChI=/i.test(folded)) return { ok: false, message: "an InChI, not an InChIKey" };
  const shape = /^([A-Z]{14})-[A-Z]{8}([SN])A-[A-Z]$/.exec(folded);
  if (shape !== null) {
    return { ok: true, inchikey: folded, skeleton: shape[1] ?? "", standard: shape[2] === "S" };
  }
  const upper = folded.toUpperCase();
  if (upper !== folded && readInchikey(upper).ok) return { ok: false, message: "an InChIKey is written in capitals" };
  return {
    ok: false,
    message:
      "not of the shape of an InChIKey: 14, 10 and 1 capital letters joined by hyphens, the second group ending in SA or NA",
  };
}
