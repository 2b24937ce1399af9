import { fail, ok, type Result } from "../core/result.ts";
import { type FileProblem, refuseFile, systemProblem } from "./file-problem.ts";
import { bytesText, decoded } from "./read-file.ts";

const PLACE = "standard input";

/** All of a stream as text, at most `maxBytes`; what is beyond is not waited for. */
export async function readStandardInput(
  maxBytes: number,
  stream: AsyncIterable<Uint8Array | string> = process.stdin,
): Promise<Result<string, FileProblem>> {
  const parts: Buffer[] = [];
  let length = 0;
  try {
    for await (const chunk of stream) {
      const part = Buffer.from(chunk as Uint8Array);
      length += part.length;
      if (length > maxBytes) {
        const most = bytesText(maxBytes);
        return refuseFile(PLACE, `it is longer than ${most}`, `a text of at most ${most}`);
      }
      parts.push(part);
    }
  } catch (error) {
    return fail(systemProblem(error, PLACE));
  }
  const text = decoded(Buffer.concat(parts));
  return text === undefined ? refuseFile(PLACE, "it is not text in UTF-8", "text in UTF-8") : ok(text);
}
