import fc from "fast-check";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { BINDINGS } from "../../src/editor/keymap.ts";
import { type Home, makeHome, openStation, type Station } from "../helpers/station.ts";

let home: Home;
let station: Station | undefined;
beforeEach(() => {
  home = makeHome();
});
afterEach(() => {
  station?.close();
  station = undefined;
  home.remove();
});

/** What leaves, and what writes files outside of the test's own folder. */
const LEFT_OUT = new Set(["q", "ctrl+c", "s", "S", "O", "K", "k"]);
const COMMANDS = BINDINGS.flatMap(({ keys }) => keys).filter((key) => !LEFT_OUT.has(key));
const CHANGES = ["+", "-", "a", "d", "delete", "{", "}", "o", "u", "U", "b", "space"];
const LETTERS = [..."0123456789.-knuM%é漢"];

/** Enter and Esc often enough that no dialog swallows all the rest. */
const key = fc
  .oneof(
    { weight: 5, arbitrary: fc.constantFrom(...COMMANDS) },
    { weight: 4, arbitrary: fc.constantFrom(...CHANGES) },
    { weight: 3, arbitrary: fc.constantFrom("up", "down", "tab") },
    { weight: 3, arbitrary: fc.constant("escape") },
    { weight: 2, arbitrary: fc.constant("enter") },
    { weight: 2, arbitrary: fc.constantFrom(...LETTERS) },
  )
  .map((each) => (each === "space" ? " " : each));

const SIZES = [
  { columns: 80, rows: 24 },
  { columns: 100, rows: 30 },
  { columns: 160, rows: 48 },
  { columns: 60, rows: 18 },
];

describe("500 random keys", () => {
  it("never throw and never leave stale cells, and undo brings back the starting chain exactly", async () => {
    const keys = fc.array(key, { minLength: 500, maxLength: 500 });
    let changes = 0;
    await fc.assert(
      fc.asyncProperty(keys, fc.constantFrom(...SIZES), async (pressed, size) => {
        const running = await openStation({ home, size, chain: "strain-bridge" });
        station = running;
        const start = running.state().document;
        for (const [k, key] of pressed.entries()) {
          const before = running.state().document;
          running.emulator.press(key);
          if (running.state().document !== before) changes += 1;
          if (k % 25 === 0) {
            await running.settled();
            expect(await running.stale()).toEqual([]);
          }
        }
        await running.settled();
        // Out of whatever is open, then all the way back.
        await running.press("escape", "escape", "escape");
        while (running.state().history.past.length > 0) await running.press("u");
        expect(running.state().document).toBe(start);
        expect(await running.stale()).toEqual([]);
        running.close();
      }),
      { numRuns: 4, seed: 20261201, endOnFailure: true },
    );
    // The keys did change the chain.
    expect(changes).toBeGreaterThan(60);
  }, 120_000);
});
