/** The package has no types of its own; its parts have. */
declare module "ml-regression" {
  export const MultivariateLinearRegression: typeof import("ml-regression-multivariate-linear");
}
