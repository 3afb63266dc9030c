import type { PreparedRoute } from "../estimate/prepare.ts";
import type { DepartureWindow } from "./departure-window.ts";
import type { Sweep } from "./sweep.ts";
import { sweepCell } from "./window.ts";
import type { WindowCell } from "./window-cell.ts";

const MINUTE = 60_000;

/** One route's cells of a window, and those at other minutes as they are asked for. */
export class MinuteCells {
  readonly route: string;
  /** The window's own. */
  readonly cells: readonly WindowCell[];
  readonly #known: Map<string, WindowCell>;
  readonly #cellAt: (departure: number, speed: number | null) => WindowCell;
  readonly #window: DepartureWindow;

  constructor(sweep: Sweep, prepared: PreparedRoute, window: DepartureWindow, cells: readonly WindowCell[]) {
    this.route = prepared.route.name;
    this.cells = cells;
    this.#window = window;
    this.#cellAt = (departure, speed) => sweepCell(sweep, prepared, departure, speed);
    this.#known = new Map(cells.map((cell) => [`${cell.departure} ${this.triedSpeed(cell)}`, cell]));
  }

  /** The speed that a cell is one of a series at, m/s. Where the window names none, a cell's speed is the one found for its own departure. */
  triedSpeed({ speed_m_s }: WindowCell): number | null {
    return this.#window.speeds_m_s === null ? null : speed_m_s;
  }

  /** The cell at a whole minute since 1970-01-01T00:00Z, at the speed of another. */
  at(minute: number, like: WindowCell): WindowCell {
    const speed = this.triedSpeed(like);
    const key = `${new Date(minute * MINUTE).toISOString()} ${speed}`;
    const cell = this.#known.get(key) ?? this.#cellAt(minute * MINUTE, speed);
    this.#known.set(key, cell);
    return cell;
  }

  /** All that were tried, the window's own first. */
  get tried(): WindowCell[] {
    return [...this.#known.values()];
  }
}
