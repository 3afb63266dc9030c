import { CommanderError } from "commander";
import { messageLine } from "./message.ts";
import { buildProgram, COMMANDS } from "./program.ts";

/** Bad input or usage. */
const STATUS_INPUT = 2;
/** A defect of the program itself: EX_SOFTWARE of sysexits.h. */
const STATUS_DEFECT = 70;

/** A reader that closes its end, as `head` does, ends the program without a word. */
function endQuietlyOnClosedPipe(): void {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on("error", (fault: NodeJS.ErrnoException) => {
      if (fault.code !== "EPIPE") throw fault;
      process.exit();
    });
  }
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
  endQuietlyOnClosedPipe();
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
