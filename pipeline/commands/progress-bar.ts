import cliProgress from "cli-progress";

/** The steps of a long command, in order, with the share of the work done when each starts. */
const STEPS: Readonly<Record<string, number>> = {
  read: 0,
  identify: 25,
  normalise: 32,
  group: 42,
  fit: 45,
  screen: 65,
  rule: 72,
  grade: 75,
  write: 78,
};

/** Work shorter than this shows no bar, ms. */
const PATIENCE = 1000;

/** A bar on standard error that names the step at work; it appears once a command has run for a second. */
export interface ProgressBar {
  readonly show: (step: string) => void;
  readonly clear: () => void;
}

/** Makes a bar; nothing is drawn before the first step that starts after a second. */
export function createProgressBar(): ProgressBar {
  const bar = new cliProgress.SingleBar({
    format: "{bar} {step}",
    clearOnComplete: true,
    hideCursor: true,
    barCompleteChar: "=",
    barIncompleteChar: ".",
    barsize: 30,
    stream: process.stderr,
  });
  let drawn = false;
  return {
    show: (step) => {
      if (performance.now() < PATIENCE) return;
      if (!drawn) bar.start(100, 0, { step });
      drawn = true;
      bar.update(STEPS[step] ?? 0, { step });
    },
    clear: () => {
      if (drawn) bar.stop();
      drawn = false;
    },
  };
}
