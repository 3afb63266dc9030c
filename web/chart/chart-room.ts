import * as L from "leaflet";

/** Room that a view leaves at its edges, px. */
interface Room {
  readonly paddingTopLeft: L.PointTuple;
  readonly paddingBottomRight: L.PointTuple;
}

/** Half a waypoint's handle and a little air, px. */
const HANDLE = 22;
/** For a waypoint's name, which stands to its right, px. */
const NAME = 80;
/** What is left for the chart however much lies on it, px. */
const LEAST = 60;
const TOOLS = ".chart-tools";
const CORNER = ".shading-legend, .chart-scale";

/**
 * The rooms in which nothing lies on the chart, as measured on the page: below its tools and either above or beside what stands in
 * its lower left corner, and to the right of both, which is the largest on a low, wide chart.
 */
export function roomsBeside(map: L.Map): readonly [Room, Room, Room] {
  const host = map.getContainer();
  const frame = host.getBoundingClientRect();
  const rects = (selector: string): DOMRect[] =>
    [...(host.parentElement?.querySelectorAll(selector) ?? [])].map((part) => part.getBoundingClientRect());
  const corner = rects(CORNER);
  const tools = rects(TOOLS);
  const below = Math.max(40, ...tools.map(({ bottom }) => bottom - frame.top)) + HANDLE;
  const right = Math.max(0, ...[...tools, ...corner].map((rect) => rect.right - frame.left));
  const above = Math.max(0, ...corner.map((rect) => frame.bottom - rect.top));
  const beside = Math.max(0, ...corner.map(({ right }) => right - frame.left));
  const room = (left: number, top: number, bottom: number): Room => ({
    paddingTopLeft: [
      Math.min(left, frame.width - NAME - LEAST),
      Math.min(top, frame.height - bottom - LEAST),
    ],
    paddingBottomRight: [NAME, bottom],
  });
  const low = Math.min(above, frame.height / 2);
  return [
    room(HANDLE + 10, below, low + HANDLE),
    room(beside + HANDLE, below, HANDLE + 4),
    room(right + HANDLE, HANDLE + 14, HANDLE + 4),
  ];
}

/** Shows the whole of an area clear of what lies on the chart, in the room in which it is largest. */
export function fitClear(map: L.Map, bounds: L.LatLngBounds): void {
  const rooms = roomsBeside(map);
  const zoomIn = ({ paddingTopLeft: [left, top], paddingBottomRight: [right, bottom] }: Room): number =>
    map.getBoundsZoom(bounds, false, new L.Point(left + right, top + bottom));
  const room = rooms.reduce((best, each) => (zoomIn(each) > zoomIn(best) ? each : best));
  map.fitBounds(bounds, { ...room, animate: false });
}

/** Tells when what lies on the chart comes, goes or changes its size. */
export function whenBesideChanges(map: L.Map, changed: () => void): () => void {
  const chart = map.getContainer().parentElement;
  if (chart === null) return () => {};
  const sizes = new ResizeObserver(changed);
  const parts = new MutationObserver(changed);
  const tools = chart.querySelector(TOOLS);
  if (tools) sizes.observe(tools);
  parts.observe(chart, { childList: true });
  return () => {
    sizes.disconnect();
    parts.disconnect();
  };
}
