import { molalityEdge, moleFractionEdge, moleRatioEdge } from "./by-amount.ts";
import { massFractionEdge, massRatioEdge } from "./by-mass.ts";
import {
  amountConcentrationEdge,
  amountPerSolventVolumeEdge,
  massConcentrationEdge,
  massPerSolventVolumeEdge,
} from "./by-volume.ts";
import { type Edge, missingOf } from "./edge.ts";
import {
  addedSolventFromRatio,
  equivalentFromRatio,
  ratioFromAddedSolvent,
  ratioFromEquivalent,
  type SoluteBasis,
} from "./hydrate.ts";
import { crystalMolarMassInput, type Input, type Needs, numberIn, soluteMolarMassInput } from "./needs.ts";
import type { Basis } from "./unit.ts";

const edges: Readonly<Record<Basis, Edge>> = {
  "mass ratio": massRatioEdge,
  "mass fraction": massFractionEdge,
  "mass per volume of solvent": massPerSolventVolumeEdge,
  "mass per volume of solution": massConcentrationEdge,
  "mole fraction": moleFractionEdge,
  "mole ratio": moleRatioEdge,
  "amount per mass of solvent": molalityEdge,
  "amount per volume of solvent": amountPerSolventVolumeEdge,
  "amount per volume of solution": amountConcentrationEdge,
};

/** Every basis of the conversion graph. */
export const everyBasis: readonly Basis[] = Object.values(edges).map((edge) => edge.basis);

/** An edge together with what its solute is weighed as: the whole way from a basis quantity to the hub and back. */
export interface Link extends Edge {
  readonly soluteBasis: SoluteBasis;
}

/** R = M(crystal)/M(unsolvated solute). */
const crystalRatio = (needs: Needs) => numberIn(needs.crystalMolarMass) / numberIn(needs.soluteMolarMass);

/** The inputs that carry d ln r/d ln R: the two molar masses of R, of opposite sign. */
function crystalInputs(ratioElasticity: Input["elasticity"]): readonly Input[] {
  return [crystalMolarMassInput(ratioElasticity), soluteMolarMassInput((r, needs) => -ratioElasticity(r, needs))];
}

function missingWithCrystal(edge: Edge): Edge["missing"] {
  return (needs) =>
    Array.from(
      new Set([
        ...edge.missing(needs),
        ...missingOf(
          ["molar mass of the solute", needs.soluteMolarMass],
          ["molar mass of the crystal", needs.crystalMolarMass],
        ),
      ]),
    );
}

/** Crystal weighed per solution: the unsolvated solute is 1/R of the reported mass. */
function crystalPerSolution(edge: Edge, soluteBasis: SoluteBasis): Link {
  return {
    ...edge,
    soluteBasis,
    toHubEquation: `${edge.symbol} = ${edge.symbol}(crystal)/R; ${edge.toHubEquation}`,
    fromHubEquation: `${edge.fromHubEquation}; ${edge.symbol}(crystal) = R ${edge.symbol}`,
    missing: missingWithCrystal(edge),
    toHub: (quantity, needs) => edge.toHub(quantity / crystalRatio(needs), needs),
    fromHub: (r, needs) => edge.fromHub(r, needs) * crystalRatio(needs),
    inputs: [...edge.inputs, ...crystalInputs((r, needs) => -edge.valueElasticity(r, needs))],
  };
}

/** Crystal equivalent weighed per total solvent: r = e/R. */
function crystalPerTotalSolvent(edge: Edge): Link {
  return {
    ...edge,
    soluteBasis: "hydrate equivalent per total solvent",
    toHubEquation: `e by ${edge.toHubEquation.replace(/^r/, "e")}; r = e/R`,
    fromHubEquation: `e = r R; ${edge.fromHubEquation} with e for r`,
    missing: missingWithCrystal(edge),
    toHub: (quantity, needs) => ratioFromEquivalent(edge.toHub(quantity, needs), crystalRatio(needs)),
    fromHub: (r, needs) => edge.fromHub(equivalentFromRatio(r, crystalRatio(needs)), needs),
    inputs: [...edge.inputs, ...crystalInputs(() => -1)],
  };
}

/** d ln a/d ln r = 1/(1 - r (R - 1)), so everything upstream of a reaches r through this factor. */
const addedShare = (r: number, needs: Needs) => 1 - r * (crystalRatio(needs) - 1);

function throughAddedSolvent(
  edge: Edge,
  upstream: (r: number, needs: Needs) => number,
): Pick<Link, "valueElasticity" | "inputs"> {
  return {
    valueElasticity: (r, needs) => addedShare(r, needs) * edge.valueElasticity(upstream(r, needs), needs),
    inputs: edge.inputs.map((input) => ({
      ...input,
      quantity: (needs, r) => input.quantity(needs, upstream(r, needs)),
      elasticity: (r, needs) => addedShare(r, needs) * input.elasticity(upstream(r, needs), needs),
    })),
  };
}

