// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen } from "@testing-library/preact";
import { afterEach, expect, test } from "vitest";
import { TextField } from "../../web/waypoints/TextField.tsx";

afterEach(cleanup);

const field = () => screen.getByRole<HTMLInputElement>("textbox");

function shown(value: string) {
  const told: string[] = [];
  const onText = (text: string) => told.push(text);
  const view = render(<TextField label="Name" value={value} onText={onText} />);
  const show = (next: string) => view.rerender(<TextField label="Name" value={next} onText={onText} />);
  return { told, show };
}

test("text is told once, on Enter or on leaving", () => {
  const { told, show } = shown("High");
  field().focus();
  fireEvent.input(field(), { target: { value: "Low" } });
  fireEvent.keyDown(field(), { key: "Enter" });
  show("Low");
  fireEvent.blur(field());
  expect(told).toEqual(["Low"]);
});

test("a value that changes while the field has the focus is shown, and not told back as somebody's text", () => {
  const { told, show } = shown("High");
  field().focus();
  show("Low");
  expect(field().value).toBe("Low");
  fireEvent.blur(field());
  expect(told).toEqual([]);
});

test("Escape gives the plan's text back and tells nothing", () => {
  const { told } = shown("High");
  field().focus();
  fireEvent.input(field(), { target: { value: "Lo" } });
  fireEvent.keyDown(field(), { key: "Escape" });
  expect(field().value).toBe("High");
  fireEvent.blur(field());
  expect(told).toEqual([]);
});

test("text in work is kept while the value changes underneath", () => {
  const { told, show } = shown("High");
  field().focus();
  fireEvent.input(field(), { target: { value: "Lower" } });
  show("Higher");
  expect(field().value).toBe("Lower");
  fireEvent.blur(field());
  expect(told).toEqual(["Lower"]);
});
