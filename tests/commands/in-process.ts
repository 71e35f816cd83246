import { CommanderError } from "commander";
import { createProgram } from "../../pipeline/commands/command-line.ts";
import { here } from "./ruled-collection.ts";
import type { Run } from "./saltern.ts";

/**
 * Runs the command line in this process: its arguments are read as main.ts has them read, and a fault that is no
 * problem of input or output is thrown. Much quicker than the built command, for what does not ask whether that one
 * starts; --quiet and --log, working folder and environment need a process of their own.
 */
export async function inProcess(arguments_: readonly string[]): Promise<Run> {
  const text = { stdout: "", stderr: "" };
  let ended: Run | undefined;
  const program = createProgram("0.1.0", async ({ quiet, log }, command) => {
    if (quiet !== undefined || log !== undefined) throw new Error("--quiet and --log belong to main.ts");
    ended = await here(command);
  });
  for (const each of [program, ...program.commands]) {
    each.configureOutput({
      writeOut: (piece) => {
        text.stdout += piece;
      },
      writeErr: (piece) => {
        text.stderr += piece;
      },
    });
  }
  try {
    await program.parseAsync(arguments_, { from: "user" });
  } catch (error) {
    if (!(error instanceof CommanderError)) throw error;
    return { code: error.exitCode === 0 ? 0 : 2, ...text };
  }
  if (ended === undefined) throw new Error(`no command was run by ${arguments_.join(" ")}`);
  return ended;
}
