import fine from "world-atlas/land-10m.json?url";
import coarse from "world-atlas/land-50m.json?url";
import { createCoastShelf } from "./coast-shelf.ts";
import type { LandTopology } from "./core.ts";
import type { Deciding } from "./deciding.ts";
import { createEstimator } from "./estimator.ts";
import { levelOfRoutes, levelsOf } from "./field-levels.ts";
import { createFieldShelf } from "./field-shelf.ts";
import { createFileShelf } from "./file-shelf.ts";
import { createLandShelf } from "./land-shelf.ts";
import { answerLattice } from "./lattice.ts";
import { createPlanReader } from "./plan-reader.ts";
import type { CoastDetail, CoastTile, EstimateAnswer, Lattice, Worker } from "./protocol.ts";
import { handOver, serve } from "./remote.ts";
import { shelvesOf, sourcesBehind } from "./shared-shelves.ts";

async function fetchCoast(detail: CoastDetail): Promise<LandTopology> {
  const answer = await fetch(detail === "10m" ? fine : coarse);
  if (!answer.ok) throw new Error(`the ${detail} coastline could not be loaded (${answer.status})`);
  return answer.json();
}

const coast = createCoastShelf(fetchCoast);
const land = createLandShelf(() => fetchCoast("10m"));
const files = createFileShelf();
const fields = createFieldShelf(files);

/** Where what is asked of this worker rests: on its own shelves, until it is told to follow another worker's. */
let reader = createPlanReader({ files, fields, land: land.finder });
const estimator = createEstimator(reader);

// What decides is loaded when it is first asked for.
let deciding: Promise<Deciding> | null = null;
const decided = (): Promise<Deciding> => {
  deciding ??= import("./deciding.ts").then(({ createDeciding }) => createDeciding(reader));
  return deciding;
};

const worker: Worker = {
  keepFile(name, content) {
    files.keep(name, content);
    fields.forget(name);
  },
  forgetFile(name) {
    files.forget(name);
    fields.forget(name);
  },
  openField: (ticket, field, progress) => fields.open(ticket, field, progress),
  cancel: (ticket) => fields.cancel(ticket),
  async preview(content, field) {
    const { previewField } = await import("./field-preview.ts");
    return previewField(content, field);
  },
  estimate: async (plan) => handEstimate(await estimator.estimate(plan)),
  async report(question) {
    const input = await estimator.answered();
    if (input === null) return null;
    const { writeReport } = await import("./write-report.ts");
    return writeReport(input, question);
  },
  studyCraft: async (craft) => (await import("./craft-study.ts")).studyCraft(craft, estimator.pace()),
  readRoutes: async (name, content) => (await import("./exchange.ts")).readRoutes(name, content),
  openArchive: async (name, content) => (await import("./exchange.ts")).openArchive(name, content),
  packArchive: async (plan, stem) => (await import("./exchange.ts")).packArchive(plan, stem, files.blob),
  planText: async (plan) => (await import("./document-text.ts")).planText(plan),
  craftText: async (craft) => (await import("./document-text.ts")).craftText(craft),
  lattice: async (question) => handLattice(answerLattice(fields.current(), question)),
  fieldsAt: async (question) => (await import("./field-at.ts")).fieldsAt(fields.current(), question),
  levels() {
    const heights = levelsOf(fields.current());
    return { heights, ofRoutes: levelOfRoutes(heights, estimator.prepared()) };
  },
  coastTile: async (z, x, y, detail) => handTile(await coast.tile(z, x, y, detail)),
  async loadFineCoast() {
    await coast.load("10m");
  },
  loadLand: () => land.load(),
  share(port) {
    serve(shelvesOf(files, fields, land), port);
  },
  follow(port) {
    reader = createPlanReader(sourcesBehind(port));
    deciding = null;
  },
  async loadDeciding() {
    await decided();
  },
  decide: async (plan, turnBack) => (await decided()).decide(plan, turnBack),
  beginWindow: async (ticket, plan, first) => (await decided()).beginWindow(ticket, plan, first),
  windowSlice: async (ticket, indices, budget) => (await decided()).windowSlice(ticket, indices, budget),
  windowBests: async (ticket, cells, refine) => (await decided()).windowBests(ticket, cells, refine),
  windowSure: async (ticket, question, budget) => (await decided()).windowSure(ticket, question, budget),
  paceCurve: async (plan, route) => (await decided()).paceCurve(plan, route),
};

/* The arrays that an answer was made for are handed over; those that are kept here are copied. */

function handTile(tile: CoastTile): CoastTile {
  return handOver(tile, [tile.points.buffer, tile.ends.buffer]);
}

function handLattice(lattice: Lattice): Lattice {
  const { lat, lon, east_m_s, north_m_s, state } = lattice;
  return handOver(lattice, [lat.buffer, lon.buffer, east_m_s.buffer, north_m_s.buffer, state.buffer]);
}

function handEstimate(answer: EstimateAnswer): EstimateAnswer {
  if (!answer.ok) return answer;
  const buffers = answer.drawings.flatMap(({ profile }) =>
    profile === null ? [] : Object.values(profile).map((column: Float64Array | Int32Array) => column.buffer),
  );
  return handOver(answer, [...new Set(buffers)]);
}

serve(worker, self);
