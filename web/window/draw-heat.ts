import { cssColour } from "../chart/css-colour.ts";
import type { WindowCell } from "../core.ts";
import { SPEED_CLASSES, speedColour } from "../format/palette.ts";
import type { BestMark } from "./best-marks.ts";
import { figureOf, heatClass, type Measure } from "./heat-rows.ts";

/** What is drawn of a window, cells by row and departure. */
export interface HeatPicture {
  readonly columns: number;
  readonly rows: readonly (readonly (WindowCell | null)[])[];
  readonly measure: Measure;
  readonly range: readonly [number, number] | null;
  readonly marks: readonly BestMark[];
  readonly cellWidth: number;
  readonly rowHeight: number;
  /** Whether a cell can be done and keeps the window's arrival; none does where it keeps none. */
  readonly isInTime: (cell: WindowCell) => boolean;
  /** The latest departures in time, columns in parts. */
  readonly latest: readonly { readonly row: number; readonly column: number }[];
  /** Where the plan's departure lies, in columns; `null` outside the window. */
  readonly planned: number | null;
  readonly active: { readonly row: number; readonly column: number } | null;
}

/** Draws the window on a canvas that is as large as its cells. Better is lighter; what cannot be done is hatched. */
export function drawHeat(canvas: HTMLCanvasElement, picture: HeatPicture): void {
  const { columns, rows, cellWidth, rowHeight } = picture;
  const width = columns * cellWidth;
  const height = rows.length * rowHeight;
  const scale = window.devicePixelRatio;
  const wanted = { width: Math.round(width * scale), height: Math.round(height * scale) };
  if (canvas.width !== wanted.width || canvas.height !== wanted.height) Object.assign(canvas, wanted);
  canvas.style.width = `${width}px`;
  canvas.style.height = `${height}px`;
  const context = canvas.getContext("2d");
  if (!context) return;
  context.setTransform(scale, 0, 0, scale, 0, 0);
  context.clearRect(0, 0, width, height);
  const ink = inks();
  rows.forEach((cells, row) => {
    cells.forEach((cell, column) => {
      if (cell !== null) drawCell(context, picture, ink, cell, column * cellWidth, row * rowHeight);
    });
  });
  drawPlanned(context, picture, ink, height);
  for (const place of picture.latest) drawLatest(context, picture, ink, place);
  for (const mark of picture.marks) drawMark(context, picture, ink, mark);
  drawActive(context, picture, ink);
}

interface Inks {
  readonly panel: string;
  readonly raised: string;
  readonly ink: string;
  readonly quiet: string;
  readonly stop: string;
  readonly caution: string;
  readonly clear: string;
}

function inks(): Inks {
  return {
    panel: cssColour("--panel"),
    raised: cssColour("--raised"),
    ink: cssColour("--ink"),
    quiet: cssColour("--quiet"),
    stop: cssColour("--stop"),
    caution: cssColour("--caution"),
    clear: cssColour("--clear"),
  };
}

/** Room between cells, px, where they are wide enough to be told apart. */
const gap = (cellWidth: number): number => (cellWidth >= 6 ? 1 : 0);

function drawCell(
  context: CanvasRenderingContext2D,
  { measure, range, isInTime, cellWidth, rowHeight }: HeatPicture,
  ink: Inks,
  cell: WindowCell,
  x: number,
  y: number,
): void {
  const width = cellWidth - gap(cellWidth);
  const height = rowHeight - 2;
  const figure = figureOf(cell, measure);
  const stopped = cell.status === "stop";
  context.save();
  context.beginPath();
  context.rect(x, y + 1, width, height);
  context.clip();
  context.fillStyle =
    figure === null || range === null
      ? ink.raised
      : speedColour(heatClass(figure, range, measure, SPEED_CLASSES));
  context.globalAlpha = stopped && figure !== null ? 0.4 : 1;
  context.fillRect(x, y + 1, width, height);
  context.globalAlpha = 1;
  if (stopped) {
    hatch(context, x, y, width, rowHeight, figure === null ? ink.quiet : ink.stop, 1);
    if (figure === null) hatch(context, x, y, width, rowHeight, ink.quiet, -1);
  }
  if (cell.status === "caution") {
    context.fillStyle = ink.caution;
    context.beginPath();
    context.moveTo(x + width, y + 1);
    context.lineTo(x + width - 7, y + 1);
    context.lineTo(x + width, y + 8);
    context.fill();
  }
  if (isInTime(cell)) {
    context.fillStyle = ink.panel;
    context.fillRect(x, y + height - 5, width, 6);
    context.fillStyle = ink.ink;
    context.fillRect(x, y + height - 3, width, 4);
  }
  context.restore();
}

