import type { PageState } from "../state/page-state.ts";
export function SureView({ page: _page }: { readonly page: PageState }) {
  return null;
}
