/** A standard atomic weight: value and published uncertainty [g/mol]. */
export interface AtomicWeight {
  readonly symbol: string;
  readonly value: number;
  /** As published: half of an interval that holds the atomic weight of any normal material. */
  readonly uncertainty: number;
}

/**
 * Standard atomic weights 2021 [g/mol]. The 14 elements with a published interval carry their abridged value with the
 * uncertainty that covers the interval. Elements without a standard atomic weight (technetium, radium ...) are absent.
 *
 * @see T. Prohaska et al., Standard atomic weights of the elements 2021, Pure Appl. Chem. 94 (2022) 573-600.
 */
const standardAtomicWeights: ReadonlyArray<readonly [symbol: string, value: number, uncertainty: number]> = [
  ["H", 1.008, 0.0002],
  ["He", 4.002602, 0.000002],
  ["Li", 6.94, 0.06],
  ["Be", 9.0121831, 0.0000005],
  ["B", 10.81, 0.02],
  ["C", 12.011, 0.002],
  ["N", 14.007, 0.001],
  ["O", 15.999, 0.001],
  ["F", 18.998403162, 0.000000005],
  ["Ne", 20.1797, 0.0006],
  ["Na", 22.98976928, 0.00000002],
  ["Mg", 24.305, 0.002],
  ["Al", 26.9815384, 0.0000003],
  ["Si", 28.085, 0.001],
  ["P", 30.973761998, 0.000000005],
  ["S", 32.06, 0.02],
  ["Cl", 35.45, 0.01],
  ["Ar", 39.95, 0.16],
  ["K", 39.0983, 0.0001],
  ["Ca", 40.078, 0.004],
  ["Sc", 44.955907, 0.000004],
  ["Ti", 47.867, 0.001],
  ["V", 50.9415, 0.0001],
  ["Cr", 51.9961, 0.0006],
  ["Mn", 54.938043, 0.000002],
  ["Fe", 55.845, 0.002],
  ["Co", 58.933194, 0.000003],
  ["Ni", 58.6934, 0.0004],
  ["Cu", 63.546, 0.003],
  ["Zn", 65.38, 0.02],
  ["Ga", 69.723, 0.001],
  ["Ge", 72.63, 0.008],
  ["As", 74.921595, 0.000006],
  ["Se", 78.971, 0.008],
  ["Br", 79.904, 0.003],
  ["Kr", 83.798, 0.002],
  ["Rb", 85.4678, 0.0003],
  ["Sr", 87.62, 0.01],
  ["Y", 88.905838, 0.000002],
  ["Zr", 91.224, 0.002],
  ["Nb", 92.90637, 0.00001],
  ["Mo", 95.95, 0.01],
  ["Ru", 101.07, 0.02],
  ["Rh", 102.90549, 0.00002],
  ["Pd", 106.42, 0.01],
  ["Ag", 107.8682, 0.0002],
  ["Cd", 112.414, 0.004],
  ["In", 114.818, 0.001],
  ["Sn", 118.71, 0.007],
  ["Sb", 121.76, 0.001],
  ["Te", 127.6, 0.03],
  ["I", 126.90447, 0.00003],
  ["Xe", 131.293, 0.006],
  ["Cs", 132.90545196, 0.00000006],
  ["Ba", 137.327, 0.007],
  ["La", 138.90547, 0.00007],
  ["Ce", 140.116, 0.001],
  ["Pr", 140.90766, 0.00001],
  ["Nd", 144.242, 0.003],
  ["Sm", 150.36, 0.02],
  ["Eu", 151.964, 0.001],
  ["Gd", 157.25, 0.03],
  ["Tb", 158.925354, 0.000007],
  ["Dy", 162.5, 0.001],
  ["Ho", 164.930329, 0.000005],
  ["Er", 167.259, 0.003],
  ["Tm", 168.934219, 0.000005],
  ["Yb", 173.045, 0.01],
  ["Lu", 174.9668, 0.0001],
  ["Hf", 178.486, 0.006],
  ["Ta", 180.94788, 0.00002],
  ["W", 183.84, 0.01],
  ["Re", 186.207, 0.001],
  ["Os", 190.23, 0.03],
  ["Ir", 192.217, 0.002],
  ["Pt", 195.084, 0.009],
  ["Au", 196.96657, 0.000004],
  ["Hg", 200.592, 0.003],
  ["Tl", 204.38, 0.01],
  ["Pb", 207.2, 1.1],
  ["Bi", 208.9804, 0.00001],
  ["Th", 232.0377, 0.0004],
  ["Pa", 231.03588, 0.00001],
  ["U", 238.02891, 0.00003],
];

/**
 * Isotopes of hydrogen with symbols of their own: atomic masses [g/mol], whose uncertainty is of no account here.
 *
 * @see M. Wang et al., The AME 2020 atomic mass evaluation, Chin. Phys. C 45 (2021) 030003.
 */
const hydrogenIsotopes: ReadonlyArray<readonly [symbol: string, value: number, uncertainty: number]> = [
  ["D", 2.014101778, 1e-9],
  ["T", 3.016049281, 1e-9],
];

/** Elements known by a symbol but without a standard atomic weight: the fault can then say why a formula is refused. */
const withoutStandardAtomicWeight =
  "Tc Pm Po At Rn Fr Ra Ac Np Pu Am Cm Bk Cf Es Fm Md No Lr Rf Db Sg Bh Hs Mt Ds Rg Cn Nh Fl Mc Lv Ts Og";

const weights: ReadonlyMap<string, AtomicWeight> = new Map(
  [...standardAtomicWeights, ...hydrogenIsotopes].map(([symbol, value, uncertainty]) => [
    symbol,
    { symbol, value, uncertainty },
  ]),
);

const weightless: ReadonlySet<string> = new Set(withoutStandardAtomicWeight.split(" "));

/** Every element (and D, T) that has an atomic weight here, in order of atomic number. */
export const knownElements: readonly string[] = [...weights.keys()];

/** Atomic weight [g/mol] of an element by its symbol, or of D (deuterium) or T (tritium); undefined if none is known. */
export function atomicWeight(symbol: string): AtomicWeight | undefined {
  return weights.get(symbol);
}

/** True for an element that has no standard atomic weight because it has no stable or long-lived nuclide. */
export function hasNoStandardAtomicWeight(symbol: string): boolean {
  return weightless.has(symbol);
}

/**
 * Standard uncertainty [g/mol] of an atomic weight: the published uncertainty is the half-width of a rectangular
 * distribution, so u = U/sqrt(3).
 *
 * @see A. Possolo, A. M. H. van der Veen, J. Meija, D. B. Hibbert, Pure Appl. Chem. 90 (2018) 395-424.
 */
export function standardUncertaintyOfAtomicWeight({ uncertainty }: AtomicWeight): number {
  return uncertainty / Math.sqrt(3);
}
