import { describe, expect, test } from "vitest";
import { meaningOf } from "../../../src/document/sweep/cell.ts";

/** Role and label of a cell, or why it is no column. */
const said = (cell: string): string => {
  const meaning = meaningOf(cell);
  if (meaning.type === "column") return `${meaning.column.role}: ${meaning.column.label}`;
  return meaning.type === "unknown" && meaning.hasUnit ? "unknown with a unit" : meaning.type;
};

// Cells as bench instruments and spreadsheets write them: common practice, no source.
const MEANINGS: Readonly<Record<string, readonly string[]>> = {
  "frequency: frequency": [
    "f",
    "freq",
    "Freq.",
    "Frequency",
    "FREQUENCY (HZ)",
    "freq_hz",
    "f/Hz",
    "f [Hz]",
    "freqHz",
    "Hz",
    "Frequency in Hz",
  ],
  "frequency: frequency in kHz": [
    "Frequency (kHz)",
    "freq_khz",
    "freq_kHz",
    "f/kHz",
    "freqKHz",
    "F {KHZ}",
    "kHz",
  ],
  "frequency: frequency in MHz": ["f [MHz]", "freq_mhz", "freqMHz", "Frequency, MHz"],
  "frequency: frequency in GHz": ["f (GHz)", "freq-ghz"],
  "gainDb: dB": [
    "gain_db",
    "gain_dB",
    "gainDb",
    "gaindB",
    "Mag (dB)",
    "|H| dB",
    "Magnitude [dB]",
    "dB",
    "Level (dB)",
    "Gain in dB",
    "Vout/Vin (dB)",
    "S21 (dB)",
    "Response/dB",
  ],
  "ratio: ratio": [
    "ratio",
    "magnitude",
    "Mag",
    "Vout/Vin",
    "gain",
    "|H|",
    "abs(H)",
    "gain (V/V)",
    "Gain lin",
    "out/in",
    "V_out / V_in",
  ],
  "input: input voltage": ["Vin", "V_in", "vin (V)", "Uin", "Input (V)", "Input voltage", "in", "Vin/Vrms"],
  "input: input voltage in mV": ["Vin (mV)", "vin_mv", "Input voltage / mV"],
  "output: output voltage": [
    "Vout",
    "V_out",
    "vout [V]",
    "Uout",
    "Output (V)",
    "output voltage",
    "out",
    "Output level (V)",
  ],
  "output: output voltage in µV": ["Vout (uV)", "Vout (µV)", "Vout (μV)"],
  "phase: degrees": [
    "phase",
    "phase_deg",
    "Phase (deg)",
    "phase (°)",
    "phaseDeg",
    "Angle [degrees]",
    "∠H (°)",
    "φ/°",
    "deg",
    "Phase in degrees",
    "arg(H)",
  ],
  "phase: radians": ["Phase (rad)", "phase_rad", "phi/rad", "radians"],
  "phaseUnwrapped: degrees": ["phaseUnwrappedDeg", "unwrapped phase (deg)"],
  "real: real part": ["re", "Re(H)", "real", "Real part", "S21 real", "H_re"],
  "imaginary: imaginary part": ["im", "Im(H)", "imag", "Imaginary part"],
  other: [
    "Time (s)",
    "attenuationDb",
    "Loss (dB)",
    "slopeDbPerDecade",
    "groupDelayS",
    "Coherence",
    "Temp (°)",
    "No.",
  ],
  unknown: ["foo", "", "Vin/Vout", "amplitude", "level", "gain_dbm", "f2", "phse", "Vin gain", "re im"],
  "unknown with a unit": [
    "foo (dB)",
    "gain (dBV)",
    "gain (Hz)",
    "phase (dB)",
    "Vref (V)",
    "amplitude (V)",
    "gain (mV)",
    "f (deg)",
    "Vin (dB)",
    "V",
    "gain error (dB)",
    "unwrapped gain (dB)",
  ],
};

describe("meaning of a header cell", () => {
  test.each(
    Object.entries(MEANINGS).flatMap(([meaning, cells]) => cells.map((cell) => [cell, meaning] as const)),
  )("%j is %s", (cell, meaning) => {
    expect(said(cell)).toBe(meaning);
  });
});
