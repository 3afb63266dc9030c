export type TurnSign = "alternate" | "no-return" | "equal-time";

const SHAPES: Record<TurnSign, string> = {
  alternate: "M3 3H15V15H3ZM6 9H12M9 6V12",
  "no-return": "M9 1V17M9 1H1L9 8Z",
  "equal-time": "M9 2L16 9L9 16L2 9Z",
};

const SVG = "http://www.w3.org/2000/svg";

/** The sign of a place that turning back is about, 18 px square. */
export function signElement(kind: TurnSign): HTMLElement {
  const host = document.createElement("span");
  const svg = document.createElementNS(SVG, "svg");
  svg.setAttribute("viewBox", "0 0 18 18");
  for (const part of ["casing", "sign"]) {
    const path = document.createElementNS(SVG, "path");
    path.setAttribute("class", part);
    path.setAttribute("d", SHAPES[kind]);
    svg.append(path);
  }
  host.append(svg);
  return host;
}
