// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/preact";
import { afterEach, describe, expect, test } from "vitest";
import { Ledger } from "../../web/ledger/Ledger.tsx";
import { ClockBar } from "../../web/shell/ClockBar.tsx";
import { PlanBar } from "../../web/shell/PlanBar.tsx";
import { ErrorFields } from "../../web/spread/ErrorFields.tsx";
import { WhatIfList } from "../../web/spread/WhatIfList.tsx";
import { FaultPlace } from "../../web/state/fault-place.ts";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";
import { AlternateList } from "../../web/turn-back/AlternateList.tsx";
import { RouteEditor } from "../../web/waypoints/RouteEditor.tsx";
import { WindowSettings } from "../../web/window/WindowSettings.tsx";
import { demoEngine } from "./demo-engine.ts";

afterEach(cleanup);

/** The page's typed fields on the worker's own parts, with what is wrong with the plan. */
function Fields({ page }: { readonly page: PageState }) {
  const { window } = page.store.plan.value;
  return (
    <FaultPlace.Provider value={page.answers.answer.value.faultKey}>
      <PlanBar page={page} />
      <Ledger page={page} />
      <RouteEditor page={page} />
      <WhatIfList page={page} />
      <AlternateList page={page} isBehind={false} />
      <ErrorFields page={page} />
      {window !== undefined && <WindowSettings page={page} window={window} fault={null} />}
    </FaultPlace.Provider>
  );
}

async function shown(change: object = {}): Promise<PageState> {
  const { plan, estimator } = demoEngine("islands-decide");
  const page = createPageState({ ...plan, ...change }, { estimate: estimator.estimate } as unknown as Engine);
  await page.answers.ask(page.shown.value);
  render(<Fields page={page} />);
  return page;
}

function type(label: string | RegExp, text: string): HTMLInputElement {
  const field = screen.getByLabelText<HTMLInputElement>(label);
  field.focus();
  fireEvent.input(field, { target: { value: text } });
  fireEvent.blur(field);
  return field;
}

/** A typed field by its accessible name, how the rule calls it, and texts that break the rule. */
const FIELDS: readonly (readonly [label: string, told: string, texts: readonly string[]])[] = [
  ["Reserve", '"Reserve"', ["some", "120 %", "20"]],
  ["Speed", '"Speed" of the pace', ["fast", "0 kn", "8"]],
  ["Wind × of what-if 1", '"Wind ×" of what-if 1', ["strong", "11", "-1", "1e999", "1,2"]],
  ["Current × of what-if 1", '"Current ×" of what-if 1', ["strong", "11", "Infinity"]],
  ["Wind veered of what-if 1", '"Wind veered" of what-if 1', ["a bit", "400 deg", "10"]],
  ["Speed + of what-if 1", '"Speed +" of what-if 1', ["more", "900 kn"]],
  ["Use + of what-if 1", '"Use +" of what-if 1', ["more", "-100 %"]],
  ["Late of what-if 1", '"Late" of what-if 1', ["soon", "9000 h"]],
  ["Latitude of waypoint 2", '"Latitude" of waypoint 2', ["north", "91", "1e999", ""]],
  ["Longitude of waypoint 2", '"Longitude" of waypoint 2', ["west", "361", "0 0 0 0"]],
  ["Speed to waypoint 2", '"Speed" of waypoint 2', ["fast", "0 kn"]],
  ["Stay of waypoint 2", '"Stay" of waypoint 2', ["long", "-1 min"]],
  ["Height of waypoint 2", '"Height" of waypoint 2', ["high", "5"]],
  ["Latitude of alternate 1", '"Latitude" of alternate 1', ["north", "-91", "Infinity"]],
  ["Height of alternate 1", '"Height" of alternate 1', ["high"]],
  ["Deviation per component, current", '"Deviation per component" of the current', ["wide", "0 m/s"]],
  ["Probability with which the reserve has to hold", '"Reserve to hold with"', ["sure", "100 %", "0 %"]],
  ["Step between departures", '"Every" of the departures', ["hourly", "0 s"]],
  ["Speeds to try, with commas between", '"Speeds" of the departures', ["fast", "8 kn, 0 kn"]],
];

describe("what is typed and cannot be read", () => {
  test.each(FIELDS)(
    "stays in the field %s, which is marked, with the rule beside it",
    async (label, told, texts) => {
      const page = await shown({ confidence: "90 %" });
      for (const text of texts) {
        const field = type(label, text);
        await page.answers.ask(page.shown.value);
        await waitFor(() => expect(field.getAttribute("aria-invalid"), text).toBe("true"));
        expect(field.value).toBe(text);
        const rule = document.getElementById(field.getAttribute("aria-describedby") ?? "")?.textContent ?? "";
        expect(rule).toMatch(
          typeof told === "string" ? new RegExp(`^${told.replace(/[+×"]/g, "\\$&")}`) : told,
        );
        expect(document.querySelectorAll("[aria-invalid]")).toHaveLength(1);
      }
    },
  );

  test("of a route after one that is still being drawn is marked there and not at another", async () => {
    const { plan } = demoEngine("islands-decide");
    const page = await shown({ routes: [{ name: "Drawn", waypoints: [] }, ...plan.routes] });
    page.store.select({ route: 2, waypoint: null });
    await screen.findByDisplayValue("West about");
    const field = type("Stay of waypoint 2", "long");
    await page.answers.ask(page.shown.value);
    await waitFor(() => expect(field.getAttribute("aria-invalid")).toBe("true"));
    page.store.select({ route: 1, waypoint: null });
    await waitFor(() => expect(document.querySelector("[aria-invalid]")).toBeNull());
  });

  test("is marked no more once it is mended", async () => {
    const page = await shown();
    const field = type("Wind × of what-if 1", "strong");
    await page.answers.ask(page.shown.value);
    await waitFor(() => expect(field.getAttribute("aria-invalid")).toBe("true"));
    type("Wind × of what-if 1", "1.3");
    await page.answers.ask(page.shown.value);
    await waitFor(() => expect(field.getAttribute("aria-invalid")).toBeNull());
    expect(page.store.plan.value.whatIf?.[0]?.wind).toBe(1.3);
  });
});

describe("a departure with seconds", () => {
  test("is shown as the plan has it, and stays so until it is changed", async () => {
    const page = await shown({ departure: "2027-05-04T11:00:30Z" });
    const field = screen.getByLabelText<HTMLInputElement>("Departure Tue 4 May 2027 11:00:30 UTC");
    expect([field.value, field.step]).toEqual(["2027-05-04T11:00:30", "1"]);
    render(<ClockBar page={page} />);
    expect(screen.getByRole("slider").getAttribute("aria-valuetext")).toBe("Tue 4 May 11:00:30 UTC");
    field.focus();
    fireEvent.blur(field);
    expect(page.store.plan.value.departure).toBe("2027-05-04T11:00:30Z");
    fireEvent.change(field, { target: { value: "2027-05-04T11:05:30" } });
    expect(page.store.plan.value.departure).toBe("2027-05-04T11:05:30Z");
  });

  test("is shown again where the field is left empty, and as it is written where it is no time", async () => {
    const page = await shown();
    const field = screen.getByLabelText<HTMLInputElement>(/^Departure /);
    const before = field.value;
    fireEvent.change(field, { target: { value: "" } });
    fireEvent.blur(field);
    expect(field.value).toBe(before);
    page.store.edit("Change departure", (plan) => ({ ...plan, departure: "at dawn" }));
    expect((await screen.findByLabelText<HTMLInputElement>("Departure at dawn")).step).toBe("60");
  });
});
