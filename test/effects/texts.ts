/** Texts of chains and of stage presets, laid out as no program of ours would. */

export const chainOf = (notes: string, title = "Pump 2, strain bridge"): string =>
  JSON.stringify({
    version: 1,
    format: "halfpower-chain",
    notes,
    title,
    stages: [{ kind: "rc-lowpass", parts: { R: "4k70", C: "100 nF" } }],
  });

export const stageOf = (title = "RFI filter"): string => `{ "format" : "halfpower-stage",
   "version":1, "title": ${JSON.stringify(title)},
 "stage" : {"kind":"rc-lowpass", "parts":{ "R":"1k00","C":"4n7"}}}`;
