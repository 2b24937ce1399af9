import { readings, type Share } from "../../core/readings.ts";
import { plainText } from "../../core/text.ts";
import { type Charset, formatQuantity } from "../../core/units/format.ts";
import type { ResolvedChain } from "../../document/resolve.ts";
import type { ChainDocument } from "../../document/types.ts";
import { type Column, tableLines } from "../table.ts";
import { hertz } from "../without-value.ts";
import { branchText, stageParts } from "./parts-text.ts";
import { packed } from "./wrap.ts";

const MOST_NAME = 30;
const INDENT = "    ";
const COMMON_REFERENCE_HZ = 1000;

interface Row {
  readonly number: string;
  readonly name: string;
  readonly what: string;
  readonly share: string;
  readonly parts: readonly string[];
}

/** The chain in the order in which the signal meets it, each stage with its parts in the lines below. */
export async function chainLines(
  resolved: ResolvedChain,
  document: ChainDocument,
  columns: number,
  charset: Charset,
): Promise<readonly string[]> {
  const referenceHz = referenceOf(resolved);
  const rows = rowsOf(resolved, document, sharesAt(resolved, referenceHz));
  const table = await tableLines(columnsOf(referenceHz), rows, charset);
  return table.flatMap((line, k) => {
    const parts = k === 0 ? [] : packed(rows[k - 1].parts, ", ", columns - INDENT.length);
    return [line, ...parts.map((part) => INDENT + part)];
  });
}

/** Where shares are told: where a limit has its zero, else 1 kHz, else the middle of the sweep. */
export function referenceOf({ limits, sweep: { fromHz, toHz } }: ResolvedChain): number {
  const wanted = [...limits.flatMap(({ reHz }) => reHz ?? []), COMMON_REFERENCE_HZ];
  return wanted.find((freqHz) => freqHz >= fromHz && freqHz <= toHz) ?? Math.sqrt(fromHz) * Math.sqrt(toHz);
}

function sharesAt({ chain, sweep }: ResolvedChain, freqHz: number): readonly Share[] {
  return readings(chain, sweep, [freqHz]).readings[0]?.shares ?? [];
}

const columnsOf = (referenceHz: number): readonly Column<Row>[] => [
  { head: "", side: "right", cell: ({ number }) => number },
  { head: "stage", side: "left", cell: ({ name }) => name },
  { head: "kind", side: "left", cell: ({ what }) => what },
  { head: `share at ${hertz(referenceHz)}`, side: "right", cell: ({ share }) => share },
];

function rowsOf(resolved: ResolvedChain, document: ChainDocument, shares: readonly Share[]): readonly Row[] {
  const { source, emfV, stages, load, converter } = resolved;
  const end = { number: "", what: "", share: "" };
  const emf = `EMF ${formatQuantity(emfV, "volt", 6)}`;
  let inLine = 0;
  return [
    { ...end, name: "source", share: shareText(shares[0]), parts: [emf, branchText(source)] },
    ...stages.map((stage, k) => ({
      number: String(k + 1),
      name: plainText(stage.name, MOST_NAME),
      what: stage.kind,
      share: stage.off ? "out of the line" : shareText(shares[++inLine]),
      parts: stageParts(stage, document.stages[k]),
    })),
    { ...end, name: "load", parts: [branchText(load) || "open"] },
    ...(converter === undefined ? [] : [{ ...end, name: "converter", parts: converterParts(converter) }]),
  ];
}

const shareText = (share: Share | undefined): string =>
  share === undefined || share.gainDb === null ? "-" : formatQuantity(share.gainDb, "level", 4);

const converterParts = ({
  rateHz,
  bits,
  fullScaleV,
  bandHz,
}: NonNullable<ResolvedChain["converter"]>): readonly string[] => [
  `rate ${formatQuantity(rateHz, "samplesPerSecond", 6)}`,
  ...(bits === undefined ? [] : [`${bits} bits`]),
  ...(fullScaleV === undefined ? [] : [`full scale ${formatQuantity(fullScaleV, "volt", 6)}`]),
  ...(bandHz === undefined ? [] : [`band ${hertz(bandHz)}`]),
];
