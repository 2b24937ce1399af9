import { type Key, type KeyName, type Modifiers, namedKey } from "./key.ts";

/*
 * The sequences keyboards send, as xterm's control sequence document (ctlseqs) lists them for PC-style function keys,
 * with the older numbers of the VT220, rxvt and the Linux console beside them (console_codes(4)). From memory.
 */

/** `CSI … letter` and `SS3 letter`. */
const byLetter: Readonly<Record<string, KeyName>> = {
  A: "up",
  B: "down",
  C: "right",
  D: "left",
  H: "home",
  F: "end",
  P: "f1",
  Q: "f2",
  R: "f3",
  S: "f4",
};

/** `SS3 letter` only: the keypad's Enter. */
const bySs3Letter: Readonly<Record<string, KeyName>> = { ...byLetter, M: "enter" };

/** `CSI number ~`. */
const byNumber: Readonly<Record<string, KeyName>> = {
  1: "home",
  2: "insert",
  3: "delete",
  4: "end",
  5: "pageup",
  6: "pagedown",
  7: "home",
  8: "end",
  11: "f1",
  12: "f2",
  13: "f3",
  14: "f4",
  15: "f5",
  17: "f6",
  18: "f7",
  19: "f8",
  20: "f9",
  21: "f10",
  23: "f11",
  24: "f12",
};

/** `CSI [ letter`, the Linux console's first five function keys. */
const byConsoleLetter: Readonly<Record<string, KeyName>> = { A: "f1", B: "f2", C: "f3", D: "f4", E: "f5" };

/** rxvt's own: a small letter for Shift with an arrow. */
const byShiftedLetter: Readonly<Record<string, KeyName>> = { a: "up", b: "down", c: "right", d: "left" };

/** xterm counts modifiers from 1: one for Shift, two for Alt, four for Ctrl, eight for Meta. */
function modifiersFrom(parameter: string | undefined): Modifiers {
  const bits = Math.max(0, Number.parseInt(parameter ?? "1", 10) - 1) || 0;
  return { shift: (bits & 1) !== 0, alt: (bits & 10) !== 0, ctrl: (bits & 4) !== 0 };
}

const keyOrNothing = (name: KeyName | undefined, modifiers: Modifiers): Key | undefined =>
  name === undefined ? undefined : namedKey(name, modifiers);

/** rxvt ends a numbered key with `$` for Shift, `^` for Ctrl and `@` for both. */
const rxvtEndings: Readonly<Record<string, Modifiers>> = {
  $: { shift: true },
  "^": { ctrl: true },
  "@": { shift: true, ctrl: true },
};

/**
 * The key of a complete control sequence `CSI parameters final`, or undefined for one that is no key here: mouse and
 * focus reports, answers to questions nobody asked, keys this program has no use for.
 */
export function keyOfCsi(parameters: string, final: string): Key | undefined {
  if (parameters === "[") return keyOrNothing(byConsoleLetter[final], {});
  if (!/^[\d;]*$/.test(parameters)) return undefined;
  const [first = "", second] = parameters.split(";");
  if (final === "~") return keyOrNothing(byNumber[first], modifiersFrom(second));
  if (rxvtEndings[final]) return keyOrNothing(byNumber[first], rxvtEndings[final]);
  if (final === "Z") return namedKey("backtab", { shift: true });
  if (byShiftedLetter[final]) return namedKey(byShiftedLetter[final], { shift: true });
  return keyOrNothing(
    byLetter[final],
    modifiersFrom(second ?? (first === "1" ? undefined : first || undefined)),
  );
}

/** The key of `SS3 [modifier] letter`, or undefined. */
export function keyOfSs3(parameter: string, final: string): Key | undefined {
  return keyOrNothing(bySs3Letter[final], modifiersFrom(parameter || undefined));
}
