export { relativeRounding as roundingOf } from "../numerics/decimal-rounding.ts";
