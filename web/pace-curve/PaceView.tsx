import type { PageState } from "../state/page-state.ts";
export function PaceView({ page: _page }: { readonly page: PageState }) {
  return null;
}
