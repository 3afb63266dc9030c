import { PartButton } from "../shell/PartButton.tsx";
import type { PageState } from "../state/page-state.ts";

/** A field file's name, which opens what it holds and how it is used. */
export function FieldButton({ page, index }: { readonly page: PageState; readonly index: number }) {
  const field = page.store.plan.value.fields?.[index];
  if (field === undefined) return null;
  return (
    <PartButton
      class="field-name"
      load={async () => {
        const { FieldSheet } = await import("./FieldSheet.tsx");
        return ({ onClose }) => <FieldSheet page={page} index={index} onClose={onClose} />;
      }}
    >
      <em>{field.role}</em> {field.file}
      <span class="unseen">, what it holds and how it is used</span>
    </PartButton>
  );
}
