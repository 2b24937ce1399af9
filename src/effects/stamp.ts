/** How to tell a file's content again. */
export interface FileStamp {
  /** Time of the last change in ms; NaN where it is not known. */
  readonly mtimeMs: number;
  readonly sizeBytes: number;
  /** Of the bytes, hexadecimal; see `hashOf`. */
  readonly hash: string;
}

export const stampOf = (bytes: Uint8Array, mtimeMs = Number.NaN): FileStamp => ({
  mtimeMs,
  sizeBytes: bytes.length,
  hash: hashOf(bytes),
});

/** The stamp of a text in UTF-8, as a journal knows it of the file that its work began from. */
export const stampOfText = (text: string): FileStamp => stampOf(Buffer.from(text, "utf8"));

/** The prime and the offset of FNV-1a in 32 bits, and an offset of its own for the second lane. */
const PRIME = 0x01000193;
const OFFSETS = [0x811c9dc5, 0x2f7e15d3] as const;

/**
 * Two lanes of FNV-1a (Fowler, Noll and Vo, 1991), 64 bits in all. It only has to tell an edited file from an unedited
 * one, nobody's trust hangs on it, and Node's own hashes take a tenth of a short command's time to load.
 */
function hashOf(bytes: Uint8Array): string {
  let [one, two] = OFFSETS as readonly [number, number];
  for (let k = 0; k < bytes.length; k++) {
    one = Math.imul(one ^ bytes[k], PRIME);
    two = Math.imul(two ^ bytes[k] ^ (k & 0xff), PRIME);
  }
  return [one, two].map((lane) => (lane >>> 0).toString(16).padStart(8, "0")).join("");
}
