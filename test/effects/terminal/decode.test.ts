import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type DecoderState,
  decodeKeys,
  flushKeys,
  holdMs,
  idleDecoder,
} from "../../../src/effects/terminal/decode.ts";
import { characterKey, type Key, namedKey, pasteKey } from "../../../src/effects/terminal/key.ts";

const bytes = (text: string) => Buffer.from(text);

/** Decodes reads one after the other, then gives up waiting. */
function decodeAll(...chunks: Uint8Array[]): Key[] {
  const keys: Key[] = [];
  let state: DecoderState = idleDecoder;
  for (const chunk of chunks) {
    const result = decodeKeys(state, chunk);
    state = result.state;
    keys.push(...result.keys);
  }
  return [...keys, ...flushKeys(state).keys];
}

/** Sequences of xterm (ctlseqs), VT220, rxvt and the Linux console (console_codes(4)); from memory. */
const sequences: [string, Key][] = [
  ["\u001b[A", namedKey("up")],
  ["\u001bOB", namedKey("down")],
  ["\u001b[1;5C", namedKey("right", { ctrl: true })],
  ["\u001b[1;2D", namedKey("left", { shift: true })],
  ["\u001b[1;3A", namedKey("up", { alt: true })],
  ["\u001b[1;8A", namedKey("up", { shift: true, alt: true, ctrl: true })],
  ["\u001b[1;9A", namedKey("up", { alt: true })],
  ["\u001b[H", namedKey("home")],
  ["\u001b[1~", namedKey("home")],
  ["\u001b[7~", namedKey("home")],
  ["\u001bOF", namedKey("end")],
  ["\u001b[4~", namedKey("end")],
  ["\u001b[2~", namedKey("insert")],
  ["\u001b[3~", namedKey("delete")],
  ["\u001b[3;5~", namedKey("delete", { ctrl: true })],
  ["\u001b[5~", namedKey("pageup")],
  ["\u001b[6;2~", namedKey("pagedown", { shift: true })],
  ["\u001b[5^", namedKey("pageup", { ctrl: true })],
  ["\u001b[5$", namedKey("pageup", { shift: true })],
  ["\u001b[a", namedKey("up", { shift: true })],
  ["\u001bOP", namedKey("f1")],
  ["\u001b[1;2P", namedKey("f1", { shift: true })],
  ["\u001b[[B", namedKey("f2")],
  ["\u001b[15~", namedKey("f5")],
  ["\u001b[24~", namedKey("f12")],
  ["\u001b[Z", namedKey("backtab", { shift: true })],
  ["\u001bOM", namedKey("enter")],
  ["\t", namedKey("tab")],
  ["\r", namedKey("enter")],
  ["\n", namedKey("enter")],
  ["\u001b\r", namedKey("enter", { alt: true })],
  ["\u007f", namedKey("backspace")],
  ["\b", namedKey("backspace")],
  ["\u001b\u007f", namedKey("backspace", { alt: true })],
  ["\u0003", characterKey("c", { ctrl: true })],
  ["\u001a", characterKey("z", { ctrl: true })],
  ["\u0000", characterKey(" ", { ctrl: true })],
  ["\u001f", characterKey("_", { ctrl: true })],
  ["\u001bx", characterKey("x", { alt: true })],
  ["\u001bé", characterKey("é", { alt: true })],
  ["\u001b\u0001", characterKey("a", { alt: true, ctrl: true })],
  ["A", characterKey("A")],
  [" ", characterKey(" ")],
  ["µ", characterKey("µ")],
  ["漢", characterKey("漢")],
  ["🙂", characterKey("🙂")],
  ["\u001b[200~4.7k\u001b[201~", pasteKey("4.7k")],
];

/** Nothing of these is a key: mouse reports (X10, SGR, urxvt), focus, answers of the terminal, unknown sequences. */
const swallowed = [
  "\u001b[M !!",
  "\u001b[<0;12;7M",
  "\u001b[<0;12;7m",
  "\u001b[32;12;7M",
  "\u001b[I",
  "\u001b[O",
  "\u001b[?62;c",
  "\u001b[?2026;2$y",
  "\u001b[99~",
  "\u001b[1;5z",
  "\u001b]11;rgb:0000/0000/0000\u001b\\",
  "\u001b]11;rgb:0000/0000/0000\u0007",
  "\u001bP1$r0m\u001b\\",
  "\u001bOz",
];

