/** Rows that cannot be placed yet: node indices and values, in arrays that double. */
export class WaitingRows {
  private indices = new Int32Array(4 * 256);
  private values = new Float64Array(3 * 256);
  private count = 0;

  get length(): number {
    return this.count;
  }

  add(time: number, level: number, lat: number, lon: number, u: number, v: number, gust: number): void {
    if (4 * this.count === this.indices.length) this.double();
    this.indices.set([time, level, lat, lon], 4 * this.count);
    this.values.set([u, v, gust], 3 * this.count);
    this.count++;
  }

  /** Hands every row over, in the order of arrival, and forgets them; stops where the receiver answers `false`. */
  release(
    receive: (
      time: number,
      level: number,
      lat: number,
      lon: number,
      u: number,
      v: number,
      gust: number,
    ) => boolean,
  ): boolean {
    const { indices, values, count } = this;
    this.count = 0;
    for (let row = 0; row < count; row++) {
      const [time, level, lat, lon] = indices.subarray(4 * row, 4 * row + 4) as unknown as [
        number,
        number,
        number,
        number,
      ];
      const [u, v, gust] = values.subarray(3 * row, 3 * row + 3) as unknown as [number, number, number];
      if (!receive(time, level, lat, lon, u, v, gust)) return false;
    }
    return true;
  }

  private double(): void {
    const { indices, values } = this;
    this.indices = new Int32Array(2 * indices.length);
    this.indices.set(indices);
    this.values = new Float64Array(2 * values.length);
    this.values.set(values);
  }
}
