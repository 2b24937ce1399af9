import { plotColumns } from "../chart/scale.ts";
import type { Size } from "./state.ts";

/** The least that everything fits into. */
export const LEAST_SIZE: Size = { columns: 60, rows: 18 };

/** What stands where, in cells. */
export interface Layout {
  readonly list: Size;
  /** Cells that the charts have between them, margins and the frequency axis included. */
  readonly charts: Size;
  readonly gainRows: number;
  /** 0 where the phase chart has given way. */
  readonly phaseRows: number;
  readonly readingRows: number;
  /** Columns of the drawing itself. */
  readonly plotColumns: number;
}

const STATE_ROWS = 1;
const HINT_ROWS = 1;
const AXIS_ROWS = 2;
/** Between the list and the charts. */
export const GAP_COLUMNS = 1;

/** The panes of a screen; undefined below the least size. */
export function layoutOf({ columns, rows }: Size): Layout | undefined {
  if (columns < LEAST_SIZE.columns || rows < LEAST_SIZE.rows) return undefined;
  // Frequency to slope take three rows of a narrow screen, two of a wide one; pin and kept response one each.
  const readingRows = columns < 76 && rows >= 22 ? 5 : 4;
  const bodyRows = rows - STATE_ROWS - HINT_ROWS - readingRows;
  const listColumns = listWidth(columns);
  const chartColumns = columns - listColumns - GAP_COLUMNS;
  const { gainRows, phaseRows } = chartRows(bodyRows - AXIS_ROWS);
  return {
    list: { columns: listColumns, rows: bodyRows },
    charts: { columns: chartColumns, rows: bodyRows },
    gainRows,
    phaseRows,
    readingRows,
    plotColumns: plotColumns(chartColumns),
  };
}

const listWidth = (columns: number): number => Math.max(22, Math.min(48, Math.round(columns * 0.36)));

/** Three fifths for the gain; the phase gives way where neither could be read. */
function chartRows(rows: number): { gainRows: number; phaseRows: number } {
  if (rows < 9) return { gainRows: rows, phaseRows: 0 };
  const phaseRows = Math.max(4, Math.floor(rows * 0.4));
  return { gainRows: rows - phaseRows, phaseRows };
}
