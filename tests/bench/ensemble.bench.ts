import { createReadStream } from "node:fs";
import { estimatePlan } from "../../src/plan/estimate-plan.ts";

/*
 * A plan with an ensemble read from its file and estimated, in a process of its own, so that the peak of memory is its own too.
 * Called as `node ensemble.mjs PLAN FILE`, the plan as text; writes { seconds, peak_MB, members, arrived }.
 */

const [, , plan, file] = process.argv as [string, string, string, string];
const start = performance.now();
const { estimate } = await estimatePlan(plan, {
  file: "ensemble.plan.json",
  open: () => createReadStream(file),
});
const seconds = (performance.now() - start) / 1000;
const { members, count } = estimate.routes[0]?.ensemble ?? { members: [], count: 0 };
const peak_MB = process.resourceUsage().maxRSS / 1024;
process.stdout.write(JSON.stringify({ seconds, peak_MB, members: members.length, arrived: count }));
