// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/preact";
import { afterEach, beforeAll, describe, expect, test } from "vitest";
import { LegTable } from "../../web/leg-table/LegTable.tsx";
import { profileTracks } from "../../web/ribbon/profile-tracks.ts";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
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
  const page = createPageState(plan, { estimate: async () => answer } as unknown as Engine);
  await page.answers.ask(plan);
  return page;
}

describe("the leg table's columns", () => {
  test("are those chosen, and never without the leg's number and name", async () => {
    const page = await answeredPage();
    const { container } = render(<LegTable page={page} />);
    fireEvent.click(screen.getByText("Columns"));
    fireEvent.click(await screen.findByLabelText("Ground"));
    fireEvent.click(screen.getByLabelText("Still time"));
    expect(page.view.hiddenColumns.value).toContain("ground");
    expect(page.view.hiddenColumns.value).not.toContain("still");
    await waitFor(() => expect(container.querySelector("thead")?.textContent).not.toContain("Ground"));
    expect(container.querySelector("thead")?.textContent).toContain("Still time");
    expect(screen.queryByLabelText("Leg")).toBeNull();
    expect(screen.queryByLabelText("To")).toBeNull();
  });

  test("have units of their own, where these fit the store", async () => {
    const page = await answeredPage();
    const { container } = render(<LegTable page={page} />);
    const [leg] = page.answers.answer.value.routes[0]?.legs ?? [];
    page.view.legUnits.value = { distance: "km", amount: "MJ" };
    const first = () => container.querySelector("tbody tr")?.textContent;
    await waitFor(() => expect(first()).toContain(((leg?.distance_m ?? 0) / 1000).toFixed(1)));
    expect(first()).toContain(((leg?.use ?? 0) / 1e6).toFixed(1));
    page.view.legUnits.value = { amount: "kg" };
    await waitFor(() => expect(container.querySelector("thead")?.textContent).toContain("kWh"));
  });
});

describe("the profile of a route", () => {
  test("has its five figures, along and cross on one scale, the store down from full with its reserve", async () => {
    const page = await answeredPage();
    const route = page.answers.answer.value.routes[0];
    const profile = page.answers.answer.value.drawings[0]?.profile;
    if (!route || !profile) throw new Error("the demo's first route has a profile");
    const [along, cross, ground, rate, left] = profileTracks(profile, route, "sea");
    expect([along?.low, along?.high]).toEqual([cross?.low, cross?.high]);
    expect(along?.low).toBe(-(along?.high ?? 0));
    expect(ground?.low).toBe(0);
    expect(rate?.unit.symbol).toBe("kW");
    expect(left?.high).toBe(route.usable);
    expect(left?.bound).toBe(route.reserve);
  });

  test("points where the ribbons point, by keyboard too", async () => {
    const page = await answeredPage();
    page.view.routePart.value = "profile";
    render(<LegTable page={page} />);
    const profile = await screen.findByRole("slider", { name: /^Profile of/ });
    fireEvent.focus(profile);
    fireEvent.keyDown(profile, { key: "End" });
    const total = page.answers.answer.value.drawings[0]?.distance_m.at(-1);
    expect(page.view.pointed.value).toEqual({ route: 0, distance_m: total });
    await waitFor(() => expect(profile.getAttribute("aria-valuetext")).toMatch(/kWh left/));
  });
});
