import { describe, expect, test } from "vitest";
import { problemText } from "../../src/document/problem.ts";
import { read, withStages } from "./read-here.ts";

/**
 * Each text with `§` in front of the character that the message must point at, then the rest of the message.
 * Lines and columns are counted here from that mark, by the rule of the format: from 1, in characters.
 */
type Case = readonly [marked: string, message: string];

const RC = '"kind":"rc-lowpass"';
const given = (parts: string, rest = "") => withStages(`{${RC},"parts":{${parts}}${rest}}`);
const formula = (expression: string, rest = "") =>
  withStages(`{"kind":"formula","parts":{"H":§${JSON.stringify(expression)}${rest}}}`);
const top = (entry: string) => withStages("", `,\n\t${entry}`);
const filter = (parts: string) => withStages(`{"kind":"filter","parts":{"shape":"lowpass",${parts}}}`);

const OHM = "a resistance in ohm, as in 4.7k, 4k7 or 4.7 kohm";
const HZ = "a frequency in Hz, as in 50, 12.5k or 1 MHz";
const TOLERANCE = "a tolerance above 0 and below 100 %, as in 5% or 0.05";
const ALLOWED_VALUE = "a value: a text in double quotes, a number, true, false, a list or an object";
const WORDS = "numbers, names, + - * / ^ and parentheses";
const OPERAND = "a number, a name or an opening parenthesis";

const text: readonly Case[] = [
  ["§", `the chain: the file is empty; allowed is ${ALLOWED_VALUE}`],
  ["§[]", 'the chain: found an empty list; allowed is an object with "format", "version" and "stages"'],
  [
    "§// a remark\n{}",
    'the chain: found "// a remark"; allowed is no comments; what is to be remembered goes into "notes"',
  ],
  ["{\n  §'a': 1}", "the chain: found \"'a'\"; allowed is a name in double quotes"],
  ['{"a": [1§,\n]}', 'a[1]: there is a comma before "]"; allowed is no comma behind the last entry'],
  ['{"a": 1§,}', 'the chain: there is a comma before "}"; allowed is no comma behind the last entry'],
  ['{"a" §1}', 'a: found "1"; allowed is a colon after the name'],
  [
    '{"a": 1\r\n §"b": 2}',
    'b: found ""b""; allowed is a comma between entries, or the closing bracket of the same kind',
  ],
  ['{"a": §NaN}', `a: found "NaN"; allowed is ${ALLOWED_VALUE}`],
  ['{"a": 0§1}', 'a: found "1"; allowed is a comma between entries, or the closing bracket of the same kind'],
  [
    '{"a": §1.}',
    'a: found "1."; allowed is a number with digits behind its point and exponent, as in 4.7 or 1e3',
  ],
  ['{"𝄞": §tru}', `["𝄞"]: found "tru"; allowed is ${ALLOWED_VALUE}`],
  ['{"a": §"x\ty"}', 'a: found ""x y""; allowed is control characters as escapes, as in \\n or \\t'],
  ['{"a": §"\\q"}', 'a: found ""\\q""; allowed is after a backslash one of " \\ / b f n r t u'],
  ['{"a": {}§', 'a: found the end of the file; allowed is a comma or a closing "}"'],
  ["{} §x", 'the chain: found "x"; allowed is nothing more after the end of the chain'],
  ['{"a": 1, §"a": 2}', 'a: "a" is given a second time; allowed is each name once in an object'],
  [
    '{"a": {"b": [0, {§"__proto__": 2}]}}',
    'a.b[1].__proto__: there is no "__proto__" in a chain; allowed is any other name',
  ],
];

