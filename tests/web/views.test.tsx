// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, within } from "@testing-library/preact";
import { afterEach, beforeAll, describe, expect, test, vi } from "vitest";
import { durationText } from "../../web/format/time-text.ts";
import { Ledger } from "../../web/ledger/Ledger.tsx";
import { LegTable } from "../../web/leg-table/LegTable.tsx";
import { legColumns } from "../../web/leg-table/leg-columns.ts";
import { Ribbons } from "../../web/ribbon/Ribbons.tsx";
import { PlanBar } from "../../web/shell/PlanBar.tsx";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { RouteEditor } from "../../web/waypoints/RouteEditor.tsx";
import type { EstimateAnswer } from "../../web/worker/protocol.ts";
import { demoEngine } from "./demo-engine.ts";

let plan: PlanDocument;
let answer: EstimateAnswer;

beforeAll(async () => {
  const demo = demoEngine("islands");
  plan = demo.plan;
  answer = await demo.estimator.estimate(plan);
});
afterEach(cleanup);

async function answeredPage(): Promise<PageState> {
  const engine = { estimate: async () => answer } as unknown as Engine;
  const page = createPageState(plan, engine);
  await page.answers.ask(plan);
  return page;
}

describe("the ledger", () => {
  test("has a row a route with its figures, and the advisory beside them", async () => {
    const page = await answeredPage();
    render(<Ledger page={page} />);
    for (const { name } of plan.routes) {
      expect(screen.getByRole("rowheader", { name: new RegExp(name) })).toBeTruthy();
    }
    expect(screen.getByText(/Not for navigation/)).toBeTruthy();
    expect(screen.getAllByText(/still \d+ h \d\d · along/).length).toBe(plan.routes.length);
  });

  test("marks as best only a route that may be run, and says so in words", async () => {
    const page = await answeredPage();
    render(<Ledger page={page} />);
    const { routes } = page.answers.answer.value;
    const best = screen.getAllByText(/\(best\)/);
    expect(best.length).toBe(3);
    for (const mark of best) {
      const name = within(mark.closest("tr") as HTMLElement).getByRole("rowheader").textContent;
      expect(routes.find((route) => route?.name === name)?.status).not.toBe("stop");
    }
  });

  test("explains the mark of the best only where a figure has it", async () => {
    const { estimator } = demoEngine("islands");
    const page = createPageState(plan, { estimate: estimator.estimate } as unknown as Engine);
    await page.answers.ask(plan);
    const { container, rerender } = render(<Ledger page={page} />);
    expect(container.querySelector(".key.best")).not.toBeNull();
    page.store.edit("Ask for much", (old) => ({ ...old, reserve: "99 %" }));
    await page.answers.ask(page.store.plan.value);
    rerender(<Ledger page={page} />);
    expect(page.answers.answer.value.routes.every((route) => route?.status === "stop")).toBe(true);
    expect(container.querySelector(".key.best")).toBeNull();
  });

  test("says of the times whether stays are among them, in the ledger and below the leg table", async () => {
    const { plan: survey, estimator } = demoEngine("survey");
    const page = createPageState(survey, { estimate: estimator.estimate } as unknown as Engine);
    await page.answers.ask(survey);
    const { container } = render(
      <>
        <Ledger page={page} />
        <LegTable page={page} />
      </>,
    );
    screen.getByRole("columnheader", { name: "Time + stays" });
    const { time_s, stay_s } = page.answers.answer.value.routes[0]?.totals ?? {};
    expect(stay_s).toBe(240);
    expect(container.querySelector(".ledger-table [data-label='Time + stays']")?.textContent).toBe(
      durationText((time_s ?? 0) + 240, "second"),
    );
    expect(container.querySelector(".leg-totals")?.textContent).toContain(
      `${durationText(time_s ?? 0, "second")} under way and 4 min 00 of stays, `,
    );
  });

  test("shows differences to a chosen route on demand", async () => {
    const page = await answeredPage();
    const { container } = render(<Ledger page={page} />);
    expect(container.querySelectorAll(".difference").length).toBe(0);
    fireEvent.change(screen.getByLabelText(/Differences to/), { target: { value: "0" } });
    await Promise.resolve();
    expect(page.view.base.value).toBe(0);
    expect((await screen.findAllByText(/^[+−]\d/)).length).toBeGreaterThan(0);
  });

  test("leads from a finding to its place", async () => {
    const page = await answeredPage();
    const at = page.answers.answer.value.routes.findIndex((route) =>
      route?.findings.some((finding) => finding.leg !== null),
    );
    page.store.select({ route: at, waypoint: null });
    render(<Ledger page={page} />);
    const finding = page.answers.answer.value.routes[at]?.findings.find(({ leg }) => leg !== null);
    fireEvent.click(screen.getByText(finding?.message ?? "?"));
    expect(page.store.selection.value).toEqual({ route: at, waypoint: finding?.leg });
    expect(page.view.pointed.value?.route).toBe(at);
  });

  test("says after a fault that its figures are from before it, and says it no more once it is mended", async () => {
    const answers: EstimateAnswer[] = [
      answer,
      { ok: false, fault: "reserve takes a share", key: "reserve" },
      answer,
    ];
    const engine = { estimate: async () => answers.shift() } as unknown as Engine;
    const page = createPageState(plan, engine);
    await page.answers.ask(plan);
    render(<Ledger page={page} />);
    expect(screen.queryByText("from before the fault")).toBeNull();
    await page.answers.ask(plan);
    expect(await screen.findByText("from before the fault")).toBeTruthy();
    expect(screen.getByRole("alert").textContent).toBe("reserve takes a share");
    await page.answers.ask(plan);
    await vi.waitFor(() => expect(screen.queryByText("from before the fault")).toBeNull());
  });

  test("opens the whole advisory and closes it", async () => {
    const page = await answeredPage();
    render(<Ledger page={page} />);
    const button = screen.getByText("Read all");
    fireEvent.click(button);
    expect((await screen.findByText("Read less")).getAttribute("aria-expanded")).toBe("true");
    fireEvent.click(button);
    expect((await screen.findByText("Read all")).getAttribute("aria-expanded")).toBe("false");
  });

  test("shows a name as text, never as markup", async () => {
    const page = await answeredPage();
    page.store.edit("Rename", (old) => ({
      ...old,
      routes: old.routes.map((route, at) => (at === 0 ? { ...route, name: "<img src=x>" } : route)),
    }));
    const { container } = render(<Ledger page={page} />);
    expect(container.querySelector("img")).toBeNull();
    expect(screen.getAllByText("<img src=x>").length).toBeGreaterThan(0);
  });
});