/** Crystal weighed per solvent added: r = a/(R + a (R - 1)), d ln r/d ln R = -(1 + r). */
function crystalMassPerAddedSolvent(edge: Edge): Link {
  const upstream = (r: number, needs: Needs) => addedSolventFromRatio(r, crystalRatio(needs));
  const chained = throughAddedSolvent(edge, upstream);
  return {
    ...edge,
    soluteBasis: "hydrate per added solvent",
    toHubEquation: `a by ${edge.toHubEquation.replace(/^r/, "a")}; r = a/(R + a (R - 1))`,
    fromHubEquation: `a = r R/(1 - r (R - 1)); ${edge.fromHubEquation} with a for r`,
    missing: missingWithCrystal(edge),
    toHub: (quantity, needs) => ratioFromAddedSolvent(edge.toHub(quantity, needs), crystalRatio(needs)),
    fromHub: (r, needs) => edge.fromHub(upstream(r, needs), needs),
    valueElasticity: chained.valueElasticity,
    inputs: [...chained.inputs, ...crystalInputs((r) => -(1 + r))],
  };
}

/**
 * Crystal counted in moles per solvent added. One formula unit of crystal holds one of solute, so the edge gives
 * r' = a/R, g unsolvated solute per g solvent added, and r = r'/(1 + r' (R - 1)), d ln r/d ln R = -r R.
 */
function crystalAmountPerAddedSolvent(edge: Edge): Link {
  const upstream = (r: number, needs: Needs) => addedSolventFromRatio(r, crystalRatio(needs)) / crystalRatio(needs);
  const chained = throughAddedSolvent(edge, upstream);
  return {
    ...edge,
    soluteBasis: "hydrate per added solvent",
    toHubEquation: `a/R by ${edge.toHubEquation.replace(/^r/, "a/R")}; r = a/(R + a (R - 1))`,
    fromHubEquation: `a = r R/(1 - r (R - 1)); ${edge.fromHubEquation} with a/R for r`,
    missing: missingWithCrystal(edge),
    toHub: (quantity, needs) => {
      const R = crystalRatio(needs);
      return ratioFromAddedSolvent(edge.toHub(quantity, needs) * R, R);
    },
    fromHub: (r, needs) => edge.fromHub(upstream(r, needs), needs),
    valueElasticity: chained.valueElasticity,
    inputs: [...chained.inputs, ...crystalInputs((r, needs) => -r * crystalRatio(needs))],
  };
}

function buildLink(edge: Edge, soluteBasis: SoluteBasis): Link {
  if (soluteBasis === "anhydrous") return { ...edge, soluteBasis };
  // A formula unit of crystal per solution or per total solvent is a formula unit of solute: nothing to convert.
  if (edge.counts === "amount" && (edge.per === "solution" || soluteBasis !== "hydrate per added solvent"))
    return { ...edge, soluteBasis };
  if (edge.per === "solution") return crystalPerSolution(edge, soluteBasis);
  if (soluteBasis === "hydrate equivalent per total solvent") return crystalPerTotalSolvent(edge);
  return edge.counts === "mass" ? crystalMassPerAddedSolvent(edge) : crystalAmountPerAddedSolvent(edge);
}

const soluteBases: readonly SoluteBasis[] = [
  "anhydrous",
  "hydrate per added solvent",
  "hydrate equivalent per total solvent",
];

const links: ReadonlyMap<SoluteBasis, ReadonlyMap<Basis, Link>> = new Map(
  soluteBases.map((soluteBasis) => [
    soluteBasis,
    new Map(everyBasis.map((basis) => [basis, buildLink(edges[basis], soluteBasis)])),
  ]),
);

/**
 * The way between a basis and the hub for a solute weighed as `soluteBasis`. On per-solution bases both hydrate
 * readings mean the same: the mass of hydrate.
 */
export function linkOf(basis: Basis, soluteBasis: SoluteBasis = "anhydrous"): Link {
  const link = links.get(soluteBasis)?.get(basis);
  if (link === undefined) throw new RangeError(`linkOf knows no basis "${basis}" with solute basis "${soluteBasis}"`);
  return link;
}

/**
 * Whether a hydrate or solvate reported on this basis has several readings: `three readings` of a mass per solvent,
 * `added or total solvent` of an amount per solvent, `hydrate or anhydrous mass` per solution, `none` for an amount per
 * solution, where one formula unit of hydrate is one of solute.
 */
export function hydrateReadingsOf(
  basis: Basis,
): "three readings" | "added or total solvent" | "hydrate or anhydrous mass" | "none" {
  const edge = edges[basis];
  if (edge.per === "solvent") return edge.counts === "mass" ? "three readings" : "added or total solvent";
  return edge.counts === "mass" ? "hydrate or anhydrous mass" : "none";
}
