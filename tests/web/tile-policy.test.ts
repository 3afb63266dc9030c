// @vitest-environment happy-dom
import { describe, expect, test } from "vitest";
import { isTileAddress, letsIn, narrowImages, tileOrigin } from "../../web/shell/tile-policy.ts";

describe("the user's own tiles", () => {
  test.each([
    ["https://tiles.example/{z}/{x}/{y}.png", true],
    ["http://127.0.0.1:8080/{z}/{y}/{x}", true],
    ["https://{s}.tiles.example/{z}/{x}/{y}.png", true],
    ["https://tiles.example/{z}/{x}.png", false],
    ["tiles.example/{z}/{x}/{y}.png", false],
    ["javascript:alert(1)//{z}{x}{y}", false],
    ["data:image/png,{z}{x}{y}", false],
    ["", false],
  ])("%s is an address of tiles: %s", (address, is) => {
    expect(isTileAddress(address)).toBe(is);
  });

  test("are let in from the origin that the page began with, and from no other", () => {
    narrowImages("https://tiles.example/{z}/{x}/{y}.png");
    const policy = document.head.querySelector("meta[http-equiv]")?.getAttribute("content");
    expect(policy).toBe("img-src 'self' data: blob: https://tiles.example");
    expect(letsIn("https://tiles.example/other/{z}/{x}/{y}.png")).toBe(true);
    expect(letsIn("https://elsewhere.example/{z}/{x}/{y}.png")).toBe(false);
    narrowImages("");
    expect(letsIn("https://tiles.example/{z}/{x}/{y}.png")).toBe(false);
    expect(tileOrigin("no address")).toBeNull();
  });
});
