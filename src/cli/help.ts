/** Texts of `--help` beyond the list of commands and options. */

export const SUMMARY =
  "Frequency response of a measuring chain as it is really wired: source, stages and load, every stage " +
  "loading the one before it. Step along frequency and read decibels and degrees, and keep chains as files " +
  "and presets.";

export const CHAIN_HELP = 'a chain file, "-" for standard input, or a preset\'s name';

/** The option is looked for before anything else is read (see run.ts); the commands only have to know it. */
export const ASCII_HELP = "plain ASCII only";

export const WITHOUT_COMMAND = `Without a command the workstation opens with CHAIN, or with the preset
strain-bridge. Where standard output or input is no terminal, the sheet is
written instead: the chain, both charts and a table of readings as text.

Example:
  halfpower strain-bridge
      the strain bridge of pump 2`;

export const STATUS = `Exit status: 0 done (and limits met), 1 limits not met, 2 bad usage or input.
Results go to standard output, messages to standard error.`;

export const CAUTION = `Caution: the program models, it does not approve. Voltage and power ratings are
not checked. A filter connected to the mains needs parts certified for it
(IEC 60384-14, classes X and Y) and falls under local codes and a licensed
electrician. Charged capacitors hurt. Nothing here clears a chain for patient
contact, protection or safety functions.`;

/** One way to use a command. */
export const example = (command: string, does: string): string => `\nExample:\n  ${command}\n      ${does}`;
