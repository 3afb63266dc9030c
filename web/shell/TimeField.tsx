import { fromLocalInput, fullTimeText, localInput, timeOf } from "../format/time-text.ts";
import { useFault } from "../state/fault-place.ts";

interface TimeFieldProps {
  readonly label: string;
  readonly value: string;
  readonly zone: string;
  /** The key of the plan that it edits. */
  readonly at: string;
  readonly onTime: (time: string) => void;
  /** Takes the time away, where there may be none. */
  readonly onClear?: () => void;
  /** The element that says what is wrong with the time. */
  readonly faultId?: string;
}

/** A time in the zone that the page shows, written to the plan in UTC. */
export function TimeField({ label, value, zone, at, onTime, onClear, faultId }: TimeFieldProps) {
  const instant = Date.parse(value);
  const isTime = !Number.isNaN(instant);
  const shown = isTime ? localInput(instant, zone) : "";
  const fault = useFault(at, faultId);
  const field = (
    <label>
      {/* Browsers choose the control's order of day and month: beside it the time stands in full. */}
      <span>
        {label} <b>{isTime ? fullTimeText(instant, zone) : value || zone}</b>
      </span>
      <input
        type="datetime-local"
        value={shown}
        max="9999-12-31T23:59:59.999"
        step={stepOf(instant)}
        {...fault}
        onChange={({ currentTarget }) => {
          const asked = fromLocalInput(currentTarget.value, zone);
          if (asked !== null) onTime(timeOf(asked));
        }}
        // A field is empty while a part of it is typed anew: only one that is left so means no time.
        onBlur={({ currentTarget }) => {
          if (currentTarget.value !== "" || shown === "") return;
          if (onClear === undefined) currentTarget.value = shown;
          else onClear();
        }}
      />
    </label>
  );
  if (onClear === undefined) return field;
  return (
    <div class="clearable">
      {field}
      {shown !== "" && (
        <button type="button" aria-label={`Take out: ${label}`} onClick={onClear}>
          ✕
        </button>
      )}
    </div>
  );
}

/** Whole minutes, but for a time of the plan's that is finer, s. */
function stepOf(instant: number): number {
  if (instant % 1000 > 0) return 0.001;
  return instant % 60_000 > 0 ? 1 : 60;
}
