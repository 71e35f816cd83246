import type { Edition } from "../../records/edition.ts";
import type { CampReading, Curve, CurveWithout, SourceStanding } from "../../records/fits.ts";
import type { CurveDisagreement, CurveReading, CurveSource } from "../../records/generated/curves-json.ts";

const finite = (value: number): number | undefined => (Number.isFinite(value) ? value : undefined);
const nameOf = (edition: Edition, source: number): string => edition.sources[source]?.name ?? "";

function withoutDocument({
  model,
  coefficients,
  temperatureRangeK,
  n,
  nSources,
}: CurveWithout): CurveSource["without"] {
  const [low, high] = temperatureRangeK;
  return { model, coefficients: [...coefficients], T_min_K: low, T_max_K: high, n, n_sources: nSources };
}

function sourceDocument(edition: Edition, standing: SourceStanding) {
  const { source, n, compared, offset, low, high, influence, without } = standing;
  return {
    ...{ source: nameOf(edition, source), n, compared },
    ...{ offset_ln: finite(offset), offset_low: finite(low), offset_high: finite(high) },
    influence_ln: finite(influence),
    without: without && withoutDocument(without),
  };
}

/** The part of a curve's document that tells how its sources stand to one another; nothing where there is one source. */
export function sourcesOfCurve(edition: Edition, { system, branch }: Curve) {
  const standings = edition.fits[system]?.standings?.().filter((standing) => standing.branch === branch) ?? [];
  return standings.length === 0 ? {} : { sources: standings.map((standing) => sourceDocument(edition, standing)) };
}

function readingDocument(edition: Edition, { sources, curve }: CampReading): CurveReading {
  const names = sources.map((source) => nameOf(edition, source));
  if (curve === undefined) return { sources: names };
  const [low, high] = curve.temperatureRangeK;
  const coefficients = curve.coefficients.map(({ name, value }) => ({ name, value }));
  const { model, n } = curve;
  return { sources: names, model, coefficients, T_min_K: low, T_max_K: high, n };
}

/** Systems whose sources disagree without a majority, each with every reading. */
export function disagreements(edition: Edition): CurveDisagreement[] {
  return edition.systems.flatMap(({ index, id, fitBasis }) => {
    const readings = edition.fits[index]?.campReadings ?? [];
    if (readings.length < 2) return [];
    const [first, second, ...more] = readings.map((reading) => readingDocument(edition, reading));
    return [{ system: id, fit_basis: fitBasis, readings: [first as CurveReading, second as CurveReading, ...more] }];
  });
}
