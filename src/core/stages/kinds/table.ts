import { irrational } from "../../elements/make.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { defineKind, type FileSpec, type TabulatedResponse } from "../kind.ts";
import { tableTransfer } from "../tabulated.ts";

const file: FileSpec = {
  type: "file",
  name: "file",
  what: "file of the measured response",
  optional: false,
  initial: "",
};

/** A measured response in place of a model. */
export const table = defineKind<PortValues & { file: TabulatedResponse }>({
  kind: "table",
  group: "ideal",
  summary: "measured response from a file",
  circuit: "ideal; no value outside the file's range",
  formula: "dB and unwrapped phase, linear in log f",
  source: "linear interpolation",
  parts: [file, ...idealPorts],
  elements: ({ file: response, ...ports }) => [irrational(tableTransfer(response), ports)],
});
