import type { PageState } from "../state/page-state.ts";
import { PartButton } from "./PartButton.tsx";

/** The craft's name, which opens its form. */
export function CraftButton({ page, name }: { readonly page: PageState; readonly name: string }) {
  return (
    <PartButton
      class="craft-name"
      load={async () => {
        const { CraftDialog } = await import("../craft/CraftDialog.tsx");
        return ({ onClose }) => <CraftDialog page={page} onClose={onClose} />;
      }}
    >
      {name}
      <span class="unseen">, change the craft</span>
    </PartButton>
  );
}
