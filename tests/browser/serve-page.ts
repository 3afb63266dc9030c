import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import { extname } from "node:path";

const TYPES: Readonly<Record<string, string>> = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".json": "application/json; charset=utf-8",
  ".csv": "text/csv; charset=utf-8",
  ".svg": "image/svg+xml",
  ".png": "image/png",
  ".webmanifest": "application/manifest+json",
};

export interface PageServer {
  /** With a `/` at its end. */
  readonly address: string;
  /** The files by path; what is changed here is served from then on. */
  readonly files: Map<string, Buffer>;
  close(): Promise<void>;
}

/** Serves files from memory on the loopback address, as `web/serve.mjs` does from the disk: a build meanwhile changes nothing. */
export async function servePage(files: Map<string, Buffer>): Promise<PageServer> {
  const server = createServer((request, response) => {
    const path = decodeURIComponent(new URL(request.url ?? "/", "http://localhost").pathname).slice(1);
    const name = path === "" || path.endsWith("/") ? `${path}index.html` : path;
    const content = files.get(name);
    if (content === undefined) {
      response.writeHead(404, { "content-type": "text/plain" }).end("not found");
      return;
    }
    response.writeHead(200, {
      "content-type": TYPES[extname(name)] ?? "application/octet-stream",
      "content-length": content.length,
      "cache-control": name.startsWith("assets/") ? "public, max-age=31536000, immutable" : "no-cache",
      "x-content-type-options": "nosniff",
      "referrer-policy": "no-referrer",
    });
    response.end(content);
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const { port } = server.address() as AddressInfo;
  return {
    address: `http://127.0.0.1:${port}/`,
    files,
    close() {
      server.closeAllConnections();
      return new Promise((resolve) => server.close(() => resolve()));
    },
  };
}
