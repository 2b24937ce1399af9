import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { curveOf, sweepOf } from "./support.ts";

interface Point {
  readonly freqHz: number;
  readonly gainDb: number;
  readonly phaseDeg: number;
}

/** `String(-0)` is `0`. */
const withoutMinusZero = (value: number): number => value + 0;

const points = fc
  .uniqueArray(
    fc.record({
      freqHz: fc.double({ min: 1e-3, max: 1e10, noNaN: true }),
      gainDb: fc.double({ min: -200, max: 200, noNaN: true }).map(withoutMinusZero),
      phaseDeg: fc.double({ min: -180, max: 180, noNaN: true }).map(withoutMinusZero),
    }),
    { minLength: 2, maxLength: 20, selector: ({ freqHz }) => freqHz },
  )
  .map((rows) => rows.sort((a, b) => a.freqHz - b.freqHz));

const separators = fc.constantFrom(",", ";", "\t", "  ");
const lineEnds = fc.constantFrom("\n", "\r\n");

const write = (
  rows: readonly (readonly number[])[],
  separator: string,
  lineEnd: string,
  comma: boolean,
): string =>
  rows
    .map((row) =>
      row.map((value) => (comma ? String(value).replace(".", ",") : String(value))).join(separator),
    )
    .join(lineEnd);

const close = (found: readonly number[] | undefined, expected: readonly number[], digits: number) => {
  expect(found).toHaveLength(expected.length);
  expected.forEach((value, index) => {
    expect(found?.[index]).toBeCloseTo(value, digits);
  });
};

const numbersOf = ({ freqHz, gainDb, phaseDeg }: Point): number[] => [freqHz, gainDb, phaseDeg];

describe("what is written is read", () => {
  test("without a header, to the last bit, in every separator", () => {
    fc.assert(
      fc.property(points, separators, lineEnds, fc.boolean(), (rows, separator, lineEnd, wantsComma) => {
        const comma = wantsComma && (separator === ";" || separator === "\t");
        expect(curveOf(sweepOf(write(rows.map(numbersOf), separator, lineEnd, comma)))).toEqual({
          freqHz: rows.map(({ freqHz }) => freqHz),
          gainDb: rows.map(({ gainDb }) => gainDb),
          phaseDeg: rows.map(({ phaseDeg }) => phaseDeg),
        });
      }),
    );
  });

  // Each way of writing a response, from its definition.
  const size = (gainDb: number) => 10 ** (gainDb / 20);
  const angle = (phaseDeg: number) => (phaseDeg / 180) * Math.PI;
  const ways: readonly (readonly [string, (point: Point) => number[]])[] = [
    [
      "Frequency (kHz),Gain (dB),Phase (rad)",
      ({ freqHz, gainDb, phaseDeg }) => [freqHz / 1e3, gainDb, angle(phaseDeg)],
    ],
    ["phase_deg,ratio,freq_MHz", ({ freqHz, gainDb, phaseDeg }) => [phaseDeg, size(gainDb), freqHz / 1e6]],
    [
      "f/GHz,Vin (mV),Vout (V),phase/°",
      ({ freqHz, gainDb, phaseDeg }) => [freqHz / 1e9, 2000, 2 * size(gainDb), phaseDeg],
    ],
    [
      "f,re,im",
      ({ freqHz, gainDb, phaseDeg }) => [
        freqHz,
        size(gainDb) * Math.cos(angle(phaseDeg)),
        size(gainDb) * Math.sin(angle(phaseDeg)),
      ],
    ],
  ];

  test.each(ways)("under the header %s", (header, columnsOf) => {
    fc.assert(
      fc.property(points, fc.constantFrom(",", ";", "\t"), (rows, separator) => {
        const lines = write(rows.map(columnsOf), separator, "\n", separator !== ",");
        const { freqHz, gainDb, phaseDeg } = curveOf(
          sweepOf(`${header.replaceAll(",", separator)}\n${lines}`),
        );
        close(
          freqHz.map((value, index) => value / rows[index].freqHz),
          rows.map(() => 1),
          14,
        );
        close(
          gainDb,
          rows.map((row) => row.gainDb),
          9,
        );
        // −180° and 180° are one direction.
        close(
          phaseDeg?.map((value, index) => Math.cos(angle(value - rows[index].phaseDeg))),
          rows.map(() => 1),
          14,
        );
      }),
    );
  });

  const formats: readonly (readonly [string, (point: Point) => number[]])[] = [
    ["DB", ({ gainDb, phaseDeg }) => [gainDb, phaseDeg]],
    ["MA", ({ gainDb, phaseDeg }) => [size(gainDb), phaseDeg]],
    [
      "RI",
      ({ gainDb, phaseDeg }) => [
        size(gainDb) * Math.cos(angle(phaseDeg)),
        size(gainDb) * Math.sin(angle(phaseDeg)),
      ],
    ],
  ];

  test.each(formats)("as .s2p in %s", (format, pairOf) => {
    fc.assert(
      fc.property(points, (rows) => {
        const lines = rows.map((row) => [row.freqHz, 1, 2, ...pairOf(row), 3, 4, 5, 6].join(" "));
        const { freqHz, gainDb, phaseDeg } = curveOf(sweepOf(`# ${format} Hz\n${lines.join("\n")}`, "a.s2p"));
        expect(freqHz).toEqual(rows.map((row) => row.freqHz));
        close(
          gainDb,
          rows.map((row) => row.gainDb),
          9,
        );
        close(
          phaseDeg?.map((value, index) => Math.cos(angle(value - rows[index].phaseDeg))),
          rows.map(() => 1),
          14,
        );
      }),
    );
  });
});
