import type { PageState } from "../state/page-state.ts";

/** What opening takes, by the ends of names. */
export const ACCEPTED = ".json,.csv,.tsv,.txt,.gpx,.geojson,.zip";

/** Takes the files that the user chose or dropped; what does so is loaded with the first of them. */
export async function takeFilesLater(page: PageState, files: readonly File[]): Promise<void> {
  const { takeFiles } = await import("./take-files.ts");
  await takeFiles(page, files);
}
