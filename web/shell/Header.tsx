import { ACCEPTED, takeFilesLater } from "../files/take-later.ts";
import type { PageState } from "../state/page-state.ts";
import { setPlanText } from "../state/plan-edits.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { LazyPart } from "./LazyPart.tsx";
import { Menu } from "./Menu.tsx";
import { MoreMenu } from "./MoreMenu.tsx";
import { savePlan } from "./plan-files.ts";

const loadSettings = () => import("./Settings.tsx").then(({ Settings }) => Settings);

/** The plan's title, its files, undo and redo, and how things are shown. */
export function Header({ page }: { readonly page: PageState }) {
  const { store } = page;
  const { undoLabel, redoLabel } = store;
  return (
    <header class="page-head">
      <h1>
        <Mark />
        <span>Legwork</span>
      </h1>
      <TextField
        label="Title of the plan"
        value={store.plan.value.title ?? ""}
        placeholder="Untitled plan"
        whole
        onText={(text) => store.edit("Change title", (plan) => setPlanText(plan, "title", text))}
      />
      <span class="saved-state">{store.unsaved.value ? "not saved to a file" : ""}</span>
      <div class="tools" role="toolbar" aria-label="Plan file">
        <button
          type="button"
          disabled={undoLabel.value === null}
          title={undoLabel.value === null ? "Nothing to undo" : `Undo: ${undoLabel.value}`}
          onClick={() => store.undo()}
        >
          Undo
        </button>
        <button
          type="button"
          disabled={redoLabel.value === null}
          title={redoLabel.value === null ? "Nothing to redo" : `Redo: ${redoLabel.value}`}
          onClick={() => store.redo()}
        >
          Redo
        </button>
        <label class="button">
          Open
          <input
            type="file"
            class="unseen"
            multiple
            accept={ACCEPTED}
            onChange={({ currentTarget }) => {
              void takeFilesLater(page, [...(currentTarget.files ?? [])]);
              currentTarget.value = "";
            }}
          />
        </label>
        <button type="button" onClick={() => void savePlan(page)}>
          Save
        </button>
        <MoreMenu page={page} />
      </div>
      <Menu name="Show as" late={<LazyPart page={page} load={loadSettings} />} />
    </header>
  );
}

function Mark() {
  return (
    <svg width="22" height="22" viewBox="0 0 22 22" aria-hidden="true">
      <path
        d="M3 18 9 8l5 5 5-10"
        fill="none"
        stroke="currentColor"
        stroke-width="2.2"
        stroke-linejoin="round"
      />
      <circle cx="3.5" cy="17.5" r="2.5" fill="currentColor" />
      <circle cx="18.5" cy="3.5" r="2.5" fill="currentColor" />
    </svg>
  );
}
