import type { PageState } from "../state/page-state.ts";

/** The field files that are being read, each with how far it is and a way to stop it. */
export function Readings({ page }: { readonly page: PageState }) {
  return (
    <>
      {page.readings.value.map(({ ticket, file, share }) => (
        <li key={ticket} class="reading">
          <progress max={1} value={share} aria-label={`Reading ${file}`} />
          {file}
          <button type="button" onClick={() => void page.engine.cancel(ticket)}>
            Stop
          </button>
        </li>
      ))}
    </>
  );
}
