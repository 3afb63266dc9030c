import { computed, effect } from "@preact/signals";
import * as L from "leaflet";
import { latText, lonText } from "../format/position-text.ts";
import { readPosition } from "../format/read-position.ts";
import { alternateName, changeAlternate, deleteAlternate } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import type { AlternateDocument } from "../state/plan-document.ts";
import { arrowMove } from "./arrow-move.ts";
import { turnsToward } from "./longitude.ts";
import { setNamesApart } from "./names-apart.ts";
import { nameHandle, nameTag, placeHandle } from "./place-handle.ts";
import { rounded } from "./place-rounding.ts";
import { signElement } from "./turn-sign.ts";

const KEYS_ID = "alternate-keys";

/** Handles on the plan's alternates, dragged as waypoints are: by mouse, touch and keyboard, a drag one step to undo. */
class AlternateHandles {
  private readonly map: L.Map;
  private readonly page: PageState;
  private readonly group: L.LayerGroup;
  /** By the alternate's index; none where its position cannot be read. */
  private readonly handles = new Map<number, L.Marker>();
  private readonly hint = keysHint();
  private dragged: number | null = null;

  constructor(map: L.Map, page: PageState) {
    this.map = map;
    this.page = page;
    this.group = L.layerGroup().addTo(map);
    map.getContainer().append(this.hint);
  }

  show(alternates: readonly AlternateDocument[]): void {
    const places = alternates.map(positionOf);
    for (const [index, handle] of this.handles) {
      if (places[index] != null) continue;
      handle.remove();
      this.handles.delete(index);
    }
    alternates.forEach((alternate, index) => {
      const place = places[index];
      if (place != null) this.showOne(index, alternateName(alternate, index), place.lat, place.lon);
    });
    setNamesApart(this.map.getContainer());
  }

  remove(): void {
    this.group.remove();
    this.hint.remove();
  }

  private showOne(index: number, name: string, lat: number, lon: number): void {
    const handle = this.handles.get(index) ?? this.makeHandle(index);
    this.handles.set(index, handle);
    if (index !== this.dragged) handle.setLatLng([lat, lon + turnsToward(lon, this.map.getCenter().lng)]);
    const element = handle.getElement();
    if (element)
      nameHandle(element, `Alternate ${index + 1}, ${name}, ${latText(lat)} ${lonText(lon)}`, name);
  }

  private makeHandle(index: number): L.Marker {
    const marker = placeHandle(this.group, handleIcon(), 900);
    marker.on("click", L.DomEvent.stopPropagation);
    marker.on("dragstart", () => {
      this.dragged = index;
    });
    marker.on("drag", () => this.moveTo(index, marker.getLatLng()));
    marker.on("dragend", () => {
      this.dragged = null;
      this.moveTo(index, marker.getLatLng());
      this.page.store.settle();
    });
    const element = marker.getElement();
    element?.addEventListener("keydown", (event) => this.onKey(event, marker, index));
    element?.setAttribute("aria-describedby", KEYS_ID);
    return marker;
  }

  private moveTo(index: number, { lat, lng }: L.LatLng): void {
    const place = rounded(lat, lng, this.map.getZoom());
    this.page.store.edit("Move alternate", (plan) => changeAlternate(plan, index, place), {
      merge: `alternate ${index}`,
    });
  }

  private onKey(event: KeyboardEvent, marker: L.Marker, index: number): void {
    const move = arrowMove(event);
    if (move) {
      const place = this.map.latLngToContainerPoint(marker.getLatLng()).add(move);
      this.moveTo(index, this.map.containerPointToLatLng(place));
    } else if (event.key === "Delete" || event.key === "Backspace") {
      this.page.store.edit("Take out alternate", (plan) => deleteAlternate(plan, index));
      const next = this.handles.get(index) ?? this.handles.get(index - 1);
      (next?.getElement() ?? this.map.getContainer()).focus();
    } else {
      return;
    }
    event.preventDefault();
    event.stopPropagation();
  }
}

/** Shows the plan's alternates on the chart until it is closed. */
export function showAlternates(map: L.Map, page: PageState): () => void {
  const handles = new AlternateHandles(map, page);
  // A plan changes with every move of a waypoint; names are set apart only where alternates do.
  const alternates = computed(() => page.store.plan.value.alternates ?? []);
  const show = (): void => handles.show(alternates.value);
  const stop = effect(show);
  // Panning past half a turn brings another copy of the world into view, and a zoom other names side by side.
  map.on("moveend", show);
  return () => {
    stop();
    map.off("moveend", show);
    handles.remove();
  };
}

/** `null` where it cannot be read: what is wrong with the plan is said elsewhere. */
function positionOf({ lat, lon }: AlternateDocument): { lat: number; lon: number } | null {
  try {
    return readPosition(lat, lon);
  } catch {
    return null;
  }
}

function handleIcon(): L.DivIcon {
  const html = signElement("alternate");
  html.append(nameTag());
  return L.divIcon({ className: "alternate-handle turn-mark", html, iconSize: [30, 30] });
}

function keysHint(): HTMLElement {
  const hint = document.createElement("p");
  hint.id = KEYS_ID;
  hint.className = "unseen";
  hint.textContent = "Arrow keys move it, with Shift in fine steps; Delete takes it out.";
  return hint;
}
