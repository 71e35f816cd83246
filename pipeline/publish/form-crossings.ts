import { type ComparedCurve, type Crossing, comparedCurve, crossingOf } from "../curves/compare-curves.ts";
import type { Edition } from "../records/edition.ts";
import type { Curve, SystemFit } from "../records/fits.ts";
import type { CurveDocument } from "../records/generated/curves-json.ts";
import type { System } from "../records/systems.ts";

/** Name of the form of rows that name none. */
export const UNSPECIFIED = "unspecified";

/** A curve of a named form that crosses the one of another: their transition in this solvent. */
export interface FormCrossing extends Crossing {
  readonly first: Curve;
  readonly second: Curve;
}

/** A curve of an edition, ready to be compared with another. */
export function comparedCurveOf({ fits, table }: Edition, curve: Curve): ComparedCurve {
  return comparedCurve(curve, (fits[curve.system] as SystemFit).robust, table.sharedU);
}

/** Systems of named forms that have a curve, by family, in the edition's order. */
function namedByFamily({ systems, fits }: Edition): Map<string, System[]> {
  const families = new Map<string, System[]>();
  for (const system of systems) {
    if (system.identity.solidForm === UNSPECIFIED || (fits[system.index]?.curves.length ?? 0) === 0) continue;
    families.set(system.family, [...(families.get(system.family) ?? []), system]);
  }
  return families;
}

/** Most forms of one family whose curves are paired. */
const MOST_FORMS = 20;

/** Crossings of the curves of named forms of one family, by the id of each of the two curves. */
export function crossingsByCurve(edition: Edition): ReadonlyMap<string, readonly FormCrossing[]> {
  const found = new Map<string, FormCrossing[]>();
  const add = (curve: Curve, crossing: FormCrossing) =>
    found.set(curve.curveId, [...(found.get(curve.curveId) ?? []), crossing]);
  for (const members of namedByFamily(edition).values()) {
    const forms = members.slice(0, MOST_FORMS);
    forms.forEach((one, i) => {
      for (const other of forms.slice(i + 1)) {
        for (const crossing of crossingsBetween(edition, one, other)) {
          add(crossing.first, crossing);
          add(crossing.second, crossing);
        }
      }
    });
  }
  return found;
}

/** Crossings of the curves of two systems of one family; none where they are fitted on different bases. */
export function crossingsBetween(edition: Edition, one: System, other: System): FormCrossing[] {
  if (one.fitBasis !== other.fitBasis) return [];
  const curvesOf = ({ index }: System) => edition.fits[index]?.curves ?? [];
  return curvesOf(one).flatMap((first) =>
    curvesOf(other).flatMap((second) => {
      const crossing = crossingOf(comparedCurveOf(edition, first), comparedCurveOf(edition, second));
      return crossing === undefined ? [] : [{ ...crossing, first, second }];
    }),
  );
}

const crossingsOfEdition = new WeakMap<Edition, ReadonlyMap<string, readonly FormCrossing[]>>();

/** Crossings of one curve as `curves.json` lists them; nothing where it crosses none. */
export function crossingsPart(edition: Edition, curve: Curve): Pick<CurveDocument, "form_crossings"> {
  const known = crossingsOfEdition.get(edition) ?? crossingsByCurve(edition);
  crossingsOfEdition.set(edition, known);
  const found = known.get(curve.curveId);
  if (found === undefined) return {};
  return {
    form_crossings: found.map(({ first, second, temperatureK, lowK, highK, firstLowerWhenCold }) => ({
      other_curve_id: (first === curve ? second : first).curveId,
      temperature_K: temperatureK,
      ...(Number.isNaN(lowK) ? {} : { low_K: lowK }),
      ...(Number.isNaN(highK) ? {} : { high_K: highK }),
      stable_below: (firstLowerWhenCold ? first : second).curveId,
    })),
  };
}
