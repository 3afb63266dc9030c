/** Where a name may stand beside its handle, in the order in which places are tried. */
const SIDES = ["", "left", "above", "below"] as const;

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Puts the names of alternates where they lie on no other name or handle, as far as there is such a place. */
export function setNamesApart(chart: HTMLElement): void {
  const names = [...chart.querySelectorAll<HTMLElement>(".alternate-handle .handle-name")];
  if (names.length === 0) return;
  const taken: Box[] = [".waypoint-handle", ".waypoint-handle .handle-name", ".alternate-handle svg"].flatMap(
    (selector) => [...chart.querySelectorAll(selector)].map((part) => part.getBoundingClientRect()),
  );
  for (const name of names) {
    const free = SIDES.find((side) => {
      name.dataset["side"] = side;
      return !taken.some((other) => overlaps(name.getBoundingClientRect(), other));
    });
    name.dataset["side"] = free ?? "";
    taken.push(name.getBoundingClientRect());
  }
}

function overlaps(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}