const head: readonly Case[] = [
  ["§{}", 'format: it is missing; allowed is "halfpower-chain"'],
  ['{"format": §"other", "x": 1}', 'format: found "other"; allowed is "halfpower-chain"'],
  ['§{"format":"halfpower-chain"}', "version: it is missing; allowed is 1"],
  ['{"format":"halfpower-chain","version":§"1"}', 'version: found "1"; allowed is 1'],
  [
    '{"colour":1,"format":"halfpower-chain","version":§2}',
    "version: found 2, a newer version of the format; allowed is 1, the version that this program reads; " +
      "a newer program is needed for this file",
  ],
  [
    '§{"format":"halfpower-chain","version":1}',
    "stages: it is missing; allowed is a list of stages in square brackets",
  ],
  [
    top('§"colour": 1'),
    'colour: there is no "colour" here; allowed is format, version, title, notes, caution, against, temperature, ' +
      "distribution, source, stages, load, converter, sweep, limits",
  ],
  [top('"title": §5'), "title: found 5; allowed is a text of at most 500 characters"],
  [
    top(`"title": §"${"x".repeat(501)}"`),
    "title: found a text of 501 characters; allowed is a text of at most 500 characters",
  ],
  [top('"against": §"output"'), 'against: found "output"; allowed is "emf", "input" or "insertion"'],
  [top('"distribution": §"gauss"'), 'distribution: found "gauss"; allowed is "uniform" or "normal"'],
  [top('"temperature": §-273.15'), "temperature: -273.15 is out of range; allowed is more than -273.15 °C"],
];

