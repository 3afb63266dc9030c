import type { CraftDocument } from "../state/plan-document.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { setAt, setMedium, setModel, setRows, tableRows, textAt } from "./craft-edits.ts";
import {
  type CraftField,
  type CraftPath,
  type CraftSection,
  LIMITS,
  MODEL_FIELDS,
  MODELS,
  type ModelName,
  pathText,
  RATES,
  SPEEDS,
  STORE,
  WINDAGE,
} from "./craft-fields.ts";
import { QuantityField } from "./QuantityField.tsx";

/** The first fault of a craft, and the key that it stands at. */
interface CraftFault {
  readonly key: string | null;
  readonly fault: string;
}

export interface CraftFormProps {
  readonly craft: CraftDocument;
  readonly fault: CraftFault | null;
  readonly onCraft: (label: string, craft: CraftDocument) => void;
}

/** Everything that a craft file may hold. What is wrong stands beside the field that it stands in. */
export function CraftForm(props: CraftFormProps) {
  const { craft, fault, onCraft } = props;
  const moves = textAt(craft, ["moves"]) === "air" ? "air" : "water";
  const model = modelOf(craft);
  const sections = [SPEEDS, STORE, ...(moves === "water" ? [WINDAGE] : []), LIMITS];
  return (
    <div class="craft-form">
      <fieldset class="craft-section">
        <legend>Craft</legend>
        <div class={faultAt(fault, ["name"]) === null ? "quantity wide" : "quantity wide wrong"}>
          <span aria-hidden="true">Name</span>
          <TextField
            label="Name"
            value={textAt(craft, ["name"])}
            onText={(text) => onCraft("Name craft", setAt(craft, ["name"], text.trim()))}
          />
          <FaultText fault={faultAt(fault, ["name"])} />
        </div>
        <label class="quantity wide">
          <span>Moves through</span>
          <select
            value={moves}
            onChange={({ currentTarget: { value } }) =>
              onCraft("Change medium", setMedium(craft, value === "air" ? "air" : "water"))
            }
          >
            <option value="water">water</option>
            <option value="air">air</option>
          </select>
        </label>
      </fieldset>
      <fieldset class="craft-section">
        <legend>Power model</legend>
        <label class="quantity wide">
          <span>Model</span>
          <select
            value={model ?? ""}
            onChange={({ currentTarget: { value } }) => {
              const chosen = MODELS.find(([name]) => name === value)?.[0];
              if (chosen) onCraft("Change power model", setModel(craft, chosen));
            }}
          >
            {model === null && <option value="">none</option>}
            {MODELS.map(([name, text]) => (
              <option key={name} value={name}>
                {text}
              </option>
            ))}
          </select>
          <FaultText fault={faultAt(fault, ["power"]) ?? faultAt(fault, ["power", "model"])} />
        </label>
        {model === "table" && <RowsTable {...props} />}
        {model !== null && <Fields {...props} fields={MODEL_FIELDS[model]} />}
      </fieldset>
      {sections.map((section) => (
        <Section key={section.title} {...props} section={section} />
      ))}
    </div>
  );
}

function Section({ section, ...props }: CraftFormProps & { readonly section: CraftSection }) {
  const group = section.fields.find(({ path }) => path.length > 1)?.path.slice(0, 1);
  return (
    <fieldset class="craft-section">
      <legend>{section.title}</legend>
      <Fields {...props} fields={section.fields} />
      {group !== undefined && <FaultText fault={faultAt(props.fault, group)} />}
    </fieldset>
  );
}

function Fields({
  craft,
  fault,
  onCraft,
  fields,
}: CraftFormProps & { readonly fields: readonly CraftField[] }) {
  return (
    <>
      {fields.map((field) => (
        <QuantityField
          key={pathText(field.path)}
          field={field}
          text={textAt(craft, field.path)}
          fault={faultAt(fault, field.path)}
          onText={(text) => onCraft(`Change ${field.label.toLowerCase()}`, setText(craft, field, text))}
        />
      ))}
    </>
  );
}

/** The measured rows of a table, in any order; the core sorts them. */
function RowsTable({ craft, fault, onCraft }: CraftFormProps) {
  const rows = tableRows(craft);
  const cell = (
    at: number,
    key: "speed" | "rate",
    label: string,
    field: Pick<CraftField, "dimensions" | "unit">,
  ) => {
    const path = ["power", "rows", at, key];
    return (
      <QuantityField
        field={{ ...field, path, label: `${label} of row ${at + 1}` }}
        text={textAt(craft, path)}
        fault={faultAt(fault, path)}
        unlabelled
        onText={(text) => onCraft(`Change ${key} of a row`, setAt(craft, path, text))}
      />
    );
  };
  const last = rows.at(-1) ?? { speed: "", rate: "" };
  return (
    <div class="craft-rows">
      <table>
        <thead>
          <tr>
            <th scope="col">Speed</th>
            <th scope="col">Rate</th>
            <td />
          </tr>
        </thead>
        <tbody>
          {rows.map((_, at) => (
            <tr key={at}>
              <td>{cell(at, "speed", "Speed", { dimensions: ["speed"], unit: "kn" })}</td>
              <td>{cell(at, "rate", "Rate", { dimensions: RATES, unit: "kW" })}</td>
              <td>
                <button
                  type="button"
                  aria-label={`Take out row ${at + 1}`}
                  onClick={() =>
                    onCraft(
                      "Take out row",
                      setRows(
                        craft,
                        rows.filter((_row, other) => other !== at),
                      ),
                    )
                  }
                >
                  ✕
                </button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <button type="button" onClick={() => onCraft("Add row", setRows(craft, [...rows, last]))}>
        Add row
      </button>
      <FaultText fault={faultAt(fault, ["power", "rows"])} />
    </div>
  );
}

function FaultText({ fault }: { readonly fault: string | null }) {
  return fault === null ? null : <p class="field-fault">{fault}</p>;
}

function modelOf(craft: CraftDocument): ModelName | null {
  const name = textAt(craft, ["power", "model"]);
  return MODELS.find(([model]) => model === name)?.[0] ?? null;
}

/** A bare number is kept as a number where it is one; an empty text takes the key away. */
function setText(craft: CraftDocument, { path, dimensions }: CraftField, text: string): CraftDocument {
  if (text === "") return setAt(craft, path, undefined);
  const number = Number(text);
  return setAt(craft, path, dimensions.length === 0 && Number.isFinite(number) ? number : text);
}

/** The fault that stands at a path itself. */
function faultAt(fault: CraftFault | null, path: CraftPath): string | null {
  return fault !== null && fault.key === pathText(path) ? fault.fault : null;
}
