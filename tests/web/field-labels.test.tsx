// @vitest-environment happy-dom
import { cleanup, render } from "@testing-library/preact";
import { afterEach, beforeAll, describe, expect, test } from "vitest";
import { planJsonSchema } from "../../src/plan/json-schema.ts";
import { ArrivalFields } from "../../web/arrival/ArrivalFields.tsx";
import { CraftForm } from "../../web/craft/CraftForm.tsx";
import { setModel } from "../../web/craft/craft-edits.ts";
import { MODELS } from "../../web/craft/craft-fields.ts";
import { DeskTabs } from "../../web/desk/DeskTabs.tsx";
import { fieldLabel } from "../../web/faults/field-labels.ts";
import { FieldSheet } from "../../web/files/FieldSheet.tsx";
import { Header } from "../../web/shell/Header.tsx";
import { PlanBar } from "../../web/shell/PlanBar.tsx";
import { ErrorFields } from "../../web/spread/ErrorFields.tsx";
import { WhatIfList } from "../../web/spread/WhatIfList.tsx";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { AlternateList } from "../../web/turn-back/AlternateList.tsx";
import { RouteEditor } from "../../web/waypoints/RouteEditor.tsx";
import { WindowSettings } from "../../web/window/WindowSettings.tsx";
import { createDeciding } from "../../web/worker/deciding.ts";
import { type DemoEngine, demoEngine } from "./demo-engine.ts";

afterEach(cleanup);

let demo: DemoEngine;

beforeAll(() => {
  demo = demoEngine("islands-decide");
});

function pageOf(change: Partial<PlanDocument>): PageState {
  return createPageState({ ...demo.plan, ...change }, {} as Engine);
}

interface Schema {
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly items?: Schema;
  readonly anyOf?: readonly Schema[];
  readonly oneOf?: readonly Schema[];
}

/** Every key that a plan may have, the first of each list. */
function keysOf(schema: Schema, path = ""): string[] {
  const branches = [...(schema.anyOf ?? []), ...(schema.oneOf ?? [])].flatMap((each) => keysOf(each, path));
  const own = Object.entries(schema.properties ?? {}).flatMap(([key, each]) =>
    keysOf(each, path === "" ? key : `${path}.${key}`),
  );
  const items = schema.items === undefined ? [] : keysOf(schema.items, `${path}[0]`);
  return [...new Set([...(path === "" ? [] : [path]), ...branches, ...own, ...items])];
}

/** Keys for which the page has no field: a file's own affairs, lists as a whole, and what is set by opening files. */
const WITHOUT = [
  /\$schema$/,
  /^(format|fields|routes|whatIf|alternates)$/,
  /^craft\.(file|power\.reference)$/,
  /^fields\[0\](\.(file|member|columns.*))?$/,
  /^routes\[0\]\.path$/,
];

/** All that the page's fields are called, to the eye or by their accessible names. */
function shownLabels(): string {
  const named = [...document.querySelectorAll("[aria-label]")].map((each) => each.getAttribute("aria-label"));
  return [document.body.textContent, ...named].join("\n");
}

describe("the labels by which faults are told", () => {
  test("are those of fields on the page, for every key that a plan may have", () => {
    const page = pageOf({
      pace: { arrive: { notBefore: "2027-05-04T12:00Z", notAfter: "2027-05-04T13:00Z" } },
    });
    const held = pageOf({ pace: { hold: "through-speed" } });
    const powered = pageOf({ pace: { hold: "power", power: "5 kW" } });
    const window = demo.plan.window ?? { from: "", to: "", every: "" };
    render(
      <>
        <Header page={page} />
        {[page, held, powered].map((each, at) => (
          <PlanBar key={at} page={each} />
        ))}
        <ArrivalFields page={page} />
        <DeskTabs page={page} legs={true} />
        <WindowSettings page={page} window={window} fault={null} />
        <RouteEditor page={page} />
        <WhatIfList page={page} />
        <AlternateList page={page} isBehind={false} />
        <ErrorFields page={page} />
        <FieldSheet page={page} index={0} onClose={() => undefined} />
        {MODELS.map(([model]) => (
          <CraftForm
            key={model}
            craft={setModel({ name: "Boat", moves: "water" }, model)}
            fault={null}
            onCraft={() => undefined}
          />
        ))}
      </>,
    );
    const shown = shownLabels();
    const keys = keysOf(planJsonSchema() as Schema);
    expect(keys.length).toBeGreaterThan(90);
    for (const key of keys) {
      const label = fieldLabel(key, demo.plan);
      if (WITHOUT.some((pattern) => pattern.test(key))) expect(label, key).toBeNull();
      else {
        expect(label, key).not.toBeNull();
        for (const [, name = ""] of (label ?? "").matchAll(/"([^"]+)"/g))
          expect(shown, `${key}: ${label}`).toContain(name);
      }
    }
  });
});

