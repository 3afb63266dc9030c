import { effect } from "@preact/signals";
import * as Comlink from "comlink";
import { render } from "preact";
import { App } from "./shell/App.tsx";
import { listenForKeys } from "./shell/keys.ts";
import { narrowImages } from "./shell/tile-policy.ts";
import "./shell/style.css";
import { FIRST_PLAN } from "./shell/first-plan.ts";
import { createPageState } from "./state/page-state.ts";
import type { Worker as Protocol } from "./worker/protocol.ts";

narrowImages("");

const worker = new Worker(new URL("./worker/worker.ts", import.meta.url), { type: "module" });
const page = createPageState(FIRST_PLAN, Comlink.wrap<Protocol>(worker));

effect(() => {
  void page.answers.ask(page.store.plan.value);
});
effect(() => {
  document.documentElement.dataset["theme"] = page.view.theme.value;
});
listenForKeys(page.store);

const root = document.getElementById("page");
if (root) render(<App page={page} />, root);
