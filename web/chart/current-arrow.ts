import type { FlowSymbol, Point } from "./wind-barb.ts";

const HEAD = 5;

/**
 * An arrow toward where the water sets, centred on its place, as long as the flow is strong.
 *
 * @param toward_deg direction that the water moves to, degrees clockwise from up
 * @param length of the whole arrow, px; below 2 px it is a dot
 */
export function currentArrow(toward_deg: number, length: number): FlowSymbol {
  if (length < 2) return { strokes: [], fills: [], calm: 1 };
  const angle = (toward_deg * Math.PI) / 180;
  const ahead: Point = [Math.sin(angle), -Math.cos(angle)];
  const aside: Point = [Math.cos(angle), Math.sin(angle)];
  const at = (along: number, across: number): Point => [
    along * ahead[0] + across * aside[0],
    along * ahead[1] + across * aside[1],
  ];
  const tip = length / 2;
  const head = Math.min(HEAD, length * 0.6);
  return {
    strokes: [[at(-tip, 0), at(tip - head * 0.6, 0)]],
    fills: [[at(tip, 0), at(tip - head, head * 0.5), at(tip - head * 0.7, 0), at(tip - head, -head * 0.5)]],
    calm: null,
  };
}
