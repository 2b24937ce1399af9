import type { StageKind } from "./kind.ts";
import { allpass1 } from "./kinds/allpass-1.ts";
import { allpass2 } from "./kinds/allpass-2.ts";
import { amplifier } from "./kinds/amplifier.ts";
import { bandpass2 } from "./kinds/bandpass-2.ts";
import { biquad } from "./kinds/biquad.ts";
import { delay } from "./kinds/delay.ts";
import { differentiator } from "./kinds/differentiator.ts";
import { divider } from "./kinds/divider.ts";
import { filter } from "./kinds/filter.ts";
import { formula } from "./kinds/formula.ts";
import { gain } from "./kinds/gain.ts";
import { highpass1 } from "./kinds/highpass-1.ts";
import { highpass2 } from "./kinds/highpass-2.ts";
import { hold } from "./kinds/hold.ts";
import { integrator } from "./kinds/integrator.ts";
import { inverting } from "./kinds/inverting.ts";
import { ladder } from "./kinds/ladder.ts";
import { lag } from "./kinds/lag.ts";
import { lcHighpass } from "./kinds/lc-highpass.ts";
import { lcLowpass } from "./kinds/lc-lowpass.ts";
import { lead } from "./kinds/lead.ts";
import { line } from "./kinds/line.ts";
import { lowpass1 } from "./kinds/lowpass-1.ts";
import { lowpass2 } from "./kinds/lowpass-2.ts";
import { mfbBandpass } from "./kinds/mfb-bandpass.ts";
import { mfbLowpass } from "./kinds/mfb-lowpass.ts";
import { movingAverage } from "./kinds/moving-average.ts";
import { noninverting } from "./kinds/noninverting.ts";
import { notch2 } from "./kinds/notch-2.ts";
import { pad } from "./kinds/pad.ts";
import { rcHighpass } from "./kinds/rc-highpass.ts";
import { rcLowpass } from "./kinds/rc-lowpass.ts";
import { rlHighpass } from "./kinds/rl-highpass.ts";
import { rlLowpass } from "./kinds/rl-lowpass.ts";
import { sallenKeyHighpass } from "./kinds/sallen-key-highpass.ts";
import { sallenKeyLowpass } from "./kinds/sallen-key-lowpass.ts";
import { seriesBranch } from "./kinds/series.ts";
import { shuntBranch } from "./kinds/shunt.ts";
import { sincDecimator } from "./kinds/sinc-decimator.ts";
import { table } from "./kinds/table.ts";
import { transformer } from "./kinds/transformer.ts";
import { twinT } from "./kinds/twin-t.ts";
import { zeroPole } from "./kinds/zero-pole.ts";

/**
 * Every stage kind, in the order of chooser, help and catalogue. A new kind is one file in `kinds/` and its line here.
 */
export const STAGE_KINDS: readonly StageKind[] = [
  seriesBranch,
  shuntBranch,
  rcLowpass,
  rcHighpass,
  rlLowpass,
  rlHighpass,
  lcLowpass,
  lcHighpass,
  divider,
  lead,
  lag,
  twinT,
  pad,
  ladder,
  line,
  transformer,
  amplifier,
  inverting,
  noninverting,
  sallenKeyLowpass,
  sallenKeyHighpass,
  mfbLowpass,
  mfbBandpass,
  gain,
  lowpass1,
  highpass1,
  allpass1,
  lowpass2,
  highpass2,
  bandpass2,
  notch2,
  allpass2,
  zeroPole,
  integrator,
  differentiator,
  filter,
  formula,
  table,
  delay,
  hold,
  movingAverage,
  sincDecimator,
  biquad,
];

const BY_NAME: ReadonlyMap<string, StageKind> = new Map(STAGE_KINDS.map((kind) => [kind.kind, kind]));

export const stageKind = (name: string): StageKind | undefined => BY_NAME.get(name);
