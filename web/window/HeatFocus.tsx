import { useRef } from "preact/hooks";
import type { PageState } from "../state/page-state.ts";
import { columnOf, type HeatPlace, ROW_HEIGHT, walk } from "./heat-places.ts";

interface HeatFocusProps {
  readonly page: PageState;
  readonly departures: readonly number[];
  readonly rows: number;
  readonly cellWidth: number;
  readonly active: HeatPlace | null;
  /** What the active cell says; `null` where it is not worked out yet. */
  readonly text: string | null;
  readonly onLook: (place: HeatPlace | null) => void;
  readonly onChoose: (place: HeatPlace) => void;
}

/**
 * The window as pointer, keyboard and screen reader take it: a grid over the picture that holds the focus and names its active cell.
 * Only that cell exists as an element; a window may have thousands.
 */
export function HeatFocus(props: HeatFocusProps) {
  const { page, departures, rows, cellWidth, active, text, onLook, onChoose } = props;
  const grid = useRef<HTMLTableElement>(null);
  // What a finger looks at stays while it goes on to the button that sets it.
  const isTouched = useRef(false);
  const lookedAt = useRef<HeatPlace | null>(null);
  const columns = departures.length;
  const placeAt = ({ clientX, clientY }: MouseEvent): HeatPlace | null => {
    const box = grid.current?.getBoundingClientRect();
    if (!box) return null;
    const column = Math.floor((clientX - box.left) / cellWidth);
    const row = Math.floor((clientY - box.top) / ROW_HEIGHT);
    return column >= 0 && column < columns && row >= 0 && row < rows ? { row, column } : null;
  };
  const onKey = (event: KeyboardEvent): void => {
    isTouched.current = false;
    const next = walk(event.key, active ?? { row: 0, column: 0 }, rows, columns);
    if (next !== null) {
      onLook(next);
      bringIntoView(grid.current, next.column * cellWidth, cellWidth);
    } else if (active !== null && (event.key === "Enter" || event.key === " ")) onChoose(active);
    else if (event.key === "Escape") onLook(null);
    else return;
    event.preventDefault();
  };
  const onFocus = (): void => {
    if (active !== null || !grid.current?.matches(":focus-visible")) return;
    const planned = columnOf(departures, Date.parse(page.store.plan.peek().departure));
    onLook({ row: 0, column: Math.round(planned ?? 0) });
  };
  return (
    <table
      ref={grid}
      class="heat-focus"
      // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: its keys are handled below
      role="grid"
      tabIndex={0}
      aria-label="Departures: arrow keys look at one, Enter sets it"
      aria-rowcount={rows}
      aria-colcount={columns}
      aria-activedescendant="heat-cell"
      onPointerDown={({ pointerType }) => {
        isTouched.current = pointerType === "touch";
        lookedAt.current = active;
      }}
      onPointerMove={(event) => {
        const place = placeAt(event);
        if (!isSame(place, active)) onLook(place);
      }}
      onPointerLeave={({ pointerType }) => {
        if (pointerType !== "touch") onLook(null);
      }}
      onClick={(event) => {
        const place = placeAt(event);
        if (place === null) return;
        // A finger looks first, and at the same cell no more; the button beside the figures sets what is looked at.
        if (!isTouch(event)) onChoose(place);
        else onLook(isSame(place, lookedAt.current) ? null : place);
      }}
      onFocus={onFocus}
      onBlur={() => {
        if (!isTouched.current) onLook(null);
      }}
      onKeyDown={onKey}
    >
      <tbody>
        <tr aria-rowindex={(active?.row ?? 0) + 1}>
          <td id="heat-cell" aria-colindex={(active?.column ?? 0) + 1}>
            <span class="unseen">
              {active === null ? "no departure looked at" : (text ?? "not worked out yet")}
            </span>
          </td>
        </tr>
      </tbody>
    </table>
  );
}

function isSame(a: HeatPlace | null, b: HeatPlace | null): boolean {
  return a?.row === b?.row && a?.column === b?.column;
}

function isTouch(event: MouseEvent): boolean {
  return event instanceof PointerEvent && event.pointerType === "touch";
}

function bringIntoView(grid: HTMLElement | null, x: number, width: number): void {
  const scroller = grid?.closest(".heat-scroll");
  if (!scroller) return;
  if (x < scroller.scrollLeft) scroller.scrollLeft = x;
  else if (x + width > scroller.scrollLeft + scroller.clientWidth)
    scroller.scrollLeft = x + width - scroller.clientWidth;
}
