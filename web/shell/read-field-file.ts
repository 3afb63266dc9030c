import type { PageState } from "../state/page-state.ts";
import type { FieldDocument } from "../state/plan-document.ts";
import type { FieldAnswer } from "../worker/protocol.ts";

let tickets = 0;

/** Has the worker read a field file that it keeps, showing how far it is; the user may cancel it. */
export async function readFieldFile(
  { engine, readings, inspections }: PageState,
  field: FieldDocument,
): Promise<FieldAnswer> {
  tickets += 1;
  const ticket = tickets;
  const { file } = field;
  const others = () => readings.value.filter((reading) => reading.ticket !== ticket);
  let done = false;
  readings.value = [...others(), { ticket, file, share: 0 }];
  try {
    const answer = await engine.openField(ticket, field, ({ readBytes, totalBytes }) => {
      // The last word of progress may come after the answer.
      if (done) return;
      const share = totalBytes === 0 ? 1 : readBytes / totalBytes;
      readings.value = [...others(), { ticket, file, share }];
    });
    if (answer.ok) inspections.value = { ...inspections.value, [file]: answer.inspection };
    return answer;
  } finally {
    done = true;
    readings.value = others();
  }
}
