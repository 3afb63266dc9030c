import {
  fieldSummary,
  InputError,
  parseQuantity,
  parseTime,
  type Units,
  unitsFor,
  windowPlan,
  writeWindowCsv,
  writeWindowJson,
  writeWindowTable,
} from "./core.ts";
import { loadLand } from "./load-land.ts";
import { tellOfOption } from "./option-fault.ts";
import { writeResult } from "./output.ts";
import { openPlan } from "./plan-files.ts";
import { noteUnits } from "./units-note.ts";

export interface WindowOptions {
  readonly from?: string;
  readonly to?: string;
  readonly every?: string;
  /** Separated by commas. */
  readonly speeds?: string;
  readonly route?: readonly string[];
  readonly arriveBy?: string;
  readonly refine?: boolean;
  readonly format: "table" | "csv" | "json";
  readonly units?: Units;
  readonly out?: string;
}

/** Compares the departures of a plan's window and writes them; 1 where none can be done, or holds in all that the plan names. */
export async function windowCommand(file: string, options: WindowOptions): Promise<number> {
  const { from, to, every, speeds, route, refine = false, arriveBy, format, units, out } = options;
  checkWindowOptions(options);
  noteUnits(units, format);
  const inputs = new Set([file]);
  const source = await openPlan(file, inputs);
  const answer = await windowPlan(source.text, {
    file,
    open: source.open,
    loadLand,
    refine,
    ...(from === undefined ? {} : { from }),
    ...(to === undefined ? {} : { to }),
    ...(every === undefined ? {} : { every }),
    ...(speeds === undefined ? {} : { speeds: speeds.split(",") }),
    ...(arriveBy === undefined ? {} : { arriveBy }),
    ...(route === undefined ? {} : { routes: route }),
  }).catch(tellOfOption);
  const { plan, input, window, cells, summary, refined, inTime, paces, sure } = answer;
  const { title, craft, pace, arrive = null } = plan;
  const fields = input.fields.map(fieldSummary);
  const report = { title, fields, craft, pace, arrive, window, cells, summary, refined, inTime, paces, sure };
  const text = {
    table: () => writeWindowTable(report, units ?? unitsFor(craft)),
    csv: () => writeWindowCsv(report),
    json: () => writeWindowJson(report),
  }[format]();
  await writeResult(text, out, inputs);
  const { time } = sure === null ? summary.best : (sure.refined ?? sure).best.sure;
  return time === null ? 1 : 0;
}

/**
 * Reads the options that are parts of a window, so that a fault in one names it as it was typed.
 *
 * @throws InputError for a time or quantity that is none
 */
function checkWindowOptions({ from, to, every, speeds, arriveBy }: WindowOptions): void {
  if (from !== undefined) parseTime(from, "--from");
  if (to !== undefined) parseTime(to, "--to");
  if (every !== undefined) parseQuantity(every, "time", "--every");
  if (speeds !== undefined) checkSpeeds(speeds.split(","));
  if (arriveBy !== undefined) parseTime(arriveBy, "--arrive-by");
}

function checkSpeeds(texts: readonly string[]): void {
  const found: number[] = [];
  for (const text of texts) {
    const speed = parseQuantity(text, "speed", "--speeds");
    if (!(speed > 0)) throw new InputError(`--speeds is above 0; found "${text}"`);
    if (found.includes(speed))
      throw new InputError(`--speeds takes speeds that differ; found "${text}" twice`);
    found.push(speed);
  }
}
