import { effect } from "@preact/signals";
import { render } from "preact";
import { warmDesk } from "./desk/warm-desk.ts";
import { listenForDrops } from "./files/drop-target.ts";
import { keepPlan, restorePlan, warnBeforeLoss } from "./keeping/keep-plan.ts";
import { keepView, restoreView, viewStorage } from "./keeping/keep-view.ts";
import { offerNewer } from "./offline/NewerVersion.tsx";
import { keepOffline } from "./offline/newer-version.ts";
import { App } from "./shell/App.tsx";
import { listenForKeys } from "./shell/keys.ts";
import { narrowImages } from "./shell/tile-policy.ts";
import "./shell/style.css";
import { openDemo } from "./shell/demo.ts";
import { giveFiles } from "./shell/give-files.ts";
import { wantsDecisions } from "./state/decisions.ts";
import { EMPTY_PLAN } from "./state/empty-plan.ts";
import { createPageState } from "./state/page-state.ts";
import type { Worker as Protocol } from "./worker/protocol.ts";
import { handOver, reach } from "./worker/remote.ts";

const startWorker = () =>
  reach<Protocol>(new Worker(new URL("./worker/worker.ts", import.meta.url), { type: "module" }));
const engine = startWorker();
const page = createPageState(EMPTY_PLAN, engine, () => {
  const second = startWorker();
  const { port1, port2 } = new MessageChannel();
  void engine.share(handOver(port1, [port1]));
  void second.follow(handOver(port2, [port2]));
  return second;
});

restoreView(page.view, viewStorage());
narrowImages(page.view.tiles.peek());
keepView(page.view, viewStorage());

effect(() => {
  giveFiles(page);
  void page.answers.ask(page.shown.value);
});
// What is decided rests on the estimate, and takes longer: it follows once that is there.
effect(() => {
  const { estimate, ensemble } = page.answers.answer.value;
  if (estimate === null) return;
  const turnBack = page.desk.part.value === "turn-back";
  const plan = page.shown.peek();
  if (turnBack || wantsDecisions(plan, ensemble)) void page.decisions.ask(plan, turnBack);
});
// The coast is large: routes are estimated without it first, and held against it once it is there.
effect(() => {
  if (!page.answers.answer.value.landPending) return;
  page.engine.loadLand().then(
    () => page.answers.ask(page.shown.peek()),
    () => {
      page.view.announcement.value = "The coast could not be loaded: routes are not held against land.";
    },
  );
});
effect(() => {
  document.documentElement.dataset["theme"] = page.view.theme.value;
});
listenForKeys(page.store);
listenForDrops(page);

const root = document.getElementById("page");
if (root) render(<App page={page} />, root);

// What the device holds comes back; a first visit begins with a demo. Only then is anything kept, so that nothing is kept over it.
restorePlan(page)
  .then((restored) => (restored ? undefined : openDemo(page, "islands")))
  .finally(() => {
    const keeping = keepPlan(page);
    warmDesk(page.engine);
    warnBeforeLoss(page, keeping);
    if (import.meta.env.PROD) void keepOffline((useIt) => offerNewer(page, keeping, useIt));
  });