describe("the leg table", () => {
  test("has a row a leg of the chosen route, in the user's units", async () => {
    const page = await answeredPage();
    page.store.select({ route: 1, waypoint: null });
    const { container } = render(<LegTable page={page} />);
    const legs = page.answers.answer.value.routes[1]?.legs ?? [];
    expect(container.querySelectorAll("tbody tr").length).toBe(legs.length);
    expect(container.querySelector("thead")?.textContent).toContain("NM");
    page.view.units.value = "metric";
    await Promise.resolve();
    expect((await screen.findAllByText("km")).length).toBe(1);
  });

  test("ends with what decides, and its still time is without the stay", async () => {
    const page = await answeredPage();
    const { container } = render(<LegTable page={page} />);
    const headings = [...container.querySelectorAll("thead th")];
    expect(headings.slice(-2).map(({ className }) => className)).toEqual([
      "figure decides",
      "figure decides",
    ]);
    const [route] = page.answers.answer.value.routes;
    if (!route) throw new Error("the demo has a route");
    const stopping = { ...route, totals: { ...route.totals, stay_s: 300 } };
    const still = legColumns(stopping, { preset: "sea", zone: "UTC", clock: "minute" }).find(
      ({ key }) => key === "still",
    );
    expect([still?.heading, still?.unit]).toEqual(["Still time", ""]);
  });

  test("marks the leg that is pointed at on a ribbon", async () => {
    const page = await answeredPage();
    const { container } = render(<LegTable page={page} />);
    page.view.pointed.value = { route: 0, distance_m: 10 };
    await screen.findByText(plan.routes[0]?.name ?? "?");
    await Promise.resolve();
    expect(container.querySelector("tr.pointed td")?.textContent).toBe("1");
  });
});

