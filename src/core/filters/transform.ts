import { type Complex, complex, divide, modulus, scale } from "../complex.ts";
import type { Rational } from "../rational.ts";
import { fail, ok, type Result } from "../result.ts";
import { type RootPair, splitAxisPair, splitPair } from "./band.ts";
import { buildPrototype } from "./prototype.ts";
import {
  axisZeroSection,
  firstOrderSection,
  type QuadraticFactor,
  type RatedSection,
  secondOrderSection,
  withGain,
} from "./section-rational.ts";
import { sectionPoles, sectionZeros } from "./section-roots.ts";
import { isRealPole, type PrototypeSection } from "./sections.ts";
import { checkPrototype, type FilterProblem, type FilterShape, type PrototypeSpec } from "./spec.ts";

/** A filter: `cornerHz` for low-pass and high-pass, `lowHz` < `highHz` for band-pass and band-stop. */
export interface FilterSpec extends PrototypeSpec {
  readonly shape: FilterShape;
  readonly cornerHz?: number | undefined;
  readonly lowHz?: number | undefined;
  readonly highHz?: number | undefined;
}

/** Zeros and poles in rad/s; zeros at infinity are not listed. */
export interface FilterRoots {
  readonly zeros: readonly Complex[];
  readonly poles: readonly Complex[];
}

/**
 * The filter as a product of real first- and second-order sections, lowest Q first. `order` is the low-pass prototype's.
 * A section with zeros on the axis is scaled to them, any other to the modulus of its poles.
 *
 * Transforms, with S the prototype's variable: `S = s/w` (low-pass), `w/s` (high-pass), `(s² + w²)/(B·s)` (band-pass),
 * `B·s/(s² + w²)` (band-stop), w² = wLow·wHigh, B = wHigh − wLow; made root by root, nothing is multiplied out.
 * Source: Zverev, Handbook of Filter Synthesis (1967).
 */
export function designSections(spec: FilterSpec): Result<readonly Rational[], FilterProblem> {
  const checked = checkFilter(spec);
  if (!checked.ok) return checked;
  const { sections, dcGain } = buildPrototype(spec);
  const transform = sectionTransform(spec);
  const ordered = sections
    .flatMap(transform)
    .sort((a, b) => (a.inverseQ === b.inverseQ ? 0 : b.inverseQ - a.inverseQ));
  return ok([withGain(ordered[0], dcGain), ...ordered.slice(1)].map((section) => section.rational));
}

/** Zeros and poles of the same filter. */
export function designRoots(spec: FilterSpec): Result<FilterRoots, FilterProblem> {
  const sections = designSections(spec);
  if (!sections.ok) return sections;
  return ok({ zeros: sections.value.flatMap(sectionZeros), poles: sections.value.flatMap(sectionPoles) });
}

/** The spec itself, or what is wrong with its order, losses or frequencies. */
export function checkFilter(spec: FilterSpec): Result<FilterSpec, FilterProblem> {
  const prototype = checkPrototype(spec);
  if (!prototype.ok) return prototype;
  const problem = isBand(spec.shape)
    ? bandProblem(spec)
    : frequencyProblem("corner", spec.cornerHz, spec.shape);
  return problem ? fail(problem) : ok(spec);
}

const isBand = (shape: FilterShape): boolean => shape === "bandpass" || shape === "bandstop";

function bandProblem({ shape, lowHz, highHz }: FilterSpec): FilterProblem | undefined {
  const problem = frequencyProblem("low", lowHz, shape) ?? frequencyProblem("high", highHz, shape);
  if (problem || lowHz! < highHz!) return problem;
  return { part: "high", found: `${highHz} Hz is not above low`, allowed: `more than ${lowHz} Hz` };
}

function frequencyProblem(
  part: "corner" | "low" | "high",
  freqHz: number | undefined,
  shape: FilterShape,
): FilterProblem | undefined {
  const allowed = "a frequency above 0 Hz";
  if (freqHz === undefined) return { part, found: `it is missing, and a ${shape} needs it`, allowed };
  return freqHz > 0 && Number.isFinite(freqHz) ? undefined : { part, found: `${freqHz} Hz`, allowed };
}

