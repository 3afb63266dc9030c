import { useLayoutEffect, useRef } from "preact/hooks";
import { useFault } from "../state/fault-place.ts";

interface TextFieldProps {
  readonly label: string;
  readonly value: string;
  /** Called with the new text on Enter or when the field is left, not at every key. */
  readonly onText: (text: string) => void;
  readonly placeholder?: string;
  /** Whether the whole text is a tooltip, where the field may be too narrow for it. */
  readonly whole?: boolean;
  /** The key of the plan that it edits. */
  readonly at?: string;
  /** The element that says what is wrong with the text, where its own does. */
  readonly faultId?: string;
}

/** A field that speaks when its text is finished, and shows the plan's text again on Escape. */
export function TextField({ label, value, onText, placeholder, whole, at, faultId }: TextFieldProps) {
  const input = useRef<HTMLInputElement>(null);
  // Only text that was typed is told: focus may pass through a field whose value has just become another route's.
  const typed = useRef(false);
  const fault = useFault(at, faultId);
  useLayoutEffect(() => {
    if (input.current && !typed.current) input.current.value = value;
  }, [value]);
  const finish = (text: string): void => {
    if (!typed.current) return;
    typed.current = false;
    if (text !== value) onText(text);
  };
  return (
    <input
      ref={input}
      type="text"
      aria-label={label}
      defaultValue={value}
      {...(placeholder === undefined ? {} : { placeholder })}
      {...(whole ? { title: value } : {})}
      {...fault}
      autocomplete="off"
      spellcheck={false}
      onInput={() => {
        typed.current = true;
      }}
      onBlur={(event) => {
        finish(event.currentTarget.value);
        event.currentTarget.value = value;
      }}
      onKeyDown={(event) => {
        if (event.key === "Enter") finish(event.currentTarget.value);
        if (event.key === "Escape") {
          typed.current = false;
          event.currentTarget.value = value;
        }
      }}
    />
  );
}
