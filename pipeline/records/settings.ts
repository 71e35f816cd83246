import { type CollectionSettings, DEFAULT_SETTINGS, type Settings } from "./generated/collection.ts";

export type { Settings };

/** Defaults with a collection's own settings laid over them, group by group. */
export function settingsInForce(own: CollectionSettings | undefined): Settings {
  const merged: Record<string, unknown> = { ...DEFAULT_SETTINGS };
  for (const [name, value] of Object.entries(own ?? {})) {
    const group = typeof value === "object" && !Array.isArray(value);
    merged[name] = group ? { ...(merged[name] as object), ...value } : value;
  }
  return merged as unknown as Settings;
}
