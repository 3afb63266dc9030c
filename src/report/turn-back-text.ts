import type { Goal, RoutePlace, TurnBack, TurnLimit } from "../choose/turn-back-result.ts";
import type { FindingCode } from "../estimate/result.ts";
import { isolated, plainText } from "./plain-text.ts";

/** What ends a journey, in a few words. */
const REASONS: Partial<Record<FindingCode, string>> = {
  "outside-time": "the data end in time",
  "outside-area": "the data end in area",
  gap: "data are missing",
  "cannot-hold-track": "the track cannot be held",
  "outside-power-table": "the power model ends",
};

export function reasonText(code: FindingCode | null): string {
  return code === null ? "" : (REASONS[code] ?? code);
}

/** A goal by its kind, and an alternate by its name. */
export function goalText({ kind, name }: Goal): string {
  return kind === "alternate" ? isolated(plainText(name)) : kind;
}

/** What a limit is about. */
export function limitText({ goals }: TurnBack, { goal }: TurnLimit): string {
  return goal === null ? "any of them" : goalText(goals[goal] as Goal);
}

/** The point of no return that a limit is, if it is one: beyond it the goal is known to be out of reach. */
export function noReturn({ last, beyond }: TurnLimit): RoutePlace | null {
  return beyond === "short" || beyond === "cannot" ? last : null;
}
