/** Lists of names in messages. */
import { plainText } from "../core/text.ts";

/** `a, b or c`. */
export function orList(words: readonly string[]): string {
  if (words.length < 2) return words.join("");
  return `${words.slice(0, -1).join(", ")} or ${words.at(-1)}`;
}

/** The names that `wrong` may have been meant to be, where there are any; else all of them. */
export function suggestion(wrong: string, names: readonly string[]): string {
  const near = nearNames(wrong, names);
  return near.length === 0 ? orList(names) : `for example ${orList(near)}`;
}

/** Longer than any name of ours; what is longer still cannot be a slip. */
const LONGEST = 40;
const MOST_SUGGESTED = 4;

/** Names equal but for case and hyphens, or at most two slips away, nearest first; or else those that contain it. */
export function nearNames(wrong: string, names: readonly string[]): readonly string[] {
  const bare = simplified(wrong);
  if (bare === "" || wrong.length > LONGEST) return [];
  const most = bare.length < 3 ? 0 : bare.length < 6 ? 1 : 2;
  const slips = names
    .map((name) => ({ name, count: slipCount(bare, simplified(name)) }))
    .filter(({ count }) => count <= most)
    .sort((one, other) => one.count - other.count)
    .map(({ name }) => name);
  const found =
    slips.length > 0 || bare.length < 3 ? slips : names.filter((name) => simplified(name).includes(bare));
  return found.slice(0, MOST_SUGGESTED);
}

const simplified = (name: string): string =>
  plainText(name, LONGEST)
    .toLowerCase()
    .replace(/[\s_-]/g, "");

/** Levenshtein's distance (1966): letters put in, left out or changed. */
function slipCount(one: string, other: string): number {
  let row = Array.from({ length: other.length + 1 }, (_, k) => k);
  for (const [i, letter] of [...one].entries()) {
    const next = [i + 1];
    for (let k = 0; k < other.length; k++) {
      next.push(Math.min(next[k] + 1, row[k + 1] + 1, row[k] + (other[k] === letter ? 0 : 1)));
    }
    row = next;
  }
  return row[other.length];
}
