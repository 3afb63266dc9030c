import type { PageState } from "../state/page-state.ts";
export function TurnBackView({ page: _page }: { readonly page: PageState }) {
  return null;
}
