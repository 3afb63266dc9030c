/** Numbers the slices of an ensemble's file, one a member and time, in the order of first appearance. */
export class MemberSlices {
  private readonly slices: number[][] = [];
  private readonly found: { readonly member: number; readonly time: number }[] = [];

  /** Slice of a member at a time, both by the order of first appearance. */
  indexOf(member: number, time: number): number {
    this.slices[member] ??= [];
    const slices = this.slices[member] as number[];
    const known = slices[time];
    if (known !== undefined) return known;
    slices[time] = this.found.length;
    this.found.push({ member, time });
    return this.found.length - 1;
  }

  /** Slice of a member at a time, `undefined` where no row gave any of it. */
  find(member: number, time: number): number | undefined {
    return this.slices[member]?.[time];
  }

  /** The member and time that a slice is of. */
  of(slice: number): { readonly member: number; readonly time: number } {
    return this.found[slice] as { readonly member: number; readonly time: number };
  }
}
