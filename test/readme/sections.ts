import { presetStore } from "../../src/cli/preset-adapter.ts";
import { STAGE_KINDS } from "../../src/core/stages/index.ts";
import { BINDINGS, KEY_GROUPS } from "../../src/editor/keymap.ts";
import { shippedPresetsFolder } from "../../src/effects/paths.ts";
import { openPresets } from "../../src/effects/presets.ts";
import { run } from "../cli/support.ts";
import { makeHome, openStation } from "../helpers/station.ts";

/** Parts of the README that the program itself writes, by name. */
export const SECTIONS: Readonly<Record<string, () => Promise<string>>> = {
  "screen 100x30": () => screen({ columns: 100, rows: 30 }, ["p", "pageup", "left", "left", "down", "down"]),
  "screen 80x24": () => screen({ columns: 80, rows: 24 }, ["down", "b", "+", "+", "+"]),
  "screen 60x18": () => screen({ columns: 60, rows: 18 }, ["n"]),
  keys: async () => keyTable(),
  kinds: async () => kindTable(),
  read: () => command(["read", "strain-bridge", "10", "1k", "19k"]),
  "read json": () => command(["read", "strain-bridge", "1k", "--json"]),
  sweep: () =>
    command(["sweep", "strain-bridge", "--from", "100", "--to", "10k", "--per-decade", "3", "--csv"]),
  check: () => command(["check", "strain-bridge"]),
  design: () =>
    command(
      ["design", ..."--pass 1k --pass-loss 0.5 --stop 9k --stop-loss 74 --as sallen-key".split(" ")],
      "with asides",
    ),
  presets: () => command(["presets"]),
};

const fenced = (text: string): string => `\`\`\`text\n${text.trimEnd()}\n\`\`\``;

/** The real program in a terminal in memory, after some keys. */
async function screen(size: { columns: number; rows: number }, keys: readonly string[]): Promise<string> {
  const home = makeHome();
  const station = await openStation({ home, size });
  try {
    for (const key of keys) await station.press(key);
    return fenced(station.screen().join("\n"));
  } finally {
    station.close();
    home.remove();
  }
}

async function command(argv: readonly string[], asides: "with asides" | "alone" = "alone"): Promise<string> {
  const home = makeHome();
  try {
    const presets = presetStore(
      openPresets({ config: home.path("config"), shipped: shippedPresetsFolder() }),
    );
    const { stdout, stderr, exitCode } = await run(argv, { presets });
    if (exitCode !== 0) throw new Error(stderr);
    return fenced(`$ halfpower ${argv.join(" ")}\n${stdout}${asides === "alone" ? "" : stderr}`);
  } finally {
    home.remove();
  }
}

const cell = (text: string): string => text.replaceAll("|", "\\|");
const table = (head: readonly string[], rows: readonly (readonly string[])[]): string =>
  [head, head.map(() => "---"), ...rows].map((cells) => `| ${cells.map(cell).join(" | ")} |`).join("\n");

function keyTable(): string {
  return KEY_GROUPS.map((group) => {
    const keys = BINDINGS.filter((each) => each.group === group);
    return `**${group}**: ${keys.map(({ shown, does }) => `\`${shown}\` ${does}`).join("; ")}.`;
  }).join("\n\n");
}

const kindTable = (): string =>
  table(
    ["kind", "group", "what it is", "parts", "formula (open output, ideal source)", "source"],
    STAGE_KINDS.map(({ kind, group, summary, parts, formula, source }) => [
      `\`${kind}\``,
      group,
      summary,
      parts.map(({ name, optional }) => (optional ? `[${name}]` : name)).join(" "),
      formula,
      source,
    ]),
  );

const MARK = /<!-- begin (.+?) -->\n[\s\S]*?<!-- end \1 -->/g;

/** The README with every marked part as the program writes it now; a part without a name is an error. */
export async function renewed(readme: string): Promise<string> {
  let text = readme;
  for (const [whole, name] of readme.matchAll(MARK)) {
    const section = SECTIONS[name as string];
    if (section === undefined) throw new Error(`README.md: there is no part called "${name}"`);
    const body = await section();
    // A function, so that no sign in the text means anything to the replacement.
    text = text.replace(whole, () => `<!-- begin ${name} -->\n${body}\n<!-- end ${name} -->`);
  }
  return text;
}

export const namesIn = (readme: string): readonly string[] =>
  [...readme.matchAll(MARK)].map((match) => match[1] as string);
