import * as L from "leaflet";
import { latText, lonText } from "../format/position-text.ts";
import { arrowMove } from "./arrow-move.ts";
import { nameHandle, nameTag, placeHandle } from "./place-handle.ts";

/** A waypoint of the chosen route, longitude continuous along the route. */
export interface Handle {
  readonly name: string;
  readonly lat: number;
  readonly lon: number;
}

/** The middle of a leg, where a waypoint can be inserted; `before` is the index it would take. */
export interface LegMiddle {
  readonly before: number;
  readonly lat: number;
  readonly lon: number;
}

export interface HandleGestures {
  select(index: number): void;
  /** While `done` is false more moves of the same drag follow. */
  move(index: number, lat: number, lon: number, done: boolean): void;
  insert(before: number, lat: number, lon: number): void;
  remove(index: number): void;
}

/** Handles on the chosen route's waypoints and on the middles of its legs, for mouse, touch and keyboard. */
export class WaypointHandles {
  private readonly map: L.Map;
  private readonly gestures: HandleGestures;
  private readonly group: L.LayerGroup;
  private handles: L.Marker[] = [];
  private middles: L.Marker[] = [];
  private dragged: L.Marker | null = null;
  private shift = 0;

  constructor(map: L.Map, gestures: HandleGestures) {
    this.map = map;
    this.gestures = gestures;
    this.group = L.layerGroup().addTo(map);
  }

  show(
    waypoints: readonly Handle[],
    middles: readonly LegMiddle[],
    selected: number | null,
    shift: number,
  ): void {
    this.shift = shift;
    this.showWaypoints(waypoints, selected);
    if (this.dragged === null || !this.middles.includes(this.dragged)) this.showMiddles(middles);
  }

  /** Puts the keyboard on a waypoint's handle. */
  focus(index: number): void {
    this.handles[index]?.getElement()?.focus();
  }

  private showWaypoints(waypoints: readonly Handle[], selected: number | null): void {
    while (this.handles.length > waypoints.length) this.handles.pop()?.remove();
    while (this.handles.length < waypoints.length) this.handles.push(this.makeHandle(this.handles.length));
    waypoints.forEach((waypoint, index) => {
      const marker = this.handles[index];
      if (marker === undefined) return;
      if (marker !== this.dragged) marker.setLatLng([waypoint.lat, waypoint.lon + this.shift]);
      this.describe(marker, waypoint, index, index === selected);
    });
  }

  private describe(marker: L.Marker, { name, lat, lon }: Handle, index: number, selected: boolean): void {
    const element = marker.getElement();
    if (!element) return;
    element.classList.toggle("selected", selected);
    element.dataset["number"] = String(index + 1);
    element.setAttribute("aria-pressed", String(selected));
    const named = name === "" ? "" : `, ${name}`;
    nameHandle(element, `Waypoint ${index + 1}${named}, ${latText(lat)} ${lonText(lon)}`, name);
  }

  private makeHandle(index: number): L.Marker {
    const marker = placeHandle(this.group, handleIcon(), 1000);
    marker.on("click", (event) => {
      L.DomEvent.stopPropagation(event);
      this.gestures.select(index);
    });
    marker.on("dragstart", () => {
      this.dragged = marker;
      this.gestures.select(index);
    });
    marker.on("drag", () => this.moveTo(index, marker.getLatLng(), false));
    marker.on("dragend", () => {
      this.dragged = null;
      this.moveTo(index, marker.getLatLng(), true);
    });
    const element = marker.getElement();
    element?.addEventListener("keydown", (event) => this.onKey(event, marker, index));
    element?.addEventListener("focus", () => this.gestures.select(index));
    element?.setAttribute("aria-describedby", "handle-keys");
    return marker;
  }

  private moveTo(index: number, { lat, lng }: L.LatLng, done: boolean): void {
    this.gestures.move(index, lat, lng - this.shift, done);
  }

  private onKey(event: KeyboardEvent, marker: L.Marker, index: number): void {
    const move = arrowMove(event);
    if (move) {
      const place = this.map.latLngToContainerPoint(marker.getLatLng()).add(move);
      this.moveTo(index, this.map.containerPointToLatLng(place), false);
    } else if (event.key === "Delete" || event.key === "Backspace") {
      this.gestures.remove(index);
      this.focus(Math.max(index - 1, 0));
    } else if (event.key === "Insert" || event.key === "+") {
      this.insertOn(index);
    } else {
      return;
    }
    event.preventDefault();
    event.stopPropagation();
  }

  /** Inserts a waypoint at the middle of the leg that begins at a waypoint, and puts the keyboard on it. */
  private insertOn(index: number): void {
    const middle = this.middles[index]?.getLatLng();
    if (middle === undefined) return;
    const before = index + 1;
    this.gestures.insert(before, middle.lat, middle.lng - this.shift);
    this.moveTo(before, middle, true);
    this.focus(before);
  }

  private showMiddles(middles: readonly LegMiddle[]): void {
    while (this.middles.length > middles.length) this.middles.pop()?.remove();
    while (this.middles.length < middles.length) this.middles.push(this.makeMiddle(this.middles.length));
    middles.forEach(({ lat, lon }, at) => {
      this.middles[at]?.setLatLng([lat, lon + this.shift]);
    });
  }

  /** The middle of the leg that arrives at waypoint `at + 1`. */
  private makeMiddle(at: number): L.Marker {
    const marker = L.marker([0, 0], {
      draggable: true,
      keyboard: false,
      icon: L.divIcon({ className: "leg-middle", html: "", iconSize: [24, 24] }),
      title: "Drag or click to insert a waypoint",
    }).addTo(this.group);
    const before = at + 1;
    marker.on("click", (event) => {
      L.DomEvent.stopPropagation(event);
      this.insertOn(at);
    });
    marker.on("dragstart", () => {
      this.dragged = marker;
      const { lat, lng } = marker.getLatLng();
      this.gestures.insert(before, lat, lng - this.shift);
    });
    marker.on("drag", () => this.moveTo(before, marker.getLatLng(), false));
    marker.on("dragend", () => {
      this.dragged = null;
      this.moveTo(before, marker.getLatLng(), true);
    });
    return marker;
  }
}

function handleIcon(): L.DivIcon {
  return L.divIcon({ className: "waypoint-handle", html: nameTag(), iconSize: [30, 30] });
}
