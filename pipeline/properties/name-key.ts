const GREEK: ReadonlyMap<string, string> = new Map([
  ["α", "alpha"],
  ["β", "beta"],
  ["γ", "gamma"],
  ["δ", "delta"],
  ["ε", "epsilon"],
  ["ω", "omega"],
  ["μ", "mu"],
  ["κ", "kappa"],
  ["λ", "lambda"],
]);

const PLAIN = /^[A-Za-z\d()[\],.'+ -]*$/;

/**
 * The key under which names are compared: compatibility characters folded (NFKC), lower case, no blanks or invisible
 * characters, every dash a hyphen, primes and quotes an apostrophe, Greek letters spelled out, the dots of crystal
 * water a full stop. `α‑D‑Glucose` and `alpha-D-glucose` have one key; names that differ in a digit or hyphen do not.
 */
export function nameKey(name: string): string {
  // Most names are plain: the long way round would only cost time.
  if (PLAIN.test(name) && !name.includes(" x")) return name.toLowerCase().replaceAll(" ", "");
  return name
    .normalize("NFKC")
    .replace(/[\p{Cf}\p{Cc}]/gu, "")
    .toLowerCase()
    .replace(/[‐‑‒–—−﹣－]/g, "-")
    .replace(/[′’‘ʹ`´]/g, "'")
    .replace(/[″“”]/g, '"')
    .replace(/(?<=[a-z\d)\]])\s*[·•∙⋅*]\s*(?=[\d.]*[a-z(])/g, ".")
    .replace(/(?<=[a-z\d)\]])\s+[x×]\s*(?=[\d.]*\s*h2o)/g, ".")
    .replace(/[α-ω]/g, (letter) => GREEK.get(letter) ?? letter)
    .replace(/\s+/g, "");
}
