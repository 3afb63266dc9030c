import { InputError } from "../errors.ts";
import { quoted } from "../found.ts";
import { type Quantity, quantityOf } from "./column-names.ts";
import { likelyUnit, splitHeader, unitSize, unitsText } from "./column-units.ts";
import type { TableHead } from "./csv-table.ts";
import type { FieldRole } from "./field.ts";
import {
  headersText,
  isOfOtherRole,
  missingColumnText,
  missingVectorText,
  unknownNameText,
} from "./missing-columns.ts";

/** Where a quantity stands in a row, and the size of its unit in m/s, m, hPa or degrees. */
export interface Column {
  readonly index: number;
  readonly header: string;
  readonly unit: number;
}

/** The columns of a field file: those that are used, and the headers that are not. */
export interface Columns {
  readonly time: Column | null;
  readonly latitude: Column;
  readonly longitude: Column;
  /** Height or air pressure. */
  readonly level: { readonly column: Column; readonly kind: "height" | "air_pressure" } | null;
  readonly member: Column | null;
  /** Eastward and northward component, or speed and direction. */
  readonly vector: { readonly first: Column; readonly second: Column; readonly form: "components" | "polar" };
  readonly gust: Column | null;
  readonly ignored: readonly string[];
  readonly width: number;
}

/** Our name of a quantity → its header in the file, as a plan or a command gives it. */
export type ColumnMapping = Readonly<Record<string, string>>;

/**
 * Finds the columns of a role by their headers.
 *
 * Errors: a header given twice, two headers for one quantity, an unknown unit, a mapping to no header, a needed column
 * missing, height beside air pressure, components beside speed and direction.
 */
export function findColumns(head: TableHead, role: FieldRole, mapping: ColumnMapping, file: string): Columns {
  return new ColumnFinder(head, role, mapping, file).columns();
}

class ColumnFinder {
  private readonly role: FieldRole;
  private readonly headers: readonly string[];
  private readonly place: { readonly file: string; readonly line: number };
  private readonly mapped = new Set<Quantity>();
  private readonly found: ReadonlyMap<Quantity, Column>;

  constructor(head: TableHead, role: FieldRole, mapping: ColumnMapping, file: string) {
    this.role = role;
    this.headers = head.headers;
    this.place = { file, line: head.headerLine };
    this.refuseRepeatedHeaders();
    this.found = this.match(this.mappedHeaders(mapping));
  }

  columns(): Columns {
    const { found } = this;
    const latitude = this.needed("latitude");
    const longitude = this.needed("longitude");
    const vector = this.vector();
    const kind = found.has("air_pressure") ? "air_pressure" : "height";
    const column = found.get(kind);
    if (kind === "air_pressure" && found.has("height")) {
      throw this.fault("height and air_pressure exclude each other; found both");
    }
    const columns = {
      time: found.get("time") ?? null,
      latitude,
      longitude,
      level: column === undefined ? null : { column, kind: kind as "height" | "air_pressure" },
      member: found.get("member") ?? null,
      vector,
      gust: found.get("gust") ?? null,
    };
    const used = [
      columns.time,
      latitude,
      longitude,
      column,
      columns.member,
      vector.first,
      vector.second,
      columns.gust,
    ];
    const usedIndices = new Set(used.map((one) => one?.index));
    const ignored = this.headers.filter((header, index) => header !== "" && !usedIndices.has(index));
    return { ...columns, ignored, width: this.headers.length };
  }

  private refuseRepeatedHeaders(): void {
    const seen = new Set<string>();
    for (const header of this.headers) {
      const key = header.toLowerCase();
      if (header !== "" && seen.has(key))
        throw this.fault(`each header stands once; found ${quoted(header)} twice`);
      seen.add(key);
    }
  }

