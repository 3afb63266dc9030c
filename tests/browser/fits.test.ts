import type { Page } from "playwright-core";
import { expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { openPart, showPane } from "./desk-parts.ts";
import { openDemo, visit } from "./visit.ts";

/** Figures of the ledger's cards that run into the next cell. */
function overlapping(page: Page): Promise<string[]> {
  return page
    .locator(".ledger-table td[data-label]")
    .evaluateAll((cells) =>
      cells.flatMap((cell) => (cell.scrollWidth > cell.clientWidth ? [cell.textContent ?? ""] : [])),
    );
}

/** Texts of a pane of which a part is cut off by the pane or by a parent of their own. */
function cutOff(page: Page, pane: string): Promise<string[]> {
  return page.locator(pane).evaluate((root) => {
    const found: string[] = [];
    const walker = document.createTreeWalker(root, NodeFilter.SHOW_TEXT);
    const isUnseen = (element: Element | null): boolean =>
      element?.closest(".unseen, .advisory, thead") !== null;
    for (let node = walker.nextNode(); node !== null; node = walker.nextNode()) {
      if ((node.textContent ?? "").trim() === "" || isUnseen(node.parentElement)) continue;
      const range = document.createRange();
      range.selectNodeContents(node);
      const { left, right, width } = range.getBoundingClientRect();
      if (width === 0) continue;
      for (let box = node.parentElement; box !== null; box = box.parentElement) {
        const { overflowX } = getComputedStyle(box);
        const edge = box.getBoundingClientRect();
        // Where a box scrolls of its own, what is beyond its edge can be reached; a whole pane is not to need it.
        if (box !== root && overflowX === "visible") continue;
        if (right > edge.right + 0.5 || left < edge.left - 0.5) found.push(node.textContent ?? "");
        if (box === root) break;
      }
    }
    return found;
  });
}

test.each([320, 360, 390, 414])("nothing of the ledger is cut off on a phone %i px wide", async (width) => {
  const { page } = await visit({ width, height: 740, touch: true });
  for (const [entry, name] of [
    ["Survey drone", "survey"],
    ["Drone: when, and how sure", "survey-decide"],
    ["Ocean: when, and how sure", "ocean-decide"],
  ] as const) {
    await openDemo(page, entry, name);
    await showPane(page, "Ledger");
    if (name !== "survey") await page.locator(".sure-line").first().waitFor();
    expect(await cutOff(page, ".pane.ledger"), name).toEqual([]);
    expect(await overlapping(page), name).toEqual([]);
  }
});

test("a stop's reason is in sight beside decisions on a wide screen", async () => {
  const { page } = await visit();
  await openDemo(page, "Workboat: when, and how sure", "islands-decide");
  await page.locator(".ledger .what-if-table").waitFor();
  const stopped = page.locator(".ledger-table tbody", { has: page.locator(".status .stop") }).first();
  await stopped.getByRole("button").click();
  const reason = page.locator(".ledger .findings .shape.stop + span").first();
  const advisory = await page.locator(".ledger .advisory").boundingBox();
  const box = await reason.boundingBox();
  expect((box?.y ?? Infinity) + (box?.height ?? 0)).toBeLessThanOrEqual(advisory?.y ?? 0);
});

test("the names of a window's rows are whole on a wide screen and on a phone", async () => {
  for (const size of [{}, { width: 360, height: 740, touch: true }]) {
    const { page } = await visit(size);
    for (const [entry, name] of [
      ["Ocean: when, and how sure", "ocean-decide"],
      ["Drone: when, and how sure", "survey-decide"],
    ] as const) {
      await openDemo(page, entry, name);
      await openPart(page, "Departures");
      const names = page.locator(".heat-names span[title]");
      await names
        .filter({ hasText: name === "ocean-decide" ? "Great circle" : "High" })
        .first()
        .waitFor();
      const cut = await names.evaluateAll((spans) =>
        spans
          .filter(
            ({ scrollWidth, clientWidth, scrollHeight, clientHeight }) =>
              scrollWidth > clientWidth || scrollHeight > clientHeight + 1,
          )
          .map(({ textContent }) => textContent),
      );
      expect(cut).toEqual([]);
    }
  }
});

test("what is wrong with a plan is in sight of the field that says it, on a phone too", async () => {
  const { page } = await visit({ width: 360, height: 740, touch: true });
  await openDemo(page, "Workboat: when, and how sure", "islands-decide");
  await openPart(page, "How sure");
  const factor = page.getByLabel("Wind × of what-if 1");
  await factor.fill("strong");
  await factor.press("Enter");
  const told = page.locator(".decide").getByRole("alert");
  await told.waitFor();
  expect(await told.textContent()).toBe(
    '"Wind ×" of what-if 1 takes a number without a unit; found "strong"',
  );
  expect(await factor.inputValue()).toBe("strong");
  expect(await factor.getAttribute("aria-invalid")).toBe("true");
  await page.getByText("Working it out").waitFor({ state: "hidden" });
  await expectAccessible(page, "a what-if that cannot be read");
});
