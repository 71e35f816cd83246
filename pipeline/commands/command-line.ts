import { Argument, Command, Option } from "commander";
import { completionScript, SHELLS, type Shell } from "./completion.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

/** Runs a command with a terminal opened for its options. */
export type Run = (options: CommonOptions, command: (terminal: Terminal) => Promise<ExitCode>) => Promise<void>;

/** Stands under the help of every command. */
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

/** The command line: every command with its arguments, options and help. Each loads its own file when it is called. */
export function createProgram(version: string, run: Run): Command {
  const program = new Command("saltern")
    .description(
      "Curates solubility data: merges measurements, checks new data for outliers, publishes a vetted table.",
    )
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
      run(options, async (terminal) => (await import("./new.ts")).newCollection(dir, options, terminal)),
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
        (await import("./merge.ts")).merge(collection, { ...options, version }, terminal),
      ),
    );

  addCommand(program, "rule <collection> [target] [action]", "write down a decision: keep, set aside, correct or ask")
    .option("--by <name>", "who decides: a name or role")
    .option("--reason <text>", "why")
    .option("--evidence <text>", "notebook page, author's reply, erratum or measurement repeated; needed for correct")
    .option("--corrected-value <value>", "value in place of the reported one, for correct")
    .option("--corrected-unit <unit>", "unit in place of the reported one, for correct")
    .option("--date <date>", "date of the decision, YYYY-MM-DD (default: today)")
    .addHelpText(
      "after",
      `
The target is the id of a flag or measurement, a block (SOURCE@SYSTEM) or a source; ids stand in flags.csv. What is not
given is asked for at a terminal. A system that meets every criterion is confirmed by keep on recommended@SYSTEM.
Example: saltern rule my-collection off-curve@bench:21 "set aside" --by "data steward" --reason "cold filter"`,
    )
    .action((collection: string, target: string | undefined, action: string | undefined, options: CommonOptions) =>
      run(options, async (terminal) =>
        (await import("./rule.ts")).rule(
          collection,
          {
            ...options,
            ...(target === undefined ? {} : { target }),
            ...(action === undefined ? {} : { action }),
            version,
          },
          terminal,
        ),
      ),
    );

  addCommand(
    program,
    "publish <collection>",
    "write a numbered, checksummed edition, once every blocking flag has a ruling",
  )
    .requiredOption("--edition <name>", "name of the edition, such as 2026-1")
    .requiredOption("--out <dir>", "folder that holds the editions; DIR/EDITION is written and never overwritten")
    .option("--since <dir>", "folder of an earlier edition: CHANGES.md tells what changed since")
    .option("--date <date>", "date of the edition, YYYY-MM-DD (default: the newest among source cards and rulings)")
    .option("--no-report", "write no HTML report")
    .action((collection: string, options: CommonOptions & { edition: string; out: string; report: boolean }) =>
      run(options, async (terminal) =>
        (await import("./publish.ts")).publish(collection, { ...options, version }, terminal),
      ),
    );

  addCommand(program, "compare <old> <new>", "what changed between two editions, in chemist's terms").action(
    (old: string, now: string, options: CommonOptions) =>
      run(options, async (terminal) => (await import("./compare.ts")).compare(old, now, options, terminal)),
  );

  addCommand(
    program,
    "show <collection> <system>",
    "one system in the terminal: small plot, curve, flags, who measured it",
  )
    .addHelpText(
      "after",
      `
SYSTEM: an id, a part of one that fits one system alone, or "solute in solvent".
Example: saltern show datasets/demo "benzoic acid in toluene"`,
    )
    .action((collection: string, system: string, options: CommonOptions) =>
      run(options, async (terminal) =>
        (await import("./show.ts")).show(collection, system, { ...options, version }, terminal),
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
      run(options, async (terminal) => (await import("./check.ts")).check(file, { ...options, version }, terminal)),
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
    .option(
      "--solution-density <density>",
      "measured density of the solution, such as '1.05 g/mL'; kg/m3 without a unit",
    )
    .option(
      "--volume-temperature <value>",
      "temperature of the volume, where it is not 20 °C (solvent) or --temperature",
    )
    .option("--collection <dir>", "use this collection's own substances as well")
    .addHelpText(
      "after",
      `
Example: saltern convert "31.6 g/100 g solvent" --to "mole fraction" --solute KNO3 --solvent water --temperature "20 °C"
A negative value follows two dashes: saltern convert --to x --solute ... -- "-2.3 log10(mol/L)"`,
    )
    .action(
      (value: string, options: CommonOptions & { to: string; solute: string; solvent: string; temperature: string }) =>
        run(options, async (terminal) => (await import("./convert.ts")).convert(value, options, terminal)),
    );
  program
    .command("completion")
    .description("print a script that completes commands and options in a shell")
    .addArgument(new Argument("<shell>").choices(SHELLS))
    .addHelpText("after", `\nExample: saltern completion bash >> ~/.bashrc${EXIT_CODES}`)
    .action((shell: Shell) =>
      run({}, async (terminal) => {
        terminal.print(completionScript(program, shell).trimEnd());
        return Exit.done;
      }),
    );

  return program;
}