const stages: readonly Case[] = [
  [
    withStages("§5"),
    "stages[0]: found 5; allowed is an object with kind, name, off, parts, tolerance, caution",
  ],
  [
    withStages("§{}"),
    'stages[0].kind: it is missing; allowed is the name of a kind of stage, as in "rc-lowpass"',
  ],
  [
    withStages('{"kind":§5}'),
    'stages[0].kind: found 5; allowed is the name of a kind of stage, as in "rc-lowpass"',
  ],
  [
    withStages('{"kind":§"RC lopass"}'),
    'stages[0].kind: there is no kind "RC lopass"; allowed is for example rc-lowpass, rl-lowpass or lc-lowpass',
  ],
  [
    withStages(`{${RC},"parts":§[]}`),
    'stages[0].parts: found an empty list; allowed is an object of values by part, as in { "R": "1k" }',
  ],
  [withStages(`§{${RC}}`), `stages[0].parts.R: it is missing (series resistor); allowed is ${OHM}`],
  [
    withStages(`{${RC},"parts":§{"C":"1n"}}`),
    `stages[0].parts.R: it is missing (series resistor); allowed is ${OHM}`,
  ],
  [
    given('"R":§"4,7k","C":"1n"'),
    'stages[0].parts.R: "4,7k" has a comma; allowed is a decimal point, as in 4.7k',
  ],
  [given('"R":§"4.7 F","C":"1n"'), `stages[0].parts.R: "4.7 F" is in F; allowed is ${OHM}`],
  [given('"R":§-4700,"C":"1n"'), "stages[0].parts.R: -4700 is out of range; allowed is more than 0 Ω"],
  [given('"R":§"0","C":"1n"'), 'stages[0].parts.R: "0" is out of range; allowed is more than 0 Ω'],
  [
    given('"R":§1e999,"C":"1n"'),
    "stages[0].parts.R: Infinity is not a finite number; allowed is a finite number, at most about 1e308",
  ],
  [given('"R":§null,"C":"1n"'), `stages[0].parts.R: found null; allowed is ${OHM}`],
  [given('"R":§" ","C":"1n"'), `stages[0].parts.R: it is empty; allowed is ${OHM}`],
  [given('"R":§{"a":1},"C":"1n"'), `stages[0].parts.R: found an object in braces; allowed is ${OHM}`],
  [given('§"r":1,"C":"1n"'), 'stages[0].parts.r: rc-lowpass has no part "r"; allowed is for example R'],
  [given('"R":1,"C":1,§"L":1'), 'stages[0].parts.L: rc-lowpass has no part "L"; allowed is R or C'],
  [given('"R":1,"C":1', ',"off":§"yes"'), 'stages[0].off: found "yes"; allowed is true or false'],
  [
    given('"R":1,"C":1', ',"name":§7'),
    "stages[0].name: found 7; allowed is a text of at most 200 characters",
  ],
  [
    given('"R":1,"C":1', ',§"Off":true'),
    'stages[0].Off: there is no "Off" here; allowed is kind, name, off, parts, tolerance, caution',
  ],
  [
    given('"R":1,"C":1', ',"tolerance":{§"L":"1%"}'),
    'stages[0].tolerance.L: rc-lowpass has no part "L"; allowed is R or C',
  ],
  [
    given('"R":1,"C":1', ',"tolerance":{"C":§"100%"}'),
    `stages[0].tolerance.C: "100%" is 100 %; allowed is ${TOLERANCE}`,
  ],
  [given('"R":1,"C":1', ',"tolerance":{"C":§0}'), `stages[0].tolerance.C: 0 is 0 %; allowed is ${TOLERANCE}`],
  [
    given('"R":1,"C":1', ',"tolerance":{"C":§true}'),
    `stages[0].tolerance.C: found true; allowed is ${TOLERANCE}`,
  ],
  [
    withStages('{"kind":"rl-lowpass","parts":{"L":1,"R":1},"tolerance":{§"Rw":"1%"}}'),
    'stages[0].tolerance.Rw: the part "Rw" is not given; allowed is a tolerance of a part that is given',
  ],
  [
    filter('"family":"butterworth","order":2,"corner":1},"tolerance":{§"shape":"1%"'),
    'stages[0].tolerance.shape: the part "shape" is no number; allowed is a tolerance of a part that is a number',
  ],
  [
    filter('"family":§"Butterworth","order":2,"corner":1'),
    'stages[0].parts.family: found "Butterworth"; allowed is "butterworth", "chebyshev", "inverse-chebyshev", "bessel" or "elliptic"',
  ],
  [
    filter('"family":"bessel","order":§2.5,"corner":1'),
    "stages[0].parts.order: 2.5 is out of range; allowed is a whole number from 1 to 30",
  ],
  [
    filter('"family":"bessel","order":§31,"corner":1'),
    "stages[0].parts.order: 31 is out of range; allowed is a whole number from 1 to 30",
  ],
  [
    withStages('{"kind":"series","parts":§{}}'),
    "stages[0].parts.R: none of R, L, C is given; allowed is at least one of them",
  ],
  [
    withStages('{"kind":"series","parts":§{"R":1,"L":1}}'),
    'stages[0].parts.joined: it is missing; allowed is "series" or "parallel"',
  ],
  [
    withStages('{"kind":"shunt","parts":§{"L":1e-200,"C":1e-200,"joined":"series"}}'),
    "stages[0].parts: the values together lead to numbers that are too large or too small; allowed is values of the size that real parts have",
  ],
  [
    withStages('{"kind":"table","parts":{"file":§"other.csv"}}'),
    "stages[0].parts.file: there is no such file; allowed is a file that can be read",
  ],
  [
    withStages('{"kind":"gain","parts":{"gain":§0}}'),
    "stages[0].parts.gain: 0 is out of range; allowed is anything but 0",
  ],
];

