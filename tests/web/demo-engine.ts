import { Blob as NodeBlob } from "node:buffer";
import { readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { createEstimator, type Estimator } from "../../web/worker/estimator.ts";
import { createFieldShelf, type FieldShelf } from "../../web/worker/field-shelf.ts";
import { createFileShelf, type FileShelf } from "../../web/worker/file-shelf.ts";
import { createLandShelf } from "../../web/worker/land-shelf.ts";
import { createPlanReader, type PlanReader } from "../../web/worker/plan-reader.ts";

/** The worker's parts without a worker, with a demo's files in it. */
export interface DemoEngine {
  readonly plan: PlanDocument;
  readonly files: FileShelf;
  readonly reader: PlanReader;
  readonly estimator: Estimator;
  readonly fields: FieldShelf;
}

export function demoEngine(name: "islands" | "survey" | "ocean" | "islands-decide"): DemoEngine {
  const plan: PlanDocument = JSON.parse(readFileSync(join(demos, `${name}.plan.json`), "utf8"));
  const files = createFileShelf();
  const { craft, fields: references = [] } = plan;
  if ("file" in craft && typeof craft.file === "string") files.keep(craft.file, demoFile(craft.file));
  for (const { file } of references) files.keep(file, demoFile(file));
  const fields = createFieldShelf(files);
  const land = createLandShelf(() => Promise.reject(new Error("no land in this test")));
  const reader = createPlanReader({ files, fields, land: land.finder });
  return { plan, files, fields, reader, estimator: createEstimator(reader) };
}

const demos = join(dirname(fileURLToPath(import.meta.url)), "../../data/demo");

/** Node's own Blob, since a stand-in for a browser may bring one without streams. */
function demoFile(name: string): Blob {
  return new NodeBlob([readFileSync(join(demos, name))]) as unknown as Blob;
}

/** A demo's file in one piece, as the library opens it. */
export async function* bytesOfDemo(name: string): AsyncGenerator<Uint8Array> {
  yield readFileSync(join(demos, name));
}