const FAULTS: readonly (readonly [Partial<PlanDocument>, string])[] = [
  [{ departure: "noon" }, '"Departure" takes an ISO 8601 date and time with its zone, as'],
  [{ reserve: "200 %" }, '"Reserve": a reserve is at most 100 % of the usable store; found "200 %"'],
  [{ confidence: "120 %" }, '"Reserve to hold with" is above 0 % and below 100 %; found "120 %"'],
  [
    { pace: { hold: "power", power: "" } },
    '"Power" of the pace takes a number with one of W, kW, as "12 kW"; found ""',
  ],
  [
    { pace: { arrive: { notBefore: "2027-05-04T18:00Z", notAfter: "2027-05-04T17:00Z" } } },
    '"Arrive": an arrival\'s "Not before" is not after its "Not after"; found 2027-05-04T18:00Z and 2027-05-04T17:00Z',
  ],
  [
    { pace: { arrive: { notBefore: "6", notAfter: "2027-05-04T17:00Z" } } },
    '"Not before" of the arrival takes an ISO 8601 date and time with its zone, as',
  ],
  [
    { whatIf: [{ name: "a", veer: "5" }] },
    '"Wind veered" of what-if 1 takes a number with the unit deg, as "12 deg"; found "5" (without a unit)',
  ],
  [
    {
      whatIf: [
        { name: "routes[0]", wind: 1 },
        { name: "routes[0]", wind: 2 },
      ],
    },
    'what-if 2: what-ifs have different names; found "routes[0]", the name of what-if 1',
  ],
  [{ alternates: [{ lat: "x", lon: 3 }] }, '"Latitude" of alternate 1: latitude takes degrees, as'],
  [
    { pace: { hold: "least-energy" }, whatIf: [{ speed: "1 kn" }] },
    '"Speed +" of what-if 1: the pace "least energy" chooses the speed itself, so a what-if names none; found "1 kn"',
  ],
];

describe("a fault of a plan on the page", () => {
  test.each(FAULTS)("%j is told by the label of its field", async (change, told) => {
    const { window: _window, ...plan } = demo.plan;
    const answer = await demo.estimator.estimate({ ...plan, ...change });
    const fault = answer.ok ? "no fault" : answer.fault;
    expect(fault.slice(0, told.length)).toBe(told);
  });

  test("in a waypoint, a field's error and a craft's file is told by the route, the file and the label", async () => {
    const { plan, estimator, files } = demoEngine("islands-decide");
    const faultOf = async (changed: PlanDocument): Promise<string> => {
      const answer = await estimator.estimate(changed);
      return answer.ok ? "no fault" : answer.fault;
    };
    const [first, ...others] = plan.routes;
    const [start, second, ...rest] = first?.waypoints ?? [];
    if (first === undefined || start === undefined || second === undefined)
      throw new Error("a route of the demo");
    const waypoints = [start, { ...second, stay: "soon" }, ...rest];
    expect(await faultOf({ ...plan, routes: [{ ...first, waypoints }, ...others] })).toMatch(
      /^"Stay" of waypoint 2 of Sound takes a number with one of s, min, h, as "12 h"; found "soon"$/,
    );
    const fields = (plan.fields ?? []).map((field, at) =>
      at === 0 ? { ...field, error: { speed: "1 m/s", length: "far", time: "6 h" } } : field,
    );
    expect(await faultOf({ ...plan, fields })).toMatch(
      new RegExp(
        `^"Correlated over" of the ${fields[0]?.role}'s forecast error takes a number .*found "far"$`,
      ),
    );
    files.keep("own.craft.json", new Blob(['{ "name": "Own", "moves": "water", "speed": "0 kn" }']));
    expect(await faultOf({ ...plan, craft: { file: "own.craft.json" } })).toMatch(
      /^own\.craft\.json: "(Model|Ordered speed)" of the craft /,
    );
  });

  test("in what a field's file is of is told beside the file and its line by the label of the choice", async () => {
    const { fields } = demoEngine("islands-decide");
    const answer = await fields.open(1, { role: "wind", file: "islands-current.csv" }, () => undefined);
    expect(answer.ok ? "" : answer.fault).toMatch(
      /^islands-current\.csv, line 4: "Field of": the file has columns for the wind: .* while the file's role is wind/,
    );
  });

  test("in a window is told by the labels of its view", async () => {
    const { beginWindow } = createDeciding(demo.reader);
    const window = { from: "2027-05-04T09:00Z", to: "2027-05-04T10:00Z", every: "0.5 s" };
    const step = await beginWindow(1, { ...demo.plan, window }, null);
    expect(step.ok ? "" : step.fault).toBe(
      '"Every" of the departures: the step of a window of departures is at least 1 s; found 0.5 s',
    );
    const late = await beginWindow(
      2,
      { ...demo.plan, window: { ...window, from: "2027-05-04T11:00Z", every: "1 h" } },
      null,
    );
    expect(late.ok ? "" : late.fault).toMatch(
      /^"Departures": a window of departures does not end before it begins/,
    );
    const speeds = await beginWindow(
      3,
      { ...demo.plan, window: { ...window, every: "1 h", speeds: ["8 kn", "fast"] } },
      null,
    );
    expect(speeds.ok ? "" : speeds.fault).toMatch(
      /^"Speeds" of the departures: speed takes a number .*found "fast"$/,
    );
  });
});
