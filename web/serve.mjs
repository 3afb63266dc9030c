import { spawnSync } from "node:child_process";
import { createReadStream, existsSync, statSync } from "node:fs";
import { createServer } from "node:http";
import { extname, join, normalize, sep } from "node:path";
import { fileURLToPath } from "node:url";

/*
 * Serves the built page on the loopback address, building it first where it isn't there. `--port N` asks for a port (default 4747,
 * 0 for any free one); `--build` builds anew.
 */

const project = fileURLToPath(new URL("..", import.meta.url));
const folder = join(project, "dist", "page");
const TYPES = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".json": "application/json; charset=utf-8",
  ".csv": "text/csv; charset=utf-8",
  ".svg": "image/svg+xml",
  ".png": "image/png",
  ".webmanifest": "application/manifest+json",
};

if (process.argv.includes("--build") || !existsSync(join(folder, "index.html"))) {
  const vite = join(project, "node_modules", "vite", "bin", "vite.js");
  const built = spawnSync(
    process.execPath,
    [vite, "build", "--config", join(project, "web", "vite.config.ts")],
    {
      stdio: "inherit",
    },
  );
  if (built.status !== 0) process.exit(built.status ?? 1);
}

const server = createServer((request, response) => {
  const file = fileFor(request.url ?? "/");
  if (file === null || (request.method !== "GET" && request.method !== "HEAD")) {
    response.writeHead(404, { "content-type": "text/plain" }).end("not found");
    return;
  }
  const hashed = file.includes(`${sep}assets${sep}`);
  response.writeHead(200, {
    "content-type": TYPES[extname(file)] ?? "application/octet-stream",
    "content-length": statSync(file).size,
    "cache-control": hashed ? "public, max-age=31536000, immutable" : "no-cache",
    "x-content-type-options": "nosniff",
    "referrer-policy": "no-referrer",
  });
  if (request.method === "HEAD") response.end();
  else createReadStream(file).pipe(response);
});

/** The file that an address names, or null where it names none inside the folder. */
function fileFor(address) {
  let path;
  try {
    path = decodeURIComponent(new URL(address, "http://localhost").pathname);
  } catch {
    return null;
  }
  const file = normalize(join(folder, path.endsWith("/") ? `${path}index.html` : path));
  if (!file.startsWith(folder + sep) || path.includes("\0")) return null;
  return existsSync(file) && statSync(file).isFile() ? file : null;
}

const asked = process.argv.indexOf("--port");
const port = asked === -1 ? 4747 : Number(process.argv[asked + 1]);
let retried = false;

server.on("error", (fault) => {
  if (fault.code === "EADDRINUSE" && asked === -1 && !retried) {
    retried = true;
    server.listen(0, "127.0.0.1");
    return;
  }
  process.stderr.write(`The page can't be served: ${fault.message}\n`);
  process.exit(1);
});
server.listen(port, "127.0.0.1", () => {
  process.stdout.write(`Legwork is at http://127.0.0.1:${server.address().port}/ (Ctrl+C stops it)\n`);
});
