import stringWidth from "string-width";

/**
 * Characters that every terminal draws one column wide, alone and next to each other: Latin, Greek, punctuation,
 * arrows, mathematical signs, lines and blocks, Braille. Widths: Unicode Standard Annex 11, East Asian Width.
 */
const oneColumn =
  "[\\u0020-\\u007e\\u00a0-\\u00ac\\u00ae-\\u02ff\\u0370-\\u03ff\\u2010-\\u2027\\u2030-\\u205e\\u2070-\\u209c" +
  "\\u2100-\\u214f\\u2190-\\u22ff\\u2500-\\u25fc\\u2800-\\u28ff]";
const onlyOneColumn = new RegExp(`^${oneColumn}*$`);
/** Kana, ideographs, Hangul syllables and full-width forms: two columns everywhere. */
const surelyTwoColumns = /^[\u3041-\u3096\u30a1-\u30fa\u3400-\u4dbf\u4e00-\u9fff\uac00-\ud7a3\uff01-\uff60]$/;

/** Made when it is wanted: most screens hold nothing that it is needed for. */
let segmenter: Intl.Segmenter | undefined;

/** Whether terminals agree on the width of this cluster. After one they may not agree on, the cursor is in doubt. */
export const isSureWidth = (cluster: string): boolean =>
  isPrintableAscii(cluster) || isSureOtherWidth(cluster);

const isPrintableAscii = (cluster: string): boolean =>
  cluster.length === 1 && cluster >= " " && cluster <= "~";

const isSureOtherWidth = (cluster: string): boolean =>
  onlyOneColumn.test(cluster) ? cluster.length === 1 : surelyTwoColumns.test(cluster);

/** The characters of a text as they take up cells, with their widths. Those that take up none are left out. */
export function* clustersOf(text: string): Generator<{ cluster: string; width: 1 | 2 }> {
  if (onlyOneColumn.test(text)) {
    for (const cluster of text) yield { cluster, width: 1 };
    return;
  }
  segmenter ??= new Intl.Segmenter();
  for (const { segment } of segmenter.segment(text)) {
    const width = stringWidth(segment);
    if (width > 0) yield { cluster: segment, width: width === 1 ? 1 : 2 };
  }
}

/** For a terminal that knows only ASCII: question marks as wide as what they stand for. */
export const asciiOf = (text: string): string =>
  /^[ -~]*$/.test(text)
    ? text
    : [...clustersOf(text)]
        .map(({ cluster, width }) => (/^[ -~]$/.test(cluster) ? cluster : "?".repeat(width)))
        .join("");
