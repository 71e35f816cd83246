#!/usr/bin/env node
import { closeSync, openSync, readFileSync, writeSync } from "node:fs";
import { Command, CommanderError, Option } from "commander";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./commands/terminal.ts";
import { formatProblem, type Problem } from "./problems/catalogue.ts";

const version = (JSON.parse(readFileSync(new URL("../package.json", import.meta.url), "utf8")) as { version: string })
  .version;

const cleanUps: (() => void)[] = [];

/** The terminal behind one run: --quiet silences messages, --log keeps a copy of them. */
function openTerminal({ quiet, log }: CommonOptions): Terminal {
  const logFile = log === undefined ? undefined : openSync(log, "a");
  if (logFile !== undefined) process.on("exit", () => closeSync(logFile));
  const watched = process.stderr.isTTY === true && quiet !== true;
  let shown = false;
  const clear = () => {
    if (shown) process.stderr.write("\r\u001b[K");
    shown = false;
  };
  return {
    print: (text) => {
      clear();
      process.stdout.write(`${text}\n`);
    },
    tell: (text) => {
      clear();
      if (logFile !== undefined) writeSync(logFile, `${text}\n`);
      if (quiet !== true) process.stderr.write(`${text}\n`);
    },
    progress: (done) => {
      if (!watched) return;
      process.stderr.write(`\r\u001b[K${done}`);
      shown = true;
    },
    onInterrupt: (cleanUp) => cleanUps.push(cleanUp),
  };
}

/** Runs a command and turns what it throws into a message and an exit code; a stack trace is never shown. */
async function run(options: CommonOptions, command: (terminal: Terminal) => Promise<ExitCode>): Promise<void> {
  let terminal: Terminal;
  try {
    terminal = openTerminal(options);
  } catch (error) {
    process.stderr.write(`the log file cannot be written: ${(error as Error).message}\n`);
    process.exitCode = Exit.failed;
    return;
  }
  try {
    process.exitCode = await command(terminal);
  } catch (error) {
    const found = (error as { problem?: Problem }).problem;
    if (found === undefined) {
      const { name, message } = error as Error;
      terminal.tell(`a fault in saltern itself, please report it with the command you gave: ${name}: ${message}`);
      process.exitCode = Exit.failed;
    } else {
      terminal.tell(formatProblem(found));
      process.exitCode = (error as Error).constructor.name === "OutputError" ? Exit.failed : Exit.badInput;
    }
  } finally {
    for (const cleanUp of cleanUps.splice(0)) cleanUp();
  }
}

process.on("SIGINT", () => {
  for (const cleanUp of cleanUps.splice(0)) cleanUp();
  process.exit(Exit.interrupted);
});
for (const stream of [process.stdout, process.stderr]) {
  // A reader that went away (`saltern merge ... | head`) is no fault worth a message.
  stream.on("error", (error: NodeJS.ErrnoException) => {
    if (error.code === "EPIPE") process.exit(process.exitCode ?? Exit.done);
    throw error;
  });
}

const EXIT_CODES = `
Exit codes: 0 done; 1 done, and something needs you; 2 not done: usage or unreadable input;
3 not done: output could not be written, or a fault of ours; 130 interrupted.`;

/** Adds a command with the options that every command has. */
function addCommand(program: Command, usage: string, summary: string): Command {
  return program
    .command(usage)
    .description(summary)
    .option("--json", "print the result as JSON on standard output")
    .option("--quiet", "no messages on standard error")
    .option("--log <file>", "append messages to a file as well")
    .addHelpText("after", EXIT_CODES);
}

const program = new Command("saltern")
  .description("Curates solubility data: merges measurements, checks new data for outliers, publishes a vetted table.")
  .version(version, "--version")
  .helpCommand(false)
  .exitOverride()
  .configureOutput({ outputError: (text, write) => write(text) })
  .addHelpText(
    "after",
    `
Start here:
  saltern new my-collection                       a collection with a worked example
  saltern merge my-collection --out my-tables     read, check, fit, write tables and a report
  saltern check new.csv --collection my-collection --like example-2026-gravimetry
${EXIT_CODES}`,
  );

addCommand(program, "new <dir>", "start a collection with a worked example").action(
  (dir: string, options: CommonOptions) =>
    run(options, async (terminal) => (await import("./commands/new.ts")).newCollection(dir, options, terminal)),
);

addCommand(
  program,
  "merge <collection>",
  "read, check, normalise, group, fit and screen; write the tables and the report",
)
  .requiredOption("--out <dir>", "folder for the tables; replaced as a whole")
  .option("--no-report", "write no HTML report")
  .addHelpText("after", "\nExample: saltern merge datasets/demo --out reports/demo-merge")
  .action((collection: string, options: CommonOptions & { out: string; report: boolean }) =>
    run(options, async (terminal) =>
      (await import("./commands/merge.ts")).merge(collection, { ...options, version }, terminal),
    ),
  );

addCommand(program, "check <file>", "a verdict on every row of a new table; the collection is not changed")
  .requiredOption("--collection <dir>", "the collection to check against")
  .addOption(new Option("--card <file>", "source card of the new table").conflicts("like"))
  .addOption(
    new Option("--like <source>", "read the table with the card of this source of the collection").conflicts("card"),
  )
  .addHelpText("after", "\nWithout --card or --like the card beside the file (NAME.source.json) is used.")
  .action((file: string, options: CommonOptions & { collection: string; card?: string; like?: string }) =>
    run(options, async (terminal) =>
      (await import("./commands/check.ts")).check(file, { ...options, version }, terminal),
    ),
  );

addCommand(program, "convert <value-and-unit>", "convert one value, with its uncertainty, every step and assumption")
  .requiredOption("--to <unit>", "unit wanted, such as 'mole fraction' or 'g/100 g solvent'")
  .requiredOption("--solute <name>", "solute: a name, formula or registry number of the tables")
  .requiredOption("--solvent <name>", "solvent: a name or registry number of the tables")
  .requiredOption("--temperature <value>", "temperature with its unit, such as '25 °C' or '298.15 K'")
  .option("--uncertainty <u>", "uncertainty of the value, in its unit, or relative to it, such as '3 %'")
  .option("--uncertainty-kind <kind>", "standard (default) | expanded | range | standard deviation")
  .option("--coverage-factor <k>", "of an expanded uncertainty; 2 where none is given")
  .option("--n <n>", "number of replicates behind a standard deviation")
  .option("--solid-form <form>", "solid form in equilibrium, such as 'pentahydrate'")
  .option("--solute-basis <basis>", "anhydrous | hydrate per added solvent | hydrate equivalent per total solvent")
  .option("--solution-density <density>", "measured density of the solution, such as '1.05 g/mL'; kg/m3 without a unit")
  .option("--volume-temperature <value>", "temperature of the volume, where it is not 20 °C (solvent) or --temperature")
  .option("--collection <dir>", "use this collection's own substances as well")
  .addHelpText(
    "after",
    `
Example: saltern convert "31.6 g/100 g solvent" --to "mole fraction" --solute KNO3 --solvent water --temperature "20 °C"
A negative value follows two dashes: saltern convert --to x --solute ... -- "-2.3 log10(mol/L)"`,
  )
  .action(
    (value: string, options: CommonOptions & { to: string; solute: string; solvent: string; temperature: string }) =>
      run(options, async (terminal) => (await import("./commands/convert.ts")).convert(value, options, terminal)),
  );

try {
  await program.parseAsync();
} catch (error) {
  if (!(error instanceof CommanderError)) throw error;
  process.exitCode = error.exitCode === 0 ? Exit.done : Exit.badInput;
}
