/** What a key press is called, whatever bytes the terminal sent for it. */
export type KeyName =
  | "character"
  | "paste"
  | "up"
  | "down"
  | "left"
  | "right"
  | "home"
  | "end"
  | "pageup"
  | "pagedown"
  | "insert"
  | "delete"
  | "backspace"
  | "tab"
  | "backtab"
  | "enter"
  | "escape"
  | "f1"
  | "f2"
  | "f3"
  | "f4"
  | "f5"
  | "f6"
  | "f7"
  | "f8"
  | "f9"
  | "f10"
  | "f11"
  | "f12";

/**
 * One key press, or one whole paste.
 *
 * `text` is one code point for a "character", the pasted text for a "paste", and empty for every other name.
 * Ctrl with a letter is that small letter with `ctrl` set. A terminal does not tell Shift with a character apart
 * from the character, so `shift` is only ever set on named keys.
 */
export interface Key {
  readonly name: KeyName;
  readonly text: string;
  readonly ctrl: boolean;
  readonly alt: boolean;
  readonly shift: boolean;
}

export interface Modifiers {
  readonly ctrl?: boolean;
  readonly alt?: boolean;
  readonly shift?: boolean;
}

/** A named key, with the modifiers that were down. */
export const namedKey = (
  name: KeyName,
  { ctrl = false, alt = false, shift = false }: Modifiers = {},
): Key => ({
  name,
  text: "",
  ctrl,
  alt,
  shift,
});

/** A typed character. */
export const characterKey = (text: string, { ctrl = false, alt = false }: Modifiers = {}): Key => ({
  name: "character",
  text,
  ctrl,
  alt,
  shift: false,
});

/** A whole paste. */
export const pasteKey = (text: string): Key => ({ ...namedKey("paste"), text });
