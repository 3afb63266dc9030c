import type { FieldInspection } from "../core.ts";
import { latText, lonText } from "../format/position-text.ts";
import { inUnit, number, shownUnit } from "../format/units.ts";
import { Dialog } from "../shell/Dialog.tsx";
import { instantText } from "../shell/plan-words.ts";
import { readFieldFile } from "../shell/read-field-file.ts";
import type { PageState } from "../state/page-state.ts";
import type { UnitsPreset } from "../state/page-view.ts";
import type { FieldDocument } from "../state/plan-document.ts";
import { changeField, deleteField, moveField } from "../state/plan-edits.ts";

type Policy = "gaps" | "beyond" | "outside";

interface Choice {
  readonly key: Policy;
  readonly name: string;
  /** The first holds where the plan names none. */
  readonly options: readonly (readonly [string, string])[];
}

const POLICIES: readonly Choice[] = [
  {
    key: "gaps",
    name: "Where a value is missing",
    options: [
      ["nearest", "the nearest node, at most two steps away"],
      ["zero", "nothing moves"],
      ["stop", "the estimate stops"],
    ],
  },
  {
    key: "beyond",
    name: "After the last valid time",
    options: [
      ["stop", "the estimate stops"],
      ["hold", "the last values hold"],
    ],
  },
  {
    key: "outside",
    name: "Outside the area",
    options: [
      ["stop", "the estimate stops"],
      ["zero", "nothing moves"],
    ],
  },
];

interface FieldSheetProps {
  readonly page: PageState;
  readonly index: number;
  readonly onClose: () => void;
}

/** What a field file of the plan holds, and how the estimate treats its gaps and edges. */
export function FieldSheet({ page, index, onClose }: FieldSheetProps) {
  const { store, inspections, view } = page;
  const fields = store.plan.value.fields ?? [];
  const field = fields[index];
  if (field === undefined) return null;
  const inspection = inspections.value[field.file];
  const change = (part: Partial<FieldDocument>): void =>
    store.edit("Change field", (plan) => changeField(plan, index, part));
  return (
    <Dialog title={field.file} onClose={onClose}>
      <div class="selects">
        <label>
          <span>Field of</span>
          <select
            value={field.role}
            onChange={({ currentTarget: { value } }) => {
              const role = value === "current" ? "current" : "wind";
              change({ role });
              void readFieldFile(page, { ...field, role }).then((answer) => {
                if (!answer.ok) view.notice.value = answer.fault;
              });
            }}
          >
            <option value="wind">wind</option>
            <option value="current">current</option>
          </select>
        </label>
        {POLICIES.map((policy) => (
          <PolicyChoice key={policy.key} policy={policy} field={field} onChange={change} />
        ))}
      </div>
      <p class="quiet">
        Each use of one of these is a finding. On the chart a cross marks a gap, and paler symbols are filled
        or held.
      </p>
      {inspection === undefined ? (
        <p class="quiet">The file has not been read yet.</p>
      ) : (
        <Contents inspection={inspection} zone={view.zone.value} units={view.units.value} />
      )}
      <div class="tools">
        {fields.length > 1 && (
          <>
            <button
              type="button"
              disabled={index === 0}
              onClick={() => {
                store.edit("Move field", (plan) => moveField(plan, index, index - 1));
                onClose();
              }}
            >
              Before the one above
            </button>
            <button
              type="button"
              disabled={index === fields.length - 1}
              onClick={() => {
                store.edit("Move field", (plan) => moveField(plan, index, index + 1));
                onClose();
              }}
            >
              After the one below
            </button>
          </>
        )}
        <button
          type="button"
          onClick={() => {
            store.edit("Take out field", (plan) => deleteField(plan, index));
            onClose();
          }}
        >
          Take out of the plan
        </button>
      </div>
    </Dialog>
  );
}

interface PolicyChoiceProps {
  readonly policy: Choice;
  readonly field: FieldDocument;
  readonly onChange: (part: Partial<FieldDocument>) => void;
}

function PolicyChoice({ policy: { key, name, options }, field, onChange }: PolicyChoiceProps) {
  return (
    <label>
      <span>{name}</span>
      <select
        value={field[key] ?? options[0]?.[0] ?? ""}
        onChange={({ currentTarget: { value } }) => {
          const chosen = options.find(([option]) => option === value)?.[0];
          if (chosen !== undefined) onChange({ [key]: chosen });
        }}
      >
        {options.map(([option, text]) => (
          <option key={option} value={option}>
            {text}
          </option>
        ))}
      </select>
    </label>
  );
}

interface ContentsProps {
  readonly inspection: FieldInspection;
  readonly zone: string;
  readonly units: UnitsPreset;
}

function Contents({ inspection, zone, units }: ContentsProps) {
  const { latitude, longitude, height, time, speed, gust, missing, nodes, coverage } = inspection;
  const shown = shownUnit(units, "speed");
  const high = shownUnit(units, "height");
  const range = (of: { min: number; max: number }): string =>
    `${inUnit(of.min, shown)} to ${inUnit(of.max, shown)} ${shown.symbol}`;
  const rows: readonly (readonly [string, string])[] = [
    [
      "Valid",
      time === null ? "at any time" : `${instantText(time.first, zone)} to ${instantText(time.last, zone)}`,
    ],
    ...(time === null ? [] : [["Times", `${time.count}`] as const]),
    ["Latitude", `${latText(latitude.first)} to ${latText(latitude.last)}, ${latitude.count} nodes`],
    [
      "Longitude",
      inspection.global
        ? `around the globe, ${longitude.count} nodes`
        : `${lonText(longitude.first)} to ${lonText(longitude.last)}, ${longitude.count} nodes`,
    ],
    ...(height === null
      ? []
      : [
          [
            "Height",
            `${inUnit(height.first, high)} to ${inUnit(height.last, high)} ${high.symbol}, ${height.count} levels`,
          ] as const,
        ]),
    [
      "Coverage",
      missing === 0 ? "no gaps" : `${number(100 * coverage, 1)} %, ${missing} of ${nodes} nodes missing`,
    ],
    ...(speed === null ? [] : [["Speed", range(speed)] as const]),
    ...(gust === null ? [] : [["Gusts", range(gust)] as const]),
    ...(inspection.ignoredColumns.length === 0
      ? []
      : [["Columns not used", inspection.ignoredColumns.join(", ")] as const]),
    ...inspection.notes.map((note) => ["Note", note] as const),
  ];
  return (
    <dl>
      {rows.map(([name, text], at) => (
        <>
          <dt key={`${at} name`}>{name}</dt>
          <dd key={at}>{text}</dd>
        </>
      ))}
    </dl>
  );
}
