import { describe, expect, test } from "vitest";
import { curveOf, sweepOf } from "./support.ts";

// Files-and-commands, "Bench sweeps". Each text says the same: 1 kHz, -20 dB, -90° and 2 kHz, -40 dB, 45°.
const WITH_PHASE: readonly (readonly [string, string])[] = [
  ["commas, no header", "1000,-20,-90\n2000,-40,45\n"],
  ["blanks around commas", "1000, -20 , -90\n 2000,\t-40, 45"],
  ["semicolons", "1000;-20;-90\n2000;-40;45\n"],
  ["semicolons and decimal commas", "1000,0;-20,00;-90\n2000,;-4,0e1;45,0\n"],
  ["tabs", "1000\t-20\t-90\n2000\t-40\t45\n"],
  ["tabs and decimal commas", "1000\t-20,0\t-90,0\n2000\t-40\t45\n"],
  ["blanks", "  1000   -20  -90\n2000 -40 \t 45  \n"],
  ["blanks and tabs mixed", "1000 -20\t-90\n2000 \t-40 45\n"],
  ["signs and exponents", "+1e3,-2E+1,-900e-1\n.2E4,-40.,+45\n"],
  ["a true minus sign", "1000,−20,−90\n2000,−40,45\n"],
  ["CR LF", "1000,-20,-90\r\n2000,-40,45\r\n"],
  ["CR alone", "1000,-20,-90\r2000,-40,45\r"],
  ["byte order mark", "\ufeff1000,-20,-90\n2000,-40,45\n"],
  ["blank lines", "\n \n1000,-20,-90\n\t\n\n2000,-40,45\n\n"],
  ["rows of separators alone", "1000;-20;-90\n;;\n2000;-40;45\n;;;\n"],
  ["comment lines", "# pump 2\n! rig B\n  % 25 °C, after warm-up\n1000,-20,-90\n#2000,0,0\n2000,-40,45\n"],
  ["trailing comments", "1000,-20,-90 # first\n2000,-40,45\t! 2; last\n"],
  ["trailing comments behind blanks", "1000 -20 -90 % a, b\n2000 -40 45 # c, d\n"],
  ["quoted fields", '"1000","-20","-90"\n"2000", "-40" ,45\n'],
  ["quoted decimal commas", '"1000,0";"-20,0";"-90"\n2000,0;-40,0;45\n'],
  ["fields empty at the end", "1000,-20,-90,\n2000,-40,45,,\n"],
  ["a header in kHz", "Frequency (kHz),Mag (dB),Phase (deg)\n1,-20,-90\n2,-40,45\n"],
  ["a header in MHz", "f [MHz];|H| dB;phase (°)\n0,001;-20;-90\n0,002;-40;45\n"],
  ["a header in GHz", "f/GHz\tgain/dB\tphase/deg\n1e-6\t-20\t-90\n2e-6\t-40\t45\n"],
  ["a quoted header", '"Frequency, Hz","Gain, dB","Phase, deg"\n1000,-20,-90\n2000,-40,45\n'],
  ["a header between single blanks", "Frequency (Hz) Gain (dB) Phase (deg)\n1000 -20 -90\n2000 -40 45\n"],
  ["a header between wide blanks", "Frequency Hz   Gain dB   Phase deg\n1000 -20 -90\n2000 -40 45\n"],
  ["other order of columns", "phase_deg,gain_db,freq_hz\n-90,-20,1000\n45,-40,2000\n"],
  ["columns beside the response", "time,freq_hz,note,gain_db,phase_deg\n0,1000,ok,-20,-90\n,2000,,-40,45\n"],
  ["a ratio", "freq_hz,ratio,phase_deg\n1000,0.1,-90\n2000,0.01,45\n"],
  ["a ratio of named voltages", "freq_hz,Vout/Vin,phase_deg\n1000,0.1,-90\n2000,0.01,45\n"],
  ["two voltages", "freq_hz,Vin,Vout,phase_deg\n1000,2,0.2,-90\n2000,2,0.02,45\n"],
  ["two voltages of different units", "freq_hz,Vout (mV),Vin (V),phase_deg\n1000,200,2,-90\n2000,20,2,45\n"],
  ["radians", "freq_hz,gain_db,Phase (rad)\n1000,-20,-1.5707963267948966\n2000,-40,0.7853981633974483\n"],
  [
    "real and imaginary part",
    "freq_hz,re,im\n1000,0,-0.1\n2000,0.0070710678118654755,0.0070710678118654755\n",
  ],
  ["real part with words", "f;Re(H);Im(H)\n1000;0;-0,1\n2000;0,0070710678118654755;0,0070710678118654755\n"],
  [
    "the program's own table",
    "freqHz,gainDb,attenuationDb,ratio,phaseDeg,phaseUnwrappedDeg,groupDelayS,slopeDbPerDecade\n" +
      "1000,-20,20,0.1,-90,-90,1e-6,-20\n2000,-40,40,0.01,45,-315,1e-6,-20\n",
  ],
];

