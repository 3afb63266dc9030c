import { Command, Option } from "commander";
import { version } from "../../package.json";
import { ADVISORY } from "./advisory.ts";
import type { EstimateOptions } from "./estimate-command.ts";
import type { InspectOptions } from "./inspect-command.ts";
import { nameOf, refuseSlips, usageLine } from "./usage.ts";
import type { WindowOptions } from "./window-command.ts";

const HELP_WIDTH = 80;

const collect = (value: string, before: readonly string[] = []): readonly string[] => [...before, value];

function wrap(text: string): string {
  const lines = [""];
  for (const word of text.split(" ")) {
    const line = lines.at(-1) ?? "";
    if (line.length + word.length + 1 > HELP_WIDTH) lines.push(word);
    else lines[lines.length - 1] = line === "" ? word : `${line} ${word}`;
  }
  return lines.join("\n");
}

function ending(examples: readonly string[]): string {
  return ["", "Examples:", ...examples.map((example) => `  ${example}`), "", wrap(ADVISORY)].join("\n");
}

type Settle = (status: number) => void;

function addEstimate(program: Command, settle: Settle): void {
  program
    .command("estimate")
    .summary("the leg table of every route")
    .description(
      "Prints the leg table of every route of a plan. Exit status: 0 every route is clear or has cautions only, " +
        "1 some route ends in a stop, 2 bad input.",
    )
    .argument("<plan>", "plan file (*.plan.json); files that it names are beside it", nameOf("a file"))
    .option("--route <name>", "only this route (repeatable)", collect)
    .option("--departure <time>", "in place of the plan's: ISO 8601 with its zone")
    .addOption(
      new Option("--format <format>", "what to write")
        .choices(["table", "csv", "json", "geojson", "gpx"])
        .default("table"),
    )
    .addOption(
      new Option("--units <units>", "of the table (default: by the craft)").choices(["sea", "air", "metric"]),
    )
    .option("--turn-back", "add points of no return and equal-time points, as a plan with alternates does")
    .option("--out <file>", "write there, not to standard output")
    .addHelpText(
      "after",
      ending([
        "legwork estimate demo/islands.plan.json",
        "legwork estimate demo/survey.plan.json --units metric",
        "legwork estimate demo/ocean.plan.json --format gpx --out ocean.gpx",
      ]),
    )
    .action(async (plan: string, options: EstimateOptions) => {
      const { estimateCommand } = await import("./estimate-command.ts");
      settle(await estimateCommand(plan, options));
    });
}

function addWindow(program: Command, settle: Settle): void {
  program
    .command("window")
    .summary("departures and speeds compared, route by route")
    .description(
      "Estimates every route of a plan at every departure of a window, and at every speed named: arrival, what is left, the " +
        "best by time, by use and the latest departure that can be done, and why others cannot. Where the plan names members, " +
        "what-ifs or a confidence, the bests are those that hold in all of them. Exit status: 0 some departure can be done and " +
        "holds, 1 none, 2 bad input.",
    )
    .argument("<plan>", "plan file (*.plan.json); options take the place of its key window", nameOf("a file"))
    .option("--from <time>", "first departure: ISO 8601 with its zone")
    .option("--to <time>", "last departure, where the steps meet it")
    .option("--every <step>", "from one departure to the next, as 30min")
    .option("--speeds <speeds>", "in place of the pace's speed, as 8kn,10kn; a leg's own speed stays")
    .option("--route <name>", "only this route (repeatable)", collect)
    .option("--arrive-by <time>", "find the latest departure that arrives by then, be it after --to")
    .option(
      "--refine",
      "find the bests to the minute; with speeds, also each route's of least use and fastest",
    )
    .addOption(
      new Option("--format <format>", "what to write").choices(["table", "csv", "json"]).default("table"),
    )
    .addOption(
      new Option("--units <units>", "of the table (default: by the craft)").choices(["sea", "air", "metric"]),
    )
    .option("--out <file>", "write there, not to standard output")
    .addHelpText(
      "after",
      ending([
        "legwork window demo/islands.plan.json --from 2027-05-04T06:00Z \\",
        "    --to 2027-05-04T18:00Z --every 30min --speeds 6kn,8kn --refine",
        "legwork window demo/islands-decide.plan.json --arrive-by 2027-05-04T17:30Z",
      ]),
    )
    .action(async (plan: string, options: WindowOptions) => {
      const { windowCommand } = await import("./window-command.ts");
      settle(await windowCommand(plan, options));
    });
}

function addInspect(program: Command, settle: Settle): void {
  program
    .command("inspect")
    .summary("what a field file holds")
    .description(
      "Says what a field file holds: axes, spacing, times, coverage, gaps, ranges, ignored columns, memory.",
    )
    .argument("<field>", "gridded wind or current (*.csv)", nameOf("a file"))
    .addOption(new Option("--role <role>", "what the file is of").choices(["wind", "current"]))
    .option("--map <axis=header>", "a column by its own header, as lon=longitude (repeatable)", collect)
    .addOption(new Option("--format <format>", "what to write").choices(["text", "json"]).default("text"))
    .addHelpText(
      "after",
      ending([
        "legwork inspect demo/islands-current.csv --role current",
        "legwork inspect wind.csv --map lon=x --map lat=y --format json",
      ]),
    )
    .action(async (field: string, options: InspectOptions) => {
      const { inspectCommand } = await import("./inspect-command.ts");
      settle(await inspectCommand(field, options));
    });
}

function addCheck(program: Command, settle: Settle): void {
  program
    .command("check")
    .summary("read and check everything that a plan names")
    .description("Reads and checks a plan and everything that it names, and computes nothing.")
    .argument("<plan>", "plan file (*.plan.json)", nameOf("a file"))
    .addHelpText("after", ending(["legwork check demo/islands.plan.json"]))
    .action(async (plan: string) => {
      const { checkCommand } = await import("./check-command.ts");
      settle(await checkCommand(plan));
    });
}

function addDemo(program: Command, settle: Settle): void {
  program
    .command("demo")
    .summary("write the demo plans with their craft and fields")
    .description(
      "Writes the demo plans with their craft and fields into a folder; a file of other content is left alone.",
    )
    .argument("<folder>", "where to; made if it is not there", nameOf("a folder"))
    .addHelpText("after", ending(["legwork demo demo"]))
    .action(async (folder: string) => {
      const { demoCommand } = await import("./demo-command.ts");
      settle(await demoCommand(folder));
    });
}

/** The command line; an action loads its own part of the program, so that nothing waits for what it does not use. */
export function buildProgram(settle: Settle): Command {
  const program: Command = new Command("legwork")
    .description("Passage and flight legs against gridded wind and current: time, use, what is left.")
    .version(version, "-V, --version", "print the version")
    .helpOption("-h, --help", "print this help")
    .helpCommand(false)
    .usage("<command> [options]")
    .exitOverride()
    .configureOutput({
      getOutHelpWidth: () => HELP_WIDTH,
      getErrHelpWidth: () => HELP_WIDTH,
      outputError: (text, write) => write(usageLine(text)),
    })
    .allowExcessArguments(false);
  addEstimate(program, settle);
  addWindow(program, settle);
  addInspect(program, settle);
  addCheck(program, settle);
  addDemo(program, settle);
  program.commands.forEach(refuseSlips);
  return program.addHelpText(
    "after",
    ending([
      "legwork demo demo",
      "legwork estimate demo/islands.plan.json",
      "legwork inspect demo/islands-current.csv --role current",
    ]),
  );
}
