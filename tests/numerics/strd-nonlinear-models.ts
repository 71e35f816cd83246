/**
 * Model functions of the NIST StRD nonlinear regression sets, as printed in the data files
 * (www.itl.nist.gov/div898/strd/nls/nls_main.shtml): fitted value for parameters b and a row of predictors x.
 */
export type StrdModel = (b: ArrayLike<number>, x: readonly number[]) => number;

const { exp, log, atan, cos, sin, PI } = Math;

type Parameters = [number, number, number, number, number, number, number, number, number];
const named = (f: (b: Parameters, x: number, x2: number) => number): StrdModel => {
  return (b, x) => f(b as unknown as Parameters, x[0]!, x[1] ?? Number.NaN);
};

const saturation = named(([b1, b2], x) => b1 * (1 - exp(-b2 * x)));
const chwirut = named(([b1, b2, b3], x) => exp(-b1 * x) / (b2 + b3 * x));
const lanczos = named(([b1, b2, b3, b4, b5, b6], x) => b1 * exp(-b2 * x) + b3 * exp(-b4 * x) + b5 * exp(-b6 * x));
const gauss = named(
  ([b1, b2, b3, b4, b5, b6, b7, b8], x) =>
    b1 * exp(-b2 * x) + b3 * exp(-((x - b4) ** 2) / b5 ** 2) + b6 * exp(-((x - b7) ** 2) / b8 ** 2),
);
const cubicRatio = named(
  ([b1, b2, b3, b4, b5, b6, b7], x) =>
    (b1 + b2 * x + b3 * x ** 2 + b4 * x ** 3) / (1 + b5 * x + b6 * x ** 2 + b7 * x ** 3),
);

export const strdModels: Readonly<Record<string, StrdModel>> = {
  Misra1a: saturation,
  Misra1b: named(([b1, b2], x) => b1 * (1 - (1 + (b2 * x) / 2) ** -2)),
  Misra1c: named(([b1, b2], x) => b1 * (1 - (1 + 2 * b2 * x) ** -0.5)),
  Misra1d: named(([b1, b2], x) => b1 * b2 * x * (1 + b2 * x) ** -1),
  Chwirut1: chwirut,
  Chwirut2: chwirut,
  DanWood: named(([b1, b2], x) => b1 * x ** b2),
  Lanczos1: lanczos,
  Lanczos2: lanczos,
  Lanczos3: lanczos,
  Gauss1: gauss,
  Gauss2: gauss,
  Gauss3: gauss,
  Kirby2: named(([b1, b2, b3, b4, b5], x) => (b1 + b2 * x + b3 * x ** 2) / (1 + b4 * x + b5 * x ** 2)),
  Hahn1: cubicRatio,
  Thurber: cubicRatio,
  Nelson: named(([b1, b2, b3], x, x2) => b1 - b2 * x * exp(-b3 * x2)),
  MGH17: named(([b1, b2, b3, b4, b5], x) => b1 + b2 * exp(-x * b4) + b3 * exp(-x * b5)),
  Roszman1: named(([b1, b2, b3, b4], x) => b1 - b2 * x - atan(b3 / (x - b4)) / PI),
  ENSO: named(([b1, b2, b3, b4, b5, b6, b7, b8, b9], x) => {
    const month = 2 * PI * x;
    const year = b2 * cos(month / 12) + b3 * sin(month / 12);
    return b1 + year + b5 * cos(month / b4) + b6 * sin(month / b4) + b8 * cos(month / b7) + b9 * sin(month / b7);
  }),
  MGH09: named(([b1, b2, b3, b4], x) => (b1 * (x ** 2 + x * b2)) / (x ** 2 + x * b3 + b4)),
  BoxBOD: saturation,
  Rat42: named(([b1, b2, b3], x) => b1 / (1 + exp(b2 - b3 * x))),
  MGH10: named(([b1, b2, b3], x) => b1 * exp(b2 / (x + b3))),
  Eckerle4: named(([b1, b2, b3], x) => (b1 / b2) * exp(-0.5 * ((x - b3) / b2) ** 2)),
  Rat43: named(([b1, b2, b3, b4], x) => b1 / (1 + exp(b2 - b3 * x)) ** (1 / b4)),
  Bennett5: named(([b1, b2, b3], x) => b1 * (b2 + x) ** (-1 / b3)),
};

/** The response as the model predicts it: Nelson's is the natural logarithm of the printed one. */
export function strdResponse(name: string, y: number): number {
  return name === "Nelson" ? log(y) : y;
}
