import { curate } from "../curate.ts";
import { problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { sourceLetter } from "../publish/report/figures.ts";
import { type SystemView, systemView } from "../publish/report/system-view.ts";
import { equationOf } from "../publish/tables/curves.ts";
import { readCollection } from "../read/collection.ts";
import { flagId } from "../records/edition.ts";
import type { System } from "../records/systems.ts";
import { findSystem } from "./find-system.ts";
import { textOf } from "./show-text.ts";
import { valuesOf } from "./shown-values.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

export interface ShowOptions extends CommonOptions {
  readonly version: string;
}

/** Systems suggested where none or several were meant. */
const SUGGESTED = 12;

/** `saltern show COLLECTION SYSTEM`: one system in the terminal, with a small plot, its curve, flags and who measured it. */
export async function show(dir: string, wanted: string, options: ShowOptions, terminal: Terminal): Promise<ExitCode> {
  const { edition, index } = await curate(await readCollection(dir), options.version, terminal.progress);
  const found = findSystem(edition.systems, wanted, index);
  if (found.system === undefined) throw notFound(dir, wanted, found);
  const { system } = found;
  const flags = edition.flags.filter((flag) => flag.system === system.index);
  const view = systemView(edition, system, flags);
  if (options.json) terminal.print(JSON.stringify(resultOf(view)));
  else for (const line of textOf(view)) terminal.print(line);
  return Exit.done;
}

function notFound(
  dir: string,
  wanted: string,
  { fitting, near }: { readonly fitting: readonly System[]; readonly near: readonly System[] },
): InputError {
  const listed = fitting.length > 0 ? fitting : near;
  const names = listed.slice(0, SUGGESTED).map(({ id }) => id);
  const more = listed.length > SUGGESTED ? ` and ${listed.length - SUGGESTED} more` : "";
  const found =
    fitting.length > 0
      ? `"${wanted}" fits ${fitting.length} systems: ${names.join(", ")}${more}`
      : `"${wanted}" is no system of this collection`;
  const mend =
    fitting.length > 0
      ? "give one of these ids"
      : names.length > 0
        ? `did you mean ${names.join(" or ")}?`
        : "the ids are in the column system of systems.csv and on the overview of the report";
  return new InputError(
    problem("bad-argument", { file: dir }, { found, expected: 'an id, a part of one, or "solute in solvent"', mend }),
  );
}

/** The system for scripts. */
function resultOf(view: SystemView): object {
  const { edition, system, fit, grade, sources, points, flags } = view;
  const { solute, solidForm, solvent, composition, medium } = system.identity;
  return {
    format: 1,
    collection: edition.collection.name,
    system: system.id,
    family: system.family,
    solute,
    solid_form: solidForm,
    solvent,
    composition,
    medium,
    grade: grade?.grade,
    reasons: grade?.reasons ?? [],
    sources: sources.map((source, i) => {
      const own = points.filter((point) => point.source === i);
      return {
        letter: sourceLetter(i),
        source: edition.sources[source]?.name,
        measurements: own.length,
        kept: own.filter(({ state }) => state === "kept").length,
      };
    }),
    curves: (fit?.curves ?? []).map((curve) => ({
      curve_id: curve.curveId,
      model: curve.model,
      equation: equationOf(curve),
      coefficients: curve.coefficients.map(({ name, value, standardUncertainty }) => ({
        name,
        value,
        standard_uncertainty: standardUncertainty,
      })),
      T_min_K: curve.temperatureRangeK[0],
      T_max_K: curve.temperatureRangeK[1],
      n: curve.n,
      ard_percent: curve.ardPercent,
      values: valuesOf(view, curve),
    })),
    ...(fit?.noCurve === undefined ? {} : { no_curve: fit.noCurve }),
    flags: flags.map((flag) => ({
      flag_id: flagId(edition, flag),
      severity: flag.severity,
      ...(flag.suspectedCause === undefined ? {} : { suspected_cause: flag.suspectedCause }),
      evidence: flag.evidence,
      look_at: flag.lookAt,
    })),
  };
}
