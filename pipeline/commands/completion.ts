import type { Command } from "commander";

/** Shells a completion can be written for. */
export const SHELLS = ["bash", "zsh", "fish"] as const;
export type Shell = (typeof SHELLS)[number];

/** Long options of one command. */
function optionsOf(command: Command): string[] {
  return [...command.options.map(({ long }) => long), "--help"].filter((long) => typeof long === "string");
}

/** Completion for bash: commands first, then the options of the command, else files. */
function bashScript(program: Command): string {
  const cases = program.commands.map(
    (command) =>
      `        ${command.name()}) COMPREPLY=($(compgen -W "${optionsOf(command).join(" ")}" -- "$current"));;`,
  );
  return `_saltern() {
  local current=\${COMP_WORDS[COMP_CWORD]} command=\${COMP_WORDS[1]}
  if [ "$COMP_CWORD" -eq 1 ]; then
    COMPREPLY=($(compgen -W "${program.commands.map((command) => command.name()).join(" ")} --help --version" -- "$current"))
    return
  fi
  case $current in
    -*)
      case $command in
${cases.join("\n")}
      esac;;
    *) COMPREPLY=($(compgen -f -- "$current"));;
  esac
}
complete -o filenames -F _saltern saltern
`;
}

/** A text in single quotes for fish. */
const quoted = (text: string): string => `'${text.replaceAll("\\", "\\\\").replaceAll("'", "\\'")}'`;

function fishScript(program: Command): string {
  const lines = program.commands.flatMap((command) => [
    `complete -c saltern -n __fish_use_subcommand -f -a ${command.name()} -d ${quoted(command.description())}`,
    ...command.options.map(
      ({ long, description }) =>
        `complete -c saltern -n '__fish_seen_subcommand_from ${command.name()}' -l ${long?.slice(2)} -d ${quoted(description)}`,
    ),
  ]);
  return `${lines.join("\n")}\n`;
}

/**
 * Script that completes the commands and options of a program in a shell; made from the program itself, so that the two
 * cannot part. Zsh reads the one for bash.
 */
export function completionScript(program: Command, shell: Shell): string {
  if (shell === "fish") return fishScript(program);
  const start = shell === "zsh" ? "autoload -U +X bashcompinit && bashcompinit\n" : "";
  return start + bashScript(program);
}
