import { readFileSync, writeFileSync } from "node:fs";
import { expect, it } from "vitest";
import { namesIn, renewed, SECTIONS } from "./sections.ts";

const README = new URL("../../README.md", import.meta.url);

it("the README shows what the program shows (npm run readme writes it anew)", async () => {
  const readme = readFileSync(README, "utf8");
  const fresh = await renewed(readme);
  if (process.env.RENEW_README === "yes") writeFileSync(README, fresh);
  else expect(readme).toBe(fresh);
}, 60_000);

it("every part that the program writes stands in the README", () => {
  expect([...namesIn(readFileSync(README, "utf8"))].sort()).toEqual(Object.keys(SECTIONS).sort());
});
