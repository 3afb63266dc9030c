import type { RouteEstimate, RouteStatus, Severity } from "../core.ts";

const SHAPES: Record<RouteStatus | "note", string> = { clear: "✓", note: "i", caution: "!", stop: "✕" };

/** How a route stands: a shape and a number for each severity of finding, in words for those who hear it. */
export function StatusMark({ route }: { readonly route: RouteEstimate }) {
  const counts = (["stop", "caution", "note"] as const).flatMap((severity) => {
    const count = route.findings.filter((finding) => finding.severity === severity).length;
    return count === 0 ? [] : [{ severity, count }];
  });
  if (counts.length === 0) {
    return (
      <span class="status clear">
        <SeverityShape severity="clear" /> clear
      </span>
    );
  }
  return (
    <span class="status">
      {counts.map(({ severity, count }) => (
        <span key={severity} class={severity} title={`${count} ${severity}`}>
          <SeverityShape severity={severity} /> {count}
          <span class="unseen"> {severity} </span>
        </span>
      ))}
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
