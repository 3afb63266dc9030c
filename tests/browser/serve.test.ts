import { type ChildProcess, spawn } from "node:child_process";
import { request } from "node:http";
import { afterAll, beforeAll, expect, test } from "vitest";
import { visit } from "./visit.ts";

let server: ChildProcess;
let address: string;

beforeAll(async () => {
  const script = new URL("../../web/serve.mjs", import.meta.url).pathname;
  server = spawn(process.execPath, [script, "--port", "0"], { stdio: ["ignore", "pipe", "inherit"] });
  address = await new Promise((resolve, reject) => {
    let text = "";
    server.stdout?.on("data", (piece: Buffer) => {
      text += piece.toString("utf8");
      const found = text.match(/http:\/\/127\.0\.0\.1:\d+\//);
      if (found) resolve(found[0]);
    });
    server.on("exit", (code) => reject(new Error(`the server ended with ${code}: ${text}`)));
  });
});

afterAll(() => server.kill());

test("npm start's server prints an address on the loopback interface, and the demo is there", async () => {
  const { page } = await visit({ address });
  expect(await page.getByLabel("Title of the plan").inputValue()).toBe("Stores for the north light");
});

test("the server hands out nothing from outside the page's folder, and takes nothing", async () => {
  for (const path of [
    "/../../package.json",
    "/..%2f..%2fpackage.json",
    "/assets/../../../package.json",
    "/%00",
    "/none",
  ]) {
    expect(await status("GET", path), path).toBe(404);
  }
  expect(await status("POST", "/")).toBe(404);
  expect(await status("GET", "/")).toBe(200);
});

/** Asks for a path as it stands: `fetch` would tidy it. */
function status(method: string, path: string): Promise<number | undefined> {
  const { hostname, port } = new URL(address);
  return new Promise((resolve, reject) => {
    const asking = request({ hostname, port, path, method }, (answer) => {
      answer.resume();
      resolve(answer.statusCode);
    });
    asking.on("error", reject);
    asking.end();
  });
}
