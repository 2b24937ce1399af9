/**
 * The chain file as plain data. Values stay as the person wrote them (`"4k7"`, `1000`), names in the order
 * they came; nothing here is ever changed in place.
 */
import type { Against } from "../core/chain.ts";

/** A number in SI units, or text such as `4.7k`; see `core/units/quantity.ts`. */
export type RawValue = string | number;

export const FORMAT = "halfpower-chain";
export const VERSION = 1;

export interface ChainDocument {
  readonly format: typeof FORMAT;
  readonly version: typeof VERSION;
  readonly title?: string;
  readonly notes?: string;
  /** What to bear in mind about the whole chain. */
  readonly caution?: string;
  readonly against?: Against;
  /** °C. */
  readonly temperature?: RawValue;
  readonly distribution?: Distribution;
  readonly source?: SourceDocument;
  readonly stages: readonly StageDocument[];
  readonly load?: BranchDocument;
  readonly converter?: ConverterDocument;
  readonly sweep?: SweepDocument;
  readonly limits?: readonly LimitDocument[];
}

/** How parts vary within their tolerance: evenly, or normally with the tolerance as three standard deviations. */
export type Distribution = "uniform" | "normal";

export interface StageDocument {
  readonly kind: string;
  readonly name?: string;
  /** Taken out of the line. */
  readonly off?: boolean;
  readonly parts?: Readonly<Record<string, RawValue>>;
  readonly tolerance?: Readonly<Record<string, RawValue>>;
  readonly caution?: string;
}

export interface BranchDocument {
  readonly R?: RawValue;
  readonly L?: RawValue;
  readonly C?: RawValue;
  readonly joined?: "series" | "parallel";
}

export interface SourceDocument extends BranchDocument {
  /** V. */
  readonly emf?: RawValue;
}

export interface ConverterDocument {
  /** Samples per second. */
  readonly rate: RawValue;
  readonly bits?: RawValue;
  /** Peak to peak, V. */
  readonly fullScale?: RawValue;
  /** Highest frequency of interest, Hz. */
  readonly band?: RawValue;
}

export interface SweepDocument {
  readonly from?: RawValue;
  readonly to?: RawValue;
  readonly perDecade?: RawValue;
}

export type LimitQuantity = "gain" | "phase" | "delay";

export interface LimitDocument {
  readonly name?: string;
  readonly quantity: LimitQuantity;
  readonly from: RawValue;
  readonly to: RawValue;
  readonly atLeast?: RawValue;
  readonly atMost?: RawValue;
  /** Makes gain relative to the gain at this frequency. */
  readonly re?: RawValue;
}
