// @vitest-environment happy-dom
import { cleanup, render, screen } from "@testing-library/preact";
import { afterEach, describe, expect, test } from "vitest";
import { estimatePlan, unitsFor, writeTable } from "../../src/index.ts";
import { Ledger } from "../../web/ledger/Ledger.tsx";
import { LegTable } from "../../web/leg-table/LegTable.tsx";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";
import { cellText } from "../../web/window/cell-text.ts";
import { bytesOfDemo, demoEngine } from "./demo-engine.ts";

afterEach(cleanup);

async function pageOf(name: "survey" | "islands"): Promise<PageState> {
  const { plan, estimator } = demoEngine(name);
  const page = createPageState(plan, { estimate: estimator.estimate } as unknown as Engine);
  await page.answers.ask(plan);
  return page;
}

async function commandTable({ store }: PageState): Promise<string> {
  const text = JSON.stringify(store.plan.value);
  const { estimate, plan } = await estimatePlan(text, { file: "a.plan.json", open: bytesOfDemo });
  const { routes, craft, pace } = plan;
  return writeTable({ estimate, routes, craft, pace }, unitsFor(craft));
}

/** The leg table's ETAs as they are shown. */
function shownEtas(container: Element): string[] {
  const at = [...container.querySelectorAll("thead th")].findIndex((head) =>
    /^ETA/.test(head.textContent ?? ""),
  );
  return [...container.querySelectorAll("tbody tr")].map(
    (row) => row.querySelectorAll("td")[at]?.textContent ?? "",
  );
}

describe("an ETA on the page", () => {
  test.each([
    ["survey", /^\d\d:\d\d:\d\d$/],
    ["islands", /^\d\d:\d\d$/],
  ] as const)("of the %s demo has seconds where the command's leg table has them", async (name, form) => {
    const page = await pageOf(name);
    const lines = (await commandTable(page)).split("\n");
    for (const [at, { name: route }] of page.store.plan.value.routes.entries()) {
      page.store.select({ route: at, waypoint: null });
      const { container } = render(<LegTable page={page} />);
      const etas = shownEtas(container);
      const first = lines.findIndex((line) => line.startsWith(`== ${route} `));
      const told = lines.slice(
        first,
        lines.findIndex((line, n) => n > first && line.startsWith("All ")),
      );
      expect(etas.length).toBeGreaterThan(1);
      for (const eta of etas.filter((each) => each !== "–")) {
        expect(eta).toMatch(form);
        expect(
          told.some((line) => line.split(/ +/).includes(eta)),
          `${route}: ${eta}`,
        ).toBe(true);
      }
      expect(new Set(etas).size).toBe(etas.length);
      cleanup();
    }
  });

  test("of a short flight has seconds in the ledger and among the departures", async () => {
    const page = await pageOf("survey");
    render(<Ledger page={page} />);
    const routes = page.answers.answer.value.estimate?.routes ?? [];
    for (const { arrival } of routes)
      if (arrival !== null)
        expect(screen.getAllByText(new RegExp(arrival.slice(11, 16))).length).toBeGreaterThan(0);
    expect(document.body.textContent).toMatch(/\d\d:\d\d:\d\d/);
    const [route] = routes;
    if (route === undefined) throw new Error("the demo has a route");
    const cell = {
      ...{
        route: route.name,
        departure: "2027-05-04T09:00:00.000Z",
        speed_m_s: null,
        status: "clear" as const,
      },
      ...{ arrival: "2027-05-04T09:02:05.400Z", time_s: 125.4, passage_s: 125.4 },
      ...{ use: 36_000, remaining: 360_000, reserve: 0, worst: null },
    };
    const shape = { storeUnit: "J" as const, usable: 400_000, speeds: null };
    expect(cellText(page, cell, { shape, longest_s: 7199 })).toContain("Tue 4 May 09:00 UTC");
    expect(cellText(page, cell, { shape, longest_s: 7199 })).toContain("arrives 09:02:05,");
    // The command's table of departures goes over to minutes at two hours.
    expect(cellText(page, cell, { shape, longest_s: 7200 })).toContain("arrives 09:02,");
    const between = { ...cell, departure: "2027-05-04T09:00:30.000Z" };
    expect(cellText(page, between, { shape, longest_s: 7200 })).toContain("Tue 4 May 09:00:30 UTC");
  });
});
