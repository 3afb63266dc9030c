import type { RouteEstimate, Severity } from "../estimate/result.ts";
import { TABLE_WIDTH } from "./columns.ts";
import { plainText, wrapped } from "./plain-text.ts";

const ORDER: Record<Severity, number> = { stop: 0, caution: 1, note: 2 };
const WORD: Record<Severity, string> = { stop: "STOP    ", caution: "caution ", note: "note    " };

/** Findings in words, the gravest first, wrapped; each message names its own place. */
export function findingLines({ findings }: RouteEstimate): string[] {
  if (findings.length === 0) return ["Findings: none"];
  const sorted = [...findings].sort((a, b) => ORDER[a.severity] - ORDER[b.severity]);
  return [
    "Findings",
    ...sorted.flatMap(({ severity, message }) => wrapped(plainText(message), TABLE_WIDTH, WORD[severity])),
  ];
}