  /** Index of a header → the quantity that the mapping gives it. */
  private mappedHeaders(mapping: ColumnMapping): Map<number, Quantity> {
    const result = new Map<number, Quantity>();
    for (const [name, header] of Object.entries(mapping)) {
      const quantity = quantityOf(name, this.role);
      if (quantity === undefined) throw this.faultOf("columns", unknownNameText(name, this.role));
      const index = this.indexOfHeader(header);
      if (index < 0) {
        const found = `found ${headersText(this.headers)}`;
        throw this.faultOf(
          "columns",
          `the column mapping of ${quoted(name)} names a header of the file; ${quoted(header)} is none: ${found}`,
        );
      }
      if (result.has(index))
        throw this.faultOf("columns", `a column holds one quantity; ${quoted(header)} is mapped to two`);
      if (this.mapped.has(quantity))
        throw this.faultOf("columns", `a quantity is mapped once; found ${quoted(name)} mapped again`);
      this.mapped.add(quantity);
      result.set(index, quantity);
    }
    return result;
  }

  private indexOfHeader(header: string): number {
    const wanted = header.trim().toLowerCase();
    const whole = this.headers.findIndex((one) => one.toLowerCase() === wanted);
    if (whole >= 0) return whole;
    return this.headers.findIndex((one) => splitHeader(one).name.toLowerCase() === wanted);
  }

  private match(mappedHeaders: ReadonlyMap<number, Quantity>): Map<Quantity, Column> {
    const found = new Map<Quantity, Column>();
    for (const [index, header] of this.headers.entries()) {
      const { name, unit } = splitHeader(header);
      const own = quantityOf(name, this.role);
      const quantity =
        mappedHeaders.get(index) ?? (own !== undefined && !this.mapped.has(own) ? own : undefined);
      if (quantity === undefined) continue;
      const earlier = found.get(quantity);
      if (earlier !== undefined) {
        const both = `${quoted(earlier.header)} and ${quoted(header)}`;
        throw this.fault(`one column gives the ${quantity}; found ${both} (a column mapping settles which)`);
      }
      const size = unitSize(quantity, unit);
      if (size === undefined) {
        const accepted = unitsText(quantity);
        const rule = accepted === "" ? "takes no unit" : `has a unit of ${accepted}`;
        const likely = likelyUnit(quantity, unit ?? "");
        const hint = likely === undefined ? "" : ` (did you mean ${likely}?)`;
        throw this.fault(`the column ${quoted(header)} ${rule}; found ${quoted(unit ?? "")}${hint}`);
      }
      found.set(quantity, { index, header, unit: size });
    }
    return found;
  }

  private vector(): Columns["vector"] {
    const components = this.pair("eastward", "northward");
    const polar = this.pair("speed", "direction");
    if (components !== null && polar !== null) {
      const componentsMapped = this.isMapped("eastward", "northward");
      if (componentsMapped === this.isMapped("speed", "direction")) {
        const headers = [...components, ...polar].map(({ header }) => quoted(header)).join(", ");
        throw this.fault(
          `the ${this.role} is given as components or as speed and direction, not as both; found ${headers} (a column mapping settles which)`,
        );
      }
      if (!componentsMapped) return { first: polar[0], second: polar[1], form: "polar" };
    }
    if (components !== null) return { first: components[0], second: components[1], form: "components" };
    if (polar !== null) return { first: polar[0], second: polar[1], form: "polar" };
    const sentence = missingVectorText(this.headers, this.role, new Set(this.found.keys()));
    throw isOfOtherRole(this.headers, this.role) ? this.faultOf("role", sentence) : this.fault(sentence);
  }

  private pair(first: Quantity, second: Quantity): readonly [Column, Column] | null {
    const a = this.found.get(first);
    const b = this.found.get(second);
    return a === undefined || b === undefined ? null : [a, b];
  }

  private isMapped(first: Quantity, second: Quantity): boolean {
    return this.mapped.has(first) || this.mapped.has(second);
  }

  private needed(quantity: Quantity): Column {
    const column = this.found.get(quantity);
    if (column !== undefined) return column;
    throw this.fault(missingColumnText(this.headers, this.role, quantity));
  }

  private fault(sentence: string): InputError {
    return new InputError(sentence, this.place);
  }

  /** Told of the key, too, that says what the file is or how it is read: what is wrong is not in the file. */
  private faultOf(key: "columns" | "role", sentence: string): InputError {
    return new InputError(sentence, { ...this.place, key });
  }
}