describe("decodeKeys(state, chunk)", () => {
  it.each(sequences)("reads %j", (text, key) => {
    expect(decodeAll(bytes(text))).toEqual([key]);
  });

  it.each(sequences)("reads %j cut in two anywhere", (text, key) => {
    const whole = bytes(text);
    for (let cut = 1; cut < whole.length; cut += 1) {
      expect(decodeAll(whole.subarray(0, cut), whole.subarray(cut))).toEqual([key]);
    }
  });

  it.each(swallowed)("swallows %j, whole and cut in two anywhere", (text) => {
    const whole = bytes(`${text}k`);
    for (let cut = 0; cut < whole.length; cut += 1) {
      expect(decodeAll(whole.subarray(0, cut), whole.subarray(cut))).toEqual([characterKey("k")]);
    }
  });

  it("hands on any row of keys in order, however it is cut into reads", () => {
    const keyRows = fc.array(fc.constantFrom(...sequences), { maxLength: 12 });
    fc.assert(
      fc.property(keyRows, fc.array(fc.nat(200), { maxLength: 6 }), (row, cuts) => {
        const whole = bytes(row.map(([text]) => text).join(""));
        const ends = [...new Set([...cuts, whole.length])]
          .filter((end) => end <= whole.length)
          .sort((a, b) => a - b);
        const chunks = ends.map((end, index) => whole.subarray(ends[index - 1] ?? 0, end));
        expect(decodeAll(...chunks)).toEqual(row.map(([, key]) => key));
      }),
      { numRuns: 300 },
    );
  });

  it("never throws and never lets a control character through, whatever bytes come", () => {
    const noise = fc.array(fc.oneof(fc.constantFrom(0x1b, 0x5b, 0x4f, 0x32, 0x30, 0x7e, 0x3b), fc.nat(255)), {
      maxLength: 40,
    });
    fc.assert(
      fc.property(fc.array(noise, { maxLength: 4 }), (chunks) => {
        const keys = decodeAll(...chunks.map((chunk) => Uint8Array.from(chunk)));
        for (const { text } of keys) expect(text).not.toMatch(/[\u0000-\u001f\u007f-\u009f\ufffd]/);
      }),
      { numRuns: 500 },
    );
  });

  it("takes two Escapes in one read for two Escape keys, and an arrow behind one for an arrow", () => {
    expect(decodeAll(bytes("\u001b\u001b"))).toEqual([namedKey("escape"), namedKey("escape")]);
    expect(decodeAll(bytes("\u001b\u001b[A"))).toEqual([namedKey("escape"), namedKey("up")]);
  });
});

describe("holdMs(state) and flushKeys(state)", () => {
  it("wait for the rest of an Escape, and then take it for the key", () => {
    const { state, keys } = decodeKeys(idleDecoder, bytes("\u001b"));
    expect(keys).toEqual([]);
    expect(holdMs(state)).toBe(40);
    expect(flushKeys(state)).toEqual({ state: idleDecoder, keys: [namedKey("escape")] });
  });

  it("take Escape and an opening for Alt with that character", () => {
    expect(decodeAll(bytes("\u001b["))).toEqual([characterKey("[", { alt: true })]);
    expect(decodeAll(bytes("\u001bO"))).toEqual([characterKey("O", { alt: true })]);
  });

  it("drop an unfinished sequence", () => {
    expect(decodeAll(bytes("\u001b[1;"))).toEqual([]);
  });

  it("wait for nothing where nothing is held, and keep half a character", () => {
    expect(holdMs(idleDecoder)).toBeUndefined();
    const half = decodeKeys(idleDecoder, Uint8Array.of(0xc2)).state;
    expect(holdMs(half)).toBeUndefined();
    expect(decodeKeys(flushKeys(half).state, Uint8Array.of(0xb5)).keys).toEqual([characterKey("µ")]);
  });
});

describe("a paste", () => {
  const pasted = (text: string) => decodeAll(bytes(`\u001b[200~${text}\u001b[201~`))[0]!.text;

  it("is one line without control characters or sequences", () => {
    expect(pasted("RFI\tfilter\r\nsecond\u0007 line\u001b[31m red\u001b[0m\n")).toBe(
      "RFI filter second line red",
    );
  });

  it("is bounded", () => {
    expect(pasted("x".repeat(100_000))).toHaveLength(10_000);
    expect(pasted(`${"x".repeat(9_999)}🙂`)).toBe("x".repeat(9_999));
  });

  it("without an end is handed on as far as it came, and keys work again", () => {
    const open = decodeKeys(idleDecoder, bytes("\u001b[200~4k7")).state;
    expect(flushKeys(open).keys).toEqual([pasteKey("4k7")]);
    expect(decodeKeys(flushKeys(open).state, bytes("q")).keys).toEqual([characterKey("q")]);
  });

  it("cut anywhere, its marks included, is the same paste", () => {
    const whole = bytes("\u001b[200~4.7 kΩ\u001b[201~");
    for (let cut = 0; cut < whole.length; cut += 1) {
      expect(decodeAll(whole.subarray(0, cut), whole.subarray(cut))).toEqual([pasteKey("4.7 kΩ")]);
    }
  });
});
