// Puts modules of our own in the place of three of the drawing library's, where those take most of a frame's time or
// keep all that was ever drawn; see src/effects/terminal/ink/. Tests run with the library as it is.
import { resolve } from "node:path";

const own = (name) => ({ path: resolve(`src/effects/terminal/ink/${name}.ts`) });

export const leanInk = {
  name: "lean-ink",
  setup(build) {
    build.onResolve({ filter: /^\.\/(output|measure-text)\.js$/ }, ({ path, importer }) =>
      /[\\/]ink[\\/]build[\\/]/.test(importer) ? own(path.slice(2, -3)) : undefined,
    );
    build.onResolve({ filter: /^string-width$/ }, ({ importer }) =>
      /terminal[\\/]ink[\\/]string-width\.ts$/.test(importer) ? undefined : own("string-width"),
    );
  },
};
