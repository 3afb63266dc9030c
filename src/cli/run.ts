import { CommanderError } from "commander";
import { messageLine } from "./message.ts";
import { buildProgram } from "./program.ts";
import { COMMANDS } from "./usage.ts";

/** Bad input or usage. */
const STATUS_INPUT = 2;
/** A defect of the program itself: EX_SOFTWARE of sysexits.h. */
const STATUS_DEFECT = 70;

/** A reader that closes its end, as `head` does, ends the program without a word; a full disk does so with one. */
function endOnFailedWrite(): void {
  process.stderr.on("error", () => process.exit(STATUS_INPUT));
  process.stdout.on("error", (fault: NodeJS.ErrnoException) => {
    if (fault.code === "EPIPE") process.exit();
    process.stderr.write(messageLine(`standard output cannot be written: the system answers ${fault.code}`));
    process.exit(STATUS_INPUT);
  });
}

function report(fault: unknown): number {
  if (fault instanceof CommanderError) {
    // Help and version come this way too; what was wrong has been written by then.
    return fault.exitCode === 0 ? 0 : STATUS_INPUT;
  }
  if (fault instanceof Error && fault.name === "InputError") {
    process.stderr.write(messageLine(fault.message));
    return STATUS_INPUT;
  }
  const stack = fault instanceof Error ? (fault.stack ?? fault.message) : String(fault);
  process.stderr.write(
    `legwork: a defect in Legwork itself, not in your files; please report it:\n${stack}\n`,
  );
  return STATUS_DEFECT;
}

/** Runs one command line (without the program's own name) and gives its exit status. */
export async function run(argv: readonly string[]): Promise<number> {
  endOnFailedWrite();
  let status = 0;
  const program = buildProgram((outcome) => {
    status = outcome;
  });
  try {
    if (argv.length === 0) program.error(`error: a command is needed: ${COMMANDS}`);
    await program.parseAsync(argv, { from: "user" });
    return status;
  } catch (fault) {
    return report(fault);
  }
}