type SectionTransform = (section: PrototypeSection) => readonly RatedSection[];

function sectionTransform({ shape, cornerHz, lowHz, highHz }: FilterSpec): SectionTransform {
  switch (shape) {
    case "lowpass":
      return (section) => [lowpassSection(section, cornerHz!)];
    case "highpass":
      return (section) => [highpassSection(section, cornerHz!)];
    case "bandpass":
      return (section) => bandpassSections(section, bandOf(lowHz!, highHz!));
    case "bandstop":
      return (section) => bandstopSections(section, bandOf(lowHz!, highHz!));
  }
}

function lowpassSection({ pole, zero }: PrototypeSection, cornerHz: number): RatedSection {
  const radius = modulus(pole);
  if (pole.im === 0) return firstOrderSection(cornerHz * radius, [1]);
  const factor = { freqHz: cornerHz * radius, inverseQ: (-2 * pole.re) / radius };
  return zero === undefined
    ? secondOrderSection(factor, [1])
    : axisZeroSection(factor, cornerHz * zero, "dc");
}

function highpassSection({ pole, zero }: PrototypeSection, cornerHz: number): RatedSection {
  const radius = modulus(pole);
  if (pole.im === 0) return firstOrderSection(cornerHz / radius, [0, 1]);
  const factor = { freqHz: cornerHz / radius, inverseQ: (-2 * pole.re) / radius };
  if (zero === undefined) return secondOrderSection(factor, [0, 0, 1]);
  return axisZeroSection(factor, cornerHz / zero, "infinity");
}

/** A band by its geometric centre and its width over the centre. */
interface Band {
  readonly centreHz: number;
  readonly width: number;
}

function bandOf(lowHz: number, highHz: number): Band {
  const square = lowHz * highHz;
  // One root of the product hits round centres exactly; at absurd frequencies the product leaves the range of doubles.
  const inRange = square > Number.MIN_VALUE / Number.EPSILON && square < Number.POSITIVE_INFINITY;
  const centreHz = inRange ? Math.sqrt(square) : Math.sqrt(lowHz) * Math.sqrt(highHz);
  return { centreHz, width: (highHz - lowHz) / centreHz };
}

const atCentre = ({ radius, inverseQ }: RootPair, { centreHz }: Band): QuadraticFactor => ({
  freqHz: centreHz * radius,
  inverseQ,
});

function bandpassSections(section: PrototypeSection, band: Band): readonly RatedSection[] {
  const { pole, zero } = section;
  const radius = modulus(pole);
  if (isRealPole(section)) {
    const inverseQ = radius * band.width;
    return [secondOrderSection({ freqHz: band.centreHz, inverseQ }, [0, inverseQ])];
  }
  const { above, below } = splitPair(scale(pole, band.width / 2));
  if (zero === undefined) {
    return [below, above].map((pair) =>
      secondOrderSection(atCentre(pair, band), [0, (radius * band.width) / pair.radius]),
    );
  }
  const zeros = splitAxisPair((zero * band.width) / 2);
  const gain = radius / zero;
  return [
    withGain(axisZeroSection(atCentre(below, band), band.centreHz * zeros.below, "infinity"), gain),
    withGain(axisZeroSection(atCentre(above, band), band.centreHz * zeros.above, "infinity"), gain),
  ];
}

function bandstopSections(section: PrototypeSection, band: Band): readonly RatedSection[] {
  const { pole, zero } = section;
  if (isRealPole(section)) {
    return [
      axisZeroSection({ freqHz: band.centreHz, inverseQ: band.width / modulus(pole) }, band.centreHz, "dc"),
    ];
  }
  const { above, below } = splitPair(divide(complex(band.width / 2), pole));
  const zeros = zero === undefined ? { above: 1, below: 1 } : splitAxisPair(band.width / (2 * zero));
  return [
    axisZeroSection(atCentre(below, band), band.centreHz * zeros.below, "infinity"),
    axisZeroSection(atCentre(above, band), band.centreHz * zeros.above, "infinity"),
  ];
}
