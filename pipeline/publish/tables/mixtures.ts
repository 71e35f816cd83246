import { type Edition, measurementId } from "../../records/edition.ts";
import type { MixtureDocument } from "../../records/generated/curves-json.ts";
import type { MixtureRow } from "../../records/generated/mixtures.ts";
import type { MixtureModel, NoMixtureModel } from "../../records/mixtures.ts";
import type { System } from "../../records/systems.ts";
import type { Loose } from "./account.ts";

/** Room temperature, K, near which the table tells the maximum of a mixture. */
const ROOM_K = 298.15;

/** Equation of a mixture's model in the letters of its coefficients. */
export function mixtureEquation({ coefficients, fitBasis }: Pick<MixtureModel, "coefficients" | "fitBasis">): string {
  const terms = ["J0", "J1 (w1 - w2)", "J2 (w1 - w2)^2"].slice(0, coefficients.length - 4);
  const excess = terms.length === 0 ? "" : ` + (w1 w2/T) (${terms.join(" + ")})`;
  return `${fitBasis} = w1 (A1 + B1/T) + w2 (A2 + B2/T)${excess}`;
}

const orNothing = (text: string) => (text === "" ? undefined : text);

/** What a row and a document share. */
function shared(model: MixtureModel) {
  const [low, high] = model.temperatureRangeK;
  const [from, to] = model.fractionRange;
  return {
    mixture: model.id,
    solute: model.solute,
    solid_form: model.solidForm,
    first_solvent: model.solvents[0],
    second_solvent: model.solvents[1],
    medium: orNothing(model.medium),
    model: "Jouyban-Acree-van 't Hoff" as const,
    equation: mixtureEquation(model),
    fit_basis: model.fitBasis,
    ...{ w1_min: from, w1_max: to, T_min_K: low, T_max_K: high },
    ...{ n: model.n, n_compositions: model.nCompositions, n_sources: model.nSources },
    ...{ rmsd_ln: model.rmsd, ard_percent: model.ardPercent },
    ...{ lack_of_fit_sd: model.lackOfFitSd, between_sd: model.betweenSd },
  };
}

/** Ids of systems, `; ` between them. */
function systemIds({ systems }: Edition, indices: readonly number[]): string {
  return indices.map((index) => systems[index]?.id ?? "").join("; ");
}

function rowOf(edition: Edition, model: MixtureModel): Loose<MixtureRow> {
  const maximum = model.innerMaxima.reduce<MixtureModel["innerMaxima"][number] | undefined>(
    (near, one) =>
      near === undefined || Math.abs(one.temperatureK - ROOM_K) < Math.abs(near.temperatureK - ROOM_K) ? one : near,
    undefined,
  );
  const coefficients = model.coefficients.flatMap(({ name, value, standardUncertainty }) => [
    [name, value] as const,
    [`u_${name}`, standardUncertainty] as const,
  ]);
  return {
    ...shared(model),
    ...Object.fromEntries(coefficients),
    inner_maximum_w1: maximum?.fraction,
    inner_maximum_T_K: maximum?.temperatureK,
    systems: systemIds(
      edition,
      model.members.map(({ system }) => system),
    ),
    notices: orNothing(model.notices.join("; ")),
  } as Loose<MixtureRow>;
}

function rowWithout(edition: Edition, { id, solvents, systems, reason }: NoMixtureModel): Loose<MixtureRow> {
  const { identity, fitBasis } = edition.systems[systems[0] as number] as System;
  return {
    mixture: id,
    solute: identity.solute,
    solid_form: identity.solidForm,
    ...{ first_solvent: solvents[0], second_solvent: solvents[1], medium: orNothing(identity.medium) },
    ...{ no_model: reason, fit_basis: fitBasis, systems: systemIds(edition, systems) },
  } as Loose<MixtureRow>;
}

/** Rows of `mixtures.csv`, by id: every binary solvent of every solute, those without a model with the reason. */
export function mixtureRows(
  edition: Edition,
  models: readonly MixtureModel[],
  without: readonly NoMixtureModel[],
): Loose<MixtureRow>[] {
  const rows = [...models.map((model) => rowOf(edition, model)), ...without.map((one) => rowWithout(edition, one))];
  return rows.sort((a, b) => (a.mixture < b.mixture ? -1 : 1));
}

/** The models of mixtures as `curves.json` holds them. */
export function mixtureDocuments(edition: Edition, models: readonly MixtureModel[]): Loose<MixtureDocument>[] {
  return models.map((model) => {
    const p = model.coefficients.length;
    return {
      ...shared(model),
      coefficients: model.coefficients.map(({ name, value, standardUncertainty }) => ({
        ...{ name, value, standard_uncertainty: standardUncertainty },
      })),
      covariance: model.coefficients.map((_, i) => model.covariance.slice(i * p, (i + 1) * p)),
      between_sd_degrees_of_freedom: model.betweenDegreesOfFreedom,
      aicc: model.aicc.map((one) => (Number.isFinite(one) ? one : null)),
      domain: model.domain.map(({ fraction, temperatureK }) => [fraction, temperatureK]),
      members: model.members.map(({ system, fraction, nUsed, meanDeviation, leftOut, whyNot }) => ({
        ...{ system: edition.systems[system]?.id ?? "", w1: fraction, n_used: nUsed },
        mean_deviation_ln: Number.isNaN(meanDeviation) ? undefined : meanDeviation,
        left_out_deviation_ln: leftOut?.meanDeviation,
        left_out_sd: leftOut?.meanSd,
        why_not: whyNot,
      })),
      inner_maxima: model.innerMaxima.map((one) => ({
        ...{ temperature_K: one.temperatureK, w1: one.fraction, w1_low: one.fractionLow, w1_high: one.fractionHigh },
        ...{ ln_value: one.lnValue, rise_ln: one.rise, rise_half_width: one.riseHalfWidth },
      })),
      notices: [...model.notices],
      measurement_ids: usedIds(edition, model),
    } as unknown as Loose<MixtureDocument>;
  });
}

function usedIds(edition: Edition, { members }: MixtureModel): string[] {
  return members.flatMap(({ system, used }) =>
    Array.from(edition.fits[system]?.robust.points.row ?? []).flatMap((row, i) =>
      used[i] === 1 ? [measurementId(edition, row)] : [],
    ),
  );
}
