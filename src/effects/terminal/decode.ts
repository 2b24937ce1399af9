import { characterKey, type Key, namedKey, pasteKey } from "./key.ts";
import { cleanPaste, extendPaste } from "./paste.ts";
import { keyOfCsi, keyOfSs3 } from "./sequences.ts";
import { decodeUtf8 } from "./utf8.ts";

/** What is held back between two reads. */
export interface DecoderState {
  /** Bytes of a character whose end has not come. */
  readonly bytes: Uint8Array;
  /** Start of a sequence whose end has not come. */
  readonly held: string;
  /** Text of a paste under way. */
  readonly paste: string | undefined;
}

export const idleDecoder: DecoderState = { bytes: new Uint8Array(0), held: "", paste: undefined };

const esc = "\u001b";
const pasteStart = "\u001b[200~";
const pasteEnd = "\u001b[201~";
/** Longer than any sequence a keyboard sends; a longer one is noise and is dropped. */
const longestSequence = 256;
const escapeHoldMs = 40;
const sequenceHoldMs = 500;
const pasteHoldMs = 2_000;

/**
 * Keys of one read from the terminal. Whatever is cut in two by the read is held in the state; `holdMs` says for how
 * long, and `flushKeys` gives it up.
 */
export function decodeKeys(state: DecoderState, chunk: Uint8Array): { state: DecoderState; keys: Key[] } {
  const { text, rest } = decodeUtf8(state.bytes, chunk);
  const keys: Key[] = [];
  let input = state.held + text;
  let paste = state.paste;
  for (;;) {
    if (paste !== undefined) {
      const end = input.indexOf(pasteEnd);
      if (end < 0) {
        const kept = tailThatMayEnd(input);
        paste = extendPaste(paste, input.slice(0, input.length - kept.length));
        return { state: { bytes: rest, held: kept, paste }, keys };
      }
      keys.push(pasteKey(cleanPaste(extendPaste(paste, input.slice(0, end)))));
      paste = undefined;
      input = input.slice(end + pasteEnd.length);
    }
    const scanned = scan(input, keys);
    input = scanned.rest;
    if (!scanned.pasteBegins) return { state: { bytes: rest, held: input, paste }, keys };
    paste = "";
  }
}

/** Milliseconds to wait for the rest of what is held before `flushKeys`; undefined where nothing waits. */
export function holdMs(state: DecoderState): number | undefined {
  if (state.paste !== undefined) return pasteHoldMs;
  if (state.held === "") return undefined;
  return state.held.length <= 2 ? escapeHoldMs : sequenceHoldMs;
}

/**
 * Gives up waiting: a lone Escape is the Escape key, Escape and one character is Alt with it, an unfinished sequence
 * is dropped, and a paste without an end is handed on as far as it came.
 */
export function flushKeys(state: DecoderState): { state: DecoderState; keys: Key[] } {
  const idle = { ...idleDecoder, bytes: state.bytes };
  if (state.paste !== undefined) return { state: idle, keys: [pasteKey(cleanPaste(state.paste))] };
  if (state.held === esc) return { state: idle, keys: [namedKey("escape")] };
  if (state.held.length === 2) return { state: idle, keys: [characterKey(state.held[1]!, { alt: true })] };
  return { state: idle, keys: [] };
}

/** The longest end of `input` that the end mark of a paste may begin with. */
function tailThatMayEnd(input: string): string {
  for (let length = Math.min(pasteEnd.length - 1, input.length); length > 0; length -= 1) {
    const tail = input.slice(-length);
    if (pasteEnd.startsWith(tail)) return tail;
  }
  return "";
}

/** Reads keys up to the end, an unfinished sequence, or the start of a paste. */
function scan(input: string, keys: Key[]): { rest: string; pasteBegins: boolean } {
  let at = 0;
  while (at < input.length) {
    if (input.startsWith(pasteStart, at))
      return { rest: input.slice(at + pasteStart.length), pasteBegins: true };
    const step = input[at] === esc ? readEscape(input, at) : readCharacter(input, at, false);
    if (step === undefined) {
      const isNoise = input.length - at > longestSequence;
      return { rest: isNoise ? "" : input.slice(at), pasteBegins: false };
    }
    if (step.key) keys.push(step.key);
    at = step.next;
  }
  return { rest: "", pasteBegins: false };
}

/** One step of reading: a key if there is one, and where to go on; undefined where more input is needed. */
type Step = { readonly key: Key | undefined; readonly next: number } | undefined;

function readEscape(input: string, at: number): Step {
  const second = input[at + 1];
  if (second === undefined) return undefined;
  if (second === esc) return { key: namedKey("escape"), next: at + 1 };
  if (second === "[") return readCsi(input, at + 2);
  if (second === "O") return readSs3(input, at + 2);
  if (/[\]PX^_]/.test(second)) return readString(input, at + 2);
  return readCharacter(input, at + 1, true);
}

/** The Linux console's `[ letter`, rxvt's `number $`, and everything else: parameters, intermediates, final. */
const csiShape = /\[[@-~]|\d+\$|[0-?]*[ -/]*[@-Z\\-~]/y;

function readCsi(input: string, from: number): Step {
  if (input[from] === "M") return input.length < from + 4 ? undefined : { key: undefined, next: from + 4 };
  csiShape.lastIndex = from;
  const found = csiShape.exec(input)?.[0];
  if (found !== undefined)
    return { key: keyOfCsi(found.slice(0, -1), found.at(-1)!), next: from + found.length };
  return skipBroken(input, from + (input[from] === "[" ? 1 : 0));
}

/** A sequence that cannot be right any more ends before the byte that broke it, or with it where it looks final. */
function skipBroken(input: string, from: number): Step {
  const broken = /[^ -?]/.exec(input.slice(from));
  if (broken === null) return undefined;
  const looksFinal = /[@-Z\\-~]/.test(broken[0]);
  return { key: undefined, next: from + broken.index + (looksFinal ? 1 : 0) };
}

function readSs3(input: string, from: number): Step {
  const found = /^(\d?)([^\d])/.exec(input.slice(from, from + 2));
  if (found === null) return input.length < from + 2 ? undefined : { key: undefined, next: from + 1 };
  const [whole, parameter = "", final = ""] = found;
  if (final < " ") return { key: characterKey("O", { alt: true }), next: from };
  return { key: keyOfSs3(parameter, final), next: from + whole.length };
}

/** A string sequence (a terminal's answer): nothing in it is a key. It ends with BEL or with Escape and backslash. */
function readString(input: string, from: number): Step {
  const end = /\u0007|\u001b\\/.exec(input.slice(from));
  return end === null ? undefined : { key: undefined, next: from + end.index + end[0].length };
}

function readCharacter(input: string, at: number, alt: boolean): Step {
  const code = input.codePointAt(at)!;
  const text = String.fromCodePoint(code);
  return { key: keyOfCharacter(code, text, alt), next: at + text.length };
}

function keyOfCharacter(code: number, text: string, alt: boolean): Key | undefined {
  if (code === 0x08 || code === 0x7f) return namedKey("backspace", { alt });
  if (code === 0x09) return namedKey("tab", { alt });
  if (code === 0x0a || code === 0x0d) return namedKey("enter", { alt });
  if (code === 0) return characterKey(" ", { ctrl: true, alt });
  if (code < 0x1b) return characterKey(String.fromCharCode(code + 0x60), { ctrl: true, alt });
  if (code < 0x20) return characterKey(String.fromCharCode(code + 0x40), { ctrl: true, alt });
  if ((code >= 0x80 && code < 0xa0) || code === 0xfffd) return undefined;
  return characterKey(text, { alt });
}
