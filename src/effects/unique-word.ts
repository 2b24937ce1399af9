let count = 0;

/** Letters and digits that no other call makes, in this process or, by the clock, in one with the same number before it. */
export function uniqueWord(): string {
  count += 1;
  return `${Date.now().toString(36)}${(process.hrtime.bigint() % 1_000_000n).toString(36)}${count.toString(36)}`;
}
