/** The shape of the chain file: names, types and lengths. What values mean is checked where they are resolved. */
import * as z from "zod/mini";
import { FORMAT, VERSION } from "./types.ts";
import { orList } from "./words.ts";

/** Every message of these schemas says what is allowed; zod's own compiler would evaluate text as code. */
z.config({ jitless: true });

const MAX_TITLE = 500;
const MAX_NOTES = 100_000;
const MAX_NAME = 200;
const MAX_CAUTION = 2000;

const text = (maxLength: number) => {
  const error = `a text of at most ${maxLength} characters`;
  return z.optional(z.string({ error }).check(z.maxLength(maxLength, { error })));
};

const oneOf = <const T extends readonly string[]>(...words: T) =>
  z.enum(words, { error: orList(words.map((word) => `"${word}"`)) });

/** A value as written; what it may be depends on its unit, so it is checked where it is resolved. */
const raw = z.optional(z.unknown());

function object<S extends z.core.$ZodShape>(shape: S) {
  const names = Object.keys(shape).join(", ");
  return z.strictObject(shape, {
    error: ({ code }) => (code === "unrecognized_keys" ? names : `an object with ${names}`),
  });
}

const byPart = (example: string) =>
  z.optional(z.record(z.string(), z.unknown(), { error: `an object of values by part, as in ${example}` }));

const joined = z.optional(oneOf("series", "parallel"));
const branch = { R: raw, L: raw, C: raw, joined };

export const stageSchema = object({
  kind: z.string({ error: 'the name of a kind of stage, as in "rc-lowpass"' }),
  name: text(MAX_NAME),
  off: z.optional(z.boolean({ error: "true or false" })),
  parts: byPart('{ "R": "1k" }'),
  tolerance: byPart('{ "R": "1%" }'),
  caution: text(MAX_CAUTION),
});

const converter = object({ rate: raw, bits: raw, fullScale: raw, band: raw });
const sweep = object({ from: raw, to: raw, perDecade: raw });

const limit = object({
  name: text(MAX_NAME),
  quantity: oneOf("gain", "phase", "delay"),
  from: raw,
  to: raw,
  atLeast: raw,
  atMost: raw,
  re: raw,
});

/** Stages are checked one by one, so that an edit looks at one of them only. */
export const chainSchema = object({
  format: z.literal(FORMAT, { error: `"${FORMAT}"` }),
  version: z.literal(VERSION, { error: `${VERSION}` }),
  title: text(MAX_TITLE),
  notes: text(MAX_NOTES),
  caution: text(MAX_CAUTION),
  against: z.optional(oneOf("emf", "input", "insertion")),
  temperature: raw,
  distribution: z.optional(oneOf("uniform", "normal")),
  source: z.optional(object({ emf: raw, ...branch })),
  stages: z.array(z.unknown(), { error: "a list of stages in square brackets" }),
  load: z.optional(object(branch)),
  converter: z.optional(converter),
  sweep: z.optional(sweep),
  limits: z.optional(z.array(limit, { error: "a list of limits in square brackets" })),
});
