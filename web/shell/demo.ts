import type { PageState } from "../state/page-state.ts";
import { openPlan } from "./open-plan.ts";

/** The demo's files by name, where the build put them. */
const ADDRESSES: Readonly<Record<string, string>> = import.meta.glob("../../data/demo/*.{json,csv}", {
  query: "?url",
  import: "default",
  eager: true,
});

export const DEMOS = [
  { name: "islands", title: "Workboat among islands" },
  { name: "survey", title: "Survey drone" },
  { name: "ocean", title: "Ocean passage" },
  { name: "islands-decide", title: "Workboat: when, and how sure" },
  { name: "survey-decide", title: "Drone: when, and how sure" },
  { name: "ocean-decide", title: "Ocean: when, and how sure" },
] as const;

export type DemoName = (typeof DEMOS)[number]["name"];

/** Opens a demo as a user would open the same files. */
export async function openDemo(page: PageState, name: DemoName): Promise<void> {
  const text = await (await demoFile(`${name}.plan.json`)).text();
  await openPlan(page, `${name}.plan.json`, text, demoFile);
}

/** Invented craft to start from. */
export const DEMO_CRAFTS = [
  { file: "workboat.craft.json", title: "Battery workboat" },
  { file: "ship.craft.json", title: "Multi-purpose ship" },
  { file: "drone.craft.json", title: "Survey drone" },
] as const;

/** The text of one of the demos' craft files. */
export async function demoCraft(file: string): Promise<string> {
  return (await demoFile(file)).text();
}

async function demoFile(name: string): Promise<Blob> {
  const address = ADDRESSES[`../../data/demo/${name}`];
  if (address === undefined) throw new Error(`the demo has no ${name}`);
  const answer = await fetch(address);
  if (!answer.ok) throw new Error(`the demo's ${name} could not be loaded (${answer.status})`);
  return answer.blob();
}
