import type { Command } from "commander";
import { listPresets, removePreset, savePreset, showPreset } from "./commands/presets.ts";
import { ASCII_HELP, CHAIN_HELP, example } from "./help.ts";
import type { PresetStore } from "./preset-store.ts";
import type { Run } from "./program.ts";

/** `presets` and its own commands; without one of them it lists. */
export function addPresets(root: Command, { session, settle }: Run, store: PresetStore): void {
  const presets = root
    .command("presets")
    .summary("list, show, save and remove presets")
    .description("Presets: chains and stages kept under a name, shipped or your own.")
    .enablePositionalOptions()
    .helpCommand(false)
    .option("--ascii", ASCII_HELP);
  presets
    .command("list", { isDefault: true })
    .description("All presets: name, own or shipped, chain or stage, title.")
    .option("--json", "one JSON document")
    .option("--ascii", ASCII_HELP)
    .addHelpText("after", example("halfpower presets list", "the channels of the pump stand, and your own"))
    .action((options: { json?: boolean }) => settle(listPresets(session, store, options)));
  presets
    .command("show")
    .description("The text of a preset's file.")
    .argument("<NAME>", "a preset's name")
    .option("--ascii", ASCII_HELP)
    .addHelpText(
      "after",
      example("halfpower presets show strain-bridge > pump3.chain.json", "a chain of pump 3 to begin with"),
    )
    .action((name: string) => settle(showPreset(session, store, name)));
  presets
    .command("save")
    .description("Keeps a chain under a name of your own.")
    .argument("<CHAIN>", CHAIN_HELP)
    .argument("<NAME>", "the name to keep it under")
    .option("--ascii", ASCII_HELP)
    .addHelpText(
      "after",
      example("halfpower presets save pump3.chain.json pump-3-bridge", "the bridge of pump 3"),
    )
    .action((chain: string, name: string) => settle(savePreset(session, store, chain, name)));
  presets
    .command("remove")
    .description("Removes a preset of your own.")
    .argument("<NAME>", "the preset's name")
    .option("--ascii", ASCII_HELP)
    .addHelpText("after", example("halfpower presets remove pump-3-bridge", "the bridge of pump 3"))
    .action((name: string) => settle(removePreset(store, name)));
}
