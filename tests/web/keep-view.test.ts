import { describe, expect, test } from "vitest";
import { keepView, restoreView } from "../../web/keeping/keep-view.ts";
import { createPageView } from "../../web/state/page-view.ts";

function memory(held: string | null = null) {
  let text = held;
  return {
    getItem: () => text,
    setItem: (_key: string, value: string) => {
      text = value;
    },
    text: () => text,
  };
}

describe("how things are shown", () => {
  test("comes back at the next visit", () => {
    const storage = memory();
    const first = createPageView();
    const stop = keepView(first, storage);
    first.units.value = "metric";
    first.zone.value = "Pacific/Auckland";
    first.theme.value = "dark";
    first.hintSeen.value = true;
    first.tiles.value = "https://tiles.example/{z}/{x}/{y}.png";
    first.hiddenColumns.value = ["crab"];
    first.legUnits.value = { speed: "km/h", amount: "Wh" };
    stop();
    const second = createPageView();
    restoreView(second, storage);
    expect(second.units.value).toBe("metric");
    expect(second.zone.value).toBe("Pacific/Auckland");
    expect(second.theme.value).toBe("dark");
    expect(second.hintSeen.value).toBe(true);
    expect(second.tiles.value).toBe(first.tiles.value);
    expect(second.hiddenColumns.value).toEqual(["crab"]);
    expect(second.legUnits.value).toEqual({ speed: "km/h", amount: "Wh" });
  });

  test.each([
    ["nothing", null],
    ["no JSON", "{units"],
    ["a list", "[1]"],
    ["null", "null"],
    [
      "values of other kinds",
      '{"units":"imperial","zone":"Middle/Nowhere","theme":3,"tiles":[],"hiddenColumns":"x"}',
    ],
    ["units of nothing", '{"legUnits":{"speed":"furlong","amount":null}}'],
  ])("is the page's own where the device holds %s", (_, held) => {
    const view = createPageView();
    const own = createPageView();
    restoreView(view, memory(held));
    for (const key of ["units", "zone", "theme", "tiles", "hiddenColumns", "legUnits", "hintSeen"] as const) {
      expect(view[key].value, key).toEqual(own[key].value);
    }
  });

  test("does without where the storage is denied or full", () => {
    const view = createPageView();
    restoreView(view, null);
    const stop = keepView(view, {
      setItem() {
        throw new Error("full");
      },
    });
    view.units.value = "air";
    stop();
    expect(view.units.value).toBe("air");
  });
});
