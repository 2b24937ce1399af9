import { Box, Text } from "ink";
import { useMemo, useSyncExternalStore } from "react";
import { columnOfFrequency } from "../chart/scale.ts";
import { readAt } from "../core/response/exact.ts";
import type { Charset } from "../core/units/format.ts";
import { type Layout, LEAST_SIZE, layoutOf } from "../editor/layout.ts";
import { chainOnCharts, windowOnCharts } from "../editor/selectors.ts";
import type { EditorState, Size } from "../editor/state.ts";
import { chainPane } from "./chain-pane.ts";
import { chartLines } from "./charts.ts";
import { designPane } from "./design-pane.ts";
import { helpPane } from "./help-pane.ts";
import { hintLine } from "./hint-line.ts";
import { listPane } from "./list-pane.ts";
import { type Line, painted } from "./paint.ts";
import { questionPane } from "./question-pane.ts";
import { readingPane } from "./reading-pane.ts";
import { stateLine } from "./state-line.ts";
import type { Store } from "./store.ts";
import { type ShownTraces, useTraces } from "./use-traces.ts";

interface AppProps {
  readonly store: Store;
  readonly charset: Charset;
}

/** The whole screen: state, chain and charts side by side, reading, hints. */
export function App({ store, charset }: AppProps) {
  const state = useSyncExternalStore(store.subscribe, store.state);
  const layout = layoutOf(state.size);
  if (layout === undefined) return <Text>{tooSmall(state.size)}</Text>;
  return (
    <Box flexDirection="column" width={state.size.columns} height={state.size.rows}>
      <Text>{painted(stateLine(state, state.size.columns, charset))}</Text>
      <Body state={state} layout={layout} charset={charset} />
      <Text>{painted(hintLine(state, state.size.columns, charset))}</Text>
    </Box>
  );
}

const tooSmall = ({ columns, rows }: Size): string =>
  `${columns}x${rows}: ${LEAST_SIZE.columns}x${LEAST_SIZE.rows} is needed`.slice(0, columns);

interface BodyProps {
  readonly state: EditorState;
  readonly layout: Layout;
  readonly charset: Charset;
}

function Body({ state, layout, charset }: BodyProps) {
  const { dialog, size } = state;
  const chain = chainOnCharts(state).chain;
  const reading = useMemo(() => readAt(chain, state.cursorHz), [chain, state.cursorHz]);
  const traces = useTraces(state, layout);
  const readingSize = { columns: size.columns, rows: layout.readingRows };
  const continuousDeg = phaseAtCursor(state, layout, traces);
  const below = <Text>{block(readingPane(state, { reading, continuousDeg }, readingSize, charset))}</Text>;
  if (dialog?.type === "help") {
    const helpSize = { columns: size.columns, rows: layout.list.rows };
    return (
      <>
        <Text>{block(helpPane(dialog.scroll, helpSize, charset))}</Text>
        {below}
      </>
    );
  }
  return (
    <>
      <Box columnGap={1}>
        <Text>{block(sidePane(state, layout, charset, reading))}</Text>
        <Text>{block(chartLines(state, layout, traces, charset))}</Text>
      </Box>
      {below}
    </>
  );
}

/** Whole lines in one text: most of a frame's time is the layout of texts. */
const block = (lines: readonly Line[]): string => lines.map(painted).join("\n");

function sidePane(
  state: EditorState,
  { list }: Layout,
  charset: Charset,
  reading: ReturnType<typeof readAt>,
): readonly Line[] {
  if (state.dialog?.type === "list") return listPane(state.dialog, list, charset);
  if (state.dialog?.type === "design") return designPane(state.dialog, list, charset);
  if (state.dialog?.type === "question") return questionPane(state.dialog, list, charset);
  return chainPane(state, reading, list, charset);
}

/** The continuous phase of the cursor's column; NaN off the charts. */
function phaseAtCursor(state: EditorState, { plotColumns }: Layout, { chain }: ShownTraces): number {
  const column = columnOfFrequency({ ...windowOnCharts(state), columns: plotColumns }, state.cursorHz);
  return column === undefined || chain.phaseIsWrapped ? Number.NaN : chain.phaseDeg[column];
}