function hatch(
  context: CanvasRenderingContext2D,
  x: number,
  y: number,
  width: number,
  height: number,
  colour: string,
  slope: 1 | -1,
): void {
  context.strokeStyle = colour;
  context.lineWidth = 1;
  context.beginPath();
  // Lines run on from cell to cell, since they are laid from the picture's corner.
  const first = Math.floor((x - height) / 6) * 6;
  for (let at = first; at < x + width + height; at += 6) {
    context.moveTo(at, slope > 0 ? y + height : y);
    context.lineTo(at + height, slope > 0 ? y : y + height);
  }
  context.stroke();
}

function drawPlanned(
  context: CanvasRenderingContext2D,
  { planned, cellWidth }: HeatPicture,
  ink: Inks,
  height: number,
): void {
  if (planned === null) return;
  const x = planned * cellWidth + (cellWidth - gap(cellWidth)) / 2;
  context.lineWidth = 4;
  context.strokeStyle = ink.panel;
  context.beginPath();
  context.moveTo(x, 0);
  context.lineTo(x, height);
  context.stroke();
  context.lineWidth = 2;
  context.strokeStyle = ink.ink;
  context.stroke();
}

/** A flag on the row, at the very departure: its mast there, its cloth on the side of those that are in time. */
function drawLatest(
  context: CanvasRenderingContext2D,
  { cellWidth, rowHeight }: HeatPicture,
  ink: Inks,
  { row, column }: HeatPicture["latest"][number],
): void {
  const x = (column + 0.5) * cellWidth;
  const top = row * rowHeight + 1;
  context.beginPath();
  context.moveTo(x, top + rowHeight - 2);
  context.lineTo(x, top);
  context.lineTo(x - 9, top);
  context.lineTo(x, top + 8);
  context.lineWidth = 4;
  context.strokeStyle = ink.panel;
  context.stroke();
  context.lineWidth = 2;
  context.strokeStyle = ink.clear;
  context.fillStyle = ink.clear;
  context.stroke();
  context.fill();
}

function drawMark(
  context: CanvasRenderingContext2D,
  { cellWidth, rowHeight, columns }: HeatPicture,
  ink: Inks,
  { row, column, letters, isPassed }: BestMark,
): void {
  const width = 6 + 8 * letters.length;
  const middle = (column + 0.5) * cellWidth;
  const x = Math.min(Math.max(middle - width / 2, 0), columns * cellWidth - width);
  const y = row * rowHeight + rowHeight / 2 - 7.5;
  context.fillStyle = ink.panel;
  context.fillRect(x - 1.5, y - 1.5, width + 3, 18);
  // What does not hold is an outline.
  context.fillStyle = isPassed ? ink.stop : ink.clear;
  context.fillRect(x, y, width, 15);
  if (isPassed) {
    context.fillStyle = ink.panel;
    context.fillRect(x + 1.5, y + 1.5, width - 3, 12);
  }
  context.fillStyle = isPassed ? ink.stop : ink.panel;
  context.font = "700 11px system-ui, sans-serif";
  context.textAlign = "center";
  context.textBaseline = "middle";
  context.fillText(letters, x + width / 2, y + 8);
}

function drawActive(
  context: CanvasRenderingContext2D,
  { active, cellWidth, rowHeight }: HeatPicture,
  ink: Inks,
): void {
  if (active === null) return;
  const width = Math.max(cellWidth - gap(cellWidth), 4);
  const x = active.column * cellWidth;
  const y = active.row * rowHeight + 1;
  context.lineWidth = 5;
  context.strokeStyle = ink.panel;
  context.strokeRect(x, y, width, rowHeight - 2);
  context.lineWidth = 2.5;
  context.strokeStyle = ink.ink;
  context.strokeRect(x, y, width, rowHeight - 2);
}