describe("the ribbons", () => {
  test("can be walked by keyboard, and say the figures of the place", async () => {
    const page = await answeredPage();
    render(<Ribbons page={page} />);
    const [strip] = screen.getAllByRole("slider");
    if (!strip) throw new Error("no ribbon");
    fireEvent.focus(strip);
    fireEvent.keyDown(strip, { key: "End" });
    const total = page.answers.answer.value.drawings[0]?.distance_m.at(-1);
    expect(page.view.pointed.value).toEqual({ route: 0, distance_m: total });
    fireEvent.keyDown(strip, { key: "ArrowLeft" });
    expect(page.view.pointed.value?.distance_m).toBeCloseTo((total ?? 0) * 0.99, 6);
    await Promise.resolve();
    expect(strip.getAttribute("aria-valuetext")).toMatch(/NM.*(with|against).*ground speed.*kWh left/);
  });

  test("turn from distance to time", async () => {
    const page = await answeredPage();
    const { container } = render(<Ribbons page={page} />);
    expect(container.querySelector(".ribbon-axis")?.textContent).toContain("NM");
    fireEvent.click(screen.getByLabelText("Time"));
    await Promise.resolve();
    expect(page.view.axis.value).toBe("time");
  });
});

describe("the table of waypoints", () => {
  test("takes positions as they are typed, and a bare number as degrees", async () => {
    const page = await answeredPage();
    render(<RouteEditor page={page} />);
    const field = screen.getByLabelText("Latitude of waypoint 2");
    fireEvent.input(field, { target: { value: "53 28.1 N" } });
    fireEvent.keyDown(field, { key: "Enter" });
    expect(page.store.plan.value.routes[0]?.waypoints[1]?.lat).toBe("53 28.1 N");
    const lon = screen.getByLabelText("Longitude of waypoint 2");
    fireEvent.input(lon, { target: { value: "-13.5" } });
    fireEvent.keyDown(lon, { key: "Enter" });
    expect(page.store.plan.value.routes[0]?.waypoints[1]?.lon).toBe(-13.5);
  });

  test("makes, turns and takes away routes and waypoints, all of it undone again", async () => {
    const page = await answeredPage();
    render(<RouteEditor page={page} />);
    fireEvent.click(screen.getByText("Duplicate"));
    fireEvent.click(screen.getByText("Reverse"));
    await Promise.resolve();
    expect(page.store.plan.value.routes.length).toBe(plan.routes.length + 1);
    fireEvent.focusIn(screen.getByLabelText("Name of waypoint 2"));
    page.store.select({ route: 1, waypoint: 1 });
    fireEvent.click(await screen.findByText("Delete waypoint 2"));
    expect(page.store.plan.value.routes[1]?.waypoints.length).toBe(
      (plan.routes[0]?.waypoints.length ?? 0) - 1,
    );
    page.store.undo();
    page.store.undo();
    page.store.undo();
    expect(page.store.plan.value).toBe(plan);
  });
});

describe("the plan bar", () => {
  test("shows the departure in the chosen zone and writes it in UTC", async () => {
    const page = await answeredPage();
    page.view.zone.value = "Asia/Kolkata";
    render(<PlanBar page={page} />);
    const field = screen.getByLabelText(/^Departure Tue 4 May 2027 16:30 Asia\/Kolkata \(UTC\+05:30\)$/);
    expect((field as HTMLInputElement).value).toBe("2027-05-04T16:30");
    fireEvent.change(field, { target: { value: "2027-05-04T18:00" } });
    expect(page.store.plan.value.departure).toBe("2027-05-04T12:30:00Z");
  });

  test("changes the pace", async () => {
    const page = await answeredPage();
    render(<PlanBar page={page} />);
    fireEvent.change(screen.getByLabelText("Pace"), { target: { value: "least-energy" } });
    expect(page.store.plan.value.pace).toEqual({ hold: "least-energy" });
  });
});
