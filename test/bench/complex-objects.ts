import { abs, add, arg, type Complex, complex, divide, multiply } from "mathjs";
import type { Form } from "./chain.ts";
import { FREQS_HZ, LOAD_OHM, SECTIONS, SOURCE_OHM } from "./chain.ts";

type Value = Complex | number;
const times = (p: Value, q: Value) => multiply(p, q) as Complex;
const plus = (p: Value, q: Value) => add(p, q) as Complex;
const over = (p: Value, q: Value) => divide(p, q) as Complex;

/** The benchmark's chain with mathjs complex objects, frequency after frequency. */
export function complexObjectsResponse(form: Form): {
  readonly gainDb: number[];
  readonly phaseDeg: number[];
} {
  const ratios = Array.from(FREQS_HZ, form === "matrices" ? byMatrices : byPair);
  return {
    gainDb: ratios.map((h) => 20 * Math.log10(abs(h) as unknown as number)),
    phaseDeg: ratios.map((h) => (arg(h) as unknown as number) * (180 / Math.PI)),
  };
}

function branches({ L, Rw, C, Rc }: (typeof SECTIONS)[number], s: Complex): { z: Complex; y: Complex } {
  return { z: plus(Rw, times(s, L)), y: over(1, plus(Rc, over(1, times(s, C)))) };
}

function byMatrices(freqHz: number): Complex {
  const s = complex(0, 2 * Math.PI * freqHz);
  const load = 1 / LOAD_OHM;
  let [a, b, c, d]: Value[] = [1, 0, 0, 1];
  for (const section of SECTIONS) {
    const { z, y } = branches(section, s);
    const [sa, sb, sc, sd]: Value[] = [plus(1, times(z, y)), z, y, 1];
    [a, b, c, d] = [
      plus(times(a, sa), times(b, sc)),
      plus(times(a, sb), times(b, sd)),
      plus(times(c, sa), times(d, sc)),
      plus(times(c, sb), times(d, sd)),
    ];
  }
  return over(1, plus(plus(a, times(b, load)), times(SOURCE_OHM, plus(c, times(d, load)))));
}

function byPair(freqHz: number): Complex {
  const s = complex(0, 2 * Math.PI * freqHz);
  let v: Value = 1;
  let i: Value = 1 / LOAD_OHM;
  for (const section of SECTIONS.toReversed()) {
    const { z, y } = branches(section, s);
    i = plus(i, times(y, v));
    v = plus(v, times(z, i));
  }
  return over(1, plus(v, times(SOURCE_OHM, i)));
}
