import type { Finding, RouteEstimate, Severity } from "../estimate/result.ts";
import { TABLE_WIDTH } from "./columns.ts";
import { plainText, wrapped } from "./plain-text.ts";
import type { TableUnits } from "./table-units.ts";

const ORDER: Record<Severity, number> = { stop: 0, caution: 1, note: 2 };
const WORD: Record<Severity, string> = { stop: "STOP    ", caution: "caution ", note: "note    " };

function distanceText(metres: number, units: TableUnits): string {
  const { size, decimals } = units.length;
  return (metres / size).toFixed(Math.max(1, decimals));
}

/** Where a finding stands: its leg, and from where to where along it. */
export function placeText({ leg, at_m, to_m }: Finding, units: TableUnits): string {
  if (leg === null) return "";
  const unit = units.length.symbol;
  if (at_m === null) return `leg ${leg}`;
  const from = distanceText(at_m, units);
  const to = to_m === null ? from : distanceText(to_m, units);
  return from === to ? `leg ${leg} at ${from} ${unit}` : `leg ${leg}, ${from} to ${to} ${unit}`;
}

/** Findings in words, the gravest first, wrapped. */
export function findingLines(route: RouteEstimate, units: TableUnits): string[] {
  if (route.findings.length === 0) return ["Findings: none"];
  const sorted = [...route.findings].sort((a, b) => ORDER[a.severity] - ORDER[b.severity]);
  return [
    "Findings",
    ...sorted.flatMap((finding) => {
      const place = placeText(finding, units);
      const text = `${place === "" ? "" : `${place}: `}${plainText(finding.message)}`;
      return wrapped(text, TABLE_WIDTH, WORD[finding.severity]);
    }),
  ];
}
