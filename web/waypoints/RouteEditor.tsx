import { latText, lonText } from "../format/position-text.ts";
import { readPosition } from "../format/read-position.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import type { PageState } from "../state/page-state.ts";
import type { PlanDocument, WaypointDocument } from "../state/plan-document.ts";
import type { Selection } from "../state/plan-store.ts";
import { addRoute, deleteRoute, duplicateRoute, renameRoute, reverseRoute } from "../state/route-edits.ts";
import {
  appendWaypoint,
  deleteWaypoint,
  moveWaypoint,
  placeWaypoint,
  setWaypointPath,
  setWaypointText,
  type WaypointKey,
} from "../state/waypoint-edits.ts";
import { asWritten } from "./as-written.ts";
import { TextField } from "./TextField.tsx";

/** The chosen route as a table: everything that the chart can do, by typing. */
export function RouteEditor({ page }: { readonly page: PageState }) {
  const { store } = page;
  const { route: chosen } = store.selection.value;
  const route = store.plan.value.routes[chosen];
  const edit = (label: string, change: (plan: PlanDocument) => PlanDocument, select?: Selection): void =>
    store.edit(label, change, select ? { select } : {});
  const count = store.plan.value.routes.length;
  return (
    <section class="pane route" data-pane="route" aria-labelledby="route-title">
      <header class="pane-head">
        <h2 id="route-title">Route</h2>
        {route !== undefined && (
          <span class="route-name">
            <Swatch route={chosen} />
            <TextField
              label="Name of the route"
              at={`routes[${chosen}].name`}
              value={route.name}
              onText={(name) =>
                name.trim() !== "" && edit("Rename route", (plan) => renameRoute(plan, chosen, name))
              }
            />
          </span>
        )}
        <span class="tools">
          <button
            type="button"
            onClick={() =>
              edit("New route", (plan) => addRoute(plan, "Route"), { route: count, waypoint: null })
            }
          >
            New
          </button>
          {route !== undefined && (
            <>
              <button
                type="button"
                onClick={() =>
                  edit("Duplicate route", (plan) => duplicateRoute(plan, chosen), {
                    route: chosen + 1,
                    waypoint: null,
                  })
                }
              >
                Duplicate
              </button>
              <button
                type="button"
                onClick={() => edit("Reverse route", (plan) => reverseRoute(plan, chosen))}
              >
                Reverse
              </button>
              <button type="button" onClick={() => edit("Delete route", (plan) => deleteRoute(plan, chosen))}>
                Delete
              </button>
            </>
          )}
        </span>
      </header>
      {route !== undefined && (
        <div class="scroll">
          <table class="waypoint-table">
            <thead>
              <tr>
                <th scope="col">#</th>
                <th scope="col">Waypoint</th>
                <th scope="col">Latitude</th>
                <th scope="col">Longitude</th>
                <th scope="col">Path</th>
                <th scope="col">Speed</th>
                <th scope="col">Stay</th>
                <th scope="col">Height</th>
              </tr>
            </thead>
            <tbody>
              {route.waypoints.map((waypoint, index) => (
                <WaypointRow
                  key={index}
                  page={page}
                  index={index}
                  waypoint={waypoint}
                  path={waypoint.path ?? route.path ?? "geodesic"}
                />
              ))}
            </tbody>
          </table>
          <div class="tools waypoint-tools">
            <button
              type="button"
              onClick={() =>
                edit("Add waypoint", (plan) => appendNear(plan, chosen), {
                  route: chosen,
                  waypoint: route.waypoints.length,
                })
              }
            >
              Add waypoint
            </button>
            <ChosenWaypoint page={page} last={route.waypoints.length - 1} />
          </div>
        </div>
      )}
    </section>
  );
}

