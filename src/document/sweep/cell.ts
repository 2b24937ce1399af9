import {
  type Column,
  DECIBEL,
  DEGREES,
  FREQUENCY_UNITS,
  frequencyColumn,
  IMAGINARY,
  RADIANS,
  RATIO,
  REAL,
} from "./column.ts";
import { shown } from "./problem.ts";
import {
  type HeaderUnit,
  NEUTRAL,
  OTHER,
  QUANTITIES,
  type Quantity,
  UNITS_BY_WORD,
  wordsOf,
} from "./words.ts";

/** What one header cell says: a column, something that is left out, or nothing that is understood. */
export type CellMeaning =
  | { readonly type: "column"; readonly column: Column }
  | { readonly type: "other" }
  | {
      readonly type: "unknown" /** Carries a unit of ours, so it may well be meant. */;
      readonly hasUnit: boolean;
    };

interface Parsed {
  readonly quantities: readonly Quantity[];
  readonly units: readonly HeaderUnit[];
  readonly unwrapped: boolean;
  readonly unknown: boolean;
  readonly other: boolean;
}

export function meaningOf(cell: string): CellMeaning {
  const parsed = parse(wordsOf(cell));
  if (parsed.other) return { type: "other" };
  const column = parsed.unknown || parsed.units.length > 1 ? undefined : columnFor(parsed, cell);
  return column ? { type: "column", column } : { type: "unknown", hasUnit: parsed.units.length > 0 };
}

/** `mHz` with that very spelling: millihertz by its letter, megahertz by habit. */
export const isDoubtfulUnit = (cell: string): boolean => /mHz/.test(cell);

function parse(words: readonly string[]): Parsed {
  const quantities: Quantity[] = [];
  const units: HeaderUnit[] = [];
  let unknown = false;
  for (const word of words) {
    const quantity = QUANTITIES.get(word);
    const unit = UNITS_BY_WORD.get(word);
    // "gain in dB": a preposition, unless it stands alone or behind an output.
    if (word === "in" && quantities.length > 0 && quantities.at(-1) !== "output") continue;
    if (quantity !== undefined) quantities.push(quantity);
    else if (unit !== undefined) units.push(unit);
    else if (word !== "unwrapped" && !NEUTRAL.has(word)) unknown = true;
  }
  return {
    quantities,
    units,
    unknown,
    unwrapped: words.includes("unwrapped"),
    other: words.some((word) => OTHER.has(word)),
  };
}

function columnFor(parsed: Parsed, cell: string): Column | undefined {
  const quantity = quantityOf(parsed);
  const unit = parsed.units[0];
  if (parsed.unwrapped && quantity !== "phase") return undefined;
  switch (quantity) {
    case "frequency":
      return frequencyOf(unit, cell);
    case "magnitude":
      return unit === "db" ? DECIBEL : unit === undefined || unit === "linear" ? RATIO : undefined;
    case "level":
      return unit === "db" ? DECIBEL : unit === "linear" ? RATIO : undefined;
    case "phase":
      return phaseOf(unit, parsed.unwrapped, cell);
    case "real":
      return unit === undefined || unit === "linear" ? REAL : undefined;
    case "imaginary":
      return unit === undefined || unit === "linear" ? IMAGINARY : undefined;
    case "input":
    case "output":
      return voltageOf(quantity, unit);
    default:
      return undefined;
  }
}

/** The one quantity a cell is about; a magnitude stands back behind what is taken of it, as in `Re(H)`. */
function quantityOf({ quantities, units }: Parsed): Quantity | undefined {
  if (quantities.length === 0) return quantityOfUnit(units[0]);
  const ratioOfVoltages = quantities.join(" ").replace("output input", "magnitude").split(" ") as Quantity[];
  const distinct = [...new Set(ratioOfVoltages)];
  const special = distinct.filter((quantity) => quantity !== "magnitude" && quantity !== "level");
  if (special.length === 0) return distinct.includes("magnitude") ? "magnitude" : "level";
  if (special.length > 1) return undefined;
  // "input level" and "output amplitude" are voltages; "input gain" is nothing we know.
  const isVoltage = special[0] === "input" || special[0] === "output";
  return isVoltage && distinct.includes("magnitude") ? undefined : special[0];
}

function quantityOfUnit(unit: HeaderUnit | undefined): Quantity | undefined {
  if (unit === undefined) return undefined;
  if (Object.hasOwn(FREQUENCY_UNITS, unit)) return "frequency";
  if (unit === "db") return "magnitude";
  return unit === "degree" || unit === "radian" ? "phase" : undefined;
}

function frequencyOf(unit: HeaderUnit | undefined, cell: string): Column | undefined {
  if (unit === undefined) return { ...frequencyColumn("hz"), note: `${shown(cell)} has no unit, read as Hz` };
  return Object.hasOwn(FREQUENCY_UNITS, unit) ? frequencyColumn(unit) : undefined;
}

function phaseOf(unit: HeaderUnit | undefined, unwrapped: boolean, cell: string): Column | undefined {
  const role = unwrapped ? "phaseUnwrapped" : "phase";
  if (unit === undefined) return { ...DEGREES, role, note: `${shown(cell)} has no unit, read as degrees` };
  if (unit === "degree") return { ...DEGREES, role };
  return unit === "radian" ? { ...RADIANS, role } : undefined;
}

const VOLTS: Readonly<Record<string, number>> = { V: 1, mV: 1e-3, µV: 1e-6 };

function voltageOf(role: "input" | "output", unit: HeaderUnit | undefined): Column | undefined {
  const name = unit ?? "V";
  if (!Object.hasOwn(VOLTS, name)) return undefined;
  const label = name === "V" ? `${role} voltage` : `${role} voltage in ${name}`;
  return { role, scale: VOLTS[name], label };
}
