import { describe, expect, it } from "vitest";
import { complex, divide, logarithm, modulus, multiply, squareRoot } from "../../src/core/complex.ts";

describe("divide(a, b)", () => {
  it("undoes multiplication", () => {
    // By hand: (3 + 2j)(1 − 4j) = 11 − 10j.
    expect(multiply(complex(3, 2), complex(1, -4))).toEqual(complex(11, -10));
    expect(divide(complex(11, -10), complex(1, -4))).toEqual(complex(3, 2));
  });

  it("keeps clear of overflow and underflow", () => {
    expect(divide(complex(1e200, 1e200), complex(1e200, 1e200))).toEqual(complex(1, 0));
    expect(divide(complex(1e-200, 0), complex(0, 1e-200))).toEqual(complex(0, -1));
  });
});

describe("squareRoot(z)", () => {
  // By hand: (2 + 3j)² = −5 + 12j; the root with real part ≥ 0 is taken.
  it.each([
    [complex(-5, 12), complex(2, 3)],
    [complex(-5, -12), complex(2, -3)],
    [complex(-4, 0), complex(0, 2)],
    [complex(9, 0), complex(3, 0)],
    [complex(0, 0), complex(0, 0)],
  ])("√%o = %o", (square, root) => {
    expect(squareRoot(square)).toEqual(root);
  });

  it("keeps the digits of a small component", () => {
    // √(1 + δj) = 1 + δj/2 up to δ²/8.
    expect(squareRoot(complex(1, 1e-20)).im).toBe(5e-21);
    expect(squareRoot(complex(-1, 1e-20)).re).toBe(5e-21);
  });
});

describe("logarithm(z) and modulus(z)", () => {
  it("take the principal branch", () => {
    expect(logarithm(complex(0, Math.E))).toEqual(complex(1, Math.PI / 2));
    expect(logarithm(complex(-1, 0))).toEqual(complex(0, Math.PI));
    expect(modulus(complex(3e200, 4e200))).toBeCloseTo(5e200, -190);
  });
});
