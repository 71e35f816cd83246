/** What a command may do with the outside world besides files: print results, print messages, know if a person watches. */
export interface Terminal {
  /** Results, on standard output. */
  readonly print: (text: string) => void;
  /** Messages and problems, on standard error; silent with --quiet. */
  readonly tell: (text: string) => void;
  /** Names the step now at work, on a bar once a command has run for a second; nothing off a terminal. */
  readonly progress: (step: string) => void;
  /** Asks a person and gives the answer, trimmed; absent where nobody sits at the terminal. */
  readonly ask?: (question: string) => Promise<string>;
  /** Called when the user interrupts the command, to remove temporary files. */
  readonly onInterrupt: (cleanUp: () => void) => void;
}

/** Exit codes, the same for every command. */
export const Exit = {
  /** Done. */
  done: 0,
  /** Done, and something needs a person: refused readings or source, flags in check. */
  needsYou: 1,
  /** Not done: usage, or unreadable input. */
  badInput: 2,
  /** Not done: output could not be written, or a fault of ours. */
  failed: 3,
  interrupted: 130,
} as const;
export type ExitCode = (typeof Exit)[keyof typeof Exit];

/** Options that every command has. */
export interface CommonOptions {
  readonly json?: boolean;
  readonly quiet?: boolean;
  readonly log?: string;
}
