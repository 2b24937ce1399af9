import { ok } from "../../core/result.ts";
import { quoted } from "../../core/text.ts";
import { openChain } from "../chain-argument.ts";
import type { Session } from "../io.ts";
import { jsonText, safeJson } from "../json.ts";
import type { Outcome } from "../outcome.ts";
import type { ListedPreset, PresetStore } from "../preset-store.ts";
import { type Column, tableLines } from "../table.ts";
import { presetNamed } from "../unknown-preset.ts";

const COLUMNS: readonly Column<ListedPreset>[] = (["name", "origin", "type", "title"] as const).map(
  (head) => ({ head, side: "left", cell: (preset) => preset[head] }),
);

/** `halfpower presets list` */
export async function listPresets(
  session: Session,
  store: PresetStore,
  { json = false }: { readonly json?: boolean },
): Promise<Outcome> {
  const listed = await store.list();
  if (!listed.ok) return listed;
  const presets = listed.value.map(({ name, origin, type, title }) => ({ name, origin, type, title }));
  if (json) return ok({ text: jsonText({ presets }, session.charset) });
  const lines = await tableLines(COLUMNS, presets, session.charset);
  return ok({ text: lines.map((line) => `${line}\n`).join("") });
}

/** `halfpower presets show NAME` */
export async function showPreset(session: Session, store: PresetStore, name: string): Promise<Outcome> {
  const found = await presetNamed(name, store, "NAME", "a name that halfpower presets list shows");
  if (!found.ok) return found;
  return ok({ text: safeJson(found.value.text, session.charset) });
}

/** `halfpower presets save CHAIN NAME` */
export async function savePreset(
  session: Session,
  store: PresetStore,
  chainArgument: string,
  name: string,
): Promise<Outcome> {
  const chain = await openChain(chainArgument, session);
  if (!chain.ok) return chain;
  const { text, context } = chain.value;
  return changed(await store.save(name, text, context.folder), `the preset ${quoted(name)} is saved`);
}

/** `halfpower presets remove NAME` */
export async function removePreset(store: PresetStore, name: string): Promise<Outcome> {
  return changed(await store.remove(name), `the preset ${quoted(name)} is removed`);
}

const changed = (answer: Awaited<ReturnType<PresetStore["remove"]>>, said: string): Outcome =>
  answer.ok ? ok({ text: "", notes: [said] }) : answer;
