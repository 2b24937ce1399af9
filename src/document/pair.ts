import { onOneLine } from "./json-layout.ts";

/**
 * For each entry of a changed list the entry of the old list that it came from; undefined for a new one.
 *
 * In turn: the same object, an equal one, one of the same kind and name, the one behind the neighbour's.
 */
export function pairEntries(
  before: readonly unknown[],
  after: readonly unknown[],
): readonly (number | undefined)[] {
  const pairs: (number | undefined)[] = after.map(() => undefined);
  const free = new Set(before.keys());
  const pairBy = (key: (entry: unknown) => unknown): void => {
    const waiting = new Map<unknown, number[]>();
    for (const index of free)
      waiting.set(key(before[index]), [...(waiting.get(key(before[index])) ?? []), index]);
    for (const [index, entry] of after.entries()) {
      if (pairs[index] !== undefined) continue;
      const found = waiting.get(key(entry))?.shift();
      if (found === undefined) continue;
      pairs[index] = found;
      free.delete(found);
    }
  };
  pairBy((entry) => entry);
  pairBy(onOneLine);
  pairBy(kindAndName);
  for (const index of after.keys()) {
    const next = index === 0 ? 0 : (pairs[index - 1] ?? Number.NaN) + 1;
    if (pairs[index] === undefined && free.delete(next)) pairs[index] = next;
  }
  return pairs;
}

function kindAndName(entry: unknown): unknown {
  const { kind, name } = (entry ?? {}) as { readonly kind?: unknown; readonly name?: unknown };
  return onOneLine([kind ?? null, name ?? null]);
}
