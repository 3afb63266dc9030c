import { useEffect, useRef } from "preact/hooks";

interface TextFieldProps {
  readonly label: string;
  readonly value: string;
  /** Called with the new text on Enter or when the field is left, not at every key. */
  readonly onText: (text: string) => void;
  readonly placeholder?: string;
  /** Whether the whole text is a tooltip, where the field may be too narrow for it. */
  readonly whole?: boolean;
  /** The element that says what is wrong with the text. */
  readonly faultId?: string;
}

/** A field that speaks when its text is finished, and shows the plan's text again on Escape. */
export function TextField({ label, value, onText, placeholder, whole, faultId }: TextFieldProps) {
  const input = useRef<HTMLInputElement>(null);
  useEffect(() => {
    if (input.current && document.activeElement !== input.current) input.current.value = value;
  }, [value]);
  // Leaving the field after Enter must not tell the same text again: it would be another step to undo.
  const told = useRef<string | null>(null);
  const finish = (text: string): void => {
    if (text === value || text === told.current) return;
    told.current = text;
    onText(text);
  };
  return (
    <input
      ref={input}
      type="text"
      aria-label={label}
      defaultValue={value}
      {...(placeholder === undefined ? {} : { placeholder })}
      {...(whole ? { title: value } : {})}
      {...(faultId === undefined ? {} : { "aria-invalid": true, "aria-describedby": faultId })}
      autocomplete="off"
      spellcheck={false}
      onInput={() => {
        told.current = null;
      }}
      onBlur={(event) => {
        finish(event.currentTarget.value);
        event.currentTarget.value = value;
      }}
      onKeyDown={(event) => {
        if (event.key === "Enter") finish(event.currentTarget.value);
        if (event.key === "Escape") event.currentTarget.value = value;
      }}
    />
  );
}
