import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { plainText, quoted } from "../../../src/core/text.ts";

describe("plainText(text, maxLength)", () => {
  test.each([
    ["RC filter", "RC filter"],
    ["a\u001b[31mb", "a[31mb"],
    ["a\u009b31mb", "a31mb"],
    ["a\u0000\u0007\u007fb", "ab"],
    ["a\u202eb\u2066c\u200fd\u061ce", "abcde"],
    ["a\r\nb\tc\u2028d", "a b c d"],
    ["Messbrücke Ω 電", "Messbrücke Ω 電"],
    ["a\ud800b", "a\ufffdb"],
  ])("%j becomes %j", (text, plain) => {
    expect(plainText(text, 40)).toBe(plain);
  });

  test("a long text is cut to the length, between code points", () => {
    expect(plainText("abcdef", 6)).toBe("abcdef");
    expect(plainText("abcdefg", 6)).toBe("abcde…");
    expect(plainText("abcdefg", 6, "...")).toBe("abc...");
    expect(plainText("😀😀😀", 3)).toBe("😀😀😀");
    expect(plainText("😀😀😀😀", 3)).toBe("😀😀…");
    expect(plainText("x".repeat(5_000_000), 10)).toBe("xxxxxxxxx…");
  });

  // Categories of the Unicode Character Database: Cc, Cs, Zl, Zp; Bidi_Control.
  test("whatever comes in, one short line without controls comes out", () => {
    fc.assert(
      fc.property(
        fc.string({ unit: "binary", maxLength: 40 }),
        fc.integer({ min: 1, max: 30 }),
        (text, length) => {
          const plain = plainText(`${text}\u001b\u202e\n`, length);
          expect(plain).not.toMatch(/[\p{Cc}\p{Cs}\p{Zl}\p{Zp}\p{Bidi_Control}]/u);
          expect([...plain].length).toBeLessThanOrEqual(length);
        },
      ),
    );
  });
});

test("quoted(text) quotes the plain text", () => {
  expect(quoted("4,7\u001bk")).toBe('"4,7k"');
});
