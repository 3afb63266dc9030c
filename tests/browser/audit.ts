import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import type { Page } from "playwright-core";
import { expect } from "vitest";

const AXE = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");
/** WCAG 2.2, levels A and AA. */
const TAGS = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];

interface Violation {
  readonly id: string;
  readonly help: string;
  readonly nodes: readonly { readonly target: readonly unknown[]; readonly failureSummary?: string }[];
}

/** Holds the page, in the state that it is in, against WCAG 2.2 AA. */
export async function expectAccessible(page: Page, state: string): Promise<void> {
  // Handed over by the debugger, since the page's policy lets in no script.
  const devtools = await page.context().newCDPSession(page);
  await devtools.send("Runtime.evaluate", { expression: AXE });
  const run = `axe.run(document, { runOnly: { type: "tag", values: ${JSON.stringify(TAGS)} }, resultTypes: ["violations"] })
    .then(({ violations }) => JSON.stringify(violations))`;
  const { result } = await devtools.send("Runtime.evaluate", { expression: run, awaitPromise: true });
  await devtools.detach();
  const violations: Violation[] = JSON.parse(String(result.value));
  const told = violations.flatMap(({ id, help, nodes }) =>
    nodes.map(({ target, failureSummary = "" }) => `${id} (${help}): ${target.join(" ")}: ${failureSummary}`),
  );
  expect(told, state).toEqual([]);
}
