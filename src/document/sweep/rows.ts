import { MAX_ROWS } from "./sweep.ts";

const FIRST_CAPACITY = 1024;

/** Rows in the order of the text, in typed arrays that double. */
export class Rows {
  count = 0;
  /** Whether the frequencies so far are strictly ascending. */
  ascending = true;
  private freqHz = new Float64Array(FIRST_CAPACITY);
  private gainDb = new Float64Array(FIRST_CAPACITY);
  private phaseDeg: Float64Array | undefined;

  constructor(hasPhase: boolean) {
    this.phaseDeg = hasPhase ? new Float64Array(FIRST_CAPACITY) : undefined;
  }

  get isFull(): boolean {
    return this.count >= MAX_ROWS;
  }

  push(freqHz: number, gainDb: number, phaseDeg: number): void {
    if (this.count === this.freqHz.length) this.grow();
    if (this.count > 0 && !(freqHz > this.freqHz[this.count - 1])) this.ascending = false;
    this.freqHz[this.count] = freqHz;
    this.gainDb[this.count] = gainDb;
    if (this.phaseDeg) this.phaseDeg[this.count] = phaseDeg;
    this.count += 1;
  }

  /** The rows so far. The arrays have exactly their length. */
  columns(): { freqHz: Float64Array; gainDb: Float64Array; phaseDeg?: Float64Array } {
    const cut = (values: Float64Array) => values.slice(0, this.count);
    const columns = { freqHz: cut(this.freqHz), gainDb: cut(this.gainDb) };
    return this.phaseDeg ? { ...columns, phaseDeg: cut(this.phaseDeg) } : columns;
  }

  private grow(): void {
    const capacity = Math.min(2 * this.count, MAX_ROWS);
    this.freqHz = grown(this.freqHz, capacity);
    this.gainDb = grown(this.gainDb, capacity);
    if (this.phaseDeg) this.phaseDeg = grown(this.phaseDeg, capacity);
  }
}

function grown(values: Float64Array, capacity: number): Float64Array<ArrayBuffer> {
  const larger = new Float64Array(capacity);
  larger.set(values);
  return larger;
}
