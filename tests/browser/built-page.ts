import { spawnSync } from "node:child_process";
import { existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import { join, relative, sep } from "node:path";

const ROOT = new URL("../..", import.meta.url).pathname;
const PAGE = join(ROOT, "dist", "page");
const SOURCES = ["web", "src", "data/demo", "package-lock.json"].map((path) => join(ROOT, path));

/** Builds the page as it is shipped where the build is missing or older than what it is made from. */
export function buildIfStale(): void {
  const index = join(PAGE, "index.html");
  if (existsSync(index) && statSync(index).mtimeMs >= Math.max(...SOURCES.map(newest))) return;
  const vite = join(ROOT, "node_modules", "vite", "bin", "vite.js");
  const config = join(ROOT, "web", "vite.config.ts");
  const built = spawnSync(process.execPath, [vite, "build", "--config", config, "--logLevel", "warn"], {
    encoding: "utf8",
    // The tests' own would build a page that keeps nothing for use without a network.
    env: { ...process.env, NODE_ENV: "production" },
  });
  if (built.status !== 0) throw new Error(`the page can't be built:\n${built.stdout}${built.stderr}`);
}

/** The built files by their path from the page's root, with `/` between folders. */
export function builtFiles(page = PAGE): Map<string, Buffer> {
  const files = readdirSync(page, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile());
  return new Map(
    files.map(({ parentPath, name }) => {
      const file = join(parentPath, name);
      return [relative(page, file).split(sep).join("/"), readFileSync(file)];
    }),
  );
}

function newest(path: string): number {
  const stat = statSync(path);
  if (!stat.isDirectory()) return stat.mtimeMs;
  // A folder's own time tells of files taken away.
  return Math.max(stat.mtimeMs, ...readdirSync(path).map((name) => newest(join(path, name))));
}
