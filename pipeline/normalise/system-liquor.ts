import { massConcentration } from "../bases/solution-density.ts";
import type { SolidForm } from "../properties/substances.ts";
import type { Liquor } from "../records/edition.ts";
import type { Identified, SolventPart } from "../records/identified.ts";
import type { Identity } from "../records/systems.ts";
import type { LiquorModel } from "./liquor.ts";

/** Hazard words that a planning table repeats. */
const MARKED = /oxidis|energetic|peroxide|explos/i;

/**
 * The solvate stable at a temperature among those of a solute in this solvent: the first whose transition lies above.
 * `undefined` where none is; "open" where several could be, none of them with a known transition.
 */
function stableSolvate(forms: readonly SolidForm[], temperatureK: number): SolidForm | "open" | undefined {
  const reach = (form: SolidForm) => form.transitionK ?? Number.POSITIVE_INFINITY;
  const able = forms.filter((form) => reach(form) > temperatureK).sort((a, b) => reach(a) - reach(b));
  const [first, second] = able;
  return first !== undefined && second !== undefined && reach(first) === reach(second) ? "open" : first;
}

/** Properties of the azeotrope of a solvent with water. */
const AZEOTROPE = "azeotrope_with_water_boiling_point";

/** Boiling point where boiling can begin, K: that of the lowest boiler, or of a listed azeotrope with water. */
function lowestBoilingPoint(parts: readonly SolventPart[]): number {
  const water = parts.some(({ substance }) => substance.name === "water");
  const points = parts.flatMap(({ substance }) => [
    substance.boilingPointK ?? Number.NaN,
    (water && substance.properties.get(AZEOTROPE)?.value) || Number.POSITIVE_INFINITY,
  ]);
  return Math.min(...points);
}

/** Lowest of the freezing points of the components, K: a mixture freezes below its own, how far is not known. */
function lowestFreezingPoint(parts: readonly SolventPart[]): number {
  return Math.min(...parts.map(({ substance }) => substance.meltingPointK ?? Number.NaN));
}

/** What the writers need to know of a system's liquor, with every density evaluated inside its range only. */
export function systemLiquor(who: Identified, identity: Identity, model: LiquorModel): Liquor {
  const { solute, solvent, form, crystalMassFactor } = who;
  const unspecified = identity.solidForm === "unspecified";
  const solvates = (solute?.solidForms ?? []).filter(
    ({ kind, guest }) =>
      (kind === "hydrate" || kind === "solvate") && identity.solventComponents.some(({ name }) => name === guest),
  );
  const polymorphs = (solute?.solidForms ?? []).filter(({ kind }) => kind === "polymorph");
  const factor = ({ molarMass }: SolidForm) => (molarMass ?? Number.NaN) / identity.soluteMolarMass;
  const transitions = unspecified ? solvates.map(({ transitionK }) => transitionK) : [form?.transitionK];
  return {
    massConcentration: (massRatio, temperatureK) => {
      model.setConditions(temperatureK, Number.NaN, Number.NaN);
      const density = model.needs.solutionDensity;
      return density === undefined ? Number.NaN : massConcentration(density, massRatio);
    },
    solventDensity20C: model.needs.solventDensityAt20C?.value ?? Number.NaN,
    solventBoilingPointK: lowestBoilingPoint(solvent.parts),
    solventHighestBoilingPointK: Math.max(
      ...solvent.parts.map(({ substance }) => substance.boilingPointK ?? Number.NaN),
    ),
    solventFreezingPointK: lowestFreezingPoint(solvent.parts),
    formMeltingPointK: form?.meltingPointK ?? (unspecified ? (solute?.meltingPointK ?? Number.NaN) : Number.NaN),
    formFusionEnthalpy: form?.fusionEnthalpy ?? (unspecified ? (solute?.fusionEnthalpy ?? Number.NaN) : Number.NaN),
    electrolyte: solute?.electrolyte ?? false,
    solvated: who.solvated,
    meltingOfSameForm: unspecified ? polymorphs.length < 2 && solvates.length === 0 : form?.meltingPointK !== undefined,
    crystalAt: (temperatureK) => {
      if (!unspecified) {
        return Number.isNaN(crystalMassFactor)
          ? undefined
          : { form: identity.solidForm, massFactor: crystalMassFactor };
      }
      // Transitions are those in the pure solvent: in a mixture the activity of the guest moves them, nobody knows where.
      const mixed = identity.solventComponents.length > 1 && solvates.length > 0;
      const stable = mixed ? "open" : stableSolvate(solvates, temperatureK);
      if (stable === "open") return undefined;
      if (stable === undefined) return { form: "unspecified", massFactor: 1 };
      return Number.isNaN(factor(stable)) ? undefined : { form: stable.form, massFactor: factor(stable) };
    },
    transitionsK: transitions.filter((t) => t !== undefined),
    hazards: [
      ...(solute?.hazards ?? []).filter((word) => MARKED.test(word)).map((word) => `solute: ${word}`),
      ...new Set(
        solvent.parts
          .flatMap(({ substance }) => substance.hazards)
          .filter((word) => MARKED.test(word))
          .map((word) => `solvent: ${word}`),
      ),
    ],
  };
}
