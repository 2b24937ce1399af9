/**
 * Units a value can be asked for in. The tag says what a bare number means; `symbol` is what is shown after it.
 *
 * `gain` is a ratio that may be typed in dB; `level` is dB by itself (losses, ripples, limits).
 */
export type UnitTag =
  | "ohm"
  | "farad"
  | "henry"
  | "hertz"
  | "second"
  | "metre"
  | "volt"
  | "voltPerRootHertz"
  | "amperePerRootHertz"
  | "samplesPerSecond"
  | "gain"
  | "level"
  | "degree"
  | "celsius"
  | "number";
