import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { beginHistory, type History, record, redo, settle, undo } from "../../web/state/history.ts";

describe("the history", () => {
  test("gives back every value in turn, and brings each again", () => {
    fc.assert(
      fc.property(fc.array(fc.integer(), { maxLength: 60 }), (values) => {
        const boxes = values.map((value) => ({ value }));
        const first = { value: -1 };
        let history: History<{ value: number }> = beginHistory(first);
        for (const box of boxes) history = record(history, box, "edit");
        for (const box of [...boxes].reverse()) {
          expect(history.present).toBe(box);
          history = undo(history);
        }
        expect(history.present).toBe(first);
        expect(undo(history)).toBe(history);
        for (const box of boxes) {
          history = redo(history);
          expect(history.present).toBe(box);
        }
        expect(redo(history)).toBe(history);
      }),
      { numRuns: 50 },
    );
  });

  test("takes a drag as one step", () => {
    let history = beginHistory(0);
    for (let move = 1; move <= 1000; move += 1) history = record(history, move, "Move", "drag 1");
    expect(history.present).toBe(1000);
    expect(undo(history).present).toBe(0);
    expect(redo(undo(history)).present).toBe(1000);
  });

  test("keeps two drags of the same handle apart once the first is settled", () => {
    let history = record(record(beginHistory(0), 1, "Move", "drag"), 2, "Move", "drag");
    history = record(record(settle(history), 3, "Move", "drag"), 4, "Move", "drag");
    expect(undo(history).present).toBe(2);
    expect(undo(undo(history)).present).toBe(0);
  });

  test("begins another step after an edit of another key, after none, and after undo", () => {
    let history = record(beginHistory(0), 1, "Move", "a");
    history = record(history, 2, "Move", "b");
    history = record(history, 3, "Rename");
    history = record(history, 4, "Move", "b");
    expect(undo(history).present).toBe(3);
    history = record(undo(history), 5, "Move", "b");
    expect(undo(history).present).toBe(3);
  });

  test("forgets what was undone once something else is done", () => {
    const history = record(undo(record(beginHistory(0), 1, "one")), 2, "two");
    expect(history.future).toBeNull();
    expect(redo(history).present).toBe(2);
  });

  test("records nothing where nothing changed", () => {
    const history = beginHistory(7);
    expect(record(history, 7, "nothing")).toBe(history);
  });

  test("names what undo and redo would do", () => {
    const history = record(record(beginHistory(0), 1, "Add waypoint"), 2, "Rename route");
    expect(history.past?.label).toBe("Rename route");
    expect(undo(history).future?.label).toBe("Rename route");
    expect(undo(history).past?.label).toBe("Add waypoint");
  });
});
