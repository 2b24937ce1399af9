import type { Dialect } from "./dialect.ts";
import type { KeySource } from "./input.ts";
import type { RealOutput } from "./output.ts";
import { writeNow } from "./write-now.ts";

/** Takes the terminal over and gives it back. */
export interface Session {
  readonly isActive: boolean;
  /** Takes it over; again where something outside may have changed its modes. */
  enter(): void;
  /** Gives it back as it was found, before it returns. Does nothing where that is done; throws as `writeSync`. */
  restore(): void;
}

export function createSession(stdin: KeySource, stdout: RealOutput, dialect: Dialect): Session {
  let isActive = false;
  return {
    get isActive() {
      return isActive;
    },
    enter() {
      if (isActive) stdin.setRawMode?.(false);
      isActive = true;
      stdin.setRawMode?.(true);
      writeNow(stdout, entering(dialect));
    },
    restore() {
      if (!isActive) return;
      isActive = false;
      try {
        writeNow(stdout, leaving(dialect));
      } finally {
        stdin.setRawMode?.(false);
      }
    },
  };
}

/** Private modes of xterm's ctlseqs: 1049 second screen, 25 cursor, 2004 bracketed paste; DEC's 7 is autowrap. */
function entering(dialect: Dialect): string {
  return [
    dialect.alternateScreen ? "\u001b[?1049h" : "",
    dialect.hiddenCursor ? "\u001b[?25l" : "",
    dialect.bracketedPaste ? "\u001b[?2004h" : "",
    "\u001b[?7l",
  ].join("");
}

/** Without a second screen, what was drawn is cleared away. */
function leaving(dialect: Dialect): string {
  return [
    "\u001b[m\u001b[?7h",
    dialect.bracketedPaste ? "\u001b[?2004l" : "",
    dialect.hiddenCursor ? "\u001b[?25h" : "",
    dialect.alternateScreen ? "\u001b[?1049l" : "\u001b[H\u001b[2J",
  ].join("");
}
