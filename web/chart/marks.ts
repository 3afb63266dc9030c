import * as L from "leaflet";
import { routeHue } from "../format/palette.ts";
import { turnsToward } from "./longitude.ts";

export interface CraftMark {
  readonly route: number;
  readonly lat: number;
  readonly lon: number;
  /** Whether its route is the chosen one. */
  readonly chosen: boolean;
}

/** Where each route's craft stands at the chart's instant, and the place that is pointed at. */
export class Marks {
  private readonly map: L.Map;
  private readonly crafts: L.LayerGroup;
  private readonly pointed: L.CircleMarker;

  constructor(map: L.Map) {
    this.map = map;
    this.crafts = L.layerGroup().addTo(map);
    this.pointed = L.circleMarker([0, 0], {
      radius: 9,
      color: "var(--ink)",
      weight: 2.5,
      fill: false,
      interactive: false,
    });
  }

  showCrafts(marks: readonly CraftMark[]): void {
    this.crafts.clearLayers();
    for (const { route, lat, lon, chosen } of marks) {
      const shift = turnsToward(lon, this.map.getCenter().lng);
      L.circleMarker([lat, lon + shift], {
        radius: chosen ? 8 : 6,
        color: "var(--panel)",
        weight: 2,
        fillColor: routeHue(route),
        fillOpacity: 1,
        interactive: false,
      }).addTo(this.crafts);
    }
  }

  showPointed(place: { readonly lat: number; readonly lon: number } | null): void {
    if (place === null) {
      this.pointed.remove();
      return;
    }
    const shift = turnsToward(place.lon, this.map.getCenter().lng);
    this.pointed.setLatLng([place.lat, place.lon + shift]).addTo(this.map);
  }
}
