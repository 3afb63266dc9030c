import { InputError } from "../errors.ts";
import { quoted } from "../found.ts";
import { sinCosDegrees } from "../geodesy/angle.ts";
import { AxisLearner } from "./axis-learner.ts";
import type { Column, Columns } from "./columns.ts";
import type { RowBatch, Separator } from "./csv-table.ts";
import type { FieldRole } from "./field.ts";
import type { FoundAxes } from "./grid-layout.ts";
import { MemberSlices } from "./member-slices.ts";
import { CellFault, numberCell } from "./number-cell.ts";
import { pressureAltitude, STANDARD_PRESSURE_RANGE } from "./standard-atmosphere.ts";
import { timeCell } from "./time-cell.ts";

/** Fastest wind or current taken, m/s: three times the strongest gust on record, and below the usual fill values. */
const SPEED_LIMIT = 500;
/** Turns of longitude taken, degrees either way. */
const LONGITUDE_LIMIT = 1080;
/** Heights taken, m. */
const HEIGHT_LIMIT = 100_000;

/** Takes a node's vector by its indices in the order of first appearance (`time`: of time and member); answers `false` where the row is to be told. */
export interface NodeSink {
  put(time: number, level: number, lat: number, lon: number, u: number, v: number, gust: number): boolean;
}

/** Turns rows of cells into nodes: axes, units and directions. */
export class RowReader {
  private readonly columns: Columns;
  private readonly role: FieldRole;
  private readonly file: string;
  private readonly decimalComma: boolean;
  private readonly time: AxisLearner | null;
  private readonly level: AxisLearner | null;
  private readonly lat: AxisLearner;
  private readonly lon: AxisLearner;
  private readonly member: AxisLearner | null;
  private readonly slices = new MemberSlices();

  constructor(columns: Columns, separator: Separator, role: FieldRole, file: string) {
    this.columns = columns;
    this.role = role;
    this.file = file;
    this.decimalComma = separator === ";";
    const { time, level, member } = columns;
    this.time = time === null ? null : new AxisLearner((cell) => inColumn(time, () => timeCell(cell)));
    this.member =
      member === null ? null : this.axisLearner(member, isMember, "is a member's whole number, not below 0");
    this.level = level === null ? null : this.levelLearner(level.column, level.kind);
    this.lat = this.axisLearner(columns.latitude, (lat) => Math.abs(lat) <= 90, "is a latitude in -90..90");
    const turns = `is a longitude in -${LONGITUDE_LIMIT}..${LONGITUDE_LIMIT}`;
    this.lon = this.axisLearner(columns.longitude, (lon) => Math.abs(lon) <= LONGITUDE_LIMIT, turns);
  }

  /** The axes so far. */
  get axes(): FoundAxes {
    const isPressure = this.columns.level?.kind === "air_pressure";
    const levels = this.level?.values ?? null;
    return {
      lon: this.lon.values,
      lat: this.lat.values,
      height: levels !== null && isPressure ? levels.map((hPa) => pressureAltitude(100 * hPa)) : levels,
      times: this.time?.values ?? null,
      members: this.member === null ? null : { numbers: this.member.values, slices: this.slices },
    };
  }

  /** Hands the rows of a batch on, from one row on; returns the first row to which the sink answers `false`, or -1. */
  read(batch: RowBatch, start: number, sink: NodeSink): number {
    const { rows } = batch;
    let index = start;
    try {
      for (; index < rows.length; index++) {
        if (!this.readRow(rows[index] as readonly string[], sink)) return index;
      }
    } catch (fault) {
      if (!(fault instanceof CellFault)) throw fault;
      throw new InputError(fault.message, { file: this.file, line: batch.lineOf(index) });
    }
    return -1;
  }

