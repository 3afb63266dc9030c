/* The parts that the page uses of packages that ship no types of their own. */

declare module "d3-scale" {
  export interface LinearScale {
    (value: number): number;
    domain(values: readonly [number, number]): LinearScale;
    range(values: readonly [number, number]): LinearScale;
    nice(count?: number): LinearScale;
    ticks(count?: number): number[];
    invert(value: number): number;
  }
  export function scaleLinear(): LinearScale;
}

declare module "d3-shape" {
  interface LineOf<T> {
    (data: readonly T[]): string | null;
    x(accessor: (datum: T, index: number) => number): LineOf<T>;
    y(accessor: (datum: T, index: number) => number): LineOf<T>;
  }
  interface AreaOf<T> {
    (data: readonly T[]): string | null;
    x(accessor: (datum: T, index: number) => number): AreaOf<T>;
    y0(accessor: number): AreaOf<T>;
    y1(accessor: (datum: T, index: number) => number): AreaOf<T>;
  }
  export function line<T>(): LineOf<T>;
  export function area<T>(): AreaOf<T>;
}

declare module "topojson-client" {
  import type { Feature, FeatureCollection } from "geojson";
  export function feature(topology: unknown, object: unknown): FeatureCollection | Feature;
}
