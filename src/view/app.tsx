import { Box, Text } from "ink";
import { useMemo, useSyncExternalStore } from "react";
import { TraceMaker, type Traces } from "../chart/traces.ts";
import type { Chain } from "../core/chain.ts";
import { readAt } from "../core/response/exact.ts";
import type { Charset } from "../core/units/format.ts";
import { type Layout, LEAST_SIZE, layoutOf } from "../editor/layout.ts";
import { chainOnCharts, ghostOnCharts, windowOnCharts } from "../editor/selectors.ts";
import type { EditorState, Size } from "../editor/state.ts";
import { chainPane } from "./chain-pane.ts";
import { chartLines } from "./charts.ts";
import { helpPane } from "./help-pane.ts";
import { hintLine } from "./hint-line.ts";
import { listPane } from "./list-pane.ts";
import { type Line, painted } from "./paint.ts";
import { questionPane } from "./question-pane.ts";
import { readingPane } from "./reading-pane.ts";
import { stateLine } from "./state-line.ts";
import type { Store } from "./store.ts";

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
  const below = <Text>{block(readingPane(state, reading, readingSize, charset))}</Text>;
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
  if (state.dialog?.type === "question") return questionPane(state.dialog, list, charset);
  return chainPane(state, reading, list, charset);
}

export interface ShownTraces {
  readonly chain: Traces;
  readonly ghost: Traces | undefined;
}

/** Traces are made anew only when a chain, the frequencies shown or the columns are other ones. */
function useTraces(state: EditorState, { plotColumns }: Layout): ShownTraces {
  const maker = useMemo(() => new TraceMaker(), []);
  const ghostMaker = useMemo(() => new TraceMaker(), []);
  const { chain } = chainOnCharts(state);
  const ghost = ghostOnCharts(state)?.chain;
  const { fromHz, toHz } = windowOnCharts(state);
  const shown = useMemo(
    () => maker.traces(chain, { fromHz, toHz, columns: plotColumns }),
    [maker, chain, fromHz, toHz, plotColumns],
  );
  const behind = useMemo(
    () => (ghost === undefined ? undefined : tracesOf(ghostMaker, ghost, fromHz, toHz, plotColumns)),
    [ghostMaker, ghost, fromHz, toHz, plotColumns],
  );
  return { chain: shown, ghost: behind };
}

const tracesOf = (maker: TraceMaker, chain: Chain, fromHz: number, toHz: number, columns: number): Traces =>
  maker.traces(chain, { fromHz, toHz, columns });
