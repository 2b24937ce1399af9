/** What xterm sends for named keys (ctlseqs, "PC-Style Function Keys"; from memory). */
const plainBytes: Readonly<Record<string, string>> = {
  up: "\u001b[A",
  down: "\u001b[B",
  right: "\u001b[C",
  left: "\u001b[D",
  home: "\u001b[H",
  end: "\u001b[F",
  insert: "\u001b[2~",
  delete: "\u001b[3~",
  pageup: "\u001b[5~",
  pagedown: "\u001b[6~",
  f1: "\u001bOP",
  f2: "\u001bOQ",
  f3: "\u001bOR",
  f4: "\u001bOS",
  f5: "\u001b[15~",
  f6: "\u001b[17~",
  f7: "\u001b[18~",
  f8: "\u001b[19~",
  f9: "\u001b[20~",
  f10: "\u001b[21~",
  f11: "\u001b[23~",
  f12: "\u001b[24~",
  tab: "\t",
  backtab: "\u001b[Z",
  enter: "\r",
  escape: "\u001b",
  backspace: "\u007f",
  space: " ",
};

const modifierBits: Readonly<Record<string, number>> = { shift: 1, alt: 2, ctrl: 4 };

/** Bytes, as text, of one key: `up`, `ctrl+right`, `ctrl+c`, `alt+x`, or one character. Throws for a name it does not know. */
export function bytesOfKey(key: string): string {
  const parts = key.length === 1 ? [key] : key.split("+");
  const name = parts.at(-1)!;
  const modifiers = parts.slice(0, -1);
  const known = plainBytes[name];
  if (known === undefined && [...name].length !== 1) throw new Error(`no such key: ${key}`);
  if (modifiers.length === 0) return known ?? name;
  const isSequence = known !== undefined && known.length > 2;
  if (isSequence)
    return withModifiers(known, 1 + modifiers.reduce((sum, name) => sum + modifierBits[name]!, 0));
  const base = modifiers.includes("ctrl")
    ? String.fromCharCode(name.toUpperCase().charCodeAt(0) & 0x1f)
    : (known ?? name);
  return modifiers.includes("alt") ? `\u001b${base}` : base;
}

/** `CSI A` becomes `CSI 1;5A`, `SS3 P` becomes `CSI 1;5P`, `CSI 5~` becomes `CSI 5;5~`. */
function withModifiers(sequence: string, parameter: number): string {
  const final = sequence.at(-1)!;
  const number = sequence.slice(2, -1) || "1";
  return `\u001b[${number};${parameter}${final}`;
}
