import { expect, test } from "vitest";
import { windowWords } from "../../web/window/window-words.ts";

const WINDOW = { from: "2027-05-04T09:00Z", to: "2027-05-04T16:00Z", every: "1 h" };

test("a window is one sentence on paper, with its day in words and every part that it names", () => {
  expect(windowWords(WINDOW, "UTC")).toBe(
    "Departures from Tue 4 May 2027 09:00 UTC to Tue 4 May 2027 16:00 UTC, every 1 h.",
  );
  expect(windowWords({ ...WINDOW, speeds: ["7 kn", "8 kn"], arriveBy: "2027-05-04T18:30Z" }, "UTC")).toMatch(
    /, every 1 h, at 7 kn, 8 kn, to arrive by Tue 4 May 2027 18:30 UTC\.$/,
  );
});
