import * as Comlink from "comlink";
import fine from "world-atlas/land-10m.json?url";
import coarse from "world-atlas/land-50m.json?url";
import { createCoastShelf } from "./coast-shelf.ts";
import { createFieldShelf } from "./field-shelf.ts";
import type { CoastTile, EstimateAnswer, Lattice, Worker } from "./protocol.ts";
import { standInEstimate, standInLattice } from "./stand-in.ts";

const coast = createCoastShelf(async (detail) => {
  const answer = await fetch(detail === "10m" ? fine : coarse);
  if (!answer.ok) throw new Error(`the ${detail} coastline could not be loaded (${answer.status})`);
  return answer.json();
});
const fields = createFieldShelf();

const worker: Worker = {
  openField: (ticket, source, field, progress) => fields.open(ticket, source, field, progress),
  cancel: (ticket) => fields.cancel(ticket),
  forgetField: (name) => fields.forget(name),
  preview: (source, field) => fields.preview(source, field),
  async estimate(plan) {
    return handEstimate(standInEstimate(plan));
  },
  async lattice(question) {
    return handLattice(standInLattice(question));
  },
  async coastTile(z, x, y, detail) {
    return handTile(await coast.tile(z, x, y, detail));
  },
  async loadFineCoast() {
    await coast.load("10m");
  },
};

function handTile(tile: CoastTile): CoastTile {
  return Comlink.transfer(tile, [tile.points.buffer, tile.ends.buffer]);
}

function handLattice(lattice: Lattice): Lattice {
  const { lat, lon, east_m_s, north_m_s } = lattice;
  return Comlink.transfer(lattice, [lat.buffer, lon.buffer, east_m_s.buffer, north_m_s.buffer]);
}

function handEstimate(answer: EstimateAnswer): EstimateAnswer {
  return answer;
}

Comlink.expose(worker);
