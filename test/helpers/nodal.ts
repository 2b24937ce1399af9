import { type Complex, complex, exponential, scaled, times } from "./nodal-complex.ts";
import type { Component, ComponentOf, Ends, Netlist } from "./nodal-components.ts";
import { Equations, type Solution } from "./nodal-equations.ts";

/**
 * Modified nodal analysis: Kirchhoff's current law at every node, and the branch's own equation wherever a branch's
 * current is an unknown. Shares no code with the program under test.
 * Gives all node voltages at one frequency; throws where the network has no unique solution.
 * Source: C.-W. Ho, A. E. Ruehli, P. A. Brennan, The modified nodal approach to network analysis, IEEE Trans. CAS-22
 * (1975) 504–509.
 */
export function solve(netlist: Netlist, freqHz: number): Solution {
  const equations = new Equations(netlist);
  for (const component of netlist) stamp(equations, component, freqHz);
  return equations.solve();
}

/** Voltage of a node; throws for a node that the netlist does not have. */
export function voltageAt(solution: Solution, node: string): Complex {
  const voltage = solution.voltages.get(node);
  if (voltage === undefined) throw new Error(`no node "${node}"`);
  return voltage;
}

/** Current through a component; throws for one whose current was no unknown. */
export function currentOf(solution: Solution, name: string): Complex {
  const current = solution.currents.get(name);
  if (current === undefined) throw new Error(`no current of "${name}"`);
  return current;
}

type Stamps = {
  readonly [T in Component["type"]]: (equations: Equations, part: ComponentOf<T>, freqHz: number) => void;
};

const stamps: Stamps = {
  R: (equations, part) => stampImpedance(equations, part, complex(part.ohm)),
  L: (equations, part, freqHz) =>
    stampImpedance(equations, part, complex(0, 2 * Math.PI * freqHz * part.henry)),
  C: (equations, part, freqHz) =>
    stampAdmittance(equations, part.ends, complex(0, 2 * Math.PI * freqHz * part.farad)),
  V: stampVoltage,
  I: stampCurrent,
  transformer: stampTransformer,
  vcvs: stampControlled,
  opamp: stampOpamp,
  line: stampLine,
};

function stamp<T extends Component["type"]>(
  equations: Equations,
  part: ComponentOf<T>,
  freqHz: number,
): void {
  const add = stamps[part.type as T];
  add(equations, part, freqHz);
}

const one = complex(1);
const minusOne = complex(-1);

/** V(first) − V(second) − Z·I = 0. */
function stampImpedance(
  equations: Equations,
  { name, ends }: { name: string; ends: Ends },
  impedance: Complex,
): void {
  equations.flow(name, ends);
  equations.add(name, ends[0], one);
  equations.add(name, ends[1], minusOne);
  equations.add(name, name, scaled(impedance, -1));
}

function stampAdmittance(equations: Equations, [first, second]: Ends, admittance: Complex): void {
  equations.add(first, first, admittance);
  equations.add(second, second, admittance);
  equations.add(first, second, scaled(admittance, -1));
  equations.add(second, first, scaled(admittance, -1));
}

function stampVoltage(equations: Equations, part: ComponentOf<"V">): void {
  stampImpedance(equations, part, complex(0));
  equations.drive(part.name, part.volt);
}

function stampCurrent(equations: Equations, { ends, ampere }: ComponentOf<"I">): void {
  equations.drive(ends[0], -ampere);
  equations.drive(ends[1], ampere);
}

function stampControlled(equations: Equations, part: ComponentOf<"vcvs">): void {
  stampImpedance(equations, part, complex(0));
  equations.add(part.name, part.sense[0], complex(-part.gain));
  equations.add(part.name, part.sense[1], complex(part.gain));
}

/** The secondary delivers I, the primary takes ratio·I: no power is lost. */
function stampTransformer(equations: Equations, part: ComponentOf<"transformer">): void {
  const { name, ends, to, ratio } = part;
  equations.add(ends[0], name, complex(ratio));
  equations.add(ends[1], name, complex(-ratio));
  equations.flow(name, [to[1], to[0]]);
  equations.add(name, to[0], one);
  equations.add(name, to[1], minusOne);
  equations.add(name, ends[0], complex(-ratio));
  equations.add(name, ends[1], complex(ratio));
}

/** (1/a0 + jf/gbw)·V(out) − V(plus) + V(minus) = 0, with whatever output current that takes. */
function stampOpamp(equations: Equations, part: ComponentOf<"opamp">, freqHz: number): void {
  equations.flow(part.name, [part.out, "0"]);
  equations.add(part.name, part.out, complex(1 / part.a0, freqHz / part.gbwHz));
  equations.add(part.name, part.plus, minusOne);
  equations.add(part.name, part.minus, one);
}

/**
 * What leaves one end arrives at the other: V − Z0·I = e^(−γl)·(V' + Z0·I'), both ways, I and I' into the line.
 * The same as the admittance matrix coth(γl)/Z0, −1/(Z0·sinh(γl)), but without its poles at every half wavelength.
 * Source: F. H. Branin, Transient analysis of lossless transmission lines, Proc. IEEE 55 (1967) 2012–2013, with loss.
 */
function stampLine(equations: Equations, part: ComponentOf<"line">, freqHz: number): void {
  const { z0, gammaLength } = part.wave(freqHz);
  const arriving = exponential(scaled(gammaLength, -1));
  const ends = [
    { node: part.near, current: `${part.name}.near` },
    { node: part.far, current: `${part.name}.far` },
  ];
  for (const [here, there] of [ends, ends.toReversed()]) {
    equations.flow(here.current, [here.node, "0"]);
    equations.add(here.current, here.node, one);
    equations.add(here.current, here.current, scaled(z0, -1));
    equations.add(here.current, there.node, scaled(arriving, -1));
    equations.add(here.current, there.current, scaled(times(arriving, z0), -1));
  }
}
