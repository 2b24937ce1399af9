import { evaluationRows } from "./evaluation.ts";
import { frameRows } from "./frames.ts";
import { startingRows } from "./starting.ts";
import { report } from "./timing.ts";

const root = process.env.HALFPOWER_ROOT ?? process.cwd();
const rows = [...(await evaluationRows(root)), ...(await startingRows(root)), ...(await frameRows())];
console.log(report(rows));