  private readRow(row: readonly string[], sink: NodeSink): boolean {
    const { columns } = this;
    if (row.length !== columns.width) return skipBlank(row, columns.width);
    let time = this.time === null ? 0 : this.time.indexOf(row[(columns.time as Column).index] as string);
    if (this.member !== null)
      time = this.slices.indexOf(this.member.indexOf(row[(columns.member as Column).index] as string), time);
    const level =
      this.level === null ? 0 : this.level.indexOf(row[columns.level?.column.index as number] as string);
    const lat = this.lat.indexOf(row[columns.latitude.index] as string);
    const lon = this.lon.indexOf(row[columns.longitude.index] as string);
    const { first, second, form } = columns.vector;
    let u = this.number(row, first);
    let v = this.number(row, second);
    if (form === "polar") {
      const { sin, cos } = sinCosDegrees(this.direction(v, second));
      const toward = this.role === "wind" ? -notNegative(u, first) : notNegative(u, first);
      u = toward * sin + 0; // + 0 turns -0 into 0
      v = toward * cos + 0;
    }
    const gust = columns.gust === null ? 0 : this.gust(row, columns.gust);
    if (!(Math.abs(u) <= SPEED_LIMIT && Math.abs(v) <= SPEED_LIMIT)) {
      this.checkSpeed(u, first);
      this.checkSpeed(v, second);
      // One component without the other is no vector.
      return sink.put(time, level, lat, lon, Number.NaN, Number.NaN, gust);
    }
    return sink.put(time, level, lat, lon, u, v, gust);
  }

  private number(row: readonly string[], column: Column): number {
    try {
      return numberCell(row[column.index] as string, this.decimalComma) * column.unit;
    } catch (fault) {
      throw named(fault, column);
    }
  }

  private direction(angle: number, column: Column): number {
    if (Math.abs(angle) > 360)
      throw new CellFault(`${cellOf(column)} is a direction in -360..360; found ${angle}`);
    return angle;
  }

  private gust(row: readonly string[], column: Column): number {
    const gust = notNegative(this.number(row, column), column);
    this.checkSpeed(gust, column);
    return gust;
  }

  private checkSpeed(speed: number, column: Column): void {
    if (Math.abs(speed) <= SPEED_LIMIT || Number.isNaN(speed)) return;
    const rule = `is at most ${SPEED_LIMIT} m/s, and a missing value is an empty cell or NaN`;
    throw new CellFault(`${cellOf(column)} ${rule}; found ${speed} m/s`);
  }

  private levelLearner(column: Column, kind: "height" | "air_pressure"): AxisLearner {
    if (kind === "height") {
      const rule = `is a height within ${HEIGHT_LIMIT} m`;
      return this.axisLearner(column, (height) => Math.abs(height) <= HEIGHT_LIMIT, rule);
    }
    const [least, most] = STANDARD_PRESSURE_RANGE.map((pascal) => pascal / 100) as [number, number];
    const rule = `is a pressure in ${least.toPrecision(4)}..${most.toPrecision(6)} hPa`;
    return this.axisLearner(column, (hPa) => hPa >= least && hPa <= most, rule);
  }

  private axisLearner(column: Column, isWithin: (value: number) => boolean, rule: string): AxisLearner {
    return new AxisLearner((cell) =>
      inColumn(column, () => {
        const value = numberCell(cell, this.decimalComma) * column.unit;
        if (!isWithin(value)) throw new CellFault(`${rule}; found ${quoted(cell.trim())}`);
        return value;
      }),
    );
  }
}

function isMember(value: number): boolean {
  return Number.isSafeInteger(value) && value >= 0;
}

function skipBlank(row: readonly string[], width: number): true {
  if (row.length === 1 && row[0]?.trim() === "") return true;
  throw new CellFault(`a row has as many cells as the header, ${width}; found ${row.length}`);
}

function notNegative(speed: number, column: Column): number {
  if (speed < 0) throw new CellFault(`${cellOf(column)} is a speed, not below 0; found ${speed} m/s`);
  return speed;
}

function inColumn(column: Column, parse: () => number): number {
  try {
    return parse();
  } catch (fault) {
    throw named(fault, column);
  }
}

function named(fault: unknown, column: Column): unknown {
  return fault instanceof CellFault ? new CellFault(`${cellOf(column)} ${fault.message}`) : fault;
}

function cellOf(column: Column): string {
  return `a cell of ${quoted(column.header)}`;
}
