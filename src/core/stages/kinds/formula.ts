import { irrational, isolating } from "../../elements/make.ts";
import { compile } from "../../formula/evaluate.ts";
import { rationalForm } from "../../formula/rational-form.ts";
import type { Constants } from "../../formula/tree.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { defineKind, type FormulaSpec, type FormulaValue, type PartValues } from "../kind.ts";

const expression: FormulaSpec = {
  type: "formula",
  name: "H",
  what: "expression in s and named constants",
  optional: false,
  initial: "1/(1 + s/6283)",
};

/** An expression in s; rational ones join their group, any other is evaluated as it stands. */
export const formula = defineKind<PortValues & { H: FormulaValue }>({
  kind: "formula",
  group: "ideal",
  summary: "expression in s",
  circuit: "ideal; further parts are its named constants",
  formula: "H(s)",
  source: "as typed",
  parts: [expression, ...idealPorts],
  ownConstants: true,
  elements: ({ H, Rin, Rout, ...others }) => {
    const ports = { Rin, Rout };
    const { tree } = H;
    const constants = numbersOf(others);
    const sections = rationalForm(tree, constants);
    if (sections !== undefined) return [isolating(sections, ports)];
    return [irrational({ at: compile(tree, constants), delayS: 0, marks: () => [] }, ports)];
  },
});

function numbersOf(values: PartValues): Constants {
  return Object.fromEntries(
    Object.entries(values).filter((entry): entry is [string, number] => typeof entry[1] === "number"),
  );
}
