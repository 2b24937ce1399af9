import { type Dialect, dialectOf } from "./dialect.ts";

/** How the program shows itself here. */
export type Display = ScreenDisplay | SheetDisplay;

export interface ScreenDisplay {
  readonly mode: "screen";
  readonly dialect: Dialect;
  readonly colour: boolean;
  readonly unicode: boolean;
}

/** Plain text for a pipe, a file, or a terminal that cannot move its cursor. */
export interface SheetDisplay {
  readonly mode: "sheet";
  readonly colour: boolean;
  readonly unicode: boolean;
}

export type Environment = Readonly<Record<string, string | undefined>>;

/**
 * Decides from the environment and the two streams. The full screen needs a terminal on both sides that TERM calls
 * something other than `dumb`. Colour is dropped for a non-empty NO_COLOR (no-color.org) and for monochrome terminals;
 * `colour` says nothing else. `unicode` follows the first of LC_ALL, LC_CTYPE and LANG that is set and not empty
 * (POSIX, XBD 8.2), and is false with `ascii`.
 */
export function decideDisplay(
  env: Environment,
  stdin: { readonly isTTY?: boolean },
  stdout: { readonly isTTY?: boolean },
  { ascii = false }: { readonly ascii?: boolean } = {},
): Display {
  const term = env.TERM ?? "";
  const unicode = !ascii && isUtf8(env);
  const canMove = term !== "" && term !== "dumb" && term !== "unknown";
  if (!stdin.isTTY || !stdout.isTTY || !canMove) return { mode: "sheet", colour: false, unicode };
  const dialect = dialectOf(term, !env.NO_COLOR);
  return { mode: "screen", dialect, colour: dialect.colour, unicode };
}

function isUtf8(env: Environment): boolean {
  const locale = [env.LC_ALL, env.LC_CTYPE, env.LANG].find(Boolean) ?? "";
  return /\.utf-?8(@|$)/i.test(locale);
}
