// @vitest-environment happy-dom
import { readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { cleanup, fireEvent, render, screen } from "@testing-library/preact";
import { afterEach, describe, expect, test } from "vitest";
import { CraftForm } from "../../web/craft/CraftForm.tsx";
import { CraftPlots } from "../../web/craft/CraftPlots.tsx";
import { setAt, setMedium, setModel, splitQuantity, textAt, withUnit } from "../../web/craft/craft-edits.ts";
import { MODEL_FIELDS, MODELS } from "../../web/craft/craft-fields.ts";
import { hasPlace } from "../../web/craft/craft-places.ts";
import { inOtherUnit } from "../../web/craft/QuantityField.tsx";
import type { CraftDocument } from "../../web/state/plan-document.ts";
import { studyCraft } from "../../web/worker/craft-study.ts";

const demos = join(dirname(fileURLToPath(import.meta.url)), "../../data/demo");
const demo = (name: string): CraftDocument =>
  JSON.parse(readFileSync(join(demos, `${name}.craft.json`), "utf8"));
const workboat = demo("workboat");

afterEach(cleanup);

describe("edits of a craft", () => {
  test("set a value at a path and leave everything else as it was", () => {
    const next = setAt(workboat, ["power", "rows", 1, "rate"], "2 kW");
    expect(textAt(next, ["power", "rows", 1, "rate"])).toBe("2 kW");
    expect(setAt(next, ["power", "rows", 1, "rate"], textAt(workboat, ["power", "rows", 1, "rate"]))).toEqual(
      workboat,
    );
  });

  test("take an emptied group away with its last key", () => {
    const one = setAt({ name: "x" }, ["limits", "wind"], "9 m/s");
    expect(one).toEqual({ name: "x", limits: { wind: "9 m/s" } });
    expect(setAt(one, ["limits", "wind"], undefined)).toEqual({ name: "x" });
  });

  test.each(MODELS)("the model %s begins with figures that the core reads", (model) => {
    const base = model === "table" || model === "cube" ? workboat : demo("drone");
    const craft = setAt(setModel(base, model), ["speed"], undefined);
    expect(studyCraft(craft, null)).toMatchObject({ ok: true });
    for (const { path, otherwise } of MODEL_FIELDS[model]) {
      if (otherwise === undefined) expect(textAt(craft, path), path.join(".")).not.toBe("");
    }
  });

  test("windage goes where the craft moves through air", () => {
    expect(textAt(workboat, ["windage", "frontalArea"])).not.toBe("");
    expect("windage" in setMedium(workboat, "air")).toBe(false);
  });
});

describe("a quantity", () => {
  test("is split into its number and unit, and a bare number takes the unit shown", () => {
    expect(splitQuantity("12.5 kn")).toEqual({ number: "12.5", unit: "kn" });
    expect(splitQuantity("fast")).toEqual({ number: "", unit: "fast" });
    expect(withUnit("7", "kn")).toBe("7 kn");
    expect(withUnit("7 m/s", "kn")).toBe("7 m/s");
    expect(withUnit("", "kn")).toBe("");
  });

  test("keeps its amount in another unit of the same kind, and its number in one of another kind", () => {
    expect(inOtherUnit("10", "kn", "km/h")).toBe("18.52 km/h");
    expect(inOtherUnit("18.52", "km/h", "kn")).toBe("10 kn");
    expect(inOtherUnit("10", "kW", "L/h")).toBe("10 L/h");
  });
});

describe("the craft's form", () => {
  test("writes a number with the unit beside it", () => {
    const seen: CraftDocument[] = [];
    render(<CraftForm craft={workboat} fault={null} onCraft={(_, craft) => seen.push(craft)} />);
    const field = screen.getByLabelText("Ordered speed");
    fireEvent.input(field, { target: { value: "7.5" } });
    fireEvent.blur(field);
    expect(textAt(seen.at(-1) ?? {}, ["speed"])).toBe("7.5 kn");
    fireEvent.change(screen.getByLabelText("Unit of Ordered speed"), { target: { value: "m/s" } });
    expect(textAt(seen.at(-1) ?? {}, ["speed"])).toBe("4.11556 m/s");
  });

  test("shows the core's sentence beside the field that it is about", () => {
    const broken = setAt(workboat, ["power", "rows", 2, "rate"], "abc");
    const answer = studyCraft(broken, null);
    if (answer.ok) throw new Error("this craft has a fault");
    expect(answer.key).toBe("power.rows[2].rate");
    render(<CraftForm craft={broken} fault={answer} onCraft={() => undefined} />);
    const field = screen.getByLabelText("Rate of row 3");
    expect(field.getAttribute("aria-invalid")).toBe("true");
    const told = document.getElementById(field.getAttribute("aria-describedby") ?? "");
    expect(told?.textContent).toBe(answer.fault);
    expect(answer.fault).toMatch(/^"Rate" of row 3 takes .*found "abc"$/);
  });

  test("has a place for every key that a fault of these craft may stand at", () => {
    const breaks: readonly (readonly [CraftDocument, readonly (string | number)[], unknown])[] = [
      [workboat, ["name"], ""],
      [workboat, ["power", "rows", 0, "speed"], "0"],
      [workboat, ["power", "rows"], []],
      [workboat, ["windage", "efficiency"], "120 %"],
      [workboat, ["speeds", "min"], "12 kn"],
      [workboat, ["store", "density"], "1 kg/L"],
      [workboat, ["store", "capacity"], "3 kn"],
      [workboat, ["hotel"], "2 kg/h"],
      [workboat, ["limits", "gust"], "-1 m/s"],
      [demo("drone"), ["power", "solidity"], undefined],
      [demo("drone"), ["moves"], "water"],
      [demo("ship"), ["power", "reference", "power"], "fast"],
      [demo("ship"), ["store", "specificConsumption"], undefined],
    ];
    for (const [craft, path, value] of breaks) {
      const broken = setAt(craft, path, value);
      const answer = studyCraft(broken, null);
      const told = `${path.join(".")}: ${answer.ok ? "no fault" : `${answer.key}: ${answer.fault}`}`;
      expect(answer.ok, told).toBe(false);
      if (!answer.ok) expect(hasPlace(broken, answer.key), told).toBe(true);
    }
  });

  test("keeps bare numbers as numbers", () => {
    const seen: CraftDocument[] = [];
    render(<CraftForm craft={demo("drone")} fault={null} onCraft={(_, craft) => seen.push(craft)} />);
    const field = screen.getByLabelText("Solidity");
    fireEvent.input(field, { target: { value: "0.08" } });
    fireEvent.blur(field);
    expect(seen.at(-1)).toMatchObject({ power: { solidity: 0.08 } });
  });
});

describe("the craft's curve", () => {
  test("marks the pace and the least use in figures", () => {
    const study = studyCraft(workboat, { hold: "through-speed", speed_m_s: (8 * 1852) / 3600 });
    if (!study.ok) throw new Error(study.fault);
    render(<CraftPlots study={study} units="sea" />);
    // 26 kW of the table's row at 8 kn and 1.2 kW of hotel load; 102 kWh last 3.75 h, 30 NM.
    expect(screen.getByRole("row", { name: /At the pace/ }).textContent).toBe(
      "At the pace8.027.23.4030.0 NM, 3 h 45",
    );
    expect(screen.getByRole("row", { name: /Least for the distance/ })).toBeTruthy();
  });

  test("a pace that the craft cannot keep is said, and the curve stands", () => {
    const study = studyCraft(setAt(demo("ship"), ["speeds"], undefined), { hold: "least-energy" });
    if (!study.ok) throw new Error(study.fault);
    expect(study.curve).not.toBeNull();
    expect(study.paceFault).toMatch(/range of speeds/);
  });
});
