import { expect, test } from "vitest";
import { runPeer } from "./peer.ts";

test("a peer program that is missing fails with one sentence that names the Debian package", () => {
  expect(() => runPeer("no-such-program", "some-package", [], ["1"])).toThrow(
    "no-such-program is not installed: this check needs the Debian package some-package.",
  );
});

test("a peer program that rejects its options fails with its own message", () => {
  expect(() => runPeer("node", "nodejs", ["--no-such-option"], [""])).toThrow(/node ended with status/);
});
