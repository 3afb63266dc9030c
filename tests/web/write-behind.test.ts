import { afterEach, beforeEach, expect, test, vi } from "vitest";
import { writeBehind } from "../../web/keeping/write-behind.ts";

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

test("changes in a row are one write, once they settle", async () => {
  const write = vi.fn(async () => undefined);
  const { later } = writeBehind(write, 300, 2000);
  for (let change = 0; change < 5; change += 1) {
    later();
    await vi.advanceTimersByTimeAsync(100);
  }
  expect(write).not.toHaveBeenCalled();
  await vi.advanceTimersByTimeAsync(300);
  expect(write).toHaveBeenCalledTimes(1);
});

test("changes that do not settle are written all the same, the first no later than it may be", async () => {
  const write = vi.fn(async () => undefined);
  const { later } = writeBehind(write, 300, 2000);
  for (let change = 0; change < 50; change += 1) {
    later();
    await vi.advanceTimersByTimeAsync(100);
  }
  // 50 changes over 5 s.
  expect(write).toHaveBeenCalledTimes(2);
});

test("one write ends before the next begins, and what is asked for at once waits for its own", async () => {
  const ends: (() => void)[] = [];
  const write = vi.fn(() => new Promise<void>((resolve) => ends.push(resolve)));
  const { now } = writeBehind(write, 300, 2000);
  void now();
  let done = false;
  const second = now().then(() => {
    done = true;
  });
  await vi.advanceTimersByTimeAsync(0);
  expect(write).toHaveBeenCalledTimes(1);
  ends[0]?.();
  await vi.advanceTimersByTimeAsync(0);
  expect(write).toHaveBeenCalledTimes(2);
  expect(done).toBe(false);
  ends[1]?.();
  await second;
  expect(done).toBe(true);
});

test("a write at once takes the place of the one that waits", async () => {
  const write = vi.fn(async () => undefined);
  const { later, now } = writeBehind(write, 300, 2000);
  later();
  await now();
  await vi.advanceTimersByTimeAsync(1000);
  expect(write).toHaveBeenCalledTimes(1);
});
