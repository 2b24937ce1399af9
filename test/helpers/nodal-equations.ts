import { type Complex, complex, minus, plus, scaled } from "./nodal-complex.ts";
import { currentsOf, type Ends, type Netlist, nodesOf } from "./nodal-components.ts";
import { type ComplexRow, factorise, product, zeroRow } from "./nodal-linear.ts";

export interface Solution {
  /** Node voltages in V by node. */
  readonly voltages: ReadonlyMap<string, Complex>;
  /** Currents in A by component, of those whose current is an unknown (all but C and I). */
  readonly currents: ReadonlyMap<string, Complex>;
}

const one = complex(1);
const minusOne = complex(-1);

/** The linear system: one row and one unknown for each node but common, and for each current. */
export class Equations {
  private readonly indices = new Map<string, number>();
  private readonly nodes = new Set<string>();
  private readonly matrix: ComplexRow[];
  private readonly right: number[];

  constructor(netlist: Netlist) {
    for (const node of netlist.flatMap(nodesOf)) if (node !== "0") this.nodes.add(node);
    for (const name of [...this.nodes, ...netlist.flatMap(currentsOf)]) this.index(name);
    const size = this.indices.size;
    this.matrix = Array.from({ length: size }, () => zeroRow(size));
    this.right = new Array(size).fill(0);
  }

  private index(name: string): void {
    if (this.indices.has(name)) throw new Error(`"${name}" names two things`);
    this.indices.set(name, this.indices.size);
  }

  add(rowName: string, columnName: string, value: Complex): void {
    if (rowName === "0" || columnName === "0") return;
    const row = this.matrix[this.indices.get(rowName)!];
    const column = this.indices.get(columnName)!;
    row.re[column] += value.re;
    row.im[column] += value.im;
  }

  /** A current leaves its first node and enters its second (current law: what leaves a node adds up to what is fed). */
  flow(current: string, [first, second]: Ends): void {
    this.add(first, current, one);
    this.add(second, current, minusOne);
  }

  drive(rowName: string, value: number): void {
    if (rowName !== "0") this.right[this.indices.get(rowName)!] += value;
  }

  solve(): Solution {
    const right = this.balanceRows();
    const factors = factorise(this.matrix);
    let x = factors(right);
    // Refinement in the same precision makes the error small entry by entry, so that a node a thousand dB down is
    // right too (one 1400 dB down is not).
    // Source: R. D. Skeel, Iterative refinement implies numerical stability, Math. Comp. 35 (1980) 817–832.
    for (let pass = 0; pass < 2; pass++) {
      const residual = this.matrix.map((row, index) => minus(right[index], product(row, x)));
      const correction = factors(residual);
      x = x.map((value, index) => plus(value, correction[index]));
    }
    const named = [...this.indices].map(([name, index]) => [name, x[index]] as const);
    return {
      voltages: new Map([["0", complex(0)], ...named.filter(([name]) => this.nodes.has(name))]),
      currents: new Map(named.filter(([name]) => !this.nodes.has(name))),
    };
  }

  /** Rows in siemens, ohm and plain numbers side by side would mislead the choice of pivots. Gives the right side. */
  private balanceRows(): Complex[] {
    return this.matrix.map(({ re, im }, index) => {
      const largest = re.reduce(
        (most, part, column) => Math.max(most, Math.abs(part), Math.abs(im[column])),
        0,
      );
      const factor = 2 ** -Math.round(Math.log2(largest));
      for (let column = 0; column < re.length; column++) {
        re[column] *= factor;
        im[column] *= factor;
      }
      return scaled(complex(this.right[index]), factor);
    });
  }
}
