import { afterEach, expect, test } from "vitest";
import { handOver, type Remote, reach, serve } from "../../web/worker/remote.ts";

interface Served {
  double(x: number): number;
  fail(kind: "error" | "word"): Promise<never>;
  count(to: number, progress: (at: number) => void): Promise<string>;
  column(): Float64Array;
  lengthOf(buffer: ArrayBuffer): number;
  unsendable(): unknown;
}

const kept = new Float64Array([1, 2, 3]);

class InputFault extends Error {
  override readonly name = "InputFault";
}

const served: Served = {
  double: (x) => 2 * x,
  fail: (kind) => Promise.reject(kind === "error" ? new InputFault("no such file") : "stopped"),
  async count(to, progress) {
    for (let at = 1; at <= to; at++) progress(at);
    await new Promise((resolve) => setTimeout(resolve, 20));
    return "counted";
  },
  column: () => handOver(kept, [kept.buffer]),
  lengthOf: ({ byteLength }) => byteLength,
  unsendable: () => () => 1,
};

const ports: MessagePort[] = [];
afterEach(() => {
  for (const port of ports.splice(0)) port.close();
});

function reached(): Remote<Served> {
  const { port1, port2 } = new MessageChannel();
  ports.push(port1, port2);
  serve(served, port2);
  return reach<Served>(port1);
}

test("calls are answered each with their own answer", async () => {
  const far = reached();
  expect(await Promise.all([far.double(1), far.double(2), far.double(3)])).toEqual([2, 4, 6]);
});

test("an error comes back as an error of the same name and words, anything else thrown as it is", async () => {
  const far = reached();
  const fault = await far.fail("error").catch((error: unknown) => error);
  expect(fault).toBeInstanceOf(Error);
  expect(fault).toMatchObject({ name: "InputFault", message: "no such file" });
  await expect(far.fail("word")).rejects.toBe("stopped");
});

test("a function that is given is called in order while the call is answered", async () => {
  const words: number[] = [];
  expect(await reached().count(3, (at) => words.push(at))).toBe("counted");
  expect(words).toEqual([1, 2, 3]);
});

test("what is handed over is gone on the side that gave it", async () => {
  const far = reached();
  expect(await far.column()).toEqual(new Float64Array([1, 2, 3]));
  expect(kept.length).toBe(0);
  const buffer = new ArrayBuffer(8);
  expect(await far.lengthOf(handOver(buffer, [buffer]))).toBe(8);
  expect(buffer.byteLength).toBe(0);
});

test("an answer that can't be sent, and a name that nothing is served under, are errors at the caller", async () => {
  const far = reached();
  await expect(far.unsendable()).rejects.toThrow(/clone/);
  const unknown = far as unknown as { missing(): Promise<unknown> };
  await expect(unknown.missing()).rejects.toThrow("nothing named missing is served");
});

test("what reaches afar can be awaited itself", async () => {
  const far = reached();
  expect(await far).toBe(far);
});
