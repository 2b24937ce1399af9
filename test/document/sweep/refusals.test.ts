import { describe, expect, test } from "vitest";
import { ALLOWED_HEADERS } from "../../../src/document/sweep/header.ts";
import { refusalOf } from "./support.ts";

const ROWS = "rows of frequency, dB and degrees";
const TWO = "at least two rows of different frequency";
const COMMAS = "decimal points, or decimal commas where a semicolon or tab separates";
const MARKS = "points throughout, or commas throughout, and nothing between thousands";

describe("files that are no sweep", () => {
  test.each([
    ["nothing", "", "pump2.csv: no rows", TWO],
    ["a byte order mark alone", "\ufeff", "pump2.csv: no rows", TWO],
    ["blanks alone", " \n\t\r\n", "pump2.csv: no rows", TWO],
    ["comments alone", "# a\n! b\n% c", "pump2.csv: no rows", TWO],
    ["a header alone", "freq_hz,gain_db\n", "pump2.csv: no rows", TWO],
    ["a single row", "1000,-3,45\n", "pump2.csv: a single row", TWO],
    ["a header and a row", "freq_hz,gain_db\n1000,-3\n", "pump2.csv: a single row", TWO],
    ["one frequency", "1000,-3\n1000,-4\n1000,-5\n", "pump2.csv: 3 rows of one frequency", TWO],
  ])("%s", (_, text, found, allowed) => {
    expect(refusalOf(text)).toBe(`${found}; allowed are ${allowed}`);
  });
});

describe("rows that are refused with their line", () => {
  test.each([
    ["1,2,3\n2,3,4\nabc,3,4\n", 3, '"abc" is no number', ROWS],
    ["1,2,3\n\n# c\r\n2,x,4\n", 4, '"x" is no number', ROWS],
    ["1,2,3\n2,3,4\nabc\n", 3, '"abc" is no number', ROWS],
    ["1,2,3\n2,3,nan\n", 2, '"nan" is no number', ROWS],
    ["1,2,3\n2,-inf,3\n", 2, '"-inf" is no number', ROWS],
    ["1,2,3\n2,0x10,3\n", 2, '"0x10" is no number', ROWS],
    ["1,2,3\n2,1e,3\n", 2, '"1e" is no number', ROWS],
    ["1,2,3\n2,1.2.3,3\n", 2, '"1.2.3" is no number', ROWS],
    ["1,2,3\n2,--1,3\n", 2, '"--1" is no number', ROWS],
    ["1,2,3\n2k,1,3\n", 2, '"2k" is no number', ROWS],
    ["1,2,3\n2,50%,3\n", 2, '"50%" is no number', ROWS],
    ["1;2;3\n2;3;50 %\n", 2, '"50 %" is no number', ROWS],
    ["1,2,3\n2,,3\n", 2, "an empty field", ROWS],
    ["1,2,3\n2,1e999,3\n", 2, '"1e999" is not finite', ROWS],
    ["1,2,3\n2,3\n", 2, "2 columns", ROWS],
    ["1,2,3\n2\n", 2, "1 column", ROWS],
    ["1,2,3\n2,3,4,5\n", 2, "4 columns", ROWS],
    ["1,2\n2,3,4\n", 2, "3 columns", "rows of frequency and dB"],
    ["1,2,3\n0,3,4\n", 2, "a frequency of 0 Hz", "frequencies above 0"],
    ["1,2,3\n-5,3,4\n", 2, "a frequency of -5 Hz", "frequencies above 0"],
    ["f_ghz,gain_db\n1,2\n1e300,3\n", 3, "a frequency beyond 1e308 Hz", "finite frequencies"],
    ["1,2,3\n2,7000,4\n", 2, "a gain of 7000 dB", "gains from -6000 dB to 6000 dB"],
    ["1,2,3\n2,3,1e10\n", 2, "a phase beyond 1e9 degrees", "phases from -1e9 to 1e9 degrees"],
    ["f,ratio\n1,2\n2,0\n", 3, "a ratio of 0", "ratios above 0, or gains in dB where the header says so"],
    ["f,gain\n1,-3\n2,-4\n", 2, "a ratio of -3", "ratios above 0, or gains in dB where the header says so"],
    ["f,Vin,Vout\n1,1,1\n2,0,1\n", 3, "voltages of 0 V and 1 V", "amplitudes above 0"],
    ["f,Vin,Vout\n1,1,1\n2,-1,-1\n", 3, "voltages of -1 V and -1 V", "amplitudes above 0"],
    [
      "f,re,im\n1,1,1\n2,0,0\n",
      3,
      "real and imaginary parts both 0, which is no gain in dB",
      "responses other than 0",
    ],
    ["1000,5 -3,01\n2000,5 -4,02\n", 1, '"5 -3" beside a comma', COMMAS],
    ['1,2,3\n2,"3,5",4\n', 2, '"3,5" beside a comma', COMMAS],
    ["1\t2.5\n1,000\t3.5\n", 2, '"1,000" has another decimal mark than the rows before', MARKS],
    ["1,5;2\n2;3.5\n", 2, '"3.5" has another decimal mark than the rows before', MARKS],
    ['1,2,3\n2,"3,4\n', 2, "a quotation mark that is not closed", "fields quoted as a whole on one line"],
    ['1,2,3\n2,"3"x,4\n', 2, "text behind a quoted field", "fields quoted as a whole on one line"],
  ])("%j", (text, line, found, allowed) => {
    expect(refusalOf(text)).toBe(`pump2.csv:${line}: ${found}; allowed are ${allowed}`);
  });

  test("four columns without a header ask for names", () => {
    expect(refusalOf("1,2,3,4\n2,3,4,5\n")).toBe(
      "pump2.csv:1: 4 columns without a header; allowed are rows of frequency, dB and degrees (degrees may be left out), " +
        "or columns named as in --columns freq_kHz,skip,gain_dB,phase_deg",
    );
  });
});

