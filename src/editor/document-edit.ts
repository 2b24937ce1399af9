import type { DocumentPath } from "../document/problem.ts";
import type { ChainDocument } from "../document/types.ts";

type Json = unknown;
type JsonObject = Readonly<Record<string, Json>>;

/** The document with one value set, or removed where `value` is undefined; everything else stays the same object. */
export function setAt(document: ChainDocument, path: DocumentPath, value: Json): ChainDocument {
  return setIn(document, path, value) as ChainDocument;
}

function setIn(target: Json, path: DocumentPath, value: Json): Json {
  const [step, ...rest] = path;
  if (step === undefined) return value;
  if (typeof step === "number") {
    const list = [...((target as readonly Json[] | undefined) ?? [])];
    list[step] = setIn(list[step], rest, value);
    return list;
  }
  const object = (target ?? {}) as JsonObject;
  const changed = setIn(object[step], rest, value);
  if (changed === undefined) return without(object, step);
  return { ...object, [step]: changed };
}

/** The object without one name; nothing is left of one that becomes empty. */
function without(object: JsonObject, name: string): JsonObject | undefined {
  const { [name]: _, ...others } = object;
  return Object.keys(others).length === 0 ? undefined : others;
}

export function valueAt(document: ChainDocument, path: DocumentPath): Json {
  return path.reduce<Json>((target, step) => (target as JsonObject | undefined)?.[step], document);
}
