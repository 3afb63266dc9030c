import { useSignal } from "@preact/signals";
import { useEffect, useRef } from "preact/hooks";
import { columnNames, type FieldRole } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import type { FieldDocument } from "../state/plan-document.ts";
import type { FieldPreview } from "../worker/protocol.ts";

/** Asks what a field file holds: its role, and what each column is, with the first rows and the reader's own answer beside it. */
export function FieldDialog({ page }: { readonly page: PageState }) {
  const question = page.asking.value;
  return question === null ? null : <Question key={question.content.name} page={page} question={question} />;
}

interface QuestionProps {
  readonly page: PageState;
  readonly question: NonNullable<PageState["asking"]["value"]>;
}

function Question({ page, question }: QuestionProps) {
  const { content, answer } = question;
  const dialog = useRef<HTMLDialogElement>(null);
  const role = useSignal<FieldRole>("wind");
  const columns = useSignal<Readonly<Record<string, string>>>({});
  const preview = useSignal<FieldPreview | null>(null);
  useEffect(() => dialog.current?.showModal(), []);

  const field: FieldDocument = {
    role: role.value,
    file: content.name,
    ...(Object.keys(columns.value).length === 0 ? {} : { columns: columns.value }),
  };
  const asked = JSON.stringify(field);
  useEffect(() => {
    let stale = false;
    void page.engine.preview(content, JSON.parse(asked)).then((found) => {
      if (!stale) preview.value = found;
    });
    return () => {
      stale = true;
    };
  }, [asked, content, page, preview]);

  const found = preview.value;
  return (
    <dialog
      ref={dialog}
      class="field-dialog"
      aria-labelledby="field-dialog-title"
      onCancel={(event) => {
        event.preventDefault();
        answer(null);
      }}
    >
      <h2 id="field-dialog-title">What does {content.name} hold?</h2>
      <fieldset>
        <legend>Field of</legend>
        {(["wind", "current"] as const).map((choice) => (
          <label key={choice}>
            <input
              type="radio"
              name="field-role"
              checked={role.value === choice}
              onChange={() => {
                role.value = choice;
                columns.value = {};
              }}
            />{" "}
            {choice}
          </label>
        ))}
      </fieldset>
      {found !== null && (
        <PreviewTable
          preview={found}
          role={role.value}
          columns={columns.value}
          onColumns={(next) => {
            columns.value = next;
          }}
        />
      )}
      <p role="status" class={found?.fault ? "fault" : "quiet"}>
        {found === null ? "Reading the first rows…" : (found.fault ?? "The first rows read well.")}
      </p>
      <div class="tools">
        <button type="button" class="primary" disabled={found?.fault !== null} onClick={() => answer(field)}>
          Add {role.value}
        </button>
        <button type="button" onClick={() => answer(null)}>
          Leave it out
        </button>
      </div>
    </dialog>
  );
}

interface PreviewTableProps {
  readonly preview: FieldPreview;
  readonly role: FieldRole;
  /** Our name → the header in the file. */
  readonly columns: Readonly<Record<string, string>>;
  readonly onColumns: (columns: Readonly<Record<string, string>>) => void;
}

function PreviewTable({ preview, role, columns, onColumns }: PreviewTableProps) {
  const names = [...columnNames(role).values()].flatMap(([first]) => (first === undefined ? [] : [first]));
  const nameOf = (header: string): string =>
    Object.entries(columns).find(([, mapped]) => mapped === header)?.[0] ?? "";
  const map = (header: string, name: string): void => {
    const others = Object.entries(columns).filter(([key, mapped]) => mapped !== header && key !== name);
    onColumns(Object.fromEntries(name === "" ? others : [...others, [name, header]]));
  };
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by keyboard (WCAG 2.1.1)
    <section class="scroll" aria-label="First rows" tabIndex={0}>
      <table>
        <thead>
          <tr>
            {preview.header.map((header) => (
              <th key={header} scope="col">
                {header}
                <select
                  aria-label={`Meaning of ${header}`}
                  value={nameOf(header)}
                  onChange={({ currentTarget: { value } }) => map(header, value)}
                >
                  <option value="">{preview.used.includes(header) ? "as it is named" : "not used"}</option>
                  {names.map((name) => (
                    <option key={name} value={name}>
                      {name.replaceAll("_", " ")}
                    </option>
                  ))}
                </select>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {preview.rows.map((row, at) => (
            <tr key={at}>
              {preview.header.map((header, column) => (
                <td key={header} class="figure">
                  {row[column] ?? ""}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
