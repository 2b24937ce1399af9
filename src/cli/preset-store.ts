import type { Result } from "../core/result.ts";
import type { FileProblem } from "../effects/file-problem.ts";

/** A preset as it is listed. Texts are safe to show. */
export interface ListedPreset {
  readonly name: string;
  readonly origin: "own" | "shipped";
  readonly type: "chain" | "stage";
  /** Empty where there is none. */
  readonly title: string;
}

export interface FoundPreset {
  readonly type: ListedPreset["type"];
  /** Of its file. */
  readonly text: string;
  /** That files named in it are relative to. */
  readonly folder: string;
}

type Answer<T> = Promise<Result<T, FileProblem>>;

/** What the commands want of presets. */
export interface PresetStore {
  readonly list: () => Answer<readonly ListedPreset[]>;
  /** Undefined without a preset of that name. */
  readonly find: (name: string) => Answer<FoundPreset | undefined>;
  /** Files named in the chain are relative to `folder`, which is absolute. Replaces an own preset of that name. */
  readonly save: (name: string, chainText: string, folder: string) => Answer<void>;
  readonly remove: (name: string) => Answer<void>;
  /** What was found amiss on the way, such as a damaged settings file that was set aside. */
  readonly notes: () => readonly string[];
}
