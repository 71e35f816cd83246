import { execFileSync } from "node:child_process";
import { describe, expect, test } from "vitest";
import { createProgram } from "../../pipeline/commands/command-line.ts";
import { completionScript, SHELLS } from "../../pipeline/commands/completion.ts";

const program = createProgram("0.0.0", async () => {});

/** What bash offers for a line whose last word is being typed. */
function offered(...words: readonly string[]): string[] {
  const script = `${completionScript(program, "bash")}
COMP_WORDS=(${words.map((word) => `'${word}'`).join(" ")})
COMP_CWORD=${words.length - 1}
_saltern
printf '%s\\n' "\${COMPREPLY[@]}"`;
  return execFileSync("bash", ["-c", script], { encoding: "utf8" }).trim().split("\n");
}

describe("the completion for bash", () => {
  test("offers the commands that begin as typed", () => {
    expect(offered("saltern", "me")).toEqual(["merge"]);
    expect(offered("saltern", "co")).toEqual(["compare", "convert", "completion"]);
  });

  test("offers the options of the command, and no other's", () => {
    expect(offered("saltern", "merge", "--")).toEqual(["--json", "--quiet", "--log", "--out", "--no-report", "--help"]);
    expect(offered("saltern", "check", "--l")).toEqual(["--log", "--like"]);
  });
});

test.each(SHELLS)("the completion for %s names every command", (shell) => {
  const script = completionScript(program, shell);
  for (const command of program.commands) expect(script).toContain(command.name());
});
