import type { ComponentChildren } from "preact";
import type { WindowCell } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { chooseDeparture } from "./heat-places.ts";
import type { Filled } from "./window-fill.ts";

interface DepartureButtonProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly cell: WindowCell;
  /** A sign before the words, which say it too. */
  readonly sign: ComponentChildren;
  readonly children: ComponentChildren;
}

/** A departure that a window tells of: looked at while it is pointed at or has the keyboard, set when it is chosen. */
export function DepartureButton({ page, filled, cell, sign, children }: DepartureButtonProps) {
  const { desk, store } = page;
  const { shape, plan } = filled;
  const speed = plan.window?.speeds?.[shape.speeds?.indexOf(cell.speed_m_s ?? Number.NaN) ?? -1] ?? null;
  const preview = { departure: cell.departure.replace(".000Z", "Z"), speed };
  const look = (): void => {
    desk.preview.value = preview;
  };
  const leave = (): void => {
    desk.preview.value = null;
  };
  const choose = (): void => {
    const route = store.plan.peek().routes.findIndex(({ name }) => name === cell.route);
    chooseDeparture(page, preview, route);
  };
  return (
    <button
      type="button"
      onPointerEnter={look}
      onPointerLeave={leave}
      onFocus={look}
      onBlur={leave}
      onClick={choose}
    >
      {sign}
      <span>{children}</span>
    </button>
  );
}