const formulas: readonly Case[] = [
  [
    formula("1/(1+s/w0)"),
    '"w0" at character 8 is not given; allowed is s, pi, e, or a constant that is given among the parts, as in "w0": 1',
  ],
  [formula("2s"), '"2" and "s" side by side at character 2; allowed is an operator between them, as in 2*s'],
  [
    formula("s^2.5"),
    "no whole number as exponent at character 2; allowed is a whole number behind ^, as in s^2 or s^(-1)",
  ],
  [
    formula("1+(s^10)^4"),
    "a total power of 40 at character 5; allowed is at most 30, powers of powers included",
  ],
  [formula("exp()"), `")" at character 5; allowed is ${OPERAND}`],
  [formula("1+exp"), '"exp" without parentheses at character 3; allowed is exp(…) with one value in it'],
  [
    formula("f(s)"),
    '"f" is no function at character 1; allowed is a function (exp, sqrt, log, sin, cos, tan, sinh, cosh or tanh), or f*(…) for a product',
  ],
  [formula("s=1"), '"=" at character 2; allowed is an expression only, without an assignment'],
  [
    formula("s.re"),
    '"." at character 2; allowed is numbers with digits on both sides of the point, as in 4.7',
  ],
  [formula("[1,2]"), `"[" at character 1; allowed is ${WORDS}`],
  [formula("1:2"), `":" at character 2; allowed is ${WORDS}`],
  [formula("'a'"), `"'" at character 1; allowed is ${WORDS}`],
  [formula("1\n+s"), `" " at character 2; allowed is ${WORDS}`],
  [formula("2 mod s"), 'unknown name "mod" at character 3; allowed is s, pi, e, constants and functions'],
  [formula("(1"), '"(" without ")" at character 1; allowed is a ")" for each "("'],
  [formula("1)+(2"), '")" without "(" at character 2; allowed is a "(" for each ")"'],
  [formula(""), "nothing at character 1; allowed is an expression, as in 1/(1 + s/6283)"],
  [formula("1e999"), '"1e999" is not a finite number at character 1; allowed is numbers up to about 1e308'],
  [
    formula(`${"(".repeat(61)}s${")".repeat(61)}`),
    "parentheses too deep at character 61; allowed is at most 60 within each other",
  ],
  [formula("1+".repeat(500).concat("s")), "the expression has 1001 characters; allowed is at most 1000"],
];

const names: readonly Case[] = [
  [
    formula("1", ',§"pi":3').replace("§", ""),
    'stages[0].parts.pi: "pi" has a meaning of its own in a formula; allowed is any other name, as in tau1',
  ],
  [
    formula("1", ',§"2a":3').replace("§", ""),
    'stages[0].parts["2a"]: "2a" cannot be the name of a constant; allowed is a name of at most 40 letters, digits and _, ' +
      "no digit first, as in tau1",
  ],
];

const sections: readonly Case[] = [
  [top('"source": §7'), "source: found 7; allowed is an object with emf, R, L, C, joined"],
  [top('"source": {"emf": §"0 V"}'), 'source.emf: "0 V" is out of range; allowed is more than 0 V'],
  [top('"source": {"R": §"-1"}'), 'source.R: "-1" is out of range; allowed is 0 Ω or more'],
  [top('"load": {"R": §0}'), "load.R: 0 is out of range; allowed is more than 0 Ω"],
  [
    top('"load": §{"L": 1e-200, "C": "1e-200"}'),
    "load: the values together lead to numbers that are too large or too small; allowed is values of the size that real parts have",
  ],
  [
    top('"source": §{"R": 1e200, "C": 1e200}'),
    "source: the values together lead to numbers that are too large or too small; allowed is values of the size that real parts have",
  ],
  [top('"load": {"joined": §"both"}'), 'load.joined: found "both"; allowed is "series" or "parallel"'],
  [top('"load": §null'), "load: found null; allowed is an object with R, L, C, joined"],
  [
    top('"converter": §{"bits": 16}'),
    "converter.rate: it is missing; allowed is a sample rate in S/s, as in 20k or 20 kS/s",
  ],
  [
    top('"converter": {"rate":"20k","bits":16,"fullScale":5,"band":§"11k"}'),
    'converter.band: "11k" is more than half the rate, so the band would fold onto itself; allowed is at most 10 kHz',
  ],
  [
    top('"converter": {"rate":"20k","bits":§16.5,"fullScale":5,"band":1}'),
    "converter.bits: 16.5 is out of range; allowed is a whole number from 1 to 64",
  ],
  [top('"sweep": {"from": 10, "to": §5}'), 'sweep.to: 5 is not above "from"; allowed is more than 10 Hz'],
  [
    top('"sweep": {"from": §"2M"}'),
    'sweep.from: "2M" is not below "to"; allowed is below 1 MHz, where the sweep ends',
  ],
  [top('"sweep": {"from": §0}'), "sweep.from: 0 is out of range; allowed is more than 0 Hz"],
  [
    top('"sweep": {"perDecade": §10001}'),
    "sweep.perDecade: 10001 is out of range; allowed is a whole number from 1 to 10000",
  ],
  // 30 decades of 10 000 points, and the last point.
  [
    top('"sweep": §{"to": "1e30", "perDecade": 10000}'),
    "sweep: it has 300001 points; allowed is at most 200000 points",
  ],
  [top('"limits": §{}'), "limits: found an object in braces; allowed is a list of limits in square brackets"],
  [
    top('"limits": [§{"quantity":"gain","to":2,"atMost":1}]'),
    `limits[0].from: it is missing; allowed is ${HZ}`,
  ],
  [
    top('"limits": [{"quantity":§"loss","from":1,"to":2,"atMost":1}]'),
    'limits[0].quantity: found "loss"; allowed is "gain", "phase" or "delay"',
  ],
  [
    top('"limits": [§{"quantity":"gain","from":1,"to":2}]'),
    "limits[0]: the limit has no bound; allowed is atLeast, atMost or both",
  ],
  [
    top('"limits": [{"quantity":"gain","from":2,"to":§2,"atMost":1}]'),
    'limits[0].to: 2 is not above "from"; allowed is more than 2 Hz',
  ],
  [
    top('"limits": [{"quantity":"gain","from":1,"to":2,"atLeast":"1 dB","atMost":§0}]'),
    'limits[0].atMost: 0 is below "atLeast"; allowed is at least "1 dB"',
  ],
  [
    top('"limits": [{"quantity":"delay","from":1,"to":2,"atMost":1,§"re":2}]'),
    'limits[0].re: a delay is not relative; allowed is "re" with the quantity "gain" only',
  ],
  [
    top('"limits": [{"quantity":"phase","from":1,"to":2,"atMost":§"3 dB"}]'),
    'limits[0].atMost: "3 dB" is in dB; allowed is an angle in degrees, as in 90 or -45 deg',
  ],
];

