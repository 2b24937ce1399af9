import { createHash } from "node:crypto";

/** How to tell a file's content again. */
export interface FileStamp {
  /** Time of the last change in ms; NaN where it is not known. */
  readonly mtimeMs: number;
  readonly sizeBytes: number;
  /** SHA-256 of the bytes, hexadecimal. */
  readonly hash: string;
}

export const stampOf = (bytes: Uint8Array, mtimeMs = Number.NaN): FileStamp => ({
  mtimeMs,
  sizeBytes: bytes.length,
  hash: createHash("sha256").update(bytes).digest("hex"),
});

/** The stamp of a text in UTF-8, as a journal knows it of the file that its work began from. */
export const stampOfText = (text: string): FileStamp => stampOf(Buffer.from(text, "utf8"));
