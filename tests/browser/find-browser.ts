import { accessSync, constants } from "node:fs";
import { delimiter, join } from "node:path";

const NAMES = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable"];

/**
 * The Chromium that the tests drive: the one that LEGWORK_BROWSER names, else the first on PATH.
 *
 * @throws a sentence that says what to install, where there is none
 */
export function findBrowser(environment: NodeJS.ProcessEnv = process.env): string {
  const { LEGWORK_BROWSER: named, PATH = "" } = environment;
  if (named !== undefined && named !== "") {
    if (isProgram(named)) return named;
    throw new Error(`LEGWORK_BROWSER is ${named}, which is no program: name a Chromium by its full path.`);
  }
  for (const folder of PATH.split(delimiter)) {
    for (const name of NAMES) {
      const file = join(folder, name);
      if (folder !== "" && isProgram(file)) return file;
    }
  }
  throw new Error(
    "The browser tests need Chromium: install Debian's package chromium (apt-get install chromium), or name one in LEGWORK_BROWSER.",
  );
}

function isProgram(file: string): boolean {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}
