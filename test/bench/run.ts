import { evaluationRows } from "./evaluation.ts";
import { frameRows } from "./frames.ts";
import { report } from "./report.ts";
import { startingRows } from "./starting.ts";

const root = process.env.HALFPOWER_ROOT ?? process.cwd();
const rows = [...(await evaluationRows(root)), ...(await startingRows(root)), ...(await frameRows(root))];
console.log(report(rows));
console.log("\nThe contenders take turns in one run. Ratios are the middle ones of all rounds.");
