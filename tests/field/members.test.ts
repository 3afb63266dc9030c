import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { inspectGrid } from "../../src/field/inspect.ts";
import { memberGrid } from "../../src/field/member-grid.ts";
import { messageOf, readText } from "./read-text.ts";

const HEADER = "member,time,lat,lon,u,v,gust";

/** Rows of a member on a grid of 2 times × 2 × 3 nodes, with values of its own. */
function rowsOf(member: number, values: readonly number[]): string[] {
  const rows: string[] = [];
  for (const [t, time] of ["2027-05-04T06:00Z", "2027-05-04T09:00Z"].entries())
    for (const [j, lat] of [50, 51].entries())
      for (const [i, lon] of [-5, -4, -3].entries()) {
        const at = ((t * 2 + j) * 3 + i) * 2;
        const [u, v] = [values[at] as number, values[at + 1] as number];
        // Every fifth node of a member has no vector.
        rows.push(`${member},${time},${lat},${lon},${at % 10 === 8 ? "," : `${u},${v}`},${Math.abs(u) + 1}`);
      }
  return rows;
}

const values = fc.array(fc.integer({ min: -99, max: 99 }), { minLength: 24, maxLength: 24 });

describe("the members of an ensemble's file", () => {
  test("are each what the file with that member alone holds, in any order of the rows", async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.uniqueArray(fc.integer({ min: 0, max: 60 }), { minLength: 1, maxLength: 5 }),
        fc.array(values, { minLength: 5, maxLength: 5 }),
        fc.array(fc.double({ noNaN: true }), { minLength: 60, maxLength: 60 }),
        async (numbers, sets, order) => {
          const parts = numbers.map((member, n) => rowsOf(member, sets[n] as number[]));
          const shuffled = parts
            .flat()
            .map((row, n) => ({ row, by: order[n] as number }))
            .sort((a, b) => a.by - b.by)
            .map(({ row }) => row);
          const whole = await readText([HEADER, ...shuffled].join("\n"));
          expect(whole.members?.map(({ member }) => member)).toEqual([...numbers].sort((a, b) => a - b));
          for (const [n, member] of numbers.entries()) {
            const alone = await readText([HEADER, ...(parts[n] as string[])].join("\n"));
            const { slices, masks, gusts, lon, lat, times } = memberGrid(whole, member);
            expect({ slices, masks, gusts, lon, lat, times }).toEqual({
              slices: alone.slices,
              masks: alone.masks,
              gusts: alone.gusts,
              lon: alone.lon,
              lat: alone.lat,
              times: alone.times,
            });
          }
          const control = memberGrid(whole, Math.min(...numbers));
          expect([whole.slices, whole.masks]).toEqual([control.slices, control.masks]);
        },
      ),
      { numRuns: 40 },
    );
  });

  test("are named by the inspection, whose nodes and ranges are of all of them", async () => {
    const found = inspectGrid(
      await readText("member,lat,lon,u,v\n3,0,0,1,0\n3,0,1,2,0\n8,0,0,-4,0\n8,0,1,,\n"),
    );
    expect([found.members, found.nodes, found.missing, found.eastward]).toEqual([
      [3, 8],
      4,
      1,
      { min: -4, max: 2 },
    ]);
    expect(inspectGrid(await readText("lat,lon,u,v\n0,0,1,0\n")).members).toBeUndefined();
  });

  test("share one mask where the same nodes are missing", async () => {
    const rows = [0, 1].map((member) => `${member},0,0,1,0\n${member},0,1,,\n`).join("");
    const { members } = await readText(`member,lat,lon,u,v\n${rows}`);
    expect(members?.[1]?.masks[0]).toBe(members?.[0]?.masks[0]);
  });

  test.each([
    [
      "a number that is none",
      "member,lat,lon,u,v\nsix,0,0,1,1\n",
      'winds.csv, line 2: a cell of "member" is a number; found "six"',
    ],
    [
      "a number that is not whole",
      "member,lat,lon,u,v\n1.5,0,0,1,1\n",
      'winds.csv, line 2: a cell of "member" is a member\'s whole number, not below 0; found "1.5"',
    ],
    [
      "a number below 0",
      "member,lat,lon,u,v\n-1,0,0,1,1\n",
      'winds.csv, line 2: a cell of "member" is a member\'s whole number, not below 0; found "-1"',
    ],
    [
      "no number",
      "member,lat,lon,u,v\n,0,0,1,1\n",
      'winds.csv, line 2: a cell of "member" is a member\'s whole number, not below 0; found ""',
    ],
    [
      "a node given twice",
      "member,lat,lon,u,v\n1,0,0,1,1\n2,0,0,1,1\n2,0,0,1,2\n",
      "winds.csv, line 4: a node is given once; found latitude 0, longitude 0, member 2 on lines 3 and 4",
    ],
    [
      "a valid time that one member lacks",
      "member,time,lat,lon,u,v\n1,2027-05-04T06:00Z,0,0,1,1\n1,2027-05-04T09:00Z,0,0,1,1\n2,2027-05-04T06:00Z,0,0,1,2\n",
      "winds.csv: every member has every valid time; found none of 2027-05-04T09:00Z for member 2",
    ],
  ])("are refused with %s", async (_, text, message) => {
    expect(await messageOf(text)).toBe(message);
  });
});
