/** What a problem stops: one reading, the whole source, the whole command, or nothing (a notice). */
export type Stops = "reading" | "source" | "command" | "nothing";

/** One entry of the catalogue: everything that is the same wherever the problem occurs. */
export interface Kind {
  readonly stops: Stops;
  /** What is wrong, in one sentence. */
  readonly meaning: string;
  /** What the program expected instead; a problem may say it more precisely. */
  readonly expected: string;
  /** What a person can do about it; a problem may say it more precisely. */
  readonly mend: string;
}