describe("forms of one sweep", () => {
  test.each(WITH_PHASE)("%s", (_, text) => {
    const { freqHz, gainDb, phaseDeg } = curveOf(sweepOf(text));
    expect(freqHz).toEqual([1000, 2000]);
    expect(gainDb[0]).toBeCloseTo(-20, 12);
    expect(gainDb[1]).toBeCloseTo(-40, 12);
    expect(phaseDeg?.[0]).toBeCloseTo(-90, 12);
    expect(phaseDeg?.[1]).toBeCloseTo(45, 12);
  });

  test.each([
    ["no header", "1000,-20\n2000,-40\n"],
    ["dB", "freq_hz,gain_db\n1000,-20\n2000,-40\n"],
    ["voltages", "freq_hz,Uin,Uout\n1000,10,1\n2000,10,0.1\n"],
  ])("%s without a phase", (_, text) => {
    const sweep = sweepOf(text);
    expect(sweep).not.toHaveProperty("phaseDeg");
    expect(sweep.gainDb[0]).toBeCloseTo(-20, 12);
    expect(sweep.understood.notes).toContain("no phase: a table stage made from it has phase 0");
  });
});

describe("what was understood", () => {
  test("of columns, unit, rows and range", () => {
    const { understood } = sweepOf("t;f (kHz);Gain (dB);phase\n1;20;-3;0\n2;10;-1;0\n3;30;-5;0\n");
    expect(understood).toEqual({
      separator: "semicolon",
      columns: ["not read", "frequency in kHz", "dB", "degrees"],
      unit: "kHz",
      rows: 3,
      rangeHz: [10_000, 30_000],
      averaged: 0,
      notes: [
        'column "t" is not read',
        '"phase" has no unit, read as degrees',
        "rows were not in ascending order, sorted by frequency",
      ],
    });
  });

  test.each([
    ["1,-3\n2,-4\n", "no header: read as frequency in Hz and dB"],
    ["1,-3,0\n2,-4,0\n", "no header: read as frequency in Hz, dB and degrees"],
    ["f,gain_db\n1,-3\n2,-4\n", '"f" has no unit, read as Hz'],
    ["f_hz,gain_db,ratio\n1,-3,2\n2,-4,2\n", 'column "ratio" is not read'],
    [
      "# freq_kHz,gain_db\n1,-3\n2,-4\n",
      "the comment above line 2 looks like a header but is not read as one; --columns can say so",
    ],
  ])("%j notes %j", (text, note) => {
    expect(sweepOf(text).understood.notes).toContain(note);
  });

  test("a comment that says what is assumed anyway needs no note", () => {
    expect(sweepOf("# freq_hz,gain_db,phase_deg\n1,-3,0\n2,-4,0\n").understood.notes).toHaveLength(1);
  });
});
