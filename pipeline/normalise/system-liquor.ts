import { massConcentration } from "../bases/solution-density.ts";
import type { SolidForm } from "../properties/substances.ts";
import type { Liquor } from "../records/edition.ts";
import type { Identified } from "../records/identified.ts";
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

/** What the writers need to know of a system's liquor, with every density evaluated inside its range only. */
export function systemLiquor(who: Identified, identity: Identity, model: LiquorModel): Liquor {
  const { solute, solvent, form, crystalMassFactor } = who;
  const unspecified = identity.solidForm === "unspecified";
  const solvates = (solute?.solidForms ?? []).filter(
    ({ kind, guest }) => (kind === "hydrate" || kind === "solvate") && guest === solvent.name,
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
    solventBoilingPointK: solvent.boilingPointK ?? Number.NaN,
    solventFreezingPointK: solvent.meltingPointK ?? Number.NaN,
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
      const stable = stableSolvate(solvates, temperatureK);
      if (stable === "open") return undefined;
      if (stable === undefined) return { form: "unspecified", massFactor: 1 };
      return Number.isNaN(factor(stable)) ? undefined : { form: stable.form, massFactor: factor(stable) };
    },
    transitionsK: transitions.filter((t) => t !== undefined),
    hazards: [
      ...(solute?.hazards ?? []).filter((word) => MARKED.test(word)).map((word) => `solute: ${word}`),
      ...solvent.hazards.filter((word) => MARKED.test(word)).map((word) => `solvent: ${word}`),
    ],
  };
}
