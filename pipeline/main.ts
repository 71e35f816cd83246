#!/usr/bin/env node
import { closeSync, openSync, readFileSync, writeSync } from "node:fs";
import { CommanderError } from "commander";
import { createProgram } from "./commands/command-line.ts";
import type { ProgressBar } from "./commands/progress-bar.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./commands/terminal.ts";
import { formatProblem, type Problem } from "./problems/catalogue.ts";

const version = (JSON.parse(readFileSync(new URL("../package.json", import.meta.url), "utf8")) as { version: string })
  .version;

const cleanUps: (() => void)[] = [];

/** The terminal behind one run: --quiet silences messages, --log keeps a copy of them. */
function openTerminal({ quiet, log }: CommonOptions, bar: ProgressBar | undefined): Terminal {
  const logFile = log === undefined ? undefined : openSync(log, "a");
  if (logFile !== undefined) process.on("exit", () => closeSync(logFile));
  const clear = () => bar?.clear();
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
    progress: (step) => bar?.show(step),
    ...(process.stdin.isTTY === true && process.stderr.isTTY === true ? { ask } : {}),
    onInterrupt: (cleanUp) => cleanUps.push(cleanUp),
  };
}

/** Asks a person at the terminal; the answer trimmed, "" at the end of input. */
async function ask(question: string): Promise<string> {
  const { createInterface } = await import("node:readline");
  const reader = createInterface({ input: process.stdin, output: process.stderr });
  return new Promise((resolve) => {
    reader.on("SIGINT", () => process.kill(process.pid, "SIGINT"));
    reader.on("close", () => resolve(""));
    reader.question(question, (answer) => {
      resolve(answer.trim());
      reader.close();
    });
  });
}

/** Runs a command and turns what it throws into a message and an exit code; a stack trace is never shown. */
async function run(options: CommonOptions, command: (terminal: Terminal) => Promise<ExitCode>): Promise<void> {
  const watched = process.stderr.isTTY === true && options.quiet !== true;
  const bar = watched ? (await import("./commands/progress-bar.ts")).createProgressBar() : undefined;
  if (bar) cleanUps.push(bar.clear);
  let terminal: Terminal;
  try {
    terminal = openTerminal(options, bar);
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

for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const) {
  process.on(signal, () => {
    for (const cleanUp of cleanUps.splice(0)) cleanUp();
    process.exit(Exit.interrupted);
  });
}
for (const stream of [process.stdout, process.stderr]) {
  // A reader that went away (`saltern merge ... | head`) is no fault worth a message.
  stream.on("error", (error: NodeJS.ErrnoException) => {
    if (error.code === "EPIPE") process.exit(process.exitCode ?? Exit.done);
    throw error;
  });
}

try {
  await createProgram(version, run).parseAsync();
} catch (error) {
  if (!(error instanceof CommanderError)) throw error;
  process.exitCode = error.exitCode === 0 ? Exit.done : Exit.badInput;
}
