import { useSignal } from "@preact/signals";
import type { WindowCell } from "../core.ts";
import { shownUnit } from "../format/units.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { useWidth } from "../shell/use-width.ts";
import type { PageState } from "../state/page-state.ts";
import { cellText } from "./cell-text.ts";
import { HeatAxis } from "./HeatAxis.tsx";
import { HeatFocus } from "./HeatFocus.tsx";
import { HeatLegend } from "./HeatLegend.tsx";
import { HeatPicture } from "./HeatPicture.tsx";
import { chooseDeparture, type HeatPlace, previewOf, ROW_HEIGHT, routeOnPage } from "./heat-places.ts";
import { cellIndex, heatRows, type Measure, type RowChoice } from "./heat-rows.ts";
import { arrivalToKeep, spareText } from "./keep-arrival.ts";
import type { Filled } from "./window-fill.ts";

/** Narrower cells could not be pointed at; the map then scrolls. */
const LEAST_CELL = 5;
const MOST_CELL = 60;

interface HeatMapProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly measure: Measure;
  readonly rows: RowChoice;
}

/** Departures from left to right, a row a route or a speed. Pointing or walking to a cell looks at that departure; choosing sets it. */
export function HeatMap({ page, filled, measure, rows: choice }: HeatMapProps) {
  const { desk, view } = page;
  const { ref, width } = useWidth<HTMLDivElement>(640);
  const active = useSignal<HeatPlace | null>(null);
  const { shape, cells } = filled;
  const rows = heatRows(filled, choice, shownUnit(view.units.value, "speed"));
  const columns = shape.departures.length;
  const cellWidth = Math.min(Math.max(Math.floor((width - 2) / columns), LEAST_CELL), MOST_CELL);

  const cellAt = ({ row, column }: HeatPlace): WindowCell | null => {
    const found = rows[row];
    return found === undefined ? null : (cells[cellIndex(shape, column, found)] ?? null);
  };
  const look = (place: HeatPlace | null): void => {
    active.value = place;
    const row = place === null ? undefined : rows[place.row];
    desk.preview.value = place === null || row === undefined ? null : previewOf(filled, place.column, row);
  };
  const choose = (place: HeatPlace): void => {
    const row = rows[place.row];
    if (row !== undefined)
      chooseDeparture(page, previewOf(filled, place.column, row), routeOnPage(page, row.route));
  };
  const told = active.value === null ? null : cellAt(active.value);
  const text = told === null ? null : cellWords(page, told, filled);

  return (
    <div class="heat">
      <div class="heat-names">
        {rows.map((row) => (
          <div key={`${row.route} ${row.speed}`} style={{ height: `${ROW_HEIGHT}px` }}>
            <Swatch route={routeOnPage(page, row.route)} />
            <span title={row.name}>{row.name}</span>
          </div>
        ))}
      </div>
      <div ref={ref} class="heat-scroll">
        <div
          class="heat-grid"
          style={{ width: `${columns * cellWidth}px`, height: `${rows.length * ROW_HEIGHT}px` }}
        >
          <HeatPicture
            page={page}
            filled={filled}
            measure={measure}
            rows={rows}
            cellWidth={cellWidth}
            active={active.value}
          />
          <HeatFocus
            page={page}
            departures={shape.departures}
            rows={rows.length}
            cellWidth={cellWidth}
            active={active.value}
            text={text}
            onLook={look}
            onChoose={choose}
          />
        </div>
        <HeatAxis departures={shape.departures} cellWidth={cellWidth} zone={view.zone.value} />
      </div>
      <div class="heat-below" data-told={text === null ? undefined : ""}>
        <HeatLegend page={page} filled={filled} />
        {text !== null && (
          <p class="heat-told">
            <span>{text}</span>
            <button
              type="button"
              class="for-touch"
              onClick={() => {
                if (active.value !== null) choose(active.value);
              }}
            >
              Set this departure
            </button>
          </p>
        )}
      </div>
    </div>
  );
}

/** A cell in words, and whether it keeps the window's arrival. */
function cellWords(page: PageState, cell: WindowCell, filled: Filled): string {
  const spare = spareText(cell, arrivalToKeep(filled));
  const words = cellText(page, cell, filled);
  return spare === "" ? words : `${words}; ${spare}`;
}