/** What can be done to the chosen waypoint. */
function ChosenWaypoint({ page: { store }, last }: { readonly page: PageState; readonly last: number }) {
  const { route, waypoint } = store.selection.value;
  const move = (label: string, to: number): void => {
    if (waypoint === null) return;
    store.edit(label, (plan) => moveWaypoint(plan, route, waypoint, to), { select: { route, waypoint: to } });
  };
  const name = waypoint === null ? "waypoint" : `waypoint ${waypoint + 1}`;
  return (
    <>
      <button
        type="button"
        disabled={waypoint === null || waypoint === 0}
        aria-label={`Move ${name} up`}
        onClick={() => move("Move waypoint up", (waypoint ?? 0) - 1)}
      >
        Up
      </button>
      <button
        type="button"
        disabled={waypoint === null || waypoint === last}
        aria-label={`Move ${name} down`}
        onClick={() => move("Move waypoint down", (waypoint ?? 0) + 1)}
      >
        Down
      </button>
      <button
        type="button"
        disabled={waypoint === null}
        onClick={() =>
          waypoint !== null && store.edit("Delete waypoint", (plan) => deleteWaypoint(plan, route, waypoint))
        }
      >
        Delete {name}
      </button>
    </>
  );
}

interface WaypointRowProps {
  readonly page: PageState;
  readonly index: number;
  readonly waypoint: WaypointDocument;
  readonly path: "geodesic" | "rhumb";
}

function WaypointRow({ page, index, waypoint, path }: WaypointRowProps) {
  const { store } = page;
  const { route, waypoint: selected } = store.selection.value;
  const select = { route, waypoint: index };
  const place = (lat: number | string, lon: number | string): void =>
    store.edit("Place waypoint", (plan) => placeWaypoint(plan, route, index, lat, lon), { select });
  const at = `routes[${route}].waypoints[${index}]`;
  const field = (key: WaypointKey, label: string) => (
    <TextField
      label={`${label} waypoint ${index + 1}`}
      at={`${at}.${key}`}
      value={waypoint[key] ?? ""}
      onText={(text) =>
        store.edit(`Change ${key}`, (plan) => setWaypointText(plan, route, index, key, text), { select })
      }
    />
  );
  return (
    <tr
      class={selected === index ? "chosen" : ""}
      onFocusCapture={() => store.select(select)}
      onPointerEnter={() => {
        const drawing = page.answers.answer.peek().drawings[route];
        const distance_m = drawing?.distance_m[drawing.waypoints[index] ?? -1];
        if (distance_m !== undefined) page.view.pointed.value = { route, distance_m };
      }}
      onPointerLeave={() => {
        page.view.pointed.value = null;
      }}
    >
      <th scope="row">{index + 1}</th>
      <td>{field("name", "Name of")}</td>
      <td>
        <TextField
          label={`Latitude of waypoint ${index + 1}`}
          at={`${at}.lat`}
          value={shownDegrees(waypoint.lat, latText)}
          onText={(text) => place(asWritten(text), waypoint.lon)}
        />
      </td>
      <td>
        <TextField
          label={`Longitude of waypoint ${index + 1}`}
          at={`${at}.lon`}
          value={shownDegrees(waypoint.lon, lonText)}
          onText={(text) => place(waypoint.lat, asWritten(text))}
        />
      </td>
      <td>
        {index > 0 && (
          <select
            aria-label={`Path to waypoint ${index + 1}`}
            value={path}
            onChange={({ currentTarget: { value } }) =>
              store.edit("Change path", (plan) =>
                setWaypointPath(plan, route, index, value === "rhumb" ? "rhumb" : "geodesic"),
              )
            }
          >
            <option value="geodesic">geodesic</option>
            <option value="rhumb">rhumb</option>
          </select>
        )}
      </td>
      <td>{index > 0 && field("speed", "Speed to")}</td>
      <td>{field("stay", "Stay of")}</td>
      <td>{field("height", "Height of")}</td>
    </tr>
  );
}

/** A number as degrees and minutes; a text, or a number that is no place, as it was written. */
function shownDegrees(value: number | string, text: typeof latText): string {
  const [least, most] = text === latText ? [-90, 90] : [-180, 360];
  return typeof value === "number" && value >= least && value <= most ? text(value, 3) : String(value);
}

/** A new waypoint starts beside the last one, where it can be seen and moved. */
function appendNear(plan: PlanDocument, route: number): PlanDocument {
  const last = plan.routes[route]?.waypoints.at(-1);
  if (last === undefined) return appendWaypoint(plan, route, { lat: 0, lon: 0 });
  try {
    const { lat, lon } = readPosition(last.lat, last.lon);
    const east = lon + 0.05 > 180 ? lon + 0.05 - 360 : lon + 0.05;
    return appendWaypoint(plan, route, { lat, lon: Number(east.toFixed(5)) });
  } catch {
    return appendWaypoint(plan, route, { lat: 0, lon: 0 });
  }
}
