import { LuDecomposition, Matrix } from "ml-matrix";
import { type Complex, complex } from "./nodal-complex.ts";
import { currentsOf, type Ends, type Netlist, nodesOf } from "./nodal-components.ts";

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
  private readonly size: number;
  /** The complex system M·x = e as [[Re M, −Im M], [Im M, Re M]]·[Re x; Im x] = [Re e; Im e]. */
  private readonly matrix: Matrix;
  private readonly right: Matrix;

  constructor(netlist: Netlist) {
    for (const node of netlist.flatMap(nodesOf)) if (node !== "0") this.nodes.add(node);
    for (const name of [...this.nodes, ...netlist.flatMap(currentsOf)]) this.index(name);
    this.size = this.indices.size;
    this.matrix = Matrix.zeros(2 * this.size, 2 * this.size);
    this.right = Matrix.zeros(2 * this.size, 1);
  }

  private index(name: string): void {
    if (this.indices.has(name)) throw new Error(`"${name}" names two things`);
    this.indices.set(name, this.indices.size);
  }

  add(rowName: string, columnName: string, value: Complex): void {
    if (rowName === "0" || columnName === "0") return;
    const row = this.indices.get(rowName)!;
    const column = this.indices.get(columnName)!;
    const accumulate = (r: number, c: number, x: number) => this.matrix.set(r, c, this.matrix.get(r, c) + x);
    accumulate(row, column, value.re);
    accumulate(row + this.size, column + this.size, value.re);
    accumulate(row + this.size, column, value.im);
    accumulate(row, column + this.size, -value.im);
  }

  /** A current leaves its first node and enters its second (current law: what leaves a node adds up to what is fed). */
  flow(current: string, [first, second]: Ends): void {
    this.add(first, current, one);
    this.add(second, current, minusOne);
  }

  drive(rowName: string, value: number): void {
    if (rowName === "0") return;
    const row = this.indices.get(rowName)!;
    this.right.set(row, 0, this.right.get(row, 0) + value);
  }

  solve(): Solution {
    this.balanceRows();
    const decomposition = new LuDecomposition(this.matrix);
    let x = decomposition.solve(this.right);
    // Refinement in the same precision makes the error small entry by entry, so that a node 300 dB down is right too:
    // R. D. Skeel, Iterative refinement implies numerical stability for Gaussian elimination, Math. Comp. 35 (1980).
    for (let pass = 0; pass < 2; pass++) {
      x = Matrix.add(x, decomposition.solve(Matrix.sub(this.right, this.matrix.mmul(x))));
    }
    const value = (index: number) => complex(x.get(index, 0), x.get(index + this.size, 0));
    const named = [...this.indices].map(([name, index]) => [name, value(index)] as const);
    return {
      voltages: new Map([["0", complex(0)], ...named.filter(([name]) => this.nodes.has(name))]),
      currents: new Map(named.filter(([name]) => !this.nodes.has(name))),
    };
  }

  /** Rows in siemens, ohm and plain numbers side by side would mislead the choice of pivots. */
  private balanceRows(): void {
    for (let row = 0; row < 2 * this.size; row++) {
      const largest = this.matrix.getRow(row).reduce((most, entry) => Math.max(most, Math.abs(entry)), 0);
      const factor = 2 ** -Math.round(Math.log2(largest));
      this.matrix.mulRow(row, factor);
      this.right.mulRow(row, factor);
    }
  }
}
