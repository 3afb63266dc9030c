import { useEffect, useLayoutEffect, useRef } from "preact/hooks";
import type { PageState } from "../state/page-state.ts";
import { bestMarks } from "./best-marks.ts";
import { drawHeat } from "./draw-heat.ts";
import { columnOf, type HeatPlace, ROW_HEIGHT } from "./heat-places.ts";
import { cellIndex, figureRange, type HeatRow, type Measure } from "./heat-rows.ts";
import { arrivalToKeep, keepsArrival, latestMarks } from "./keep-arrival.ts";
import type { Filled } from "./window-fill.ts";

interface HeatPictureProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly measure: Measure;
  readonly rows: readonly HeatRow[];
  readonly cellWidth: number;
  readonly active: HeatPlace | null;
}

/** The window's cells on a canvas, drawn anew with every change. */
export function HeatPicture({ page, filled, measure, rows, cellWidth, active }: HeatPictureProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const { shape, cells } = filled;
  const theme = page.view.theme.value;
  const arriveBy = arrivalToKeep(filled);
  const departure = Date.parse(page.store.plan.value.departure);
  const draw = (): void => {
    if (canvas.current === null) return;
    const drawn = rows.map((row) =>
      shape.departures.map((_, column) => cells[cellIndex(shape, column, row)] ?? null),
    );
    drawHeat(canvas.current, {
      columns: shape.departures.length,
      rows: drawn,
      measure,
      range: figureRange(cells, measure),
      marks: bestMarks(filled, rows),
      isInTime: (cell) => keepsArrival(cell, arriveBy),
      latest: latestMarks(filled, rows),
      cellWidth,
      rowHeight: ROW_HEIGHT,
      planned: columnOf(shape.departures, departure),
      active,
    });
  };
  useLayoutEffect(draw);
  const redraw = useRef(draw);
  redraw.current = draw;
  // A print has colours of its own.
  useEffect(() => {
    const paper = window.matchMedia("print");
    const again = (): void => redraw.current();
    paper.addEventListener("change", again);
    return () => paper.removeEventListener("change", again);
  }, []);
  return (
    <div aria-hidden="true" data-theme={theme}>
      <canvas ref={canvas} />
    </div>
  );
}
