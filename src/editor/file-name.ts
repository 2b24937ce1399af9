/** A file name made of a chain's title: `Pump 2, strain bridge` gives `pump-2-strain-bridge.chain.json`. */
export function chainFileName(title: string): string {
  const stem = title
    .normalize("NFKD")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-+|-+$/g, "")
    .slice(0, 60);
  return `${stem || "chain"}.chain.json`;
}

/** A name without any ending gets that of chain files. */
export const withEnding = (path: string): string => (/\.[^./]*$/.test(path) ? path : `${path}.chain.json`);