function placeOfMark(marked: string): string {
  const lines = marked.slice(0, marked.indexOf("§")).replaceAll("\r\n", "\n").split("\n");
  return `${lines.length}:${Array.from(lines[lines.length - 1]).length + 1}`;
}

function expectRefused([marked, expected]: Case, path = ""): void {
  const loaded = read(marked.replace("§", ""));
  expect(loaded.ok ? "ok" : problemText(loaded.problem)).toBe(
    `pump2.chain.json:${placeOfMark(marked)}: ${path}${expected}`,
  );
}

describe("a file is refused with place, path, what was found and what is allowed", () => {
  test.each(text)("text %j", (...row) => expectRefused(row));
  test.each(head)("head %j", (...row) => expectRefused(row));
  test.each(stages)("stage %j", (...row) => expectRefused(row));
  test.each(formulas)("formula %j", (...row) => expectRefused(row, "stages[0].parts.H: "));
  test.each(names)("constant %j", (...row) => expectRefused(row));
  test.each(sections)("section %j", (...row) => expectRefused(row));
});

test("columns count from the start of the line, written out by hand", () => {
  //             123456789012345678901234567890
  const line4 = '  "stages": [{"kind":"gain"},7]';
  const loaded = read(`{\n"format":"halfpower-chain",\n"version":1,\n${line4}\n}`);
  expect(!loaded.ok && loaded.problem.place).toEqual({ fileName: "pump2.chain.json", line: 4, column: 14 });
});

test("an unknown kind that resembles none lists them all", () => {
  const loaded = read(withStages('{"kind":"qqqqqq"}'));
  expect(loaded.ok ? "" : loaded.problem.allowed).toMatch(/^series, shunt, rc-lowpass, .* or biquad$/);
});

test("the first problem in the order of the file is the one reported", () => {
  const loaded = read(top('"load":{"R":0},"title":5').replace("[]", '[{"kind":"gain","parts":{"gain":0}}]'));
  expect(!loaded.ok && loaded.problem.path).toEqual(["stages", 0, "parts", "gain"]);
});
