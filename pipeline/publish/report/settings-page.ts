import type { Edition } from "../../records/edition.ts";
import { DEFAULT_SETTINGS } from "../../records/generated/collection.ts";
import { type Html, html, short } from "./html.ts";
import { page, wideTable } from "./page.ts";

/** Every setting as `group: name` with its value as text, in the order of the schema. */
function flattened(settings: object): Map<string, string> {
  const flat = new Map<string, string>();
  for (const [name, value] of Object.entries(settings)) {
    if (typeof value === "object" && value !== null && !Array.isArray(value)) {
      for (const [part, inner] of Object.entries(value)) flat.set(`${name}: ${part}`, String(inner));
    } else flat.set(name, Array.isArray(value) ? value.join(", ") || "none" : String(value));
  }
  return flat;
}

/** `temperature_window_K: low` as people read it: `temperature window, K: low`. */
function words(key: string): string {
  return key
    .replace(/_wt_percent(?=$|:)/, ", wt %")
    .replace(/_(K|percent|log10)(?=$|:)/, (_, unit: string) => `, ${unit === "percent" ? "%" : unit}`)
    .replaceAll("_", " ")
    .replace(/(\d) (\d)/g, "$1.$2")
    .replace("mg per mL", "mg/mL")
    .replace("K per min", "K/min");
}

/** Every setting in force beside its default; what a collection changed is told in words. */
export function settingsPage(edition: Edition): string {
  const defaults = flattened(DEFAULT_SETTINGS);
  const rows = [...flattened(edition.settings)].map(([key, value]): Html => {
    const usual = defaults.get(key) ?? "";
    const changed = usual === value ? "" : html`<b>changed by the collection</b>`;
    return html`<tr><th scope="row">${words(key)}</th><td class="n">${short(value, 120)}</td><td class="n">${usual}</td><td>${changed}</td></tr>`;
  });
  return page(edition, {
    title: "Settings in force",
    name: "settings.html",
    body: html`<h1>Settings in force</h1>
<p>Defaults are common practice unless the page of methods names a reference. A collection changes them in its collection.json.</p>
${wideTable("Settings", html`<table><caption>Settings of this edition beside their defaults</caption><thead><tr><th scope="col">Setting</th><th scope="col" class="n">In force</th><th scope="col" class="n">Default</th><th scope="col">Remark</th></tr></thead><tbody>${rows}</tbody></table>`)}`,
  });
}
