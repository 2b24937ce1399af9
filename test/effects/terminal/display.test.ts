import { describe, expect, it } from "vitest";
import { decideDisplay } from "../../../src/effects/terminal/display.ts";

const tty = { isTTY: true };
const pipe = {};
const utf8 = { TERM: "xterm-256color", LANG: "en_GB.UTF-8" };

describe("decideDisplay(env, stdin, stdout, options)", () => {
  it("gives the full screen to a terminal on both sides", () => {
    expect(decideDisplay(utf8, tty, tty)).toMatchObject({ mode: "screen", colour: true, unicode: true });
  });

  it.each([
    ["piped input", utf8, pipe, tty],
    ["piped output", utf8, tty, pipe],
    ["a dumb terminal", { ...utf8, TERM: "dumb" }, tty, tty],
    ["no TERM", { LANG: "C.UTF-8" }, tty, tty],
    ["an empty TERM", { ...utf8, TERM: "" }, tty, tty],
  ])("gives the sheet for %s", (_, env, stdin, stdout) => {
    expect(decideDisplay(env, stdin, stdout)).toEqual({ mode: "sheet", colour: false, unicode: true });
  });

  // no-color.org: "when present and not an empty string (regardless of its value)".
  it.each([
    [{ NO_COLOR: "1" }, false],
    [{ NO_COLOR: "0" }, false],
    [{ NO_COLOR: "" }, true],
    [{ TERM: "vt100" }, false],
    [{ TERM: "vt220" }, false],
    [{ TERM: "xterm-mono" }, false],
    [{ TERM: "rxvt-m" }, false],
    [{ TERM: "linux" }, true],
    [{ TERM: "screen.xterm-256color" }, true],
  ])("with %j has colour: %s", (env, colour) => {
    expect(decideDisplay({ ...utf8, ...env }, tty, tty)).toMatchObject({ colour });
  });

  // POSIX, XBD 8.2: LC_ALL over LC_CTYPE over LANG, an empty one counting as not set; none of them is the C locale.
  it.each([
    [{ LANG: "de_DE.utf8" }, true],
    [{ LANG: "C.UTF-8" }, true],
    [{ LANG: "de_DE.UTF-8@euro" }, true],
    [{ LANG: "de_DE.ISO-8859-1" }, false],
    [{ LANG: "C" }, false],
    [{}, false],
    [{ LANG: "C.UTF-8", LC_ALL: "C" }, false],
    [{ LANG: "C", LC_CTYPE: "C.UTF-8" }, true],
    [{ LANG: "C", LC_CTYPE: "C.UTF-8", LC_ALL: "POSIX" }, false],
    [{ LANG: "C.UTF-8", LC_ALL: "" }, true],
  ])("with %j has unicode: %s", (env, unicode) => {
    expect(decideDisplay({ TERM: "xterm", ...env }, tty, tty)).toMatchObject({ unicode });
    expect(decideDisplay({ TERM: "xterm", ...env }, tty, tty, { ascii: true })).toMatchObject({
      unicode: false,
    });
  });
});
