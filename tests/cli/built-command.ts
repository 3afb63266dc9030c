import { spawnSync } from "node:child_process";
import { mkdirSync, mkdtempSync, rmSync } from "node:fs";
import { join } from "node:path";
import { build, loadConfigFromFile } from "vite";

const ROOT = new URL("../..", import.meta.url).pathname;
const CONFIG = join(ROOT, "src/cli/vite.config.ts");

interface Outcome {
  readonly status: number | null;
  readonly out: string;
  readonly err: string;
}

export interface BuiltCommand {
  readonly file: string;
  /** Runs the command in a process of its own. */
  run(args: readonly string[], cwd?: string): Outcome;
  remove(): void;
}

/** Builds the command as it is shipped, into a folder of its own below dist/, from where it finds the demo data. */
export async function builtCommand(): Promise<BuiltCommand> {
  mkdirSync(join(ROOT, "dist"), { recursive: true });
  const outDir = mkdtempSync(join(ROOT, "dist", "test-"));
  const loaded = await loadConfigFromFile({ command: "build", mode: "production" }, CONFIG);
  if (loaded === null) throw new Error(`${CONFIG} is not read`);
  const { config } = loaded;
  await build({
    ...config,
    configFile: false,
    logLevel: "error",
    build: {
      ...config.build,
      outDir,
      rolldownOptions: { ...config.build?.rolldownOptions, input: { cli: join(ROOT, "src/cli/main.ts") } },
    },
  });
  const file = join(outDir, "cli.js");
  return {
    file,
    run(args, cwd = ROOT) {
      const { status, stdout, stderr } = spawnSync(process.execPath, [file, ...args], {
        cwd,
        encoding: "utf8",
      });
      return { status, out: stdout, err: stderr };
    },
    remove: () => rmSync(outDir, { recursive: true, force: true }),
  };
}
