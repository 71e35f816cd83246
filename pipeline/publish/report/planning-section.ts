import type { PlanningCoolingRow } from "../../records/generated/planning-cooling.ts";
import { celsius, significant } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { wideTable } from "./page.ts";

const between = (low: number | undefined, high: number | undefined): string =>
  low === undefined || high === undefined ? "" : `${significant(low, 3)} to ${significant(high, 3)}`;

/** What a table plans, told apart from that of another branch by its ends. */
function titleOf({ T_hot_K: hot, T_cold_K: cold }: PlanningCoolingRow): string {
  const ends = hot === undefined || cold === undefined ? "" : `, ${celsius(hot)} to ${celsius(cold)} °C`;
  return `Cooling crystallisation${ends}`;
}

function coolingTable(row: PlanningCoolingRow): Html {
  const temperature = (kelvin: number | undefined) => (kelvin === undefined ? "" : `${celsius(kelvin)} °C`);
  const percent = (value: number | undefined) => (value === undefined ? "" : `${significant(value, 3)} %`);
  const lines: readonly (readonly [string, string, string])[] = [
    ["Solid that crystallises", row.crystal_form ?? "", ""],
    ["Hot end", temperature(row.T_hot_K), ""],
    ["Cold end", temperature(row.T_cold_K), ""],
    ["Solubility at the hot end, g/100 g solvent", significant(row.hot_g_per_100g_solvent, 4), ""],
    ["Solubility at the cold end, g/100 g solvent", significant(row.cold_g_per_100g_solvent, 4), ""],
    [
      "Highest recovery at equilibrium",
      percent(row.max_recovery_equilibrium_percent),
      between(row.max_recovery_equilibrium_percent_low, row.max_recovery_equilibrium_percent_high),
    ],
    [
      `Working recovery at ${significant(row.excess_solvent_percent, 2)} % more solvent`,
      percent(row.working_recovery_percent),
      "",
    ],
    ["Solvent at 20 °C to add, mL per g charged", significant(row.solvent_mL_per_g, 3), ""],
    ["Solids in the slurry at the cold end, by mass", percent(row.solids_cold_percent), ""],
    ["Lost to the mother liquor", percent(row.loss_to_liquor_percent), ""],
    ["Saturation temperature at the working volume", temperature(row.saturation_temperature_K), ""],
  ];
  const body = lines
    .filter(([, value]) => value !== "")
    .map(
      ([what, value, limits]) =>
        html`<tr><th scope="row">${what}</th><td class="n">${short(value, 80)}</td><td class="n">${limits}</td></tr>`,
    );
  return html`<table><caption>${titleOf(row)}</caption><thead><tr><th scope="col">Figure</th><th scope="col" class="n">Value</th><th scope="col" class="n">95 % limits</th></tr></thead><tbody>${body}</tbody></table>`;
}

function coolingPart(row: PlanningCoolingRow): Html {
  if (row.blank_reason !== undefined) return html`<p>Cooling crystallisation, no figures: ${row.blank_reason}.</p>`;
  return html`${wideTable(titleOf(row), coolingTable(row))}${row.cautions === undefined ? "" : html`<p><b>Caution:</b> ${short(row.cautions, 600)}.</p>`}`;
}

/** Planning figures of a system with their note; where data end, the reason instead of a figure. */
export function planningSection(cooling: readonly PlanningCoolingRow[]): Html {
  const note = cooling[0]?.note;
  if (note === undefined) return html``;
  return html`<h2 id="planning">Planning figures</h2><p>Holds for: ${note}.</p>${cooling.map(coolingPart)}`;
}
