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
 *
 * @param first what brought somebody to the chart
 */
export function followPlace(
  map: L.Map,
  page: PageState,
  place: Signal<ReadPlace | null>,
  first: Event,
): () => void {
  const reading = new Reading(map, place);
  const hand = new Hand(map, reading);
  if (first instanceof PointerEvent) hand.begin(first);
  const stops = [
    listen(map, {
      pointerdown: (event: PointerEvent) => hand.press(event),
      pointermove: (event: PointerEvent) => hand.move(event),
      pointerup: () => hand.lift(),
      pointercancel: () => hand.lift(),
    }),
    followKeys(map, reading, hand),
  ];
  map.on("mousemove", ({ latlng }) => {
    // After a tap browsers tell of a mouse too.
    if (!hand.isTouch) reading.put(latlng, "mouse");
  });
  map.on("mouseout", () => reading.leave("mouse"));
  map.on("click", ({ latlng }) => {
    if (hand.isTouch && !hand.wasLong && !page.view.adding.value && !page.desk.placing.value)
      reading.tap(latlng);
  });
  return () => {
    hand.lift();
    for (const stop of stops) stop();
  };
}

function followKeys(map: L.Map, reading: Reading, hand: Hand): () => void {
  const host = map.getContainer();
  const read = (): void => {
    const { activeElement: held } = document;
    if (hand.isOn || !host.contains(held) || !held?.matches(":focus-visible")) return;
    reading.put(held === host ? map.getCenter() : placeOf(map, held), "keyboard");
    host.classList.toggle("read-middle", held === host);
  };
  map.on("moveend", read);
  read();
  return listen(map, {
    focusin: read,
    // A key may have moved the handle.
    keyup: () => {
      hand.isOn = false;
      read();
    },
    focusout: () => {
      hand.isOn = false;
      reading.leave("keyboard");
    },
  });
}

/** The place that is read, with a ring around where it was tapped. */
class Reading {
  private readonly map: L.Map;
  private readonly place: Signal<ReadPlace | null>;
  private readonly ring = L.circleMarker([0, 0], {
    radius: 7,
    color: "var(--ink)",
    weight: 2,
    dashArray: "3 2",
    fill: false,
    interactive: false,
  });

  constructor(map: L.Map, place: Signal<ReadPlace | null>) {
    this.map = map;
    this.place = place;
  }

  put({ lat, lng }: L.LatLng, by: ReadPlace["by"]): void {
    this.clear();
    this.place.value = { lat, lon: lng, by };
    if (by === "touch") this.ring.setLatLng([lat, lng]).addTo(this.map);
  }

  leave(by: ReadPlace["by"]): void {
    if (this.place.peek()?.by !== by) return;
    this.place.value = null;
    this.clear();
  }

  /** A second tap on a place takes its reading away. */
  tap(latlng: L.LatLng): void {
    const isAgain = this.place.peek()?.by === "touch" && isNear(this.map, this.ring.getLatLng(), latlng);
    if (isAgain) this.leave("touch");
    else this.put(latlng, "touch");
  }

  private clear(): void {
    this.ring.remove();
    this.map.getContainer().classList.remove("read-middle");
  }
}

/** What points at the chart: a finger held still for a while reads it where it is. */
class Hand {
  isTouch = false;
  /** Whether a hand took hold of the chart, which then has the keyboard by that alone. */
  isOn = false;
  wasLong = false;
  private readonly map: L.Map;
  private readonly reading: Reading;
  private x = 0;
  private y = 0;
  private timer = 0;

  constructor(map: L.Map, reading: Reading) {
    this.map = map;
    this.reading = reading;
  }

  press(event: PointerEvent): void {
    this.isTouch = event.pointerType === "touch";
    this.isOn = true;
    this.wasLong = false;
    this.x = event.clientX;
    this.y = event.clientY;
    this.lift();
    // A second finger pinches.
    if (!this.isTouch || !event.isPrimary) return;
    this.timer = window.setTimeout(() => {
      this.wasLong = true;
      this.reading.put(this.map.mouseEventToLatLng(event), "touch");
    }, LONG_PRESS_MS);
  }

  /** The first that is heard of it; a tap that is over by then is taken for a long one. */
  begin(event: PointerEvent): void {
    if (event.pointerType === "touch") this.press(event);
    else this.reading.put(this.map.mouseEventToLatLng(event), "mouse");
  }

  move({ pointerType, clientX, clientY }: PointerEvent): void {
    this.isTouch = pointerType === "touch";
    if (Math.hypot(clientX - this.x, clientY - this.y) > STILL) this.lift();
  }

  lift(): void {
    clearTimeout(this.timer);
  }
}

/** Listens on the chart before what lies on it does. */
function listen<Kind extends keyof HTMLElementEventMap>(
  map: L.Map,
  followers: { readonly [K in Kind]: (event: HTMLElementEventMap[K]) => void },
): () => void {
  const host = map.getContainer();
  const entries = Object.entries(followers) as [string, EventListener][];
  for (const [kind, follow] of entries) host.addEventListener(kind, follow, true);
  return () => {
    for (const [kind, follow] of entries) host.removeEventListener(kind, follow, true);
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
