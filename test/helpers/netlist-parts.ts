import type { Component, Ends } from "./nodal-components.ts";

/** Parts as in the chain file, every quantity a plain SI number (an amplifier's gain a ratio). */
export type Parts = Readonly<Record<string, number | string>>;
export type Numbers = Readonly<Record<string, number>>;

/** Where a stage is wired in, what its internal nodes and components are called, and its op amps' DC gain. */
export interface Place {
  readonly input: string;
  readonly output: string;
  readonly prefix: string;
  readonly a0: number;
}

export type Circuit = (parts: Numbers, place: Place) => Component[];

export type Maker = (name: string, ends: Ends) => Component;

export const resistor =
  (ohm: number): Maker =>
  (name, ends) => ({ type: "R", name, ends, ohm });
export const inductor =
  (henry: number): Maker =>
  (name, ends) => ({ type: "L", name, ends, henry });
export const capacitor =
  (farad: number): Maker =>
  (name, ends) => ({ type: "C", name, ends, farad });

export function inSeries([first, last]: Ends, prefix: string, makers: readonly Maker[]): Component[] {
  const joint = (index: number) => `${prefix}.joint${index}`;
  return makers.map((make, index) =>
    make(`${prefix}.${index}`, [
      index === 0 ? first : joint(index),
      index === makers.length - 1 ? last : joint(index + 1),
    ]),
  );
}

export interface Branch {
  readonly R?: number;
  readonly L?: number;
  readonly C?: number;
  readonly joined?: string;
}

/** A branch between two nodes; without any part, an open one where parallel and a wire where in series. */
export function branch(parts: Branch, ends: Ends, prefix: string, joined: string): Component[] {
  const makers = [
    ...(parts.R === undefined ? [] : [resistor(parts.R)]),
    ...(parts.L === undefined ? [] : [inductor(parts.L)]),
    ...(parts.C === undefined ? [] : [capacitor(parts.C)]),
  ];
  return (parts.joined ?? joined) === "series"
    ? inSeries(ends, prefix, makers.length === 0 ? [resistor(0)] : makers)
    : makers.map((make, index) => make(`${prefix}.${index}`, ends));
}

export function optional<T>(value: number | undefined, make: (value: number) => T): T[] {
  return value === undefined ? [] : [make(value)];
}

export const seriesRC = (R: number, C: number | undefined): Maker[] => [
  resistor(R),
  ...optional(C, capacitor),
];

export function parallelRC(
  R: number | undefined,
  C: number | undefined,
  ends: Ends,
  prefix: string,
): Component[] {
  return [
    ...optional(R, (ohm) => resistor(ohm)(`${prefix}.R`, ends)),
    ...optional(C, (farad) => capacitor(farad)(`${prefix}.C`, ends)),
  ];
}

export const wire = (name: string, ends: Ends): Component => ({ type: "V", name, ends, volt: 0 });
