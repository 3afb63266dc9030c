/*
 * The parts of Leaflet that the chart uses, from its own modules: its bundle would bring every layer and control to the first
 * load, 10 kB more. The build reads this in place of "leaflet"; the types are the package's.
 */
import "leaflet/src/layer/vector/Renderer.getRenderer.js";
import "leaflet/src/map/handler/Map.DoubleClickZoom.js";
import "leaflet/src/map/handler/Map.Drag.js";
import "leaflet/src/map/handler/Map.Keyboard.js";
import "leaflet/src/map/handler/Map.ScrollWheelZoom.js";
import * as DomEvent from "leaflet/src/dom/DomEvent.js";
import * as DomUtil from "leaflet/src/dom/DomUtil.js";

export { toLatLngBounds as latLngBounds } from "leaflet/src/geo/LatLngBounds.js";
export { Point, toPoint as point } from "leaflet/src/geometry/Point.js";
export { Layer } from "leaflet/src/layer/Layer.js";
export { LayerGroup, layerGroup } from "leaflet/src/layer/LayerGroup.js";
export { divIcon } from "leaflet/src/layer/marker/DivIcon.js";
export { marker } from "leaflet/src/layer/marker/Marker.js";
export { GridLayer } from "leaflet/src/layer/tile/GridLayer.js";
export { circleMarker } from "leaflet/src/layer/vector/CircleMarker.js";
export { polyline } from "leaflet/src/layer/vector/Polyline.js";
export { createMap as map } from "leaflet/src/map/Map.js";
export { DomEvent, DomUtil };
