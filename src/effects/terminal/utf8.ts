/** How many bytes a UTF-8 sequence with this first byte has; 1 for anything that cannot start one. RFC 3629. */
function sequenceLength(lead: number): number {
  if (lead >= 0xf0 && lead <= 0xf4) return 4;
  if (lead >= 0xe0) return lead < 0xf0 ? 3 : 1;
  return lead >= 0xc2 && lead < 0xe0 ? 2 : 1;
}

/** Where an unfinished character at the end of these bytes begins; the length where there is none. */
function unfinishedAt(bytes: Uint8Array): number {
  for (let back = 1; back <= Math.min(3, bytes.length); back += 1) {
    const at = bytes.length - back;
    const isContinuation = (bytes[at]! & 0xc0) === 0x80;
    if (!isContinuation) return sequenceLength(bytes[at]!) > back ? at : bytes.length;
  }
  return bytes.length;
}

/** Text of the whole characters in `rest` followed by `chunk`, and the bytes of one that is still to be finished. */
export function decodeUtf8(rest: Uint8Array, chunk: Uint8Array): { text: string; rest: Uint8Array } {
  const bytes = rest.length === 0 ? chunk : Uint8Array.of(...rest, ...chunk);
  const end = unfinishedAt(bytes);
  const text = new TextDecoder("utf-8", { ignoreBOM: true }).decode(bytes.subarray(0, end));
  return { text, rest: Uint8Array.from(bytes.subarray(end)) };
}