describe("headers that are refused with what was found", () => {
  test.each([
    ["foo,bar\n1,2\n", 'no frequency in the columns "foo" and "bar"'],
    ["f,phase_deg\n1,2\n", 'no gain in the columns "f" and "phase_deg"'],
    ["f,re\n1,2\n", 'no gain in the columns "f" and "re"'],
    ["f,Vin\n1,2\n", 'no gain in the columns "f" and "Vin"'],
    [
      "f,gain_db,mag_db\n1,2,3\n",
      'more than one column of the same kind, the columns "gain_db" and "mag_db"',
    ],
    ["f_hz,f_khz,gain_db\n1,2,3\n", 'more than one column of the same kind, the columns "f_hz" and "f_khz"'],
    ["f,gain_db,offset (dB)\n1,2,3\n", 'the unknown column "offset (dB)"'],
    ["f,gain (dBV)\n1,2\n", 'the unknown column "gain (dBV)"'],
    ["f,gain_db,Vref (V)\n1,2,3\n", 'the unknown column "Vref (V)"'],
    ["f,Vin/Vout\n1,2\n", 'no gain in the columns "f" and "Vin/Vout"'],
    ["f,amplitude\n1,2\n", 'no gain in the columns "f" and "amplitude"'],
    ["\nhello\n", '"hello" alone', 2],
  ])("%j", (text, found, line = 1) => {
    expect(refusalOf(text)).toBe(`pump2.csv:${line}: ${found}; allowed are ${ALLOWED_HEADERS}`);
  });

  test("mHz could be either", () => {
    expect(refusalOf("freq (mHz),gain_db\n1,2\n")).toBe(
      'pump2.csv:1: the column "freq (mHz)", in millihertz or megahertz; allowed are Hz, kHz, MHz and GHz',
    );
  });
});
