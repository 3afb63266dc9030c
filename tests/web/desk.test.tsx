// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/preact";
import { afterEach, describe, expect, test } from "vitest";
import { ArrivalFields } from "../../web/arrival/ArrivalFields.tsx";
import { askArrival } from "../../web/arrival/ask-arrival.ts";
import { Ledger } from "../../web/ledger/Ledger.tsx";
import { PaceView } from "../../web/pace-curve/PaceView.tsx";
import { Ribbons } from "../../web/ribbon/Ribbons.tsx";
import { SureView } from "../../web/spread/SureView.tsx";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { TurnBackView } from "../../web/turn-back/TurnBackView.tsx";
import { proposedWindow } from "../../web/window/proposed-window.ts";
import { WindowView } from "../../web/window/WindowView.tsx";
import { createDeciding } from "../../web/worker/deciding.ts";
import { demoEngine } from "./demo-engine.ts";

afterEach(cleanup);

/** The page on the worker's own parts, as main.tsx joins them. */
async function pageOf(change: (plan: PlanDocument) => PlanDocument = (plan) => plan): Promise<PageState> {
  const { plan, estimator, reader } = demoEngine("islands");
  const deciding = createDeciding(reader);
  const engine = {
    ...deciding,
    estimate: estimator.estimate,
    windowSlice: async (...asked: Parameters<typeof deciding.windowSlice>) => deciding.windowSlice(...asked),
    windowBests: async (...asked: Parameters<typeof deciding.windowBests>) => deciding.windowBests(...asked),
    windowSure: async (...asked: Parameters<typeof deciding.windowSure>) => deciding.windowSure(...asked),
  } as unknown as Engine;
  const page = createPageState(change(plan), engine);
  await page.answers.ask(page.shown.value);
  return page;
}

const WINDOW = { from: "2027-05-04T08:00Z", to: "2027-05-04T12:00Z", every: "1 h" };

