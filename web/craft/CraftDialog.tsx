import { useSignal } from "@preact/signals";
import { useEffect, useRef } from "preact/hooks";
import { DEMO_CRAFTS, demoCraft } from "../shell/demo.ts";
import { PaceFields } from "../shell/PaceFields.tsx";
import { fileStem, saveFile } from "../shell/plan-files.ts";
import type { PageState } from "../state/page-state.ts";
import type { CraftDocument } from "../state/plan-document.ts";
import { setCraft } from "../state/plan-edits.ts";
import type { CraftAnswer } from "../worker/protocol.ts";
import { CraftForm } from "./CraftForm.tsx";
import { CraftPlots } from "./CraftPlots.tsx";
import { craftInText, craftOf } from "./craft-document.ts";
import { textAt } from "./craft-edits.ts";
import { hasPlace } from "./craft-places.ts";
import "./craft-dialog.css";

const LARGEST_CRAFT = 5_000_000;

/** The plan's craft: its form, and what it spends against its speed. Every change is an edit of the plan. */
export function CraftDialog({ page, onClose }: { readonly page: PageState; readonly onClose: () => void }) {
  const { store, engine, answers, view } = page;
  const dialog = useRef<HTMLDialogElement>(null);
  const craft = useSignal<CraftDocument | null>(null);
  const study = useSignal<CraftAnswer | null>(null);
  const held = store.plan.value.craft;
  const answer = answers.answer.value;

  const title = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    dialog.current?.showModal();
    // The first control would replace the craft at the touch of an arrow key.
    title.current?.focus();
  }, []);
  useEffect(() => {
    let stale = false;
    void craftOf(page).then((found) => {
      if (!stale) craft.value = found;
    });
    return () => {
      stale = true;
    };
  }, [held, page, craft]);
  const shown = craft.value;
  // The pace marked is the estimate's own, so that each new answer asks again.
  useEffect(() => {
    let stale = false;
    if (shown === null) study.value = null;
    else
      void engine.studyCraft(shown).then((found) => {
        if (!stale) study.value = found;
      });
    return () => {
      stale = true;
    };
  }, [shown, answer, engine, study]);

  const put = (label: string, next: CraftDocument): void => {
    craft.value = next;
    store.edit(label, (plan) => setCraft(plan, next));
  };
  const found = study.value;
  const fault = found !== null && !found.ok ? found : null;
  return (
    <dialog ref={dialog} class="craft-dialog" aria-labelledby="craft-dialog-title" onClose={onClose}>
      <header>
        <h2 ref={title} id="craft-dialog-title" tabIndex={-1}>
          Craft and pace
        </h2>
        <CraftTools page={page} craft={shown} onCraft={put} />
        <button type="button" class="primary" onClick={() => dialog.current?.close()}>
          Done
        </button>
      </header>
      <p role="status" class={fault === null || hasPlace(shown, fault.key) ? "unseen" : "fault"}>
        {fault === null ? "" : fault.fault}
      </p>
      {shown === null ? (
        <p class="quiet">The plan has no craft yet: open one, or start from one of those above.</p>
      ) : (
        <div class="craft-parts">
          <CraftForm craft={shown} fault={fault} onCraft={put} />
          <section class="craft-plots" aria-label="Pace, and use against speed in a still medium">
            <div class="pace-fields">
              <PaceFields page={page} />
            </div>
            <CraftPlots study={found?.ok === true ? found : null} units={view.units.value} />
          </section>
        </div>
      )}
    </dialog>
  );
}

interface CraftToolsProps {
  readonly page: PageState;
  readonly craft: CraftDocument | null;
  readonly onCraft: (label: string, craft: CraftDocument) => void;
}

function CraftTools({ page, craft, onCraft }: CraftToolsProps) {
  const open = async (file: File | undefined): Promise<void> => {
    if (file === undefined) return;
    const read = file.size > LARGEST_CRAFT ? null : craftInText(await file.text());
    if (read === null) page.view.notice.value = `${file.name} is no craft file: one is a JSON object`;
    else onCraft(`Open ${file.name}`, read);
  };
  const save = async (): Promise<void> => {
    if (craft === null) return;
    const name = `${fileStem(textAt(craft, ["name"]))}.craft.json`;
    saveFile(name, await page.engine.craftText(craft), "application/json");
    page.view.announcement.value = `Saved ${name}`;
  };
  return (
    <div class="tools">
      <select
        aria-label="Start from a craft, all invented"
        value=""
        onChange={({ currentTarget }) => {
          const { value } = currentTarget;
          currentTarget.value = "";
          void demoCraft(value).then((text) => {
            const start = craftInText(text);
            if (start !== null) onCraft("Start from a craft", start);
          });
        }}
      >
        <option value="">Start from…</option>
        {DEMO_CRAFTS.map(({ file, title }) => (
          <option key={file} value={file}>
            {title}
          </option>
        ))}
      </select>
      <label class="button">
        Open craft
        <input
          type="file"
          class="unseen"
          accept=".json,application/json"
          onChange={({ currentTarget }) => {
            void open(currentTarget.files?.[0]);
            currentTarget.value = "";
          }}
        />
      </label>
      <button type="button" disabled={craft === null} onClick={() => void save()}>
        Save craft
      </button>
    </div>
  );
}
