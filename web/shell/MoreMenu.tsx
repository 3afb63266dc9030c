import type { ReportFormat } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { DEMOS, openDemo } from "./demo.ts";
import { exportsLater } from "./exports-later.ts";
import { Menu } from "./Menu.tsx";
import { saveArchive } from "./plan-files.ts";

const FORMATS: readonly (readonly [ReportFormat, string])[] = [
  ["csv", "CSV"],
  ["geojson", "GeoJSON"],
  ["gpx", "GPX"],
  ["json", "Estimate (JSON)"],
];

/** What is done now and then: exports, print, demos. */
export function MoreMenu({ page }: { readonly page: PageState }) {
  const { store, answers } = page;
  const route = store.plan.value.routes[store.selection.value.route];
  const ready = answers.answer.value.routes[store.selection.value.route] != null;
  return (
    <Menu name="More">
      <h3>Leg table{route === undefined ? "" : ` of ${route.name}`}</h3>
      <button
        type="button"
        disabled={!ready}
        onClick={() => void exportsLater().then(({ copyLegTable }) => copyLegTable(page))}
      >
        Copy as text
      </button>
      {FORMATS.map(([format, name]) => (
        <button
          key={format}
          type="button"
          disabled={!ready}
          onClick={() => void exportsLater().then(({ exportRoute }) => exportRoute(page, format))}
        >
          Export {name}
        </button>
      ))}
      <button type="button" onClick={() => window.print()}>
        Print
      </button>
      <h3>Plan</h3>
      <button type="button" onClick={() => void saveArchive(page)}>
        Save with craft and fields (one file)
      </button>
      <h3>Demos, all invented</h3>
      {DEMOS.map(({ name, title }) => (
        <button key={name} type="button" onClick={() => void openDemo(page, name)}>
          {title}
        </button>
      ))}
    </Menu>
  );
}
