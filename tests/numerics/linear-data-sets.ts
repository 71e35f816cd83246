/**
 * Data and certified values of linear data sets, from the NIST/ITL Statistical Reference Datasets, Linear Least Squares
 * Regression (www.itl.nist.gov/div898/strd/lls/lls.shtml).
 */
export interface LinearDataSet {
  readonly name: string;
  /** Rows of the design, constant term included. */
  readonly rows: readonly (readonly number[])[];
  readonly response: readonly number[];
  readonly coefficients: readonly number[];
  readonly standardDeviations: readonly number[];
}

const norrisX = [
  0.2, 337.4, 118.2, 884.6, 10.1, 226.5, 666.3, 996.3, 448.6, 777, 558.2, 0.4, 0.6, 775.5, 666.9, 338, 447.5, 11.6, 556,
  228.1, 995.8, 887.6, 120.2, 0.3, 0.3, 556.8, 339.1, 887.2, 999, 779, 11.1, 118.3, 229.2, 669.1, 448.9, 0.5,
];
const norrisY = [
  0.1, 338.8, 118.1, 888, 9.2, 228.1, 668.5, 998.5, 449.1, 778.9, 559.2, 0.3, 0.1, 778.1, 668.8, 339.3, 448.9, 10.8,
  557.7, 228.3, 998, 888.8, 119.6, 0.3, 0.6, 557.6, 339.3, 888, 998.5, 778.9, 10.2, 117.6, 228.9, 668.4, 449.2, 0.2,
];

/** Lower difficulty; ozone monitors. */
export const norris: LinearDataSet = {
  name: "Norris",
  rows: norrisX.map((x) => [1, x]),
  response: norrisY,
  coefficients: [-0.262323073774029, 1.00211681802045],
  standardDeviations: [0.232818234301152, 0.429796848199937e-3],
};

const longleyTable = [
  [60323, 83, 234289, 2356, 1590, 107608, 1947],
  [61122, 88.5, 259426, 2325, 1456, 108632, 1948],
  [60171, 88.2, 258054, 3682, 1616, 109773, 1949],
  [61187, 89.5, 284599, 3351, 1650, 110929, 1950],
  [63221, 96.2, 328975, 2099, 3099, 112075, 1951],
  [63639, 98.1, 346999, 1932, 3594, 113270, 1952],
  [64989, 99, 365385, 1870, 3547, 115094, 1953],
  [63761, 100, 363112, 3578, 3350, 116219, 1954],
  [66019, 101.2, 397469, 2904, 3048, 117388, 1955],
  [67857, 104.6, 419180, 2822, 2857, 118734, 1956],
  [68169, 108.4, 442769, 2936, 2798, 120445, 1957],
  [66513, 110.8, 444546, 4681, 2637, 121950, 1958],
  [68655, 112.6, 482704, 3813, 2552, 123366, 1959],
  [69564, 114.2, 502601, 3931, 2514, 125368, 1960],
  [69331, 115.7, 518173, 4806, 2572, 127852, 1961],
  [70551, 116.9, 554894, 4007, 2827, 130081, 1962],
];

/** Higher difficulty, nearly collinear; J. W. Longley, J. Am. Stat. Assoc. 62 (1967) 819-841. */
export const longley: LinearDataSet = {
  name: "Longley",
  rows: longleyTable.map((row) => [1, ...row.slice(1)]),
  response: longleyTable.map((row) => row[0]!),
  coefficients: [
    -3482258.63459582, 15.0618722713733, -0.035819179292591, -2.02022980381683, -1.03322686717359, -0.0511041056535807,
    1829.15146461355,
  ],
  standardDeviations: [
    890420.383607373, 84.9149257747669, 0.0334910077722432, 0.488399681651699, 0.214274163161675, 0.22607320006937,
    455.478499142212,
  ],
};

const wamplerRows = Array.from({ length: 21 }, (_, x) => [1, x, x ** 2, x ** 3, x ** 4, x ** 5]);
const wamplerSum = wamplerRows.map((row) => row.reduce((sum, term) => sum + term, 0));
const wamplerNoise = [
  759, -2048, 2048, -2048, 2523, -2048, 2048, -2048, 1838, -2048, 2048, -2048, 1838, -2048, 2048, -2048, 2523, -2048,
  2048, -2048, 759,
];
const wamplerSds = [
  2152.3262467817, 2363.55173469681, 779.343524331583, 101.47550755035, 5.64566512170752, 0.112324854679312,
];

function wampler(name: string, noise: number): LinearDataSet {
  return {
    name,
    rows: wamplerRows,
    response: wamplerSum.map((y, i) => y + noise * wamplerNoise[i]!),
    coefficients: [1, 1, 1, 1, 1, 1],
    standardDeviations: wamplerSds.map((sd) => noise * sd),
  };
}

/** Higher difficulty, x = 0 to 20, degree 5; R. H. Wampler, J. Am. Stat. Assoc. 65 (1970) 549-565. */
export const wamplerSets: readonly LinearDataSet[] = [
  wampler("Wampler1", 0),
  {
    name: "Wampler2",
    rows: wamplerRows,
    response: wamplerRows.map((row) => row.reduce((sum, term, j) => sum + term * 10 ** (5 - j), 0) / 1e5),
    coefficients: [1, 0.1, 0.01, 0.001, 0.0001, 0.00001],
    standardDeviations: [0, 0, 0, 0, 0, 0],
  },
  wampler("Wampler3", 1),
  wampler("Wampler4", 100),
  wampler("Wampler5", 10000),
];
