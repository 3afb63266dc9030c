import { displayWidth, leftAligned, rightAligned } from "./plain-text.ts";

/** Columns of the text table. */
export const TABLE_WIDTH = 80;
/** Widest space between two columns: wider, and the eye loses the row. */
const WIDEST_GAP = 5;

export interface Column {
  /** Lines of the head, as many in every column. */
  readonly head: readonly string[];
  readonly cells: readonly string[];
  /** Numbers stand to the right (default), words to the left. */
  readonly align?: "left" | "right";
}

export interface LaidOut {
  readonly head: readonly string[];
  readonly rows: readonly string[];
}

/** How wide a column is. */
function widthOf({ head, cells }: Column): number {
  return Math.max(...[...head, ...cells].map(displayWidth));
}

/** What these columns take at least, with a space before the next to each. */
export function leastWidth(columns: readonly Column[]): number {
  return columns.reduce((sum, column) => sum + widthOf(column) + 1, 0);
}

/** Lines in which the columns share out `width`, after an indent; spare space goes between the columns. */
export function laidOut(columns: readonly Column[], indent: number, width = TABLE_WIDTH): LaidOut {
  const widths = columns.map(widthOf);
  const spare = width - indent - widths.reduce((sum, each) => sum + each, 0);
  const gaps = Math.max(1, columns.length - 1);
  const each = Math.min(WIDEST_GAP, Math.floor(spare / gaps));
  // What does not share out evenly goes to the right-hand columns, whose figures are the widest.
  const wider = each === WIDEST_GAP ? 0 : spare - each * gaps;
  const line = (cells: readonly string[]) =>
    cells
      .map((cell, index) => {
        const gap = index === 0 ? indent : each + (index > gaps - wider ? 1 : 0);
        const put = columns[index]?.align === "left" ? leftAligned : rightAligned;
        return " ".repeat(gap) + put(cell, widths[index] ?? 0);
      })
      .join("")
      .trimEnd();
  const lineOf = (part: (column: Column) => readonly string[], row: number) =>
    line(columns.map((column) => part(column)[row] ?? ""));
  return {
    head: (columns[0]?.head ?? []).map((_, row) => lineOf((column) => column.head, row)),
    rows: (columns[0]?.cells ?? []).map((_, row) => lineOf((column) => column.cells, row)),
  };
}

/** A line across the whole table. */
export function rule(character = "-"): string {
  return character.repeat(TABLE_WIDTH);
}
