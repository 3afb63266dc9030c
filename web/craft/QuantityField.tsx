import { useId } from "preact/hooks";
import { dimensionOf, fromUnit, symbolsOf, toUnit } from "../core.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { splitQuantity, withUnit } from "./craft-edits.ts";
import type { CraftField } from "./craft-fields.ts";

interface QuantityFieldProps {
  readonly field: CraftField;
  readonly text: string;
  /** What is wrong with it, in a sentence; `null` where nothing is known to be. */
  readonly fault: string | null;
  /** Where it has no room for a label of its own, as in a table. */
  readonly unlabelled?: boolean;
  /** The text with its unit; empty where it is taken away. */
  readonly onText: (text: string) => void;
}

/** A figure with the unit that the user chose; the text with its unit is what the document keeps. */
export function QuantityField({ field, text, fault, unlabelled = false, onText }: QuantityFieldProps) {
  const faultId = useId();
  const { label, dimensions, otherwise } = field;
  const units = dimensions.flatMap(symbolsOf);
  const split = splitQuantity(text);
  const known = units.includes(split.unit);
  const unit = known || text === "" ? split.unit || field.unit : "";
  return (
    <div class="quantity">
      {!unlabelled && <span aria-hidden="true">{label}</span>}
      <TextField
        label={label}
        value={known ? split.number : text}
        {...(otherwise === undefined ? {} : { placeholder: otherwise })}
        {...(fault === null ? {} : { faultId })}
        onText={(typed) => onText(withUnit(typed, unit))}
      />
      {units.length > 0 && (
        <select
          aria-label={`Unit of ${label}`}
          value={unit}
          disabled={split.number === ""}
          onChange={({ currentTarget: { value } }) => onText(inOtherUnit(split.number, unit, value))}
        >
          {unit === "" && <option value="">unit</option>}
          {units.map((symbol) => (
            <option key={symbol}>{symbol}</option>
          ))}
        </select>
      )}
      {fault !== null && (
        <p class="field-fault" id={faultId}>
          {fault}
        </p>
      )}
    </div>
  );
}

/** The same amount in another unit of what it measures; the same number where the new unit measures something else. */
export function inOtherUnit(number: string, from: string, to: string): string {
  const value = Number(number);
  if (!Number.isFinite(value) || dimensionOf(from) === undefined || dimensionOf(from) !== dimensionOf(to)) {
    return `${number} ${to}`;
  }
  return `${Number(toUnit(fromUnit(value, from), to).toPrecision(6))} ${to}`;
}
