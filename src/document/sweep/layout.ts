import { fail, ok, type Problem, type Result } from "../../core/result.ts";
import type { Column, Role } from "./column.ts";
import { ALLOWED_HEADERS, columnsShown } from "./header.ts";
import { listed } from "./problem.ts";

/** The columns that are read from each row. */
export interface Layout {
  readonly gain: "gainDb" | "ratio" | "parts" | "voltages";
  /** Positions: frequency first, then one or two of the gain, then the phase if there is one. */
  readonly positions: readonly number[];
  /** Factors of these columns to Hz, V and degrees. */
  readonly scales: readonly number[];
  /** Number of columns the row needs at least. */
  readonly needed: number;
  readonly hasPhase: boolean;
  /** `frequency, dB and degrees`. */
  readonly rowsOf: string;
  /** Labels of all columns of the text, by position. */
  readonly labels: readonly string[];
}

type Gain = Layout["gain"];

const ROLES: Readonly<Record<Gain, readonly Role[]>> = {
  gainDb: ["gainDb"],
  ratio: ["ratio"],
  parts: ["real", "imaginary"],
  voltages: ["input", "output"],
};

/** Where a response is given in more than one way: the one that has a phase, then the one that needs least arithmetic. */
const ORDER_WITH_PHASE: readonly Gain[] = ["gainDb", "ratio", "voltages", "parts"];
const ORDER_WITHOUT: readonly Gain[] = ["parts", "gainDb", "ratio", "voltages"];

/** Chooses the columns to read. `cells` are the names as found, for messages. */
export function layoutOf(columns: readonly Column[], cells: readonly string[]): Result<Layout> {
  const at = (role: Role) => columns.findIndex((column) => column.role === role);
  const frequency = at("frequency");
  if (frequency < 0) return fail(missing("no frequency", cells));
  const phase = at("phase") >= 0 ? at("phase") : at("phaseUnwrapped");
  const order = phase >= 0 ? ORDER_WITH_PHASE : ORDER_WITHOUT;
  const gain = order.find((way) => ROLES[way].every((role) => at(role) >= 0));
  if (gain === undefined) return fail(missing("no gain", cells));
  const readsPhase = gain !== "parts" && phase >= 0;
  const positions = [frequency, ...ROLES[gain].map(at), ...(readsPhase ? [phase] : [])];
  const twice = repeated(columns, positions, cells);
  return twice ? fail(twice) : ok(layoutFor(columns, positions, gain, readsPhase));
}

function layoutFor(
  columns: readonly Column[],
  positions: readonly number[],
  gain: Gain,
  readsPhase: boolean,
): Layout {
  return {
    gain,
    positions,
    scales: positions.map((position) => columns[position].scale),
    needed: Math.max(...positions) + 1,
    hasPhase: gain === "parts" || readsPhase,
    rowsOf: listed(positions.map((position) => columns[position].label)),
    labels: columns.map(({ label }, position) => (positions.includes(position) ? label : "not read")),
  };
}

const missing = (what: string, cells: readonly string[]): Problem => ({
  found: `${what} in ${columnsShown(cells)}`,
  allowed: ALLOWED_HEADERS,
});

function repeated(
  columns: readonly Column[],
  positions: readonly number[],
  cells: readonly string[],
): Problem | undefined {
  for (const position of positions) {
    const same = columns.flatMap(({ role }, index) =>
      role === columns[position].role ? [cells[index]] : [],
    );
    if (same.length > 1)
      return {
        found: `more than one column of the same kind, ${columnsShown(same)}`,
        allowed: ALLOWED_HEADERS,
      };
  }
  return undefined;
}
