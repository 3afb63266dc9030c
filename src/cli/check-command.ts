import { checkPlan } from "./core.ts";
import { oneLine } from "./message.ts";
import { writeResult } from "./output.ts";
import { openPlan } from "./plan-files.ts";

function counted(count: number, word: string): string {
  return `${count} ${word}${count === 1 ? "" : "s"}`;
}

/** Reads everything that a plan names and says that it is in order, and what there is to note of its fields. */
export async function checkCommand(file: string): Promise<number> {
  const { text, open } = await openPlan(file);
  const { plan, notes } = await checkPlan(text, { file, open });
  const legs = plan.routes.reduce((sum, route) => sum + route.waypoints.length - 1, 0);
  const parts = [
    counted(plan.routes.length, "route"),
    counted(legs, "leg"),
    counted(plan.fields.length, "field file"),
  ];
  const lines = [
    oneLine(`${file}: in order; ${parts.join(", ")}; craft: ${plan.craft.name}`),
    ...notes.map(({ message }) => `  note: ${oneLine(message)}`),
  ];
  await writeResult(`${lines.join("\n")}\n`);
  return 0;
}