describe("the departures compared", () => {
  const windowed = () => pageOf((plan) => ({ ...plan, window: WINDOW }));

  test("are walked by keyboard: looking changes nothing of the plan, Enter sets departure and route as one step", async () => {
    const page = await windowed();
    const { plan } = page.store;
    const before = plan.value;
    render(<WindowView page={page} />);
    const grid = await screen.findByRole("grid");
    expect(grid.getAttribute("aria-rowcount")).toBe("3");
    expect(grid.getAttribute("aria-colcount")).toBe("5");
    await screen.findByRole("list", { name: "Best departures" });
    fireEvent.keyDown(grid, { key: "ArrowDown" });
    fireEvent.keyDown(grid, { key: "End" });
    await waitFor(() =>
      expect(screen.getByRole("cell").textContent).toMatch(/4 May 12:00 UTC, West about: /),
    );
    expect(plan.value).toBe(before);
    expect(page.shown.value.departure).toBe("2027-05-04T12:00:00Z");
    fireEvent.keyDown(grid, { key: "Enter" });
    expect(plan.value.departure).toBe("2027-05-04T12:00:00Z");
    expect(page.store.selection.value.route).toBe(1);
    expect(page.desk.preview.value).toBeNull();
    page.store.undo();
    expect(plan.value).toBe(before);
  });

  test("are shown as they are again once they are no longer looked at", async () => {
    const page = await windowed();
    render(<WindowView page={page} />);
    const grid = await screen.findByRole("grid");
    fireEvent.keyDown(grid, { key: "ArrowRight" });
    expect(page.shown.value).not.toBe(page.store.plan.value);
    fireEvent.keyDown(grid, { key: "Escape" });
    expect(page.shown.value).toBe(page.store.plan.value);
  });

  test("are worked out anew for another file of the same name", async () => {
    const page = await windowed();
    const asked: PlanDocument[] = [];
    const { beginWindow } = page.engine;
    page.engine.beginWindow = (ticket, plan, first) => {
      asked.push(plan);
      return beginWindow(ticket, plan, first);
    };
    render(<WindowView page={page} />);
    await screen.findByRole("list", { name: "Best departures" });
    const once = asked.length;
    const files = new Map([["islands-wind.csv", new Blob(["another"])]]);
    page.store.edit("Replace islands-wind.csv", (plan) => ({ ...plan }), { files });
    await waitFor(() => expect(asked.length).toBeGreaterThan(once));
  });

  test("say in words what cannot be done and why", async () => {
    const page = await windowed();
    render(<WindowView page={page} />);
    const list = await screen.findByRole("list", { name: "What cannot be done" });
    expect(list.textContent).toMatch(/East about: \d of 5 not possible, the first because /);
  });

  test("are the bests that hold in every member and what-if, with those of the plain estimate that do not", async () => {
    const window = { from: "2027-05-04T15:00Z", to: "2027-05-04T16:00Z", every: "1 h" };
    const whatIf = [{ name: "An hour late", late: "1 h" }];
    const page = await pageOf((plan) => ({
      ...plan,
      window: { ...window, arriveBy: "2027-05-04T19:00Z" },
      whatIf,
      routes: plan.routes.filter(({ name }) => name === "West about"),
    }));
    render(<WindowView page={page} />);
    const list = await screen.findByRole("list", { name: "Best departures" });
    await waitFor(() =>
      expect(list.textContent).toMatch(/✓ clear: holds in the what-if|! caution: holds in the what-if/),
    );
    expect(list.textContent).toMatch(/Latest departure Tue 4 May 15:00 UTC/);
    expect(list.textContent).toMatch(
      /\(L\)Latest departure by the plain estimate Tue 4 May 16:00 UTC.*✕ stop: outlasts the forecast in the what-if "An hour late"/,
    );
    const inTime = screen.getByRole("list", { name: "Latest departures in time" });
    expect(inTime.textContent).toMatch(
      /By the plain estimate.*✕ stop: outlasts the forecast in the what-if "An hour late"/,
    );
  });

  test("write the window to the plan with the first change, speeds apart by commas", async () => {
    const page = await pageOf();
    render(<WindowView page={page} />);
    const proposed = proposedWindow(page.store.plan.value, page.answers.answer.value.estimate);
    const speeds = await screen.findByLabelText(/Speeds to try/);
    fireEvent.input(speeds, { target: { value: "6 kn, 7 kn" } });
    fireEvent.keyDown(speeds, { key: "Enter" });
    expect(page.store.plan.value.window).toEqual({ ...proposed, speeds: ["6 kn", "7 kn"] });
    await screen.findByLabelText("Rows");
  });

  test("keep an arrival: the plan's own key, which cells make it, the latest departure that does, and none again once cleared", async () => {
    const page = await windowed();
    const before = page.store.plan.value;
    render(<WindowView page={page} />);
    const field = await screen.findByLabelText(/^Arrive by/);
    fireEvent.change(field, { target: { value: "2027-05-04T12:00" } });
    expect(page.store.plan.value.window).toEqual({ ...WINDOW, arriveBy: "2027-05-04T12:00:00Z" });
    const list = await screen.findByRole("list", { name: "Latest departures in time" });
    expect(list.textContent).toMatch(/4 May 09:\d\d UTC, West about: .* arrives 1[12]:\d\d/);
    expect(list.textContent).toMatch(/East about: none arrives in time/);
    const grid = screen.getByRole("grid");
    fireEvent.keyDown(grid, { key: "Home" });
    fireEvent.keyDown(grid, { key: "ArrowDown" });
    await waitFor(() =>
      expect(screen.getByRole("cell").textContent).toMatch(/in time, \d+ min to spare|in time, 1 h/),
    );
    fireEvent.keyDown(grid, { key: "End" });
    await waitFor(() => expect(screen.getByRole("cell").textContent).toMatch(/too late/));
    fireEvent.click(screen.getByLabelText("Take out: Arrive by"));
    expect(page.store.plan.value.window).toEqual(WINDOW);
    page.store.undo();
    page.store.undo();
    expect(page.store.plan.value).toBe(before);
  });

  test("say in a sentence that an arrival is none to keep, and compare all the same", async () => {
    const page = await windowed();
    render(<WindowView page={page} />);
    const field = await screen.findByLabelText(/^Arrive by/);
    fireEvent.change(field, { target: { value: "2027-05-04T07:00" } });
    expect((await screen.findByRole("alert")).textContent).toMatch(
      /an arrival is after the earliest departure/,
    );
    expect(screen.getByLabelText(/^Arrive by/).getAttribute("aria-invalid")).toBe("true");
    await screen.findByRole("list", { name: "Best departures" });
  });

  test("are proposed within the fields' valid times", async () => {
    const page = await pageOf();
    const { estimate } = page.answers.answer.value;
    const { from, to } = proposedWindow(page.store.plan.value, estimate);
    for (const { validFrom, validTo } of estimate?.fields ?? []) {
      expect(Date.parse(from)).toBeGreaterThanOrEqual(Date.parse(validFrom ?? ""));
      expect(Date.parse(to)).toBeLessThanOrEqual(Date.parse(validTo ?? ""));
    }
  });
});

