import fc from "fast-check";

// One seed for everybody, so that a red run is red for the next person too; another is tried with FAST_CHECK_SEED=n.
fc.configureGlobal({ seed: Number(process.env["FAST_CHECK_SEED"] ?? 20261201) });
