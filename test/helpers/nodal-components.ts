import type { Complex } from "./nodal-complex.ts";

/**
 * What a network may be made of. Node "0" is common; currents flow from the first node through the component to the
 * second.
 */
export type Component =
  | { readonly type: "R"; readonly name: string; readonly ends: Ends; readonly ohm: number }
  | { readonly type: "L"; readonly name: string; readonly ends: Ends; readonly henry: number }
  | { readonly type: "C"; readonly name: string; readonly ends: Ends; readonly farad: number }
  /** First node minus second node is `volt`; 0 V makes an ammeter. */
  | { readonly type: "V"; readonly name: string; readonly ends: Ends; readonly volt: number }
  | { readonly type: "I"; readonly name: string; readonly ends: Ends; readonly ampere: number }
  /** Ideal: secondary voltage = ratio · primary voltage. */
  | {
      readonly type: "transformer";
      readonly name: string;
      readonly ends: Ends;
      readonly to: Ends;
      readonly ratio: number;
    }
  /** Voltage between `ends` = gain · voltage between `sense`. */
  | {
      readonly type: "vcvs";
      readonly name: string;
      readonly ends: Ends;
      readonly sense: Ends;
      readonly gain: number;
    }
  /** V(out) = A·(V(plus) − V(minus)), A = 1/(1/a0 + jf/gbwHz); both infinite: a nullor. */
  | {
      readonly type: "opamp";
      readonly name: string;
      readonly out: string;
      readonly plus: string;
      readonly minus: string;
      readonly a0: number;
      readonly gbwHz: number;
    }
  | {
      readonly type: "line";
      readonly name: string;
      readonly near: string;
      readonly far: string;
      readonly wave: Wave;
    };

export type Ends = readonly [string, string];
export type Netlist = readonly Component[];

/** Characteristic impedance in ohm, and propagation constant times length, of a line at a frequency. */
export type Wave = (freqHz: number) => { readonly z0: Complex; readonly gammaLength: Complex };

export type ComponentOf<T extends Component["type"]> = Extract<Component, { type: T }>;

/** Every node a component touches, common included. */
export function nodesOf(component: Component): string[] {
  switch (component.type) {
    case "opamp":
      return [component.out, component.plus, component.minus];
    case "line":
      return [component.near, component.far];
    case "transformer":
      return [...component.ends, ...component.to];
    case "vcvs":
      return [...component.ends, ...component.sense];
    default:
      return [...component.ends];
  }
}

/** Names of the currents that are unknowns of their own. */
export function currentsOf(component: Component): string[] {
  if (component.type === "C" || component.type === "I") return [];
  return component.type === "line" ? [`${component.name}.near`, `${component.name}.far`] : [component.name];
}
