import { describe, expect, test } from "vitest";
import { createAnswers } from "../../web/state/answers.ts";
import { latestWins, SUPERSEDED } from "../../web/state/latest-wins.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import type { EstimateAnswer } from "../../web/worker/protocol.ts";

/** A worker whose answers are given by hand. */
function byHand<Question, Reply>() {
  const asked: { question: Question; answer: (reply: Reply) => void; fail: (reason: Error) => void }[] = [];
  const run = (question: Question) =>
    new Promise<Reply>((answer, fail) => {
      asked.push({ question, answer, fail });
    });
  return { asked, run };
}

describe("asking with the latest winning", () => {
  test("runs the first at once and of the rest only the last", async () => {
    const { asked, run } = byHand<number, string>();
    const ask = latestWins(run);
    const replies = [ask(1), ask(2), ask(3), ask(4)];
    expect(asked.map(({ question }) => question)).toEqual([1]);
    asked[0]?.answer("one");
    expect(await replies[0]).toBe("one");
    expect(await replies[1]).toBe(SUPERSEDED);
    expect(await replies[2]).toBe(SUPERSEDED);
    expect(asked.map(({ question }) => question)).toEqual([1, 4]);
    asked[1]?.answer("four");
    expect(await replies[3]).toBe("four");
  });

  test("goes on after a failure", async () => {
    const { asked, run } = byHand<number, string>();
    const ask = latestWins(run);
    const [first, second] = [ask(1), ask(2)];
    asked[0]?.fail(new Error("defect"));
    await expect(first).rejects.toThrow("defect");
    asked[1]?.answer("two");
    expect(await second).toBe("two");
  });
});

describe("the answers to a plan", () => {
  const plan = (routes: PlanDocument["routes"]): PlanDocument => ({
    format: "legwork-plan/1",
    departure: "2027-05-04T06:00:00Z",
    craft: {},
    routes,
  });
  const two = { lat: 0, lon: 0 };
  const good = (names: string[]): EstimateAnswer =>
    ({
      ok: true,
      estimate: { routes: names.map((name) => ({ name })) },
      drawings: names.map((name) => ({ name })),
      landPending: false,
      ensemble: false,
    }) as unknown as EstimateAnswer;

  test("leave out routes still being drawn, and keep every route's own place", async () => {
    const { asked, run } = byHand<PlanDocument, EstimateAnswer>();
    const answers = createAnswers(run);
    const done = answers.ask(
      plan([
        { name: "begun", waypoints: [two] },
        { name: "whole", waypoints: [two, { lat: 1, lon: 1 }] },
      ]),
    );
    expect(asked[0]?.question.routes.map(({ name }) => name)).toEqual(["whole"]);
    asked[0]?.answer(good(["whole"]));
    await done;
    const { routes, drawings } = answers.answer.value;
    expect(routes.map((route) => route?.name ?? null)).toEqual([null, "whole"]);
    expect(drawings.map((drawing) => drawing === null)).toEqual([true, false]);
  });

  test("keep the last figures beside the sentence of a fault", async () => {
    const { asked, run } = byHand<PlanDocument, EstimateAnswer>();
    const answers = createAnswers(run);
    const whole = plan([{ name: "whole", waypoints: [two, { lat: 1, lon: 1 }] }]);
    const first = answers.ask(whole);
    asked[0]?.answer(good(["whole"]));
    await first;
    const second = answers.ask({ ...whole, reserve: "20" });
    asked[1]?.answer({ ok: false, fault: "reserve: takes a share", key: "reserve" });
    await second;
    expect(answers.answer.value.fault).toBe("reserve: takes a share");
    expect(answers.answer.value.routes[0]?.name).toBe("whole");
    expect(answers.working.value).toBe(false);
  });

  test("are empty without a route to estimate, and ask nothing", async () => {
    const { asked, run } = byHand<PlanDocument, EstimateAnswer>();
    const answers = createAnswers(run);
    await answers.ask(plan([]));
    expect(asked).toEqual([]);
    expect(answers.answer.value.estimate).toBeNull();
  });
});
