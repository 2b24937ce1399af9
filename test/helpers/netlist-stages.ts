import { activeCircuits } from "./netlist-active.ts";
import type { Numbers, Parts, Place } from "./netlist-parts.ts";
import { passiveCircuits } from "./netlist-passive.ts";
import type { Component } from "./nodal-components.ts";

const circuits = { ...passiveCircuits, ...activeCircuits };

/** Kinds that `stageComponents` can draw. */
export const drawnKinds = Object.keys(circuits);

/** Components of one stage, drawn from physics' list of circuits. Throws for a kind that has no circuit. */
export function stageComponents(kind: string, parts: Parts, place: Place): Component[] {
  const circuit = circuits[kind];
  if (circuit === undefined) throw new Error(`no circuit for "${kind}"`);
  // The circuits of the kinds below that have choices read them from the same record.
  return circuit(parts as Numbers, place);
}
