import * as L from "leaflet";

/** A handle on a place of the plan, for mouse, touch and keyboard; the icon has a {@link nameTag} in it. */
export function placeHandle(group: L.LayerGroup, icon: L.DivIcon, zIndexOffset: number): L.Marker {
  return L.marker([0, 0], {
    draggable: true,
    keyboard: true,
    autoPanOnFocus: false,
    icon,
    zIndexOffset,
  }).addTo(group);
}

/** Where a handle's name is shown. */
export function nameTag(): HTMLElement {
  const tag = document.createElement("span");
  tag.className = "handle-name";
  return tag;
}

/** Names a handle's element: by label for a screen reader, by name on the chart. */
export function nameHandle(element: HTMLElement, label: string, name: string): void {
  element.setAttribute("aria-label", label);
  const tag = element.querySelector(".handle-name");
  if (tag && tag.textContent !== name) tag.textContent = name;
}
