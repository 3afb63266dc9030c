import { type Signal, signal } from "@preact/signals";

/** What lies on the desk under the ribbons: the legs, or one of the questions that a decision asks. */
export type DeskPart = "legs" | "window" | "pace" | "turn-back" | "sure";

/** A departure or a speed that is looked at before it is chosen. */
export interface Preview {
  /** ISO 8601 with its zone. */
  readonly departure: string;
  /** As a plan writes it; `null` for the plan's own pace. */
  readonly speed: string | null;
  /** Whether the speed is through the medium, whatever the pace holds. */
  readonly through?: boolean;
}

/** How decisions are shown; none of it is part of the plan. */
export interface Desk {
  readonly part: Signal<DeskPart>;
  readonly preview: Signal<Preview | null>;
  /** Whether a click on the chart adds an alternate. */
  readonly placing: Signal<boolean>;
  /** Whether ribbons and chart show where a wrong forecast would hurt most. */
  readonly sensitivity: Signal<boolean>;
  /** Whether what lies on the desk is printed with the leg table. */
  readonly printed: Signal<boolean>;
}

export function createDesk(): Desk {
  return {
    part: signal<DeskPart>("legs"),
    preview: signal<Preview | null>(null),
    placing: signal(false),
    sensitivity: signal(false),
    printed: signal(false),
  };
}
