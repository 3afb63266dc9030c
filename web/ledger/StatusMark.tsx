import type { RouteEstimate, RouteStatus, Severity } from "../core.ts";

const SHAPES: Record<RouteStatus | "note", string> = { clear: "✓", note: "i", caution: "!", stop: "✕" };

/** How a route stands, in a word, a shape and a colour, with how many findings of each severity. */
export function StatusMark({ route }: { readonly route: RouteEstimate }) {
  const count = (severity: Severity): number =>
    route.findings.filter((finding) => finding.severity === severity).length;
  const parts = (["stop", "caution", "note"] as const).flatMap((severity) =>
    count(severity) === 0 ? [] : [`${count(severity)} ${severity}`],
  );
  return (
    <span class={`status ${route.status}`}>
      <SeverityShape severity={route.status} /> {parts.length === 0 ? "clear" : parts.join(", ")}
    </span>
  );
}

export function SeverityShape({ severity }: { readonly severity: RouteStatus | Severity }) {
  return (
    <span class={`shape ${severity}`} aria-hidden="true">
      {SHAPES[severity]}
    </span>
  );
}
