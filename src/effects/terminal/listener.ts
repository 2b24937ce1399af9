/** A listener as Node's emitters type it. */
// biome-ignore lint/suspicious/noExplicitAny: what an event brings along is not typed by Node either
export type Listener = (...values: any[]) => void;
