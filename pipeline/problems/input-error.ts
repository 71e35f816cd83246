import type { Problem } from "./catalogue.ts";

/** Raised when input cannot be used at all; `problem` says where, why and how to mend it. */
export class InputError extends Error {
  readonly problem: Problem;
  constructor(problem: Problem) {
    super(problem.found);
    this.name = "InputError";
    this.problem = problem;
  }
}
