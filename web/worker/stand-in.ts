import type { Estimate, LegEstimate, Profile, RouteEstimate } from "../core.ts";
import { ADVISORY } from "../core.ts";
import { readPosition } from "../format/read-position.ts";
import type { PlanDocument, RouteDocument } from "../state/plan-document.ts";
import type { EstimateAnswer, Lattice, LatticeQuestion, RouteDrawing } from "./protocol.ts";

/*
 * Stands in for the core until it can be joined: an invented eddy and flat-sphere arithmetic, good enough to draw with.
 * Nothing here may be shown to a user.
 */

const RADIUS = 6371e3;
const RAD = Math.PI / 180;
const SPEED = 6.2;

function flow(lat: number, lon: number, seconds: number, strength: number): readonly [number, number] {
  const turn = (lat * 7 + lon * 3 + seconds / 9000) * 1.1;
  return [strength * Math.sin(turn), strength * Math.cos(turn * 0.8)];
}

export function standInEstimate(plan: PlanDocument): EstimateAnswer {
  try {
    const departure = Date.parse(plan.departure);
    const made = plan.routes.map((route) => standInRoute(route, departure));
    const estimate: Estimate = {
      format: "legwork-estimate/1",
      advisory: ADVISORY,
      plan: { title: plan.title ?? "" },
      fields: (plan.fields ?? []).map(({ role, file }) => ({
        role,
        files: [file],
        validFrom: new Date(departure - 6 * 3600e3).toISOString(),
        validTo: new Date(departure + 42 * 3600e3).toISOString(),
      })),
      routes: made.map(({ route }) => route),
    };
    return { ok: true, estimate, drawings: made.map(({ drawing }) => drawing) };
  } catch (fault) {
    return { ok: false, fault: fault instanceof Error ? fault.message : String(fault) };
  }
}