describe("the ledger", () => {
  test("says when its figures are of a departure that is only looked at", async () => {
    const page = await pageOf();
    render(<Ledger page={page} />);
    page.desk.preview.value = { departure: "2027-05-04T09:00:00Z", speed: null };
    expect(await screen.findByText(/Looking at.*4 May 09:00 UTC: not the plan's/)).toBeTruthy();
  });

  test("has what-ifs and the probability that the reserve holds, and the worst of them decides the status", async () => {
    const page = await pageOf((plan) => ({
      ...plan,
      whatIf: [{ name: "foul tide", current: 2 }],
      fields: (plan.fields ?? []).map((field) =>
        field.role === "current"
          ? { ...field, error: { speed: "0.2 m/s", length: "30 km", time: "6 h" } }
          : field,
      ),
    }));
    await page.decisions.ask(page.shown.value, false);
    page.store.select({ route: 1, waypoint: null });
    render(<Ledger page={page} />);
    expect(await screen.findByRole("rowheader", { name: "foul tide" })).toBeTruthy();
    expect(screen.getAllByText(/^Reserve holds: [<>]? ?\d.* % by the stated error$/).length).toBe(3);
    const findings = screen.getByRole("region", { name: /^Findings of / });
    const whatIfs = screen.getByRole("table", { name: /^What if: / });
    expect(findings.compareDocumentPosition(whatIfs) & Node.DOCUMENT_POSITION_FOLLOWING).toBeTruthy();
  });
});

describe("an arrival that is asked for", () => {
  test("shows the speed found on every route", async () => {
    const page = await pageOf();
    askArrival(page);
    await page.answers.ask(page.shown.value);
    render(<ArrivalFields page={page} />);
    expect(screen.getAllByRole("listitem").map(({ textContent }) => textContent)).toEqual([
      expect.stringMatching(/Sound: \d\.\d kn/),
      expect.stringMatching(/West about: \d\.\d kn/),
      expect.stringMatching(/East about: \d\.\d kn/),
    ]);
  });

  test("marks the cheapest, and the cheapest that holds in the plan's what-ifs", async () => {
    const arrive = { notBefore: "2027-05-04T15:30Z", notAfter: "2027-05-04T16:00Z" };
    const whatIf = [{ name: "A slow start", late: "20 min" }];
    const page = await pageOf((plan) => ({ ...plan, pace: { arrive }, whatIf }));
    render(<ArrivalFields page={page} />);
    const held = /\d\.\d kn for .* kWh \(cheapest\) .*\d\.\d kn for .* kWh \(cheapest that holds\)/;
    expect(screen.getByText(/^West about:/).textContent).toMatch(held);
  });

  test("says the nearest arrival where no speed makes it", async () => {
    const page = await pageOf((plan) => ({ ...plan, pace: { arrive: "2027-05-04T11:20:00Z" } }));
    render(<ArrivalFields page={page} />);
    expect(screen.getAllByText(/^none; nearest \d\d:\d\d at/).length).toBe(3);
  });
});

describe("turning back", () => {
  test("is told in words, each line leading to its place, and drawn on the ribbon", async () => {
    const page = await pageOf();
    await page.decisions.ask(page.shown.value, true);
    render(<TurnBackView page={page} />);
    const { container } = render(<Ribbons page={page} />);
    fireEvent.click(screen.getAllByText(/Point of no return, start \(Pier buoy\)/)[0] as HTMLElement);
    expect(page.view.pointed.value?.route).toBe(0);
    await waitFor(() => expect(container.querySelector(".reach .no-return")).toBeTruthy());
    expect(container.querySelector(".reach .reachable")).toBeTruthy();
  });

  test("takes alternates as they are typed", async () => {
    const page = await pageOf();
    render(<TurnBackView page={page} />);
    fireEvent.click(screen.getByText("Type an alternate"));
    const lat = await screen.findByLabelText("Latitude of alternate 1");
    fireEvent.input(lat, { target: { value: "53 30 N" } });
    fireEvent.keyDown(lat, { key: "Enter" });
    expect(page.store.plan.value.alternates?.[0]?.lat).toBe("53 30 N");
    fireEvent.click(screen.getByLabelText("Take out alternate Alternate 1"));
    expect(page.store.plan.value.alternates).toBeUndefined();
  });
});

describe("the pace", () => {
  test("is set from the curve, never faster than what keeps the reserve", async () => {
    const page = await pageOf();
    render(<PaceView page={page} />);
    fireEvent.click(await screen.findByText("Fastest that keeps the reserve"));
    expect(page.store.plan.value.pace).toMatchObject({ hold: "through-speed" });
    await page.answers.ask(page.shown.value);
    const [route] = page.answers.answer.value.routes;
    expect(route?.totals.remaining).toBeGreaterThanOrEqual(route?.reserve ?? Infinity);
  });
});

describe("how sure it is", () => {
  test("is told in figures beside the bands on the ribbons: on arrival for every route, and leg by leg", async () => {
    const page = await pageOf((plan) => ({
      ...plan,
      fields: (plan.fields ?? []).map((field) =>
        field.role === "current"
          ? { ...field, error: { speed: "0.2 m/s", length: "30 km", time: "6 h" } }
          : field,
      ),
    }));
    await page.decisions.ask(page.shown.value, false);
    const { container } = render(<Ribbons page={page} />);
    const legend = await screen.findByText(/10 % to 90 %/);
    const onArrival = /left on arrival (-?\d+\.\d to -?\d+\.\d) kWh/.exec(legend.textContent ?? "")?.[1];
    expect(onArrival).toBeDefined();
    await waitFor(() => expect(container.querySelectorAll(".spread-band.error .bars").length).toBe(3));
    render(<SureView page={page} />);
    const [row] = screen.getAllByRole("row", { name: /Sound/ });
    expect(row?.textContent).toContain(onArrival);
    const [legs] = screen.getAllByRole("table", { name: /Left of Sound/, hidden: true });
    expect(legs?.querySelector("tbody tr:last-child")?.textContent).toContain(onArrival);
  });

  test("says by how much a what-if misses the arrival that the pace asks for, and that it is a stop", async () => {
    const arrive = { notBefore: "2027-05-04T15:55Z", notAfter: "2027-05-04T16:00Z" };
    const page = await pageOf((plan) => ({
      ...plan,
      pace: { arrive },
      whatIf: [{ name: "A slow start", late: "25 min" }],
      routes: plan.routes.filter(({ name }) => name === "Sound"),
    }));
    await page.decisions.ask(page.shown.value, false);
    render(<SureView page={page} />);
    const table = await screen.findByRole("table", { name: /^What if: Sound/ });
    expect(table.querySelector("tbody tr")?.textContent).toMatch(/\d\d:\d\d \(\d\d min late\).*stop$/);
  });

  test("begins with common what-ifs and a stated error, each to be changed", async () => {
    const page = await pageOf();
    render(<SureView page={page} />);
    fireEvent.click(screen.getByText("wind × 1.2"));
    const factor = await screen.findByLabelText("Wind × of what-if 1");
    fireEvent.input(factor, { target: { value: "1.4" } });
    fireEvent.keyDown(factor, { key: "Enter" });
    expect(page.store.plan.value.whatIf).toEqual([{ wind: 1.4 }]);
    fireEvent.click(screen.getByText("State an error of the wind"));
    const length = await screen.findByLabelText("Correlated over, wind");
    fireEvent.input(length, { target: { value: "80 km" } });
    fireEvent.keyDown(length, { key: "Enter" });
    const wind = page.store.plan.value.fields?.find(({ role }) => role === "wind");
    expect(wind?.error?.length).toBe("80 km");
  });
});
