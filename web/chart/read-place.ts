import type { Signal } from "@preact/signals";
import * as L from "leaflet";
import type { PageState } from "../state/page-state.ts";

/** A place that the chart is read at, and how it was found. */
export interface ReadPlace {
  readonly lat: number;
  readonly lon: number;
  readonly by: "mouse" | "touch" | "keyboard";
}

/** px within which a second tap takes the reading away again, and a finger counts as held still. */
const SAME_PLACE = 24;
const STILL = 8;
/** How long a finger is held for a long press, ms. */
const LONG_PRESS_MS = 500;

/**
 * Reads the chart under the mouse, where a finger taps or presses long, or where the keyboard is: at a handle, or in the middle of
 * the chart.
 */
export function followPlace(
  map: L.Map,
  { view, desk }: PageState,
  place: Signal<ReadPlace | null>,
): () => void {
  const host = map.getContainer();
  const tapped = L.circleMarker([0, 0], {
    radius: 7,
    color: "var(--ink)",
    weight: 2,
    dashArray: "3 2",
    fill: false,
    interactive: false,
  });
  let isTouch = false;
  /** Whether a hand is on the chart, which then has the keyboard by that alone. */
  let isHand = false;
  let pressed = { x: 0, y: 0, timer: 0, isLong: false };
  const noteHand = ({ pointerType }: PointerEvent): void => {
    isTouch = pointerType === "touch";
  };
  const press = (event: PointerEvent): void => {
    noteHand(event);
    isHand = true;
    clearTimeout(pressed.timer);
    const { clientX: x, clientY: y } = event;
    const hold = (): void => {
      pressed.isLong = true;
      put(map.mouseEventToLatLng(event), "touch");
    };
    // A second finger pinches.
    const isAlone = isTouch && event.isPrimary;
    pressed = { x, y, isLong: false, timer: isAlone ? window.setTimeout(hold, LONG_PRESS_MS) : 0 };
  };
  const move = (event: PointerEvent): void => {
    noteHand(event);
    if (Math.hypot(event.clientX - pressed.x, event.clientY - pressed.y) > STILL) lift();
  };
  const lift = (): void => clearTimeout(pressed.timer);
  const put = ({ lat, lng }: L.LatLng, by: ReadPlace["by"]): void => {
    place.value = { lat, lon: lng, by };
    if (by === "touch") tapped.setLatLng([lat, lng]).addTo(map);
    else tapped.remove();
  };
  const leave = (by: ReadPlace["by"]): void => {
    if (place.peek()?.by !== by) return;
    place.value = null;
    tapped.remove();
  };
  map.on("mousemove", ({ latlng }) => {
    // After a tap browsers tell of a mouse too.
    if (!isTouch) put(latlng, "mouse");
  });
  map.on("mouseout", () => leave("mouse"));
  map.on("click", ({ latlng }) => {
    if (!isTouch || pressed.isLong || view.adding.value || desk.placing.value) return;
    const again = place.peek()?.by === "touch" && isNear(map, tapped.getLatLng(), latlng);
    if (again) leave("touch");
    else put(latlng, "touch");
  });
  const readFocus = (): void => {
    const { activeElement: held } = document;
    if (isHand || !host.contains(held) || !held?.matches(":focus-visible")) return;
    put(held === host ? map.getCenter() : placeOf(map, held), "keyboard");
  };
  const takeKeys = (): void => {
    isHand = false;
    readFocus();
  };
  const loseKeys = (): void => {
    isHand = false;
    leave("keyboard");
  };
  const followers = [
    ["pointerdown", press],
    ["pointermove", move],
    ["pointerup", lift],
    ["pointercancel", lift],
    ["focusin", readFocus],
    // A key may have moved the handle.
    ["keyup", takeKeys],
    ["focusout", loseKeys],
  ] as const;
  for (const [kind, follow] of followers) host.addEventListener(kind, follow as EventListener, true);
  map.on("moveend", readFocus);
  return () => {
    lift();
    for (const [kind, follow] of followers) host.removeEventListener(kind, follow as EventListener, true);
  };
}

function isNear(map: L.Map, a: L.LatLng, b: L.LatLng): boolean {
  return map.latLngToContainerPoint(a).distanceTo(map.latLngToContainerPoint(b)) < SAME_PLACE;
}

/** Where the middle of an element on the chart is. */
function placeOf(map: L.Map, element: Element): L.LatLng {
  const frame = map.getContainer().getBoundingClientRect();
  const { left, top, width, height } = element.getBoundingClientRect();
  return map.containerPointToLatLng([left + width / 2 - frame.left, top + height / 2 - frame.top]);
}
