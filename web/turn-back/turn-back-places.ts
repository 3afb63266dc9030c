import type { RoutePlace, TurnBack, TurnLimit } from "../core.ts";

/** The goals that one turns back or off to, by their indices: all but the destination. */
export function awayGoals({ goals }: TurnBack): number[] {
  return goals.flatMap(({ kind }, at) => (kind === "destination" ? [] : [at]));
}

/** A goal by its kind and name; `null` for any one of the start and the alternates. */
export function goalName({ goals }: Pick<TurnBack, "goals">, goal: number | null): string {
  if (goal === null) return "any of them";
  const { kind, name } = goals[goal] ?? { kind: "alternate", name: "?" };
  return kind === "alternate" ? name : `${kind} (${name})`;
}

/** The points of no return, each with what it is about; the one to any of them only where it is a place of its own. */
export function noReturns(
  turn: TurnBack,
): readonly { readonly goal: string; readonly limit: TurnLimit; readonly place: RoutePlace }[] {
  const seen = new Set<number>();
  return turn.limits.flatMap((limit) => {
    const { last, beyond, goal } = limit;
    if (last === null || (beyond !== "short" && beyond !== "cannot")) return [];
    if (seen.has(last.time_s)) return [];
    seen.add(last.time_s);
    return [{ goal: goalName(turn, goal), limit, place: last }];
  });
}
