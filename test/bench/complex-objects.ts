import { abs, add, arg, type Complex, complex, divide, multiply } from "mathjs";
import { FREQS_HZ, LOAD_OHM, SECTIONS, SOURCE_OHM } from "./chain.ts";

const times = (p: Complex | number, q: Complex | number) => multiply(p, q) as Complex;
const plus = (p: Complex | number, q: Complex | number) => add(p, q) as Complex;
const over = (p: Complex | number, q: Complex | number) => divide(p, q) as Complex;

/** The benchmark's chain with mathjs complex objects: the pair (V, I) is carried from the load to the source. */
export function complexObjectsResponse(): { readonly gainDb: number[]; readonly phaseDeg: number[] } {
  const ratios = Array.from(FREQS_HZ, ratioAt);
  return {
    gainDb: ratios.map((h) => 20 * Math.log10(abs(h) as unknown as number)),
    phaseDeg: ratios.map((h) => (arg(h) as unknown as number) * (180 / Math.PI)),
  };
}

function ratioAt(freqHz: number): Complex {
  const s = complex(0, 2 * Math.PI * freqHz);
  let v: Complex = complex(1, 0);
  let i: Complex = complex(1 / LOAD_OHM, 0);
  for (const { L, Rw, C, Rc } of [...SECTIONS].reverse()) {
    i = plus(i, over(v, plus(Rc, over(1, times(s, C)))));
    v = plus(v, times(plus(Rw, times(s, L)), i));
  }
  return over(1, plus(v, times(SOURCE_OHM, i)));
}
