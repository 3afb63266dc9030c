import { TimeField } from "../shell/TimeField.tsx";
import { setWindow } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";
import type { WindowDocument } from "../state/plan-document.ts";
import { TextField } from "../waypoints/TextField.tsx";

interface WindowSettingsProps {
  readonly page: PageState;
  /** The plan's window, or one that is proposed. */
  readonly window: WindowDocument;
  /** What is wrong with the arrival to keep; `null` where nothing is. */
  readonly fault: string | null;
}

const FAULT = "arrive-by-fault";

/** First and last departure, step, speeds, and an arrival to keep. What is proposed is written to the plan with the first change. */
export function WindowSettings({ page, window, fault }: WindowSettingsProps) {
  const { store, view } = page;
  const change = (part: Partial<WindowDocument>): void =>
    store.edit("Change window", (plan) => setWindow(plan, { ...window, ...part }));
  const zone = view.zone.value;
  return (
    <>
      <TimeField
        label="From"
        at="window.from"
        value={window.from}
        zone={zone}
        onTime={(from) => change({ from })}
      />
      <TimeField label="To" at="window.to" value={window.to} zone={zone} onTime={(to) => change({ to })} />
      <div class="plan-item shorter">
        <span>Every</span>
        <TextField
          label="Step between departures"
          at="window.every"
          value={window.every}
          placeholder="30 min"
          onText={(every) => change({ every: every.trim() === "" ? window.every : every })}
        />
      </div>
      <TimeField
        label="Arrive by"
        at="window.arriveBy"
        value={window.arriveBy ?? ""}
        zone={zone}
        onTime={(arriveBy) => change({ arriveBy })}
        onClear={() => store.edit("Change window", (plan) => setWindow(plan, withoutArrival(window)))}
        {...(fault === null ? {} : { faultId: FAULT })}
      />
      {fault !== null && (
        <p class="fault" id={FAULT} role="alert">
          {fault}
        </p>
      )}
      <div class="plan-item short">
        <span>Speeds</span>
        <TextField
          label="Speeds to try, with commas between"
          at="window.speeds"
          value={(window.speeds ?? []).join(", ")}
          placeholder="the pace's"
          onText={(text) => store.edit("Change window", (plan) => setWindow(plan, withSpeeds(window, text)))}
        />
      </div>
    </>
  );
}

function withoutArrival({ arriveBy: _old, ...window }: WindowDocument): WindowDocument {
  return window;
}

/** Speeds from a text with commas or semicolons; an empty text takes them away. */
function withSpeeds({ speeds: _old, ...window }: WindowDocument, text: string): WindowDocument {
  const speeds = text
    .split(/[,;]/)
    .map((speed) => speed.trim())
    .filter((speed) => speed !== "");
  return speeds.length === 0 ? window : { ...window, speeds };
}
