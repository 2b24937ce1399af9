import type { KeyPress } from "./key-press.ts";

/** One line of text being typed; the caret counts code points. */
export interface TextField {
  readonly text: string;
  readonly caret: number;
}

const LONGEST = 1000;

export const textField = (text: string): TextField => ({ text, caret: [...text].length });

/** The field after a key, or undefined where the key does nothing to text. */
export function typeInto(field: TextField, key: KeyPress): TextField | undefined {
  const letters = [...field.text];
  const { caret } = field;
  const without = (from: number, to: number): TextField => ({
    text: [...letters.slice(0, from), ...letters.slice(to)].join(""),
    caret: from,
  });
  switch (key.name) {
    case "character":
      return key.ctrl ? control(field, key.text) : key.alt ? undefined : insert(field, key.text);
    case "paste":
      return insert(field, key.text.replace(/\s+/g, " ").trim());
    case "backspace":
      return caret === 0 ? field : without(caret - 1, caret);
    case "delete":
      return caret === letters.length ? field : without(caret, caret + 1);
    case "left":
      return { ...field, caret: Math.max(0, caret - 1) };
    case "right":
      return { ...field, caret: Math.min(letters.length, caret + 1) };
    case "home":
      return { ...field, caret: 0 };
    case "end":
      return { ...field, caret: letters.length };
    default:
      return undefined;
  }
}

function insert(field: TextField, text: string): TextField {
  const letters = [...field.text];
  const added = [...text].slice(0, LONGEST - letters.length);
  return {
    text: [...letters.slice(0, field.caret), ...added, ...letters.slice(field.caret)].join(""),
    caret: field.caret + added.length,
  };
}

/** Ctrl+U empties the line, as terminals do; any other control key is not for text. */
function control(_: TextField, letter: string): TextField | undefined {
  return letter === "u" ? textField("") : undefined;
}
