/** A waypoint's name below its tick. */
export interface TickName {
  readonly text: string;
  /** Of the tick, px. */
  readonly x: number;
  readonly anchor: "start" | "middle" | "end";
}

/** Mean advance of a letter at the names' size of 11 px. */
const LETTER = 6.3;
const GAP = 6;

/** Which of the names can stand beside each other: the first and the last before those between them, these in order. */
export function shownNames(names: readonly TickName[]): ReadonlySet<TickName> {
  const taken: { readonly from: number; readonly to: number }[] = [];
  const first = names.slice(0, 1);
  const last = names.slice(1).slice(-1);
  const shown = new Set<TickName>();
  for (const name of [...first, ...last, ...names.slice(1, -1)]) {
    const { from, to } = extent(name);
    if (taken.some((other) => from < other.to + GAP && other.from < to + GAP)) continue;
    taken.push({ from, to });
    shown.add(name);
  }
  return shown;
}

function extent({ text, x, anchor }: TickName): { readonly from: number; readonly to: number } {
  const width = LETTER * text.length;
  const from = x - width * { start: 0, middle: 0.5, end: 1 }[anchor];
  return { from, to: from + width };
}
