import type { Locator, Page } from "playwright-core";

export type DeskPartName = "Legs" | "Departures" | "Pace" | "Turning back" | "How sure";

/** Turns the desk to one of its questions, on a wide screen or on a narrow one; the pane that shows it. */
export async function openPart(page: Page, name: DeskPartName): Promise<Locator> {
  const narrow = page.getByRole("navigation", { name: "Panes" }).getByRole("button", { name: "Decide" });
  if (await narrow.isVisible()) await narrow.click();
  await page.locator(".desk-tabs:visible").getByRole("button", { name, exact: true }).click();
  const pane = page.locator(".decide");
  await pane.waitFor();
  return pane;
}

/** Shows one of a narrow screen's panes; on a wide screen all are there. */
export async function showPane(page: Page, name: "Chart" | "Ribbons" | "Ledger" | "Plan"): Promise<void> {
  const tab = page.getByRole("navigation", { name: "Panes" }).getByRole("button", { name });
  if (await tab.isVisible()) await tab.click();
}

/** A route's figure in the ledger as it is shown. */
export async function figure(
  page: Page,
  route: string,
  label: "Arrival" | "Time" | "Use" | "Left",
): Promise<string> {
  const row = page.locator(".ledger-table tbody").filter({ hasText: route });
  return (await row.locator(`[data-label=${label}]`).textContent()) ?? "";
}

/** A route's findings by severity, as the ledger counts them. */
export async function findings(page: Page, route: string): Promise<string> {
  const row = page.locator(".ledger-table tbody").filter({ hasText: route });
  return (await row.locator("tr").first().locator("td").last().textContent()) ?? "";
}

/** What the ledger says of how sure a route's reserve is; nothing where it says nothing. */
export async function sureness(page: Page, route: string): Promise<string> {
  const row = page.locator(".ledger-table tbody").filter({ hasText: route });
  return (await row.locator(".sure-line").allTextContents()).join(" ");
}
