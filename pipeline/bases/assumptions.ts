import type { Link } from "./link.ts";
import type { Needs } from "./needs.ts";
import type { SolutionDensity } from "./solution-density.ts";
import type { Unit } from "./unit.ts";

function percent(fraction: number): string {
  return `${Number((100 * fraction).toPrecision(2))} %`;
}

function densityAssumption(model: SolutionDensity): string | undefined {
  switch (model.kind) {
    case "measured":
      return undefined;
    case "additive volumes": {
      const { value, standardUncertainty } = model.apparentSoluteDensity;
      const rounded = `${Number(value.toPrecision(4))} kg/m3, u ${Number(standardUncertainty.toPrecision(2))} kg/m3`;
      const apparent = `apparent density of the solute ${rounded}`;
      const u = model.modelRelativeUncertainty;
      return `solution density by additive volumes, ${apparent}${u === undefined ? "" : `; u ${percent(u)} of the density`}`;
    }
    case "density function":
      return `solution density after ${model.name}, u ${percent(model.relativeUncertainty)}`;
  }
}

function ofOneWay(unit: Unit, needs: Needs, link: Link): readonly (string | undefined)[] {
  const perSolventVolume = link.basis === "mass per volume of solvent" || link.basis === "amount per volume of solvent";
  const perSolutionVolume =
    link.basis === "mass per volume of solution" || link.basis === "amount per volume of solution";
  return [
    unit.assumption,
    unit.namedSolvent === undefined ? undefined : `${unit.canonical} names ${unit.namedSolvent} as its solvent`,
    perSolventVolume && needs.solventDensityAtVolumeTemperature === undefined
      ? "volume of solvent taken at 20 °C"
      : undefined,
    perSolutionVolume && needs.solventDensityAtVolumeTemperature === undefined
      ? "volume of solution taken at the measuring temperature"
      : undefined,
    perSolutionVolume && needs.solutionDensity !== undefined ? densityAssumption(needs.solutionDensity) : undefined,
    link.soluteBasis === "anhydrous" ? undefined : `solute weighed as ${link.soluteBasis}`,
  ];
}

/** What a conversion assumes, in words, source before target, each said once. */
export function assumptionsOf(
  from: Unit,
  needs: Needs,
  source: Link,
  to: Unit,
  targetNeeds: Needs,
  target: Link,
): readonly string[] {
  const all = [...ofOneWay(from, needs, source), ...ofOneWay(to, targetNeeds, target)];
  return Array.from(new Set(all.filter((text) => text !== undefined)));
}