function standInRoute(
  route: RouteDocument,
  departure: number,
): { route: RouteEstimate; drawing: RouteDrawing } {
  const rows: number[][] = [];
  const waypoints: number[] = [0];
  const legs: LegEstimate[] = [];
  let time = 0;
  let distance = 0;
  let used = 0;
  let lastLon: number | null = null;
  for (let leg = 1; leg < route.waypoints.length; leg += 1) {
    const a = route.waypoints[leg - 1];
    const b = route.waypoints[leg];
    if (a === undefined || b === undefined) continue;
    const from = readPosition(a.lat, a.lon);
    const to = readPosition(b.lat, b.lon);
    const startLon: number = lastLon ?? from.lon;
    const turn: number = ((((to.lon - startLon + 180) % 360) + 360) % 360) - 180;
    const north = (to.lat - from.lat) * RAD * RADIUS;
    const east = turn * RAD * RADIUS * Math.cos(((from.lat + to.lat) / 2) * RAD);
    const length = Math.hypot(north, east);
    const course = (Math.atan2(east, north) / RAD + 360) % 360;
    const steps = 24;
    const t0 = time;
    const used0 = used;
    let gamma = 0;
    let cross = 0;
    let crabbing = 0;
    const speeds: number[] = [];
    for (let step = 0; step <= steps; step += 1) {
      const share = step / steps;
      const lat = from.lat + (to.lat - from.lat) * share;
      const lon = startLon + turn * share;
      const [u, v] = flow(lat, lon, time, 0.9);
      const along = (u * east + v * north) / length;
      const across = (u * north - v * east) / length;
      const ground = along + Math.sqrt(SPEED * SPEED - across * across);
      rows.push([
        leg,
        distance + length * share,
        time,
        lat,
        lon,
        along,
        across,
        ground,
        SPEED,
        23000,
        8.64e8 - used,
      ]);
      if (step === steps) continue;
      speeds.push(ground);
      gamma += (along * length) / steps;
      cross += across / steps;
      crabbing += length / steps / Math.sqrt(SPEED * SPEED - across * across) - length / steps / SPEED;
      time += length / steps / ground;
      used = 23000 * time;
    }
    distance += length;
    lastLon = startLon + turn;
    waypoints.push(rows.length - 1);
    const still = length / SPEED;
    const penalty = time - t0 - still;
    const field = {
      alongTrackIntegral_m2_s: gamma,
      meanAlongTrack_m_s: gamma / length,
      meanCrossTrack_m_s: cross,
      maxSpeed_m_s: 0.9,
      covered: 1,
    };
    legs.push({
      leg,
      from: a.name ?? `${leg}`,
      to: b.name ?? `${leg + 1}`,
      path: b.path ?? route.path ?? "geodesic",
      distance_m: length,
      initialCourse_deg: course,
      finalCourse_deg: course,
      magneticCourse_deg: (course + 4) % 360,
      departure: new Date(departure + t0 * 1000).toISOString(),
      arrival: new Date(departure + time * 1000).toISOString(),
      time_s: time - t0,
      stay_s: 0,
      throughDistance_m: (time - t0) * SPEED,
      throughSpeed_m_s: { mean: SPEED, min: SPEED, max: SPEED },
      groundSpeed_m_s: { mean: length / (time - t0), min: Math.min(...speeds), max: Math.max(...speeds) },
      heading_deg: { mean: (course + 3) % 360, min: course, max: course },
      crab_deg: { mean: 3, min: 0, max: 5 },
      wind: null,
      current: field,
      use: used - used0,
      remaining: 8.64e8 - used,
      still: { time_s: still, use: still * 23000 },
      penalty: {
        time_s: penalty,
        use: penalty * 23000,
        alongTime_s: penalty - crabbing,
        crossTime_s: crabbing,
        firstOrderTime_s: -gamma / SPEED ** 2,
      },
      error: { time_s: 1e-9, use: 1e-4 },
    });
  }
  const sum = (pick: (leg: LegEstimate) => number): number =>
    legs.reduce((total, leg) => total + pick(leg), 0);
  const column = (at: number): Float64Array => Float64Array.from(rows, (row) => row[at] ?? 0);
  const profile: Profile = {
    leg: Int32Array.from(rows, (row) => row[0] ?? 0),
    distance_m: column(1),
    time_s: column(2),
    lat: column(3),
    lon: column(4),
    along_m_s: column(5),
    cross_m_s: column(6),
    groundSpeed_m_s: column(7),
    throughSpeed_m_s: column(8),
    usePerSecond: column(9),
    remaining: column(10),
  };
  const usable = 8.64e8;
  const reserve = usable * 0.2;
  const broken = usable - used < reserve;
  const gammaAll = sum((leg) => leg.current?.alongTrackIntegral_m2_s ?? 0);
  return {
    drawing: {
      lat: profile.lat,
      lon: profile.lon,
      distance_m: profile.distance_m,
      waypoints: Int32Array.from(waypoints),
      profile,
    },
    route: {
      name: route.name,
      status: broken ? "stop" : "caution",
      departure: new Date(departure).toISOString(),
      arrival: new Date(departure + time * 1000).toISOString(),
      storeUnit: "J",
      usable,
      reserve,
      totals: {
        distance_m: distance,
        time_s: time,
        stay_s: 0,
        throughDistance_m: time * SPEED,
        wind: null,
        current: {
          alongTrackIntegral_m2_s: gammaAll,
          meanAlongTrack_m_s: gammaAll / distance,
          meanCrossTrack_m_s: 0,
          maxSpeed_m_s: 0.9,
          covered: 1,
        },
        use: used,
        remaining: usable - used,
        still: { time_s: sum((leg) => leg.still.time_s), use: sum((leg) => leg.still.use) },
        penalty: {
          time_s: sum((leg) => leg.penalty?.time_s ?? 0),
          use: sum((leg) => leg.penalty?.use ?? 0),
          alongTime_s: sum((leg) => leg.penalty?.alongTime_s ?? 0),
          crossTime_s: sum((leg) => leg.penalty?.crossTime_s ?? 0),
          firstOrderTime_s: sum((leg) => leg.penalty?.firstOrderTime_s ?? 0),
        },
        error: { time_s: 1e-9, use: 1e-4 },
      },
      legs,
      findings: [
        ...(broken
          ? [
              {
                code: "reserve-broken" as const,
                severity: "stop" as const,
                leg: legs.length,
                at_m: null,
                to_m: null,
                lat: null,
                lon: null,
                message: "the store falls below the reserve of 48.0 kWh before the last waypoint",
              },
            ]
          : []),
        {
          code: "gap-filled",
          severity: "caution",
          leg: 1,
          at_m: 1200,
          to_m: 3900,
          lat: profile.lat[4] ?? 0,
          lon: profile.lon[4] ?? 0,
          message: "the current has no value over 2.7 km of leg 1; the nearest node was taken",
        },
      ],
    },
  };
}

export function standInLattice(question: LatticeQuestion): Lattice {
  const { south, north, west, east, stepLat, stepLon, instant, role } = question;
  const lat: number[] = [];
  const lon: number[] = [];
  const u: number[] = [];
  const v: number[] = [];
  const strength = role === "wind" ? 14 : 0.9;
  for (let y = Math.ceil(south / stepLat); y * stepLat <= north; y += 1) {
    for (let x = Math.ceil(west / stepLon); x * stepLon <= east; x += 1) {
      const [a, b] = flow(y * stepLat, x * stepLon, instant / 1000, strength);
      lat.push(y * stepLat);
      lon.push(x * stepLon);
      u.push(a);
      v.push(b);
    }
  }
  return {
    lat: Float64Array.from(lat),
    lon: Float64Array.from(lon),
    east_m_s: Float32Array.from(u),
    north_m_s: Float32Array.from(v),
  };
}
