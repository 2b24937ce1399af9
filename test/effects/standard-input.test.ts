import { Readable } from "node:stream";
import { describe, expect, it } from "vitest";
import { readStandardInput } from "../../src/effects/standard-input.ts";

const input = (...parts: readonly (string | Buffer)[]) => Readable.from(parts, { objectMode: true });

describe("readStandardInput", () => {
  it("puts characters together that arrive in two parts", async () => {
    const bytes = Buffer.from("4.7 kΩ");
    const parts = [bytes.subarray(0, bytes.length - 1), bytes.subarray(bytes.length - 1)];
    expect(await readStandardInput(100, input(...parts))).toEqual({ ok: true, value: "4.7 kΩ" });
    expect(await readStandardInput(100, input())).toEqual({ ok: true, value: "" });
  });

  it("stops at the bound, also where the input never ends", async () => {
    const endless = (async function* () {
      for (;;) yield Buffer.alloc(1000, 0x20);
    })();
    expect(await readStandardInput(10_000, endless)).toMatchObject({
      ok: false,
      problem: {
        place: "standard input",
        found: "it is longer than 10 kB",
        allowed: "a text of at most 10 kB",
      },
    });
    expect(await readStandardInput(3, input("123"))).toEqual({ ok: true, value: "123" });
  });

  it("refuses what is not text", async () => {
    expect(await readStandardInput(10, input(Buffer.from([0xc3])))).toMatchObject({
      ok: false,
      problem: { found: "it is not text in UTF-8" },
    });
  });

  it("says what the system says", async () => {
    const broken = new Readable({
      read() {
        this.destroy(Object.assign(new Error("read"), { code: "EIO" }));
      },
    });
    expect(await readStandardInput(10, broken)).toMatchObject({
      ok: false,
      problem: { found: "the disk reports a fault" },
    });
  });
});
